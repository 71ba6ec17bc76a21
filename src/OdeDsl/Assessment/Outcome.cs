namespace OdeDsl.Assessment;

/// <summary>The share of the sampled starts that ended in one way.</summary>
public sealed record Outcome
{
    /// <summary>What these motions do.</summary>
    public required MotionKind Kind { get; init; }

    /// <summary>The index of the equilibrium, limit cycle or family they end at; otherwise <see langword="null"/>.</summary>
    public int? Index { get; init; }

    /// <summary>A short name of where they end: "rest 1", "cycle 2", "runs away", ...</summary>
    public required string Label { get; init; }

    /// <summary>The number of sampled starts that ended so.</summary>
    public required int Starts { get; init; }

    /// <summary>Their share of all sampled starts, 0 to 1.</summary>
    public required double Share { get; init; }

    /// <summary>The lower end of the 95 % confidence interval of the share (Wilson 1927).</summary>
    public required double ShareLower { get; init; }

    /// <summary>The upper end of the 95 % confidence interval of the share (Wilson 1927).</summary>
    public required double ShareUpper { get; init; }

    /// <summary>One of these starts, in the order of the state vector.</summary>
    public required IReadOnlyList<double> ExampleStart { get; init; }
}
