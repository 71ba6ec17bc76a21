using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace OdeDsl.Scalars;

/// <summary>Series up to the eighth order, in two <see cref="Vector256{T}"/> and a double: the order of Taylor methods.</summary>
public readonly struct Order8 : IJetOrder<Order8>
{
    private readonly Vector256<double> low;
    private readonly Vector256<double> high;
    private readonly double eighth;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private Order8(Vector256<double> low, Vector256<double> high, double eighth)
    {
        this.low = low;
        this.high = high;
        this.eighth = eighth;
    }

    /// <inheritdoc/>
    public static int Order => 8;

    /// <inheritdoc/>
    public double Value
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => low.ToScalar();
    }

    /// <inheritdoc/>
    public bool IsConstant =>
        eighth == 0
        && Vector256.EqualsAll(high, Vector256<double>.Zero)
        && Vector256.EqualsAll(low.WithElement(0, 0), Vector256<double>.Zero);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Order8 Constant(double value) => new(Vector256.CreateScalar(value), Vector256<double>.Zero, 0);

    /// <inheritdoc/>
    public static Order8 Load(ReadOnlySpan<double> coefficients) =>
        new(Vector256.Create(coefficients), Vector256.Create(coefficients[4..]), coefficients[8]);

    /// <inheritdoc/>
    public void CopyTo(Span<double> coefficients)
    {
        coefficients[8] = eighth;
        high.CopyTo(coefficients[4..]);
        low.CopyTo(coefficients);
    }

    /// <inheritdoc/>
    public Order8 WithValue(double value) => new(low.WithElement(0, value), high, eighth);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Order8 operator +(Order8 left, Order8 right) =>
        new(left.low + right.low, left.high + right.high, left.eighth + right.eighth);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Order8 operator -(Order8 left, Order8 right) =>
        new(left.low - right.low, left.high - right.high, left.eighth - right.eighth);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Order8 operator -(Order8 series) => new(-series.low, -series.high, -series.eighth);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Order8 operator *(Order8 left, Order8 right) => new(
        SeriesVectors.MultiplyLow(left.low, right.low),
        SeriesVectors.MultiplyHigh(left.low, left.high, right.low, right.high),
        (left.Value * right.eighth) + (left.eighth * right.Value)
            + SeriesVectors.MultiplyEighth(left.low, left.high, right.low, right.high));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Order8 operator *(Order8 series, double factor)
    {
        Vector256<double> factors = Vector256.Create(factor);
        return new(series.low * factors, series.high * factors, series.eighth * factor);
    }

    /// <inheritdoc/>
    public static Order8 operator /(Order8 left, Order8 right)
    {
        double value = left.Value / right.Value, scale = 1 / right.Value;
        Vector256<double> scales = Vector256.Create(scale);
        Vector256<double> bLow = right.low * scales, bHigh = right.high * scales;
        Vector256<double> low = SeriesVectors.DivideByMonic((left.low * scales).WithElement(0, value), bLow);
        Vector256<double> high = SeriesVectors.DivideByMonic(
            (left.high * scales) - SeriesVectors.Overlap(low, bLow, bHigh), bLow);
        double eighth = (left.eighth * scale) - (value * (right.eighth * scale)) - SeriesVectors.MultiplyEighth(low, high, bLow, bHigh);
        return new(low.WithElement(0, value), high, eighth);
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Order8 operator /(Order8 series, double divisor)
    {
        Vector256<double> divisors = Vector256.Create(divisor);
        return new(series.low / divisors, series.high / divisors, series.eighth / divisor);
    }
}
