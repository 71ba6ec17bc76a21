using System.Collections.Immutable;
using OdeDsl.Equilibria;

namespace OdeDsl.Cycles;

/// <summary>
/// The limit cycles and families of closed orbits a search found, and what its runs did. What was not found may still exist.
/// </summary>
public sealed record LimitCycleSearchResult
{
    /// <summary>The distinct limit cycles, in the order in which they were found: stable ones first.</summary>
    public required ImmutableArray<LimitCycle> Cycles { get; init; }

    /// <summary>The families of closed orbits.</summary>
    public required ImmutableArray<OrbitFamily> Families { get; init; }

    /// <summary>The equilibria the search used.</summary>
    public required ImmutableArray<Equilibrium> Equilibria { get; init; }

    /// <summary>Every run, forward ones first.</summary>
    public required ImmutableArray<SearchRun> Runs { get; init; }

    /// <summary>What was searched, what was found and how much that says.</summary>
    public required string Text { get; init; }
}
