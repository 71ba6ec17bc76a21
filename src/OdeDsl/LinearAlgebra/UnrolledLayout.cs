using System.Collections.Immutable;

namespace OdeDsl.LinearAlgebra;

/// <summary>Where an unrolled elimination keeps its numbers.</summary>
/// <param name="Length">
/// The number of places: first the entries of the state Jacobian's pattern in its order, then diagonal entries it lacks, then entries that
/// appear during the elimination.
/// </param>
/// <param name="DiagonalPlaces">For each row the place of its diagonal entry.</param>
public sealed record UnrolledLayout(int Length, ImmutableArray<int> DiagonalPlaces);
