namespace OdeDsl.Modeling;

/// <summary>The one implementation of <see cref="DynamicSystem"/>: forwards to the static members of the equations.</summary>
internal sealed partial class BoundSystem<TSystem>(ModelDescription description, double[] parameters, double[] initialState)
    : DynamicSystem(description, parameters, initialState)
    where TSystem : struct, IOdeSystem
{
    public override TResult Apply<TResult>(ISystemOperation<TResult> operation)
    {
        ArgumentNullException.ThrowIfNull(operation);
        return operation.Run<TSystem>(this);
    }

    public override void Rates(double time, ReadOnlySpan<double> state, Span<double> rates) =>
        TSystem.Rates(time, state, Parameters, rates);

    public override void Rates(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> rates) =>
        TSystem.Rates(time, state, Parameters, regime, rates);

    public override void Regime(double time, ReadOnlySpan<double> state, Span<double> regime) =>
        TSystem.Regime(time, state, Parameters, regime);

    public override void StateJacobian(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> jacobian) =>
        TSystem.StateJacobian(time, state, Parameters, regime, jacobian);

    public override void ParameterJacobian(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> jacobian) =>
        TSystem.ParameterJacobian(time, state, Parameters, regime, jacobian);

    public override void TimeDerivative(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> derivative) =>
        TSystem.TimeDerivative(time, state, Parameters, regime, derivative);

    public override void Observables(double time, ReadOnlySpan<double> state, Span<double> values) =>
        TSystem.Observables(time, state, Parameters, values);

    public override void SwitchingFunctions(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> values) =>
        TSystem.SwitchingFunctions(time, state, Parameters, regime, values);

    public override void SwitchingJacobian(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> jacobian) =>
        TSystem.SwitchingJacobian(time, state, Parameters, regime, jacobian);

    public override void SwitchingTimeDerivative(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> derivative) =>
        TSystem.SwitchingTimeDerivative(time, state, Parameters, regime, derivative);

    private protected override DynamicSystem Rebind(double[] newParameters, double[] newInitialState) =>
        new BoundSystem<TSystem>(Description, newParameters, newInitialState);
}
