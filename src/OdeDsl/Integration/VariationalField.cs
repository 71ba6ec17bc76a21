using OdeDsl.LinearAlgebra;

namespace OdeDsl.Integration;

/// <summary>
/// A field together with k tangents carried by its linearisation: y = (x, v₁, ..., vₖ) with x' = f(t, x) and vᵢ' = ∂f/∂x · vᵢ
/// (variational equation; Hairer, Norsett and Wanner, Solving ODEs I, section I.14).
/// </summary>
internal readonly struct VariationalField<TField>(TField inner, int tangentCount) : IVectorField
    where TField : struct, IVectorField
{
    private readonly TField inner = inner;
    private readonly double[] jacobian = new double[inner.LargestJacobian];

    public int Dimension => inner.Dimension * (1 + tangentCount);

    public int BlockSize => inner.Dimension;

    public JacobianStructure Structure => inner.Structure;

    public int LargestJacobian => inner.LargestJacobian;

    public bool DependsOnTime => inner.DependsOnTime;

    public void Rates(double time, ReadOnlySpan<double> y, Span<double> rates)
    {
        int n = inner.Dimension;
        inner.Rates(time, y[..n], rates[..n]);
        inner.Jacobian(time, y[..n], jacobian);
        for (int c = 1; c <= tangentCount; c++) inner.Structure.Multiply(jacobian, y.Slice(c * n, n), rates.Slice(c * n, n));
    }

    public void TimeDerivative(double time, ReadOnlySpan<double> y, double scale, Span<double> derivative) =>
        inner.TimeDerivative(time, y[..inner.Dimension], scale, derivative);

    public void DirectionalDerivative(double time, ReadOnlySpan<double> y, ReadOnlySpan<double> direction, Span<double> product) =>
        inner.DirectionalDerivative(time, y[..inner.Dimension], direction, product);

    public void Jacobian(double time, ReadOnlySpan<double> y, Span<double> jacobian) =>
        inner.Jacobian(time, y[..inner.Dimension], jacobian);
}
