using OdeDsl.Cycles;
using OdeDsl.Ensembles;

namespace OdeDsl.Assessment;

/// <summary>The second answer: whether the system keeps moving, how strongly and how fast.</summary>
public sealed record MotionsAnswer
{
    /// <summary>What the model does from its own state.</summary>
    public required MotionVerdict Working { get; init; }

    /// <summary>Where the sampled starts, spread evenly over the state bounds, end: most frequent first.</summary>
    public required IReadOnlyList<Outcome> Outcomes { get; init; }

    /// <summary>The limit cycles found, stable and unstable, by ascending period.</summary>
    public required IReadOnlyList<LimitCycle> Cycles { get; init; }

    /// <summary>The families of closed orbits found.</summary>
    public required IReadOnlyList<OrbitFamily> Families { get; init; }

    /// <summary>The Lyapunov exponents of the irregular or undecided motion that was examined; <see langword="null"/> if there was none.</summary>
    public LyapunovResult? Exponents { get; init; }

    /// <summary>How many starts were sampled.</summary>
    public required int SampledStarts { get; init; }

    /// <summary>What was searched, and how much that says.</summary>
    public required string Completeness { get; init; }
}
