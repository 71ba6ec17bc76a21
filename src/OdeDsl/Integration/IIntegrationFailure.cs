namespace OdeDsl.Integration;

/// <summary>
/// What every failed integration tells. <see cref="IntegrationException"/> carries it for failures proper;
/// <see cref="IntegrationCanceledException"/> carries it for a cancelled run.
/// </summary>
public interface IIntegrationFailure
{
    /// <summary>Why the integration ended.</summary>
    IntegrationFailure Reason { get; }

    /// <summary>The time reached.</summary>
    double Time { get; }

    /// <summary>The size of the step last tried, signed, in units of time.</summary>
    double Step { get; }

    /// <summary>The state at <see cref="Time"/>.</summary>
    IReadOnlyList<double> State { get; }

    /// <summary>The run up to <see cref="Time"/>; <see langword="null"/> if the caller did not record one.</summary>
    Trajectory? Partial { get; }
}
