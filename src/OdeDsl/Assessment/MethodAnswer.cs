using OdeDsl.Integration;

namespace OdeDsl.Assessment;

/// <summary>The fourth answer: which integration method computes the model's motion best.</summary>
public sealed record MethodAnswer
{
    /// <summary>How <see cref="MethodMeasurement.Work"/> is counted.</summary>
    public const string WorkRule =
        "one unit per evaluation of the rates, n/2 (at least 1) per Jacobian, n^2/8 + n per factorisation and n/4 per Newton iteration, for n states";

    /// <summary>The recommended method; <see langword="null"/> if none reached the wanted accuracy.</summary>
    public IntegrationMethod? Recommended { get; init; }

    /// <summary>The relative tolerance recommended with it.</summary>
    public double? RelativeTolerance { get; init; }

    /// <summary>The reason, with its numbers; no timings, so that it is the same on every machine.</summary>
    public required string Reason { get; init; }

    /// <summary>What the measured times say about the recommendation; empty if they were not measured. Varies from run to run.</summary>
    public string TimingRemark { get; init; } = "";

    /// <summary>The error that the recommended setting must not exceed, relative to each state's range.</summary>
    public required double WantedError { get; init; }

    /// <summary>The length of the motion measured, in the model's unit of time, from the model's own state.</summary>
    public required double Duration { get; init; }

    /// <summary>What the errors are measured against.</summary>
    public required string Reference { get; init; }

    /// <summary>All measurements, by method and then from loose to tight.</summary>
    public required IReadOnlyList<MethodMeasurement> Measurements { get; init; }
}
