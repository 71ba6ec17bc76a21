using OdeDsl.Ensembles;

namespace OdeDsl.Assessment;

/// <summary>What one motion does in the long run, and why the assessment says so.</summary>
public sealed record MotionVerdict
{
    /// <summary>What it does.</summary>
    public required MotionKind Kind { get; init; }

    /// <summary>
    /// Where it ends: the index of the equilibrium (<see cref="MotionKind.Settles"/>), of the limit cycle
    /// (<see cref="MotionKind.Oscillates"/>, <see cref="MotionKind.Rotates"/>) or of the family (<see cref="MotionKind.ClosedOrbits"/>);
    /// otherwise <see langword="null"/>.
    /// </summary>
    public int? Index { get; init; }

    /// <summary>A short name of where it ends: "rest 1", "cycle 2", "family 1", "runs away", ...</summary>
    public required string Label { get; init; }

    /// <summary>The verdict as one sentence with its numbers.</summary>
    public required string Text { get; init; }

    /// <summary>What was computed to say so, a sentence each.</summary>
    public required IReadOnlyList<string> Evidence { get; init; }

    /// <summary>The largest Lyapunov exponent where one was computed.</summary>
    public LyapunovExponent? Exponent { get; init; }

    /// <summary>The time the motion was followed, in the model's unit of time.</summary>
    public required double Duration { get; init; }
}
