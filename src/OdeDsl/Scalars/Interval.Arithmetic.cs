using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;
using System.Runtime.Intrinsics.X86;

namespace OdeDsl.Scalars;

// The operators choose their rounding once; the test of Avx512F.IsSupported is a constant to the compiler.
public readonly partial struct Interval
{
    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Interval operator +(Interval left, Interval right) => new(Avx512F.IsSupported
        ? IntervalArithmetic<EmbeddedRounding>.Add(left.bounds, right.bounds)
        : IntervalArithmetic<WidenedRounding>.Add(left.bounds, right.bounds));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Interval operator +(Interval left, double right) => left + Constant(right);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Interval operator +(double left, Interval right) => Constant(left) + right;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Interval operator -(Interval left, Interval right) => new(Avx512F.IsSupported
        ? IntervalArithmetic<EmbeddedRounding>.Subtract(left.bounds, right.bounds)
        : IntervalArithmetic<WidenedRounding>.Subtract(left.bounds, right.bounds));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Interval operator -(Interval left, double right) => left - Constant(right);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Interval operator -(double left, Interval right) => Constant(left) - right;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Interval operator *(Interval left, Interval right) => new(Avx512F.IsSupported
        ? IntervalArithmetic<EmbeddedRounding>.Multiply(left.bounds, right.bounds)
        : IntervalArithmetic<WidenedRounding>.Multiply(left.bounds, right.bounds));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Interval operator *(Interval left, double right)
    {
        if (right == 0 || !double.IsFinite(right)) return left * Constant(right);
        return new(Avx512F.IsSupported
            ? IntervalArithmetic<EmbeddedRounding>.Scale(left.bounds, right)
            : IntervalArithmetic<WidenedRounding>.Scale(left.bounds, right));
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Interval operator *(double left, Interval right) => right * left;

    /// <inheritdoc/>
    public static Interval operator /(Interval left, Interval right) => new(Avx512F.IsSupported
        ? IntervalArithmetic<EmbeddedRounding>.Divide(left.bounds, right.bounds)
        : IntervalArithmetic<WidenedRounding>.Divide(left.bounds, right.bounds));

    /// <inheritdoc/>
    public static Interval operator /(Interval left, double right) => left / Constant(right);

    /// <inheritdoc/>
    public static Interval operator /(double left, Interval right) => Constant(left) / right;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Interval operator -(Interval value) => new(IntervalArithmetic<WidenedRounding>.Negate(value.bounds));

    /// <inheritdoc/>
    public static Interval Square(Interval x) => new(Avx512F.IsSupported
        ? IntervalArithmetic<EmbeddedRounding>.Square(x.bounds)
        : IntervalArithmetic<WidenedRounding>.Square(x.bounds));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Interval FusedMultiplyAdd(Interval x, Interval y, Interval z) => (x * y) + z;

    /// <summary>The magnitudes of the numbers of an interval.</summary>
    /// <param name="x">The interval.</param>
    public static Interval Abs(Interval x) => x.IsEmpty ? x : new(Vector128.Create(-x.Mignitude, x.Magnitude));

    /// <inheritdoc/>
    /// <remarks>Both signs where <paramref name="y"/> contains zero, whose sign is unknown.</remarks>
    public static Interval CopySign(Interval x, Interval y)
    {
        if (y.IsEmpty) return y;
        Interval size = Abs(x);
        return y.Lower > 0 ? size : y.Upper < 0 ? -size : Hull(size, -size);
    }

    /// <inheritdoc/>
    public static Interval operator %(Interval left, Interval right)
    {
        if (left.IsEmpty || right.IsEmpty) return Empty;
        // The remainder has the sign of the dividend and is smaller than both operands.
        double limit = Math.Min(left.Magnitude, right.Magnitude);
        Interval bound = new(left.Lower < 0 ? -limit : 0, left.Upper > 0 ? limit : 0);
        Interval quotient = left / right;
        return RemainderOf(left, right, Math.Truncate(quotient.Lower), Math.Truncate(quotient.Upper), bound);
    }

    /// <inheritdoc/>
    public static Interval IEEERemainder(Interval x, Interval y)
    {
        if (x.IsEmpty || y.IsEmpty) return Empty;
        double limit = Math.Min(x.Magnitude, Math.BitIncrement(y.Magnitude / 2)); // half a subnormal number may round down
        Interval quotient = x / y;
        return RemainderOf(x, y, Math.Round(quotient.Lower), Math.Round(quotient.Upper), new(-limit, limit));
    }

    // With one whole quotient for all points the remainder is left - quotient right; else only its size is known.
    private static Interval RemainderOf(Interval left, Interval right, double first, double last, Interval bound)
    {
        if (first != last) return bound;
        return Intersect(left - (first * right), bound);
    }
}
