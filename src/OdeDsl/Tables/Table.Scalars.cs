using System.ComponentModel;
using OdeDsl.Scalars;

namespace OdeDsl;

/// <content>The table over any kind of number, as the generic forms of generated equations use it.</content>
public sealed partial class Table
{
    /// <summary>
    /// The value at an argument: for lanes each at its own, for an interval an enclosure of all. Tries the segments one after another, as a
    /// number of any kind can be compared but not be used as an index.
    /// </summary>
    /// <typeparam name="TScalar">The kind of number.</typeparam>
    /// <param name="x">The argument.</param>
    /// <returns>The value; the kind's "not a number" outside the knots of a table that does not extrapolate.</returns>
    [EditorBrowsable(EditorBrowsableState.Never)]
    public TScalar AtOver<TScalar>(TScalar x)
        where TScalar : unmanaged, IScalar<TScalar>
    {
        TScalar value = PolynomialOver(0, x, -1);
        for (int i = 0; i < knots.Length; i++)
            value = TScalar.Choose(TScalar.LessOrEqual(TScalar.Constant(knots[i]), x), PolynomialOver(0, x, i), value);
        return value;
    }

    /// <summary>The value of a segment's polynomial, or a derivative of it.</summary>
    /// <typeparam name="TScalar">The kind of number.</typeparam>
    /// <param name="order">Which derivative, 0 to 3.</param>
    /// <param name="x">The argument, which may lie outside the segment.</param>
    /// <param name="segment">The segment's number; numbers beyond the ends mean the ends.</param>
    /// <returns>The value; "not a number" outside the knots in an end segment of a table that does not extrapolate.</returns>
    [EditorBrowsable(EditorBrowsableState.Never)]
    public TScalar PolynomialOver<TScalar>(int order, TScalar x, double segment)
        where TScalar : unmanaged, IScalar<TScalar>
    {
        Segments.Cubic cubic = segments[segment];
        TScalar s = x - cubic.Origin;
        TScalar value = order switch
        {
            0 => cubic.C0 + s * (cubic.C1 + s * (cubic.C2 + s * cubic.C3)),
            1 => cubic.C1 + s * (2 * cubic.C2 + s * (3 * cubic.C3)),
            2 => 2 * cubic.C2 + s * (6 * cubic.C3),
            _ => TScalar.Constant(6 * cubic.C3),
        };
        if (Extrapolation != Extrapolation.Fail || !IsEnd(segment)) return value;
        TScalar outside = TScalar.Choose(
            TScalar.Less(x, TScalar.Constant(knots[0])), TScalar.Condition(true), TScalar.Less(TScalar.Constant(knots[^1]), x));
        return TScalar.Choose(outside, TScalar.Constant(double.NaN), value);
    }

    /// <summary>The position of an argument among the knots; see <see cref="Position"/>.</summary>
    /// <typeparam name="TScalar">The kind of number.</typeparam>
    /// <param name="x">The argument.</param>
    /// <param name="segment">The segment's number; numbers beyond the ends mean the ends.</param>
    /// <returns>The position.</returns>
    [EditorBrowsable(EditorBrowsableState.Never)]
    public TScalar PositionOver<TScalar>(TScalar x, double segment)
        where TScalar : unmanaged, IScalar<TScalar>
    {
        Segments.Cubic cubic = segments[segment];
        return cubic.Number + (x - cubic.Origin) / cubic.Spacing;
    }
}
