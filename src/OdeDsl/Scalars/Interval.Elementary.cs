using System.Runtime.Intrinsics;

namespace OdeDsl.Scalars;

// Monotonic functions: the bounds are the function's values at the ends, moved outwards by the error allowed to Math.
public readonly partial struct Interval
{
    // A unit in the last place is at most 2⁻⁵² of a normal value and 2⁻¹⁰⁷⁴ of a subnormal one. One more unit covers the rounding of the
    // widening itself.
    private const double RelativeAllowance = (FunctionError + 1) * 2.2204460492503131e-16;
    private const double AbsoluteAllowance = (FunctionError + 1) * double.Epsilon;

    /// <inheritdoc/>
    public static Interval Sqrt(Interval x)
    {
        x = Intersect(x, NotNegative);
        // The square root is correctly rounded: one step outwards is enough.
        return Intersect(new(WidenedRounding.Finish(Vector128.Create(-Math.Sqrt(x.Lower), Math.Sqrt(x.Upper)))), NotNegative);
    }

    /// <inheritdoc/>
    public static Interval Cbrt(Interval x) => Enclose(Math.Cbrt(x.Lower), Math.Cbrt(x.Upper));

    /// <inheritdoc/>
    public static Interval Exp(Interval x) => Intersect(Enclose(Math.Exp(x.Lower), Math.Exp(x.Upper)), NotNegative);

    /// <inheritdoc/>
    public static Interval Log(Interval x)
    {
        x = PositivePart(x);
        return Enclose(Math.Log(x.Lower), Math.Log(x.Upper));
    }

    /// <inheritdoc/>
    public static Interval Log(Interval x, Interval newBase) => Log(x) / Log(newBase);

    /// <inheritdoc/>
    public static Interval Log2(Interval x)
    {
        x = PositivePart(x);
        return Enclose(Math.Log2(x.Lower), Math.Log2(x.Upper));
    }

    /// <inheritdoc/>
    public static Interval Log10(Interval x)
    {
        x = PositivePart(x);
        return Enclose(Math.Log10(x.Lower), Math.Log10(x.Upper));
    }

    /// <inheritdoc/>
    public static Interval Asin(Interval x)
    {
        x = Intersect(x, UnitRange);
        return Intersect(Enclose(Math.Asin(x.Lower), Math.Asin(x.Upper)), new(-HalfPiAbove, HalfPiAbove));
    }

    /// <inheritdoc/>
    public static Interval Acos(Interval x)
    {
        x = Intersect(x, UnitRange);
        return Intersect(Enclose(Math.Acos(x.Upper), Math.Acos(x.Lower)), new(0, PiAbove));
    }

    /// <inheritdoc/>
    public static Interval Atan(Interval x) =>
        Intersect(Enclose(Math.Atan(x.Lower), Math.Atan(x.Upper)), new(-HalfPiAbove, HalfPiAbove));

    /// <inheritdoc/>
    public static Interval Sinh(Interval x) => Enclose(Math.Sinh(x.Lower), Math.Sinh(x.Upper));

    /// <inheritdoc/>
    public static Interval Cosh(Interval x) =>
        Intersect(Enclose(Math.Cosh(x.Mignitude), Math.Cosh(x.Magnitude)), new(1, double.PositiveInfinity));

    /// <inheritdoc/>
    public static Interval Tanh(Interval x) => Intersect(Enclose(Math.Tanh(x.Lower), Math.Tanh(x.Upper)), UnitRange);

    /// <inheritdoc/>
    public static Interval Asinh(Interval x) => Enclose(Math.Asinh(x.Lower), Math.Asinh(x.Upper));

    /// <inheritdoc/>
    public static Interval Acosh(Interval x)
    {
        x = Intersect(x, new(1, double.PositiveInfinity));
        return Intersect(Enclose(Math.Acosh(x.Lower), Math.Acosh(x.Upper)), NotNegative);
    }

    /// <inheritdoc/>
    public static Interval Atanh(Interval x)
    {
        x = Intersect(x, UnitRange);
        if (x.Lower == 1 || x.Upper == -1) return Empty; // the ends themselves lie outside the domain
        return Enclose(Math.Atanh(x.Lower), Math.Atanh(x.Upper));
    }

    private static Interval NotNegative => new(Vector128.Create(0, double.PositiveInfinity));

    private static Interval UnitRange => new(Vector128.Create(1.0));

    // Zero itself stays as a lower bound: it stands for the positive numbers next to it, whose logarithms have no lower bound.
    private static Interval PositivePart(Interval x)
    {
        x = Intersect(x, NotNegative);
        return x.Upper > 0 ? x : Empty;
    }

    private static Interval Enclose(double lower, double upper) =>
        new(WidenedRounding.Widen(Vector128.Create(-lower, upper), RelativeAllowance, AbsoluteAllowance));
}
