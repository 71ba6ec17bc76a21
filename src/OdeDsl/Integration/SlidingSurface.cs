namespace OdeDsl.Integration;

/// <summary>The surface a motion slides on, if it does.</summary>
internal sealed class SlidingSurface
{
    public bool IsActive { get; private set; }

    public void Rates(double time, ReadOnlySpan<double> y, Span<double> rates) => throw new NotSupportedException();

    public void DirectionalDerivative(double time, ReadOnlySpan<double> y, ReadOnlySpan<double> direction, Span<double> product) =>
        throw new NotSupportedException();

    public void Jacobian(double time, ReadOnlySpan<double> y, Span<double> jacobian) => throw new NotSupportedException();
}
