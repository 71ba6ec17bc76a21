using System.Runtime.CompilerServices;

namespace OdeDsl.Scalars;

/// <summary>
/// Powers of lanes, within 4 units in the last place of <see cref="Math.Pow"/>. The logarithm is carried in two doubles, since the
/// exponential turns its absolute error into a relative one: with a single double a result near 1e300 would lose ten bits.
/// </summary>
internal static class LanePower
{
    /// <summary>Beyond, the result nears the ends of the range.</summary>
    private const double LargestExponent = 700;

    private const double SmallestNormal = 2.2250738585072014e-308;

    /// <summary>From here on every double is even; below, halves and parities are exact.</summary>
    private const double AllEven = 9007199254740992;

    // ln 2 in two parts: the first has 11 trailing zero bits, so its product with a binary exponent is exact.
    private const double Log2High = 0.69314718055989033;
    private const double Log2Low = 5.4979230187083712e-14;

    /// <summary>The power. Zeros, subnormal numbers, infinities, NaN and results near the ends of the range go through Math.Pow.</summary>
    public static TLanes Pow<TLanes>(TLanes x, TLanes y)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes size = TLanes.Abs(x);
        (TLanes high, TLanes low) = Logarithm(size);
        // The product y (high + low) in two parts.
        TLanes product = y * high;
        TLanes rest = TLanes.FusedMultiplyAdd(y, high, -product) + (y * low);

        TLanes ordinary = TLanes.And(
            TLanes.And(
                TLanes.Less(TLanes.Constant(SmallestNormal), size),
                TLanes.Less(size, TLanes.Constant(double.PositiveInfinity))),
            TLanes.And(
                TLanes.Less(TLanes.Abs(product), TLanes.Constant(LargestExponent)),
                TLanes.Less(TLanes.Abs(y), TLanes.Constant(AllEven))));
        if (!TLanes.All(ordinary)) return TLanes.Map(Math.Pow, x, y);

        TLanes power = TLanes.Exp(product);
        power = TLanes.FusedMultiplyAdd(power, rest, power);
        TLanes negative = TLanes.Less(x, TLanes.Constant(0));
        TLanes half = 0.5 * y;
        TLanes whole = TLanes.Equal(TLanes.Round(y), y);
        TLanes odd = TLanes.AndNot(whole, TLanes.Equal(TLanes.Round(half), half));
        power = TLanes.Choose(TLanes.And(negative, odd), -power, power);
        return TLanes.Choose(TLanes.AndNot(negative, whole), TLanes.Constant(double.NaN), power);
    }

    // With s = (m − 1) / (m + 1), |s| ≤ 0.172: ln m = 2 s + 2 s³/3 + 2 s⁵/5 + ... (Abramowitz and Stegun 1964, 4.1.27). The first two
    // terms are carried in two doubles; the third is below 2e-4 of the sum, so its rounding adds 2⁻⁶⁵ only.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static (TLanes High, TLanes Low) Logarithm<TLanes>(TLanes x)
        where TLanes : struct, ILanes<TLanes>
    {
        (TLanes mantissa, TLanes exponent) = TLanes.Split(x);
        TLanes numerator = mantissa - 1.0; // exact, for the mantissa is within a factor of two of one
        TLanes denominator = mantissa + 1.0;
        TLanes lost = mantissa - (denominator - 1.0); // the rounding of the sum
        TLanes s = numerator / denominator;
        TLanes sLow = (TLanes.FusedMultiplyAdd(-s, denominator, numerator) - (s * lost)) / denominator;

        TLanes square = s * s;
        TLanes squareLow = TLanes.FusedMultiplyAdd(s, s, -square) + (2.0 * (s * sLow));
        TLanes tail = TLanes.Constant(2.0 / 23);
        tail = TLanes.FusedMultiplyAdd(tail, square, TLanes.Constant(2.0 / 21));
        tail = TLanes.FusedMultiplyAdd(tail, square, TLanes.Constant(2.0 / 19));
        tail = TLanes.FusedMultiplyAdd(tail, square, TLanes.Constant(2.0 / 17));
        tail = TLanes.FusedMultiplyAdd(tail, square, TLanes.Constant(2.0 / 15));
        tail = TLanes.FusedMultiplyAdd(tail, square, TLanes.Constant(2.0 / 13));
        tail = TLanes.FusedMultiplyAdd(tail, square, TLanes.Constant(2.0 / 11));
        tail = TLanes.FusedMultiplyAdd(tail, square, TLanes.Constant(2.0 / 9));
        tail = TLanes.FusedMultiplyAdd(tail, square, TLanes.Constant(2.0 / 7));
        tail = TLanes.FusedMultiplyAdd(tail, square, TLanes.Constant(2.0 / 5));

        // 2 s³/3 = s (2/3) s² in two parts, the rest of the series in one: s s⁴ tail.
        const double TwoThirds = 2.0 / 3, TwoThirdsLow = 3.7007434154171886e-17;
        TLanes factor = TwoThirds * square;
        TLanes factorLow = TLanes.FusedMultiplyAdd(TLanes.Constant(TwoThirds), square, -factor)
            + (TwoThirds * squareLow) + (TwoThirdsLow * square);
        TLanes cubic = s * factor;
        TLanes cubicLow = TLanes.FusedMultiplyAdd(s, factor, -cubic)
            + (s * factorLow) + (sLow * factor) + (s * ((square * square) * tail));

        // exponent ln 2 + 2 s + cubic, largest first, each sum with its rounding.
        (TLanes sum, TLanes sumLow) = FastTwoSum(2.0 * s, cubic);
        sumLow = sumLow + (2.0 * sLow) + cubicLow;
        (TLanes high, TLanes highLow) = TwoSum(exponent * Log2High, sum);
        TLanes low = highLow + sumLow + (exponent * Log2Low);
        return FastTwoSum(high, low);
    }

    // Dekker 1971: exact for |a| ≥ |b|.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static (TLanes Sum, TLanes Rounding) FastTwoSum<TLanes>(TLanes a, TLanes b)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes sum = a + b;
        return (sum, b - (sum - a));
    }

    // Knuth, The Art of Computer Programming, volume 2, section 4.2.2, theorem B: exact.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static (TLanes Sum, TLanes Rounding) TwoSum<TLanes>(TLanes a, TLanes b)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes sum = a + b;
        TLanes part = sum - a;
        return (sum, (a - (sum - part)) + (b - part));
    }
}
