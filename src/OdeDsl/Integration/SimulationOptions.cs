namespace OdeDsl.Integration;

/// <summary>How to simulate.</summary>
public sealed record SimulationOptions : IntegrationOptions
{
    /// <summary>The time at which the run starts, with the system's initial state.</summary>
    public double From { get; init; }
}
