namespace OdeDsl.Scalars;

public readonly partial struct Interval
{
    /// <inheritdoc/>
    /// <remarks>
    /// A negative base has powers only for whole exponents. Where the exponent is one whole number this gives the usual even or odd
    /// function; where it varies, the powers of the negative part at the whole exponents inside are taken into the result.
    /// The power 0⁰ is 1, as in <see cref="Math.Pow"/>.
    /// </remarks>
    public static Interval Pow(Interval x, Interval y)
    {
        if (x.IsEmpty || y.IsEmpty) return Empty;
        if (y.Lower == y.Upper && Math.Floor(y.Lower) == y.Lower) return WholePower(x, y.Lower);

        Interval positive = Intersect(x, NotNegative);
        Interval result = positive.IsEmpty ? Empty : PowerOfPositive(positive, y);
        if (x.Lower >= 0 || Math.Floor(y.Upper) < y.Lower) return result; // nothing negative, or no whole exponent
        double largest = PowerOfPositive(Abs(Intersect(x, -NotNegative)), y).Upper;
        return Hull(result, new(-largest, largest));
    }

    private static Interval WholePower(Interval x, double exponent)
    {
        if (exponent == 2) return Square(x);
        if (x.Lower >= 0) return PowerOfPositive(x, Constant(exponent));
        if (Math.IEEERemainder(exponent, 2) == 0) return PowerOfPositive(Abs(x), Constant(exponent));
        if (exponent > 0) return Enclose(Math.Pow(x.Lower, exponent), Math.Pow(x.Upper, exponent));
        return x.Upper >= 0 ? Whole : -PowerOfPositive(-x, Constant(exponent));
    }

    // For a base of at least zero the power is monotonic in the base and in the exponent, so its extrema are at corners; Math.Pow takes
    // the limits at zero and at infinite bounds.
    private static Interval PowerOfPositive(Interval x, Interval y)
    {
        double a = Math.Pow(x.Lower, y.Lower), c = Math.Pow(x.Upper, y.Lower);
        if (y.Lower == y.Upper) return Intersect(Enclose(Math.Min(a, c), Math.Max(a, c)), NotNegative);
        double b = Math.Pow(x.Lower, y.Upper), d = Math.Pow(x.Upper, y.Upper);
        return Intersect(
            Enclose(Math.Min(Math.Min(a, b), Math.Min(c, d)), Math.Max(Math.Max(a, b), Math.Max(c, d))),
            NotNegative);
    }
}
