using System.Numerics;

namespace OdeDsl.Tests.Scalars;

/// <summary>
/// A binary floating-point number of 400 bits, in whole-number arithmetic: the reference that elementary functions are held against.
/// Its last bits are rounded carelessly; three hundred of them are right, many more than the tests ask for.
/// </summary>
internal readonly struct Real
{
    private const int Bits = 400;

    private readonly BigInteger number;
    private readonly int exponent;

    private Real(BigInteger number, int exponent)
    {
        int excess = (int)number.GetBitLength() - Bits;
        (this.number, this.exponent) = excess > 0 ? (number >> excess, exponent + excess) : (number, exponent);
    }

    public static Real Zero => new(BigInteger.Zero, 0);

    public int Sign => number.Sign;

    // The exponent of the leading bit: the magnitude lies between 2^(n−1) and 2^n.
    private int Magnitude => exponent + (int)BigInteger.Abs(number).GetBitLength();

    public static implicit operator Real(int value) => new(value, 0);

    public static Real Of(double value)
    {
        (BigInteger number, int exponent) = ExactArithmetic.Parts(value);
        return new(number, exponent);
    }

    public double ToDouble()
    {
        if (number.IsZero) return 0;
        int excess = (int)number.GetBitLength() - 60;
        BigInteger leading = excess > 0 ? number >> excess : number << -excess;
        return Math.ScaleB((double)leading, exponent + excess);
    }

    public static Real operator +(Real left, Real right)
    {
        if (left.Sign == 0) return right;
        if (right.Sign == 0) return left;
        // What lies more than the precision below the larger number does not matter, except that shifting to it would cost.
        if (left.Magnitude - right.Magnitude > 2 * Bits) return left;
        if (right.Magnitude - left.Magnitude > 2 * Bits) return right;
        int lower = Math.Min(left.exponent, right.exponent);
        return new((left.number << (left.exponent - lower)) + (right.number << (right.exponent - lower)), lower);
    }

    public static Real operator -(Real value) => new(-value.number, value.exponent);

    public static Real operator -(Real left, Real right) => left + -right;

    public static Real operator *(Real left, Real right) => new(left.number * right.number, left.exponent + right.exponent);

    public static Real operator /(Real left, Real right)
    {
        int shift = Bits + (int)right.number.GetBitLength() - (int)left.number.GetBitLength();
        shift = Math.Max(shift, 0);
        return new((left.number << shift) / right.number, left.exponent - shift - right.exponent);
    }

    public static bool operator <(Real left, Real right) => (left - right).Sign < 0;

    public static bool operator >(Real left, Real right) => (left - right).Sign > 0;

    public static bool operator <=(Real left, Real right) => (left - right).Sign <= 0;

    public static bool operator >=(Real left, Real right) => (left - right).Sign >= 0;

    public static Real Abs(Real value) => new(BigInteger.Abs(value.number), value.exponent);

    /// <summary>The number times a power of two.</summary>
    public static Real Scale(Real value, int powerOfTwo) => new(value.number, value.exponent + powerOfTwo);

    public static Real Sqrt(Real value)
    {
        if (value.Sign == 0) return value;
        int shift = Math.Max(0, (2 * Bits) - (int)value.number.GetBitLength());
        if (((value.exponent - shift) & 1) != 0) shift++;
        BigInteger square = value.number << shift;
        BigInteger root = BigInteger.One << (int)((square.GetBitLength() + 1) / 2);
        while (true)
        {
            BigInteger next = (root + (square / root)) >> 1; // Newton's method from above falls until it is there
            if (next >= root) return new(root, (value.exponent - shift) / 2);
            root = next;
        }
    }

    /// <summary>The whole number nearest to a number of moderate size.</summary>
    public static BigInteger Round(Real value)
    {
        Real shifted = Scale(value, 1) + 1;
        BigInteger doubled = shifted.exponent >= 0 ? shifted.number << shifted.exponent : shifted.number >> -shifted.exponent;
        return doubled >> 1;
    }

    /// <summary>Whether a term no longer matters to a sum.</summary>
    public static bool Negligible(Real term, Real sum) => term.Sign == 0 || term.Magnitude < sum.Magnitude - Bits;
}
