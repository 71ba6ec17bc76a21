using System.ComponentModel;

namespace OdeDsl;

/// <content>
/// The table by segments, as generated equations use it: within a locked regime the regime entry is the number of a segment, and the
/// table is that segment's polynomial whatever the argument.
/// </content>
public sealed partial class Table
{
    private readonly Segments segments;
    private readonly double density;

    /// <summary>
    /// The number of the segment that holds an argument: i from knot i up to, but not including, knot i + 1; -1 below the first knot; the number
    /// of the last knot from there on.
    /// </summary>
    /// <param name="x">The argument; NaN gives NaN.</param>
    /// <returns>A whole number, or NaN.</returns>
    [EditorBrowsable(EditorBrowsableState.Never)]
    public double Segment(double x)
    {
        if (!(x >= knots[0])) return double.IsNaN(x) ? double.NaN : -1;
        int last = knots.Length - 1;
        if (x >= knots[last]) return last;
        // Evenly spaced knots are found at once, others by halving.
        int low = Math.Min((int)((x - knots[0]) * density), last - 1);
        if (knots[low] <= x && x < knots[low + 1]) return low;
        int high = last;
        low = 0;
        while (high - low > 1)
        {
            int middle = (low + high) >>> 1;
            if (knots[middle] <= x) low = middle;
            else high = middle;
        }

        return low;
    }

    /// <summary>The value of a segment's polynomial.</summary>
    /// <param name="x">The argument, which may lie outside the segment.</param>
    /// <param name="segment">The segment's number; numbers beyond the ends mean the ends.</param>
    /// <returns>The value; NaN outside the knots in an end segment of a table that does not extrapolate.</returns>
    [EditorBrowsable(EditorBrowsableState.Never)]
    public double At(double x, double segment)
    {
        ref readonly Segments.Cubic cubic = ref segments[segment];
        double s = x - cubic.Origin;
        return IsOutside(x, segment) ? double.NaN : cubic.C0 + s * (cubic.C1 + s * (cubic.C2 + s * cubic.C3));
    }

    /// <summary>A derivative of a segment's polynomial.</summary>
    /// <param name="order">Which derivative: 1, 2 or 3.</param>
    /// <param name="x">The argument, which may lie outside the segment.</param>
    /// <param name="segment">The segment's number; numbers beyond the ends mean the ends.</param>
    /// <returns>The derivative; NaN where <see cref="At(double, double)"/> is.</returns>
    [EditorBrowsable(EditorBrowsableState.Never)]
    public double Derivative(int order, double x, double segment)
    {
        ref readonly Segments.Cubic cubic = ref segments[segment];
        double s = x - cubic.Origin;
        if (IsOutside(x, segment)) return double.NaN;
        return order switch
        {
            1 => cubic.C1 + s * (2 * cubic.C2 + s * (3 * cubic.C3)),
            2 => 2 * cubic.C2 + s * (6 * cubic.C3),
            _ => 6 * cubic.C3,
        };
    }

    /// <summary>
    /// The position of an argument among the knots, counted on a segment's scale: its number at its first knot, one more at its second,
    /// linear between and beyond.
    /// </summary>
    /// <param name="x">The argument.</param>
    /// <param name="segment">The segment's number; numbers beyond the ends mean the ends, which count on their neighbour's scale.</param>
    /// <returns>The position.</returns>
    [EditorBrowsable(EditorBrowsableState.Never)]
    public double Position(double x, double segment)
    {
        ref readonly Segments.Cubic cubic = ref segments[segment];
        return cubic.Number + (x - cubic.Origin) / cubic.Spacing;
    }

    /// <summary>The derivative of <see cref="Position"/> by the argument.</summary>
    /// <param name="segment">The segment's number; numbers beyond the ends mean the ends.</param>
    /// <returns>One over the segment's length.</returns>
    [EditorBrowsable(EditorBrowsableState.Never)]
    public double PositionSlope(double segment) => 1 / segments[segment].Spacing;

    /// <summary>The argument at a position: the inverse of <see cref="Position"/>.</summary>
    internal double ArgumentAt(double position, double segment)
    {
        ref readonly Segments.Cubic cubic = ref segments[segment];
        return cubic.Origin + (position - cubic.Number) * cubic.Spacing;
    }

    /// <summary>Whether a segment lies outside the knots.</summary>
    internal bool IsEnd(double segment) => segment < 0 || segment >= knots.Length - 1;

    private bool IsOutside(double x, double segment) =>
        Extrapolation == Extrapolation.Fail && IsEnd(segment) && (x < knots[0] || x > knots[^1]);

    private Segments MakeSegments()
    {
        double[] slopes = Interpolation == Interpolation.ShapePreservingCubic ? ShapePreservingSlopes.Of(knots, values) : [];
        return new Segments(knots, values, slopes, continued: Extrapolation == Extrapolation.ContinueLine);
    }
}
