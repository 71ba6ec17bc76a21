namespace OdeDsl.Modeling;

/// <summary>The one implementation of <see cref="DynamicSystem"/>: forwards to the static members of the equations.</summary>
internal sealed partial class BoundSystem<TSystem>(
    ModelDescription description, double[] constants, double[] initialState, InputSignals? signals = null, bool isOfRun = false)
    : DynamicSystem(description, constants, initialState, signals, isOfRun)
    where TSystem : struct, IOdeSystem
{
    public override TResult Apply<TResult>(ISystemOperation<TResult> operation)
    {
        ArgumentNullException.ThrowIfNull(operation);
        return operation.Run<TSystem>(this);
    }

    public override void Rates(double time, ReadOnlySpan<double> state, Span<double> rates) =>
        TSystem.Rates(time, state, ConstantsAt(time), rates);

    public override void Rates(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> rates) =>
        TSystem.Rates(time, state, ConstantsAt(time), regime, rates);

    public override void Regime(double time, ReadOnlySpan<double> state, Span<double> regime) =>
        TSystem.Regime(time, state, ConstantsAt(time), regime);

    public override void StateJacobian(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> jacobian) =>
        TSystem.StateJacobian(time, state, ConstantsAt(time), regime, jacobian);

    public override void ParameterJacobian(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> jacobian) =>
        TSystem.ParameterJacobian(time, state, ConstantsAt(time), regime, jacobian);

    public override void TimeDerivative(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> derivative) =>
        TSystem.TimeDerivative(time, state, ConstantsAt(time, withSlopes: true), regime, derivative);

    public override void Observables(double time, ReadOnlySpan<double> state, Span<double> values) =>
        TSystem.Observables(time, state, ConstantsAt(time), values);

    public override void SwitchingFunctions(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> values) =>
        TSystem.SwitchingFunctions(time, state, ConstantsAt(time), regime, values);

    public override void SwitchingJacobian(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> jacobian) =>
        TSystem.SwitchingJacobian(time, state, ConstantsAt(time), regime, jacobian);

    public override void SwitchingTimeDerivative(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> derivative) =>
        TSystem.SwitchingTimeDerivative(time, state, ConstantsAt(time, withSlopes: true), regime, derivative);

    internal override void EventGuards(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> values) =>
        TSystem.EventGuards(time, state, ConstantsAt(time), regime, values);

    internal override void EventGuardJacobian(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> jacobian) =>
        TSystem.EventGuardJacobian(time, state, ConstantsAt(time), regime, jacobian);

    internal override void EventGuardTimeDerivative(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> derivative) =>
        TSystem.EventGuardTimeDerivative(time, state, ConstantsAt(time, withSlopes: true), regime, derivative);

    internal override void EventActions(double time, ReadOnlySpan<double> state, Span<double> values) =>
        TSystem.EventActions(time, state, ConstantsAt(time), values);

    internal override void EventActionJacobian(double time, ReadOnlySpan<double> state, Span<double> jacobian) =>
        TSystem.EventActionJacobian(time, state, ConstantsAt(time), jacobian);

    internal override void EventActionTimeDerivative(double time, ReadOnlySpan<double> state, Span<double> derivative) =>
        TSystem.EventActionTimeDerivative(time, state, ConstantsAt(time, withSlopes: true), derivative);

    private protected override DynamicSystem Rebind(double[] constants, double[] state, InputSignals? signals, bool ofRun) =>
        new BoundSystem<TSystem>(Description, constants, state, signals, ofRun);
}
