using System.Diagnostics.CodeAnalysis;
using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace OdeDsl.Scalars;

/// <summary>Products and quotients of series held four coefficients to a vector.</summary>
internal static class SeriesVectors
{
    /// <summary>Coefficients 0 to 3 of the product of two series, of which only 0 to 3 matter.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector256<double> MultiplyLow(Vector256<double> a, Vector256<double> b)
    {
        Vector256<double> first = Lane(a, 0) * b;
        Vector256<double> sum = Vector256.FusedMultiplyAdd(Lane(a, 1), Shift(b, 1), first);
        sum = Vector256.FusedMultiplyAdd(Lane(a, 2), Shift(b, 2), sum);
        sum = Vector256.FusedMultiplyAdd(Lane(a, 3), Shift(b, 3), sum);
        // The value is a single product; a higher coefficient that is infinite would have made it NaN by its zero factor.
        return Vector256.ConditionalSelect(Vector256.Create(-1L, 0, 0, 0).AsDouble(), first, sum);
    }

    /// <summary>Coefficients 4 to 7 of the product of two series, each given by its coefficients 0 to 3 and 4 to 7.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector256<double> MultiplyHigh(
        Vector256<double> aLow, Vector256<double> aHigh, Vector256<double> bLow, Vector256<double> bHigh)
    {
        Vector256<double> sum = Lane(aHigh, 0) * bLow;
        sum = Vector256.FusedMultiplyAdd(Lane(aHigh, 1), Shift(bLow, 1), sum);
        sum = Vector256.FusedMultiplyAdd(Lane(aHigh, 2), Shift(bLow, 2), sum);
        sum = Vector256.FusedMultiplyAdd(Lane(aHigh, 3), Shift(bLow, 3), sum);
        return sum + Overlap(aLow, bLow, bHigh);
    }

    /// <summary>What coefficients 0 to 3 of one series contribute to coefficients 4 to 7 of a product.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector256<double> Overlap(Vector256<double> aLow, Vector256<double> bLow, Vector256<double> bHigh)
    {
        Vector256<double> sum = Lane(aLow, 0) * bHigh;
        sum = Vector256.FusedMultiplyAdd(Lane(aLow, 1), Window(bLow, bHigh, 1), sum);
        sum = Vector256.FusedMultiplyAdd(Lane(aLow, 2), Window(bLow, bHigh, 2), sum);
        return Vector256.FusedMultiplyAdd(Lane(aLow, 3), Window(bLow, bHigh, 3), sum);
    }

    /// <summary>The quotient a / b of series up to order 3 for b(0) = 1; that coefficient itself is not looked at.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector256<double> DivideByMonic(Vector256<double> a, Vector256<double> b)
    {
        // As soon as a coefficient of the quotient is known, its multiple of b is taken from all later ones.
        b = -b.WithElement(0, 0);
        a = Vector256.FusedMultiplyAdd(Lane(a, 0), b, a);
        a = Vector256.FusedMultiplyAdd(Lane(a, 1), Shift(b, 1), a);
        return Vector256.FusedMultiplyAdd(Lane(a, 2), Shift(b, 2), a);
    }

    /// <summary>The sum of a(i) b(8 − i) for i from 1 to 7.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double MultiplyEighth(
        Vector256<double> aLow, Vector256<double> aHigh, Vector256<double> bLow, Vector256<double> bHigh)
    {
        // a1 b7 + a2 b6 + a3 b5, and a4 b4 + a5 b3 + a6 b2 + a7 b1.
        Vector256<double> reversed = Vector256.Shuffle(bHigh, Vector256.Create(4L, 3, 2, 1));
        Vector256<double> window = Vector256.Shuffle(Window(bLow, bHigh, 3), Vector256.Create(3L, 2, 1, 0));
        return Vector256.Sum(Vector256.FusedMultiplyAdd(aHigh, window, aLow * reversed));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector256<double> Lane(Vector256<double> v, [ConstantExpected] int lane) => lane switch
    {
        0 => Vector256.Shuffle(v, Vector256.Create(0L, 0, 0, 0)),
        1 => Vector256.Shuffle(v, Vector256.Create(1L, 1, 1, 1)),
        2 => Vector256.Shuffle(v, Vector256.Create(2L, 2, 2, 2)),
        _ => Vector256.Shuffle(v, Vector256.Create(3L, 3, 3, 3)),
    };

    // Moves coefficients to higher orders; an index beyond the vector gives zero.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector256<double> Shift(Vector256<double> v, [ConstantExpected] int orders) => orders switch
    {
        1 => Vector256.Shuffle(v, Vector256.Create(4L, 0, 1, 2)),
        2 => Vector256.Shuffle(v, Vector256.Create(4L, 4, 0, 1)),
        _ => Vector256.Shuffle(v, Vector256.Create(4L, 4, 4, 0)),
    };

    // Coefficients 4 to 7 of the series moved to higher orders.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector256<double> Window(Vector256<double> low, Vector256<double> high, [ConstantExpected] int orders) => orders switch
    {
        1 => Vector256.ConditionalSelect(
            Vector256.Create(-1L, 0, 0, 0).AsDouble(),
            Vector256.Shuffle(low, Vector256.Create(3L, 0, 1, 2)),
            Vector256.Shuffle(high, Vector256.Create(3L, 0, 1, 2))),
        2 => Vector256.ConditionalSelect(
            Vector256.Create(-1L, -1, 0, 0).AsDouble(),
            Vector256.Shuffle(low, Vector256.Create(2L, 3, 0, 1)),
            Vector256.Shuffle(high, Vector256.Create(2L, 3, 0, 1))),
        _ => Vector256.ConditionalSelect(
            Vector256.Create(-1L, -1, -1, 0).AsDouble(),
            Vector256.Shuffle(low, Vector256.Create(1L, 2, 3, 0)),
            Vector256.Shuffle(high, Vector256.Create(1L, 2, 3, 0))),
    };
}
