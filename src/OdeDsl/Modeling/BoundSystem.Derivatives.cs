namespace OdeDsl.Modeling;

/// <content>Products with the Jacobian, and derivatives of higher order.</content>
internal sealed partial class BoundSystem<TSystem>
{
    public override bool HasHigherDerivatives => TSystem.HasGenericForms;

    public override void StateJacobianValues(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> values) =>
        TSystem.StateJacobianValues(time, state, ConstantsAt(time), regime, values);

    public override void ParameterJacobianValues(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> values) =>
        TSystem.ParameterJacobianValues(time, state, ConstantsAt(time), regime, values);

    public override void JacobianVectorProduct(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, ReadOnlySpan<double> direction, Span<double> product) =>
        TSystem.JacobianVectorProduct(time, state, ConstantsAt(time), regime, direction, product);

    public override void SecondDerivative(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, ReadOnlySpan<double> u, ReadOnlySpan<double> v, Span<double> result) =>
        HigherDerivatives<TSystem>.Second(At(time, state, regime), Direction(u), Direction(v), result[..StateCount]);

    public override void ThirdDerivative(
        double time,
        ReadOnlySpan<double> state,
        ReadOnlySpan<double> regime,
        ReadOnlySpan<double> u,
        ReadOnlySpan<double> v,
        ReadOnlySpan<double> w,
        Span<double> result) =>
        HigherDerivatives<TSystem>.Third(At(time, state, regime), Direction(u), Direction(v), Direction(w), result[..StateCount]);

    public override void MixedDerivative(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, ReadOnlySpan<double> u, ReadOnlySpan<double> q, Span<double> result) =>
        HigherDerivatives<TSystem>.Mixed(At(time, state, regime), Direction(u), q[..ParameterCount], result[..StateCount]);

    private HigherDerivatives<TSystem>.Place At(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime) =>
        new(time, state[..StateCount], ConstantsAt(time), regime);

    private ReadOnlySpan<double> Direction(ReadOnlySpan<double> direction) => direction[..StateCount];
}
