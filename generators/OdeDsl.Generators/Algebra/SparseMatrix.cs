using System.Collections.Generic;

namespace OdeDsl.Generators.Algebra;

/// <summary>A matrix of expressions: only the entries that are not identically zero.</summary>
/// <param name="Rows">The number of rows.</param>
/// <param name="Columns">The number of columns.</param>
/// <param name="Entries">The entries by rows, columns ascending within a row.</param>
internal sealed record SparseMatrix(int Rows, int Columns, IReadOnlyList<MatrixEntry> Entries);

/// <summary>One entry of a <see cref="SparseMatrix"/>.</summary>
internal readonly record struct MatrixEntry(int Row, int Column, int Node);
