using System.Collections.Immutable;

namespace OdeDsl.Equilibria;

/// <summary>
/// A continuum of equilibria, as a conserved quantity or dry friction makes it; one member stands for it in the search result.
/// </summary>
/// <param name="Dimension">The number of directions in which the continuum extends.</param>
/// <param name="Points">
/// For a line: members from one end to the other (an end is the bounds of the search, the edge of a sliding segment or a place where
/// the line stops being regular). Closed lines end where they began. For a larger dimension: the representative only.
/// </param>
public sealed record EquilibriumSet(int Dimension, ImmutableArray<ImmutableArray<double>> Points);
