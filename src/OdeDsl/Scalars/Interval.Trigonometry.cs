namespace OdeDsl.Scalars;

// Functions that rise and fall: the extrema and poles inside the argument are found by counting quarter turns.
public readonly partial struct Interval
{
    // The double next above π, and its half.
    private const double PiAbove = 3.1415926535897936;
    private const double HalfPiAbove = 1.5707963267948968;

    /// <summary>Beyond, quarter turns cannot be counted exactly enough to be of use, and the whole range is returned.</summary>
    private const double CountableQuarters = 1L << 50;

    /// <inheritdoc/>
    public static Interval Sin(Interval x)
    {
        if (x.IsEmpty) return x;
        if (!TryCountQuarters(x, out long first, out long last)) return UnitRange;
        return Wave(Math.Sin(x.Lower), Math.Sin(x.Upper), Passes(first, last, 3, 4), Passes(first, last, 1, 4));
    }

    /// <inheritdoc/>
    public static Interval Cos(Interval x)
    {
        if (x.IsEmpty) return x;
        if (!TryCountQuarters(x, out long first, out long last)) return UnitRange;
        return Wave(Math.Cos(x.Lower), Math.Cos(x.Upper), Passes(first, last, 2, 4), Passes(first, last, 0, 4));
    }

    /// <inheritdoc/>
    public static Interval Tan(Interval x)
    {
        if (x.IsEmpty) return x;
        if (!TryCountQuarters(x, out long first, out long last) || Passes(first, last, 1, 2)) return Whole;
        return Enclose(Math.Tan(x.Lower), Math.Tan(x.Upper));
    }

    /// <inheritdoc/>
    /// <remarks>
    /// All angles from −π to π where the point may lie on the negative half axis or in the origin, at which the angle jumps.
    /// </remarks>
    public static Interval Atan2(Interval y, Interval x)
    {
        if (x.IsEmpty || y.IsEmpty) return Empty;
        Interval turn = new(-PiAbove, PiAbove);
        if (y.Contains(0) && x.Lower <= 0) return turn;
        // Seen from a point outside, the extreme directions of a rectangle are those of its corners.
        double a = Math.Atan2(y.Lower, x.Lower), b = Math.Atan2(y.Lower, x.Upper);
        double c = Math.Atan2(y.Upper, x.Lower), d = Math.Atan2(y.Upper, x.Upper);
        return Intersect(Enclose(Math.Min(Math.Min(a, b), Math.Min(c, d)), Math.Max(Math.Max(a, b), Math.Max(c, d))), turn);
    }

    // The number of quarter turns from zero to each end, rounded down. Where an end is too near a whole number to tell, the one that
    // counts a crossing more is taken.
    private static bool TryCountQuarters(Interval x, out long first, out long last)
    {
        Interval quarters = x * new Interval(0.63661977236758127, 0.63661977236758138); // 2/π
        bool countable = quarters.Magnitude < CountableQuarters;
        first = countable ? (long)Math.Floor(quarters.Lower) : 0;
        last = countable ? (long)Math.Floor(quarters.Upper) : 0;
        return countable;
    }

    // Whether a whole number congruent to the remainder modulo the period (a power of two) lies above first and up to last.
    private static bool Passes(long first, long last, long remainder, long period)
    {
        int shift = System.Numerics.BitOperations.TrailingZeroCount(period);
        return (last - remainder) >> shift > (first - remainder) >> shift;
    }

    private static Interval Wave(double atLower, double atUpper, bool hasMinimum, bool hasMaximum)
    {
        Interval values = Enclose(Math.Min(atLower, atUpper), Math.Max(atLower, atUpper));
        return Intersect(
            new(hasMinimum ? -1 : values.Lower, hasMaximum ? 1 : values.Upper),
            UnitRange);
    }
}
