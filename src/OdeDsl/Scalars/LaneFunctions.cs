using System.Runtime.CompilerServices;

namespace OdeDsl.Scalars;

/// <summary>
/// Functions of lanes built from the framework's vector exponential, logarithm, sine and cosine. The bounds given are in units in the
/// last place of the result against <see cref="Math"/>, held by tests over all magnitudes where the result is a normal number.
/// </summary>
internal static class LaneFunctions
{
    /// <summary>Below, the series of the hyperbolic sine serves; above, the exponentials no longer cancel.</summary>
    private const double SeriesLimit = 1;

    /// <summary>Above, tanh is one to the last bit: 2 exp(−2x) is below a quarter unit.</summary>
    private const double TanhLimit = 20;

    /// <summary>Beyond, the exponential overflows before the hyperbolic functions do, and lanes are computed one by one.</summary>
    private const double ExponentialLimit = 709;

    private const double LogarithmOfTen = 2.302585092994045684;

    /// <summary>Within 4 units: the quotient of the sine and the cosine.</summary>
    public static TLanes Tan<TLanes>(TLanes x)
        where TLanes : struct, ILanes<TLanes>
    {
        (TLanes sine, TLanes cosine) = TLanes.SinCos(x);
        return sine / cosine;
    }

    /// <summary>Within 5 units.</summary>
    public static TLanes Sinh<TLanes>(TLanes x)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes size = TLanes.Abs(x);
        if (!TLanes.All(TLanes.Less(size, TLanes.Constant(ExponentialLimit)))) return TLanes.Map(Math.Sinh, x);
        TLanes growth = TLanes.Exp(size);
        TLanes large = (0.5 * growth) - (0.5 / growth);
        return TLanes.Choose(TLanes.Less(size, TLanes.Constant(SeriesLimit)), SinhSeries(x), TLanes.CopySign(large, x));
    }

    /// <summary>Within 4 units.</summary>
    public static TLanes Cosh<TLanes>(TLanes x)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes size = TLanes.Abs(x);
        if (!TLanes.All(TLanes.Less(size, TLanes.Constant(ExponentialLimit)))) return TLanes.Map(Math.Cosh, x);
        TLanes growth = TLanes.Exp(size);
        return (0.5 * growth) + (0.5 / growth);
    }

    /// <summary>Within 5 units: 1 − 2 / (exp(2x) + 1), and below the limit sinh / √(1 + sinh²), which does not cancel.</summary>
    public static TLanes Tanh<TLanes>(TLanes x)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes size = TLanes.Abs(x);
        TLanes limited = TLanes.Choose(TLanes.Less(TLanes.Constant(TanhLimit), size), TLanes.Constant(TanhLimit), size);
        TLanes large = 1.0 - (2.0 / (TLanes.Exp(2.0 * limited) + 1.0));
        TLanes sine = SinhSeries(x);
        TLanes small = sine / TLanes.Sqrt((sine * sine) + 1.0);
        return TLanes.Choose(TLanes.Less(size, TLanes.Constant(SeriesLimit)), small, TLanes.CopySign(large, x));
    }

    /// <summary>Within 5 units.</summary>
    public static TLanes Log10<TLanes>(TLanes x)
        where TLanes : struct, ILanes<TLanes> => TLanes.Log(x) / LogarithmOfTen;

    // x + x³/3! + ... + x¹⁹/19!; at the limit the next term is 2e-20.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static TLanes SinhSeries<TLanes>(TLanes x)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes square = x * x;
        TLanes sum = TLanes.Constant(1.0 / 121645100408832000);
        sum = TLanes.FusedMultiplyAdd(sum, square, TLanes.Constant(1.0 / 355687428096000));
        sum = TLanes.FusedMultiplyAdd(sum, square, TLanes.Constant(1.0 / 1307674368000));
        sum = TLanes.FusedMultiplyAdd(sum, square, TLanes.Constant(1.0 / 6227020800));
        sum = TLanes.FusedMultiplyAdd(sum, square, TLanes.Constant(1.0 / 39916800));
        sum = TLanes.FusedMultiplyAdd(sum, square, TLanes.Constant(1.0 / 362880));
        sum = TLanes.FusedMultiplyAdd(sum, square, TLanes.Constant(1.0 / 5040));
        sum = TLanes.FusedMultiplyAdd(sum, square, TLanes.Constant(1.0 / 120));
        sum = TLanes.FusedMultiplyAdd(sum, square, TLanes.Constant(1.0 / 6));
        return TLanes.FusedMultiplyAdd(sum * square, x, x);
    }
}
