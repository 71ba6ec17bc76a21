using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace OdeDsl.Scalars;

/// <summary>
/// Arithmetic on intervals held as (−lower, upper), so that both bounds round up. Operands obey the rule of <see cref="Interval"/>:
/// lower is below +∞ and upper above −∞, or both are NaN (empty).
/// </summary>
internal static class IntervalArithmetic<TRounding>
    where TRounding : struct, IUpwardRounding
{
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Add(Vector128<double> left, Vector128<double> right) => TRounding.Finish(TRounding.Sum(left, right));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Subtract(Vector128<double> left, Vector128<double> right) => Add(left, Negate(right));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Negate(Vector128<double> value) => Vector128.Shuffle(value, Vector128.Create(1L, 0L));

    /// <summary>The largest of the four products of bounds, of either sign.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Multiply(Vector128<double> left, Vector128<double> right)
    {
        // Zero for bounded operands, NaN otherwise.
        Vector128<double> zero = Vector128.FusedMultiplyAdd(left, Vector128<double>.Zero, right * Vector128<double>.Zero);
        if (!Vector128.EqualsAll(zero, zero)) return MultiplyUnbounded(left, right);
        Vector128<double> lower = Vector128.Shuffle(left, Vector128.Create(0L, 0L));
        Vector128<double> upper = Vector128.Shuffle(left, Vector128.Create(1L, 1L));
        Vector128<double> swapped = Negate(right);
        Vector128<double> largest = Vector128.MaxNative(
            Vector128.MaxNative(TRounding.Product(lower, swapped), TRounding.Product(upper, right)),
            Vector128.MaxNative(TRounding.Product(-lower, right), TRounding.Product(-upper, swapped)));
        return TRounding.Finish(largest);
    }

    /// <summary>The product with a number that is neither zero nor infinite: two products instead of eight.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Scale(Vector128<double> value, double factor) => TRounding.Finish(factor > 0
        ? TRounding.Product(value, Vector128.Create(factor))
        : TRounding.Product(Negate(value), Vector128.Create(-factor)));

    /// <summary>The quotient; the whole line where the denominator contains zero.</summary>
    public static Vector128<double> Divide(Vector128<double> left, Vector128<double> right)
    {
        if (right[1] < 0) (left, right) = (Negate(left), Negate(right));
        if (!(right[0] < 0))
        {
            // Zero is in the denominator, or one of the operands is empty.
            bool empty = double.IsNaN(left[0]) || double.IsNaN(right[0]);
            return Vector128.Create(empty ? double.NaN : double.PositiveInfinity);
        }

        // A bound that moves outwards from zero is divided by the smaller end of the denominator, one that moves inwards by the larger.
        Vector128<double> smaller = Vector128.Create(-right[0]);
        Vector128<double> larger = Vector128.Create(right[1]);
        Vector128<double> divisor = Vector128.ConditionalSelect(
            Vector128.GreaterThanOrEqual(left, Vector128<double>.Zero), smaller, larger);
        return TRounding.Finish(TRounding.Quotient(left, divisor));
    }

    /// <summary>The square; never below zero.</summary>
    public static Vector128<double> Square(Vector128<double> value)
    {
        double lower = -value[0], upper = value[1];
        double largest = Math.Max(Math.Abs(lower), Math.Abs(upper)); // NaN if empty
        double smallest = lower > 0 ? lower : upper < 0 ? -upper : 0;
        Vector128<double> bounds = TRounding.Finish(
            TRounding.Product(Vector128.Create(-smallest, largest), Vector128.Create(smallest, largest)));
        return Vector128.Min(bounds, Vector128.Create(0.0, double.PositiveInfinity));
    }

    // Zero times an infinite bound is zero: the bound stands for numbers without limit, not for a number.
    [MethodImpl(MethodImplOptions.NoInlining)]
    private static Vector128<double> MultiplyUnbounded(Vector128<double> left, Vector128<double> right)
    {
        if (double.IsNaN(left[0]) || double.IsNaN(right[0])) return Vector128.Create(double.NaN);
        Vector128<double> lower = Vector128.Create(left[0]), upper = Vector128.Create(left[1]), swapped = Negate(right);
        return TRounding.Finish(Vector128.Max(
            Vector128.Max(Bounded(TRounding.Product(lower, swapped)), Bounded(TRounding.Product(upper, right))),
            Vector128.Max(Bounded(TRounding.Product(-lower, right)), Bounded(TRounding.Product(-upper, swapped)))));

        static Vector128<double> Bounded(Vector128<double> product) =>
            Vector128.ConditionalSelect(Vector128.Equals(product, product), product, Vector128<double>.Zero);
    }
}
