using System.Collections.Immutable;

namespace OdeDsl.Equilibria;

/// <summary>How thoroughly to search for equilibria.</summary>
public sealed record EquilibriumSearchOptions
{
    /// <summary>
    /// The number of starts made at least in each searched regime; 0 chooses 32 per state, between 64 and 512. The search goes on while
    /// the latter half of the starts still finds new equilibria.
    /// </summary>
    public int MinimumStarts { get; init; }

    /// <summary>The number of starts after which the search of a regime ends in any case.</summary>
    public int MaximumStarts { get; init; } = 4096;

    /// <summary>
    /// The largest number of regimes that are searched one by one; a model that shows more is searched along its own regimes only.
    /// </summary>
    public int MaximumRegimes { get; init; } = 64;

    /// <summary>Chooses the low-discrepancy sequence's shift: equal seeds give equal results.</summary>
    public int Seed { get; init; } = 1;

    /// <summary>
    /// States to start from besides the initial state, for example where long runs ended. Each needs one value per state.
    /// </summary>
    public ImmutableArray<ImmutableArray<double>> ExtraStarts { get; init; } = [];
}
