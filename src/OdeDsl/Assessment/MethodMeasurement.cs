using OdeDsl.Integration;

namespace OdeDsl.Assessment;

/// <summary>One integration method at one tolerance, measured on the model's own motion.</summary>
public sealed record MethodMeasurement
{
    /// <summary>The method.</summary>
    public required IntegrationMethod Method { get; init; }

    /// <summary>The relative tolerance asked for.</summary>
    public required double RelativeTolerance { get; init; }

    /// <summary>
    /// The largest error over the motion and the states against the reference, relative to the range each state passes through; NaN if
    /// the integration failed.
    /// </summary>
    public required double Error { get; init; }

    /// <summary>What the integration cost; <see langword="null"/> if it failed.</summary>
    public IntegrationStatistics? Statistics { get; init; }

    /// <summary>
    /// The cost in units of one evaluation of the rates, from the counts alone (see <see cref="MethodAnswer.WorkRule"/>): the same on
    /// every machine. NaN if the integration failed.
    /// </summary>
    public required double Work { get; init; }

    /// <summary>The median wall time of the repeated runs; <see langword="null"/> if not measured. Varies from run to run.</summary>
    public TimeSpan? WallTime { get; init; }

    /// <summary>The bytes allocated by one run, its recorded trajectory included; <see langword="null"/> if not measured.</summary>
    public long? AllocatedBytes { get; init; }

    /// <summary>Why the integration failed; empty if it did not.</summary>
    public string Failure { get; init; } = "";
}
