using System.Collections.Immutable;
using OdeDsl.Equilibria;

namespace OdeDsl.Cycles;

/// <summary>How thoroughly to search for limit cycles.</summary>
public sealed record LimitCycleSearchOptions
{
    /// <summary>The tightest tolerance double precision can serve with a margin.</summary>
    public const double SmallestClosingTolerance = 1e-13;

    /// <summary>The loosest tolerance whose multipliers still mean something.</summary>
    public const double LargestClosingTolerance = 1e-6;

    /// <summary>The number of starts spread over the state bounds, besides the initial state and those near unstable equilibria.</summary>
    public int SpreadStarts { get; init; } = 8;

    /// <summary>The largest number of integration steps of one run.</summary>
    public int MaximumStepsPerRun { get; init; } = 20_000;

    /// <summary>Whether to search models of two states for unstable cycles by running time backwards.</summary>
    public bool ReverseTime { get; init; } = true;

    /// <summary>The relative tolerance with which orbits are closed.</summary>
    public double ClosingTolerance { get; init; } = 1e-11;

    /// <summary>Chooses the low-discrepancy sequence's shift: equal seeds give equal results.</summary>
    public int Seed { get; init; } = 1;

    /// <summary>The equilibria, if already known; otherwise the search finds them first.</summary>
    public ImmutableArray<Equilibrium>? Equilibria { get; init; }

    /// <summary>States to start from besides the initial state. Each needs one value per state.</summary>
    public ImmutableArray<ImmutableArray<double>> ExtraStarts { get; init; } = [];
}
