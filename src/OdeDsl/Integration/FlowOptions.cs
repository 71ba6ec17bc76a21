namespace OdeDsl.Integration;

/// <summary>How a <see cref="Flow"/> integrates. The tolerances are tighter than those of a simulation: analyses differentiate its results.</summary>
public sealed record FlowOptions : IntegrationOptions
{
    /// <inheritdoc/>
    public override double RelativeTolerance { get; init; } = 1e-9;
}
