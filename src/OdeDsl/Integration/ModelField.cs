using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>A model's rates within the regime that <see cref="Motion"/> holds locked, or along the surface it slides on.</summary>
internal readonly struct ModelField<TSystem>(int stateCount, double[] parameters, double[] regime, SlidingSurface sliding) : IVectorField
    where TSystem : struct, IOdeSystem
{
    public int Dimension => stateCount;

    public int BlockSize => stateCount;

    public void Rates(double time, ReadOnlySpan<double> y, Span<double> rates)
    {
        if (sliding.IsActive) sliding.Rates(time, y, rates);
        else TSystem.Rates(time, y, parameters, regime, rates);
    }

    public void DirectionalDerivative(double time, ReadOnlySpan<double> y, ReadOnlySpan<double> direction, Span<double> product)
    {
        if (sliding.IsActive) sliding.DirectionalDerivative(time, y, direction, product);
        else TSystem.JacobianVectorProduct(time, y, parameters, regime, direction, product);
    }

    public void Jacobian(double time, ReadOnlySpan<double> y, Span<double> jacobian)
    {
        if (sliding.IsActive) sliding.Jacobian(time, y, jacobian);
        else TSystem.StateJacobian(time, y, parameters, regime, jacobian);
    }
}
