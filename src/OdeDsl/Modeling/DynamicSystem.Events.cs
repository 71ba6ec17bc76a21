namespace OdeDsl.Modeling;

/// <content>Events, for runs.</content>
public abstract partial class DynamicSystem
{
    /// <inheritdoc cref="IOdeSystem.EventGuards"/>
    internal abstract void EventGuards(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> values);

    /// <inheritdoc cref="IOdeSystem.EventGuardJacobian"/>
    internal abstract void EventGuardJacobian(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> jacobian);

    /// <inheritdoc cref="IOdeSystem.EventGuardTimeDerivative"/>
    internal abstract void EventGuardTimeDerivative(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> derivative);

    /// <inheritdoc cref="IOdeSystem.EventActions"/>
    internal abstract void EventActions(double time, ReadOnlySpan<double> state, Span<double> values);

    /// <inheritdoc cref="IOdeSystem.EventActionJacobian"/>
    internal abstract void EventActionJacobian(double time, ReadOnlySpan<double> state, Span<double> jacobian);

    /// <inheritdoc cref="IOdeSystem.EventActionTimeDerivative"/>
    internal abstract void EventActionTimeDerivative(double time, ReadOnlySpan<double> state, Span<double> derivative);

    /// <summary>Sets the modes of a system made for a run.</summary>
    internal void SetModes(ReadOnlySpan<double> modes) => modes.CopyTo(Constants.AsSpan(ParameterCount, Description.Modes.Length));
}
