namespace OdeDsl.Ensembles;

/// <summary>Lyapunov exponents of one motion, largest first.</summary>
public sealed record LyapunovResult
{
    /// <summary>The exponents, largest first.</summary>
    public required IReadOnlyList<LyapunovExponent> Exponents { get; init; }

    /// <summary>The time the exponents are averaged over, without the transient.</summary>
    public required double Duration { get; init; }

    /// <summary>The number of batches the uncertainty is taken from.</summary>
    public required int Batches { get; init; }

    /// <summary>The mean over the motion of the divergence of the rates: the sum of all exponents of the exact motion.</summary>
    public required double MeanDivergence { get; init; }

    /// <summary>The state at the end of the run, on the unrolled line.</summary>
    public required IReadOnlyList<double> FinalState { get; init; }

    /// <summary>How many times the rates were evaluated.</summary>
    public required long RateEvaluations { get; init; }

    /// <summary>The largest exponent.</summary>
    public LyapunovExponent Largest => Exponents[0];

    /// <summary>The sum of the exponents that were computed.</summary>
    public double Sum => Exponents.Sum(static exponent => exponent.Value);
}
