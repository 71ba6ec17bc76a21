using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace OdeDsl.Scalars;

/// <summary>Series up to the third order, in one <see cref="Vector256{T}"/>: directional first, second and third derivatives.</summary>
public readonly struct Order3 : IJetOrder<Order3>
{
    private readonly Vector256<double> coefficients;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private Order3(Vector256<double> coefficients) => this.coefficients = coefficients;

    /// <inheritdoc/>
    public static int Order => 3;

    /// <inheritdoc/>
    public double Value
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => coefficients.ToScalar();
    }

    /// <inheritdoc/>
    public bool IsConstant => Vector256.EqualsAll(coefficients.WithElement(0, 0), Vector256<double>.Zero);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Order3 Constant(double value) => new(Vector256.CreateScalar(value));

    /// <inheritdoc/>
    public static Order3 Load(ReadOnlySpan<double> coefficients) => new(Vector256.Create(coefficients));

    /// <inheritdoc/>
    public void CopyTo(Span<double> coefficients) => this.coefficients.CopyTo(coefficients);

    /// <inheritdoc/>
    public Order3 WithValue(double value) => new(coefficients.WithElement(0, value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Order3 operator +(Order3 left, Order3 right) => new(left.coefficients + right.coefficients);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Order3 operator -(Order3 left, Order3 right) => new(left.coefficients - right.coefficients);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Order3 operator -(Order3 series) => new(-series.coefficients);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Order3 operator *(Order3 left, Order3 right) => new(SeriesVectors.MultiplyLow(left.coefficients, right.coefficients));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Order3 operator *(Order3 series, double factor) => new(series.coefficients * Vector256.Create(factor));

    /// <inheritdoc/>
    public static Order3 operator /(Order3 left, Order3 right)
    {
        double value = left.Value / right.Value;
        Vector256<double> inverse = Vector256.Create(1 / right.Value);
        Vector256<double> start = (left.coefficients * inverse).WithElement(0, value);
        return new Order3(SeriesVectors.DivideByMonic(start, right.coefficients * inverse)).WithValue(value);
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Order3 operator /(Order3 series, double divisor) => new(series.coefficients / Vector256.Create(divisor));
}
