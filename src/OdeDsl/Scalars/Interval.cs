using System.Globalization;
using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace OdeDsl.Scalars;

/// <summary>
/// A closed interval of real numbers, possibly unbounded, whose arithmetic rounds outwards: the result of every operation and function
/// contains all values the exact function takes on the operands, hence also what doubles compute from points of them
/// (R. E. Moore, "Interval Analysis", 1966).
/// </summary>
/// <remarks>
/// <para><b>Domains.</b> The part of an argument outside a function's domain is left out: the square root of [−4, 9] is [0, 3]. If nothing
/// remains, the result is <see cref="Empty"/>, whose bounds are NaN and which every operation hands on. Cutting is right for "the
/// function takes no value outside this result"; a proof that also needs the function to be defined on the whole argument uses
/// <see cref="DecoratedInterval"/>. A quotient whose denominator contains zero, and a tangent over a pole, are <see cref="Whole"/>.</para>
/// <para><b>Bounds.</b> A lower bound is below +∞ and an upper bound above −∞: an infinite bound says "without limit" and is never a value.
/// A constant ±∞ therefore becomes an unbounded interval, and NaN the empty one.</para>
/// <para><b>Tightness.</b> + − · / are one or two units in the last place wider than the exact result (AVX-512: the tightest doubles).
/// Functions add <see cref="FunctionError"/> for the C library's own error. Results of one input therefore differ in their last digits
/// from machine to machine; every one of them is an enclosure.</para>
/// <para>+ − · and the quotient are inclusion isotonic exactly: smaller arguments give a result inside. The functions are so up to twice
/// <see cref="FunctionError"/>, since the library's own need not be monotonic to the last bit.</para>
/// </remarks>
public readonly partial struct Interval : IScalar<Interval>, IEquatable<Interval>
{
    /// <summary>
    /// How far <see cref="Math"/>'s functions may be from the true value, in units in the last place of the result. The GNU C library's
    /// manual (section "Known Maximum Errors in Math Functions", from memory) lists 4 for the cube root on 64-bit processors and at most 2
    /// for the other functions used here. The tests hold the library they run on to it, by arithmetic of 400 bits.
    /// </summary>
    public const int FunctionError = 4;

    // (−lower, upper): both round up.
    private readonly Vector128<double> bounds;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private Interval(Vector128<double> bounds) => this.bounds = bounds;

    /// <summary>The interval between two bounds.</summary>
    /// <param name="lower">The lower bound, or −∞.</param>
    /// <param name="upper">The upper bound, or +∞.</param>
    /// <exception cref="ArgumentException">A bound is NaN, the lower exceeds the upper, or no finite number lies between them.</exception>
    public Interval(double lower, double upper)
    {
        if (!(lower <= upper) || double.IsPositiveInfinity(lower) || double.IsNegativeInfinity(upper))
        {
            throw new ArgumentException(string.Create(
                CultureInfo.InvariantCulture, $"The bounds {lower:R} and {upper:R} enclose no number: lower must not exceed upper."));
        }

        bounds = Vector128.Create(-lower, upper);
    }

    /// <summary>All real numbers.</summary>
    public static Interval Whole => new(Vector128.Create(double.PositiveInfinity));

    /// <summary>No number.</summary>
    public static Interval Empty => new(Vector128.Create(double.NaN));

    /// <summary>The lower bound; NaN if empty.</summary>
    public double Lower => 0.0 - bounds[0]; // a zero bound has no sign

    /// <summary>The upper bound; NaN if empty.</summary>
    public double Upper => bounds[1] + 0.0;

    /// <summary>Whether there is no number in it.</summary>
    public bool IsEmpty => double.IsNaN(bounds[1]);

    /// <summary>Whether both bounds are finite. An empty interval is not.</summary>
    public bool IsBounded => double.IsFinite(bounds[0]) && double.IsFinite(bounds[1]);

    /// <summary>
    /// A finite number inside, the middle up to rounding; zero for the whole line and a finite bound for a half line. NaN if empty.
    /// </summary>
    public double Midpoint
    {
        get
        {
            double sum = Lower + Upper;
            if (double.IsFinite(sum)) return sum / 2;
            if (IsBounded) return (Lower / 2) + (Upper / 2);
            if (IsEmpty) return double.NaN;
            return double.IsFinite(Lower) ? Lower : double.IsFinite(Upper) ? Upper : 0;
        }
    }

    /// <summary>The distance of the bounds, rounded up; +∞ if unbounded, NaN if empty.</summary>
    public double Width => Lower == Upper ? 0 : (this - this).Upper;

    /// <summary>The largest magnitude of a number in it; NaN if empty.</summary>
    public double Magnitude => Math.Max(Math.Abs(Lower), Math.Abs(Upper));

    /// <summary>The smallest magnitude of a number in it; NaN if empty.</summary>
    public double Mignitude => Lower > 0 ? Lower : Upper < 0 ? -Upper : IsEmpty ? double.NaN : 0;

    /// <summary>Whether a number lies in it. NaN does not; an infinity does where that side is unbounded.</summary>
    /// <param name="value">The number.</param>
    public bool Contains(double value) => Lower <= value && value <= Upper;

    /// <summary>Whether another interval lies in it. An empty interval lies in every interval.</summary>
    /// <param name="other">The other interval.</param>
    public bool Contains(Interval other) => other.IsEmpty || (Lower <= other.Lower && other.Upper <= Upper);

    /// <summary>
    /// Whether another interval lies in its interior: no bound is shared, save an infinite one. An empty interval lies in every interior.
    /// </summary>
    /// <param name="other">The other interval.</param>
    public bool ContainsInInterior(Interval other) =>
        other.IsEmpty
        || ((Lower < other.Lower || double.IsNegativeInfinity(Lower)) && (other.Upper < Upper || double.IsPositiveInfinity(Upper)));

    /// <summary>What two intervals have in common; empty if they are apart.</summary>
    /// <param name="left">First interval.</param>
    /// <param name="right">Second interval.</param>
    public static Interval Intersect(Interval left, Interval right)
    {
        Vector128<double> smaller = Vector128.Min(left.bounds, right.bounds);
        return -smaller[0] <= smaller[1] ? new(smaller) : Empty;
    }

    /// <summary>The smallest interval that contains both; an empty one adds nothing.</summary>
    /// <param name="left">First interval.</param>
    /// <param name="right">Second interval.</param>
    public static Interval Hull(Interval left, Interval right) =>
        left.IsEmpty ? right : right.IsEmpty ? left : new(Vector128.Max(left.bounds, right.bounds));

    /// <summary>Whether the bounds agree; two empty intervals are equal.</summary>
    /// <param name="other">The other interval.</param>
    public bool Equals(Interval other) => Lower.Equals(other.Lower) && Upper.Equals(other.Upper);

    /// <inheritdoc/>
    public override bool Equals(object? obj) => obj is Interval other && Equals(other);

    /// <inheritdoc/>
    public override int GetHashCode() => HashCode.Combine(Lower, Upper);

    /// <summary>The bounds in brackets with all their digits, in the invariant culture.</summary>
    public override string ToString() =>
        IsEmpty ? "empty" : string.Create(CultureInfo.InvariantCulture, $"[{Lower:R}, {Upper:R}]");

    /// <summary>Whether the bounds agree; two empty intervals are equal.</summary>
    /// <param name="left">Left side.</param>
    /// <param name="right">Right side.</param>
    public static bool operator ==(Interval left, Interval right) => left.Equals(right);

    /// <summary>Whether a bound differs.</summary>
    /// <param name="left">Left side.</param>
    /// <param name="right">Right side.</param>
    public static bool operator !=(Interval left, Interval right) => !left.Equals(right);

    /// <summary>
    /// The interval of one number. An infinity gives the unbounded interval beyond the largest double, NaN the empty interval.
    /// </summary>
    /// <param name="value">The number.</param>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Interval Constant(double value) =>
        double.IsFinite(value) ? new(Vector128.Create(-value, value)) : Unbounded(value);

    private static Interval Unbounded(double value) =>
        double.IsNaN(value) ? Empty
        : value > 0 ? new(double.MaxValue, value)
        : new(value, double.MinValue);
}
