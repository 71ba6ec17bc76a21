using System.Collections.Generic;

namespace OdeDsl.Generators.Algebra;

/// <summary>The derivatives of rows that have one formula, by all states or all parameters.</summary>
/// <param name="Scalars">Those by single quantities, columns ascending.</param>
/// <param name="Vectors">Those by elements of vectors, vectors ascending.</param>
internal sealed record JacobianRow(IReadOnlyList<(int Column, int Node)> Scalars, IReadOnlyList<VectorColumns> Vectors);

/// <summary>The derivatives by elements of one vector.</summary>
/// <param name="Vector">The vector.</param>
/// <param name="IsDense">Whether they may be any of its elements, because the rows add up over it; then the entries are added to zeros.</param>
/// <param name="Entries">The derivatives; unless dense, in the order of the elements and each of another element.</param>
internal sealed record VectorColumns(int Vector, bool IsDense, IReadOnlyList<ElementEntry> Entries);

/// <summary>The derivative by an element.</summary>
/// <param name="Access">The element.</param>
/// <param name="Loops">The loops in which it appears, from the outside in, each with a factor to compute outside of it.</param>
/// <param name="Node">The innermost factor.</param>
internal sealed record ElementEntry(int Access, IReadOnlyList<(int Symbol, int Factor)> Loops, int Node);
