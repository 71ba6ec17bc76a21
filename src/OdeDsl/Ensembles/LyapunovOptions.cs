namespace OdeDsl.Ensembles;

/// <summary>How long and how finely to follow a motion for its Lyapunov exponents.</summary>
public sealed record LyapunovOptions
{
    /// <summary>How many exponents, the largest first; 0 for one for each state.</summary>
    public int Count { get; init; }

    /// <summary>The time left out at the start so that the motion reaches its attractor; <see langword="null"/>: a tenth of the duration.</summary>
    public double? Transient { get; init; }

    /// <summary>The time averaged over; <see langword="null"/>: 50 000 of the motion's own short times (see <see cref="Interval"/>).</summary>
    public double? Duration { get; init; }

    /// <summary>
    /// The time between two orthonormalisations; <see langword="null"/>: the motion's own short time, the reciprocal of the mean norm
    /// of its Jacobian in scaled states, so that no tangent loses more than a digit or two between two of them.
    /// </summary>
    public double? Interval { get; init; }

    /// <summary>The number of batches whose scatter gives the uncertainty; at least 5.</summary>
    public int Batches { get; init; } = 20;

    /// <summary>The relative tolerance of the integration.</summary>
    public double RelativeTolerance { get; init; } = 1e-9;

    internal static void Validate(LyapunovOptions options, int stateCount)
    {
        if (options.Count < 0 || options.Count > stateCount)
            throw new ArgumentOutOfRangeException(nameof(options), options.Count, $"Count must lie between 0 and the number of states, {stateCount}.");
        if (options.Transient is { } transient && !(transient >= 0 && double.IsFinite(transient)))
            throw new ArgumentOutOfRangeException(nameof(options), transient, "Transient must be a finite time, not negative.");
        if (options.Duration is { } duration && !(duration > 0 && double.IsFinite(duration)))
            throw new ArgumentOutOfRangeException(nameof(options), duration, "Duration must be a finite, positive time.");
        if (options.Interval is { } interval && !(interval > 0 && double.IsFinite(interval)))
            throw new ArgumentOutOfRangeException(nameof(options), interval, "Interval must be a finite, positive time.");
        if (options.Batches < 5)
            throw new ArgumentOutOfRangeException(nameof(options), options.Batches, "Batches must be at least 5; fewer give no uncertainty worth the name.");
        if (!(options.RelativeTolerance is > 0 and <= 1e-2))
            throw new ArgumentOutOfRangeException(nameof(options), options.RelativeTolerance, "RelativeTolerance must be positive and at most 0.01.");
    }
}
