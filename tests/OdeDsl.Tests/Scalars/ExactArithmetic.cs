using System.Numerics;

namespace OdeDsl.Tests.Scalars;

/// <summary>
/// The sign of (exact result − bound) for one operation on doubles: the truth that enclosures are held against. Once in whole numbers for
/// all finite doubles, once much faster by error-free transformations for doubles of moderate size.
/// </summary>
internal static class ExactArithmetic
{
    /// <summary>The sign of an operation's exact result minus a bound.</summary>
    public delegate int Oracle(double a, double b, double bound);

    public static Oracle Exact(string operation) => operation switch
    {
        "Add" => static (a, b, bound) => Compare(bound, () => Difference(Sum(Parts(a), Parts(b)), Parts(bound))),
        "Subtract" => static (a, b, bound) => Compare(bound, () => Difference(Sum(Parts(a), Parts(-b)), Parts(bound))),
        "Multiply" => static (a, b, bound) => Compare(bound, () => Difference(Product(Parts(a), Parts(b)), Parts(bound))),
        // a / b − bound has the sign of (a − bound b) / b.
        "Divide" => static (a, b, bound) =>
            Compare(bound, () => Difference(Parts(a), Product(Parts(bound), Parts(b))) * Math.Sign(b)),
        _ => throw new ArgumentOutOfRangeException(nameof(operation), operation, "No such operation."),
    };

    /// <summary>The same by one or two roundings whose errors are known; exact while nothing over- or underflows.</summary>
    public static Oracle Moderate(string operation) => operation switch
    {
        "Add" => CompareSum,
        "Subtract" => static (a, b, bound) => CompareSum(a, -b, bound),
        "Multiply" => static (a, b, bound) => Math.Sign(Math.FusedMultiplyAdd(a, b, -bound)), // one rounding keeps the sign
        "Divide" => static (a, b, bound) => Math.Sign(Math.FusedMultiplyAdd(-bound, b, a)) * Math.Sign(b),
        _ => throw new ArgumentOutOfRangeException(nameof(operation), operation, "No such operation."),
    };

    private static int Compare(double bound, Func<int> finite) => double.IsInfinity(bound) ? -Math.Sign(bound) : finite();

    /// <summary>A finite double as whole number times a power of two.</summary>
    public static (BigInteger Number, int Exponent) Parts(double value)
    {
        long bits = BitConverter.DoubleToInt64Bits(value);
        long fraction = bits & 0xFFFFFFFFFFFFF;
        int exponent = (int)((bits >> 52) & 0x7FF);
        BigInteger number = exponent == 0 ? fraction : fraction | 0x10000000000000;
        return (bits < 0 ? -number : number, Math.Max(exponent, 1) - 1075);
    }

    // If the rounded sum differs from the bound it decides, since rounding keeps order; else its rounding error does (D. E. Knuth, The Art
    // of Computer Programming, volume 2, section 4.2.2).
    private static int CompareSum(double a, double b, double bound)
    {
        double sum = a + b;
        if (sum != bound) return Math.Sign(sum - bound);
        double part = sum - a;
        return Math.Sign((a - (sum - part)) + (b - part));
    }

    private static (BigInteger Number, int Exponent) Sum(
        (BigInteger Number, int Exponent) left, (BigInteger Number, int Exponent) right)
    {
        int lower = Math.Min(left.Exponent, right.Exponent);
        return ((left.Number << (left.Exponent - lower)) + (right.Number << (right.Exponent - lower)), lower);
    }

    private static (BigInteger Number, int Exponent) Product(
        (BigInteger Number, int Exponent) left, (BigInteger Number, int Exponent) right) =>
        (left.Number * right.Number, left.Exponent + right.Exponent);

    private static int Difference((BigInteger Number, int Exponent) left, (BigInteger Number, int Exponent) right) =>
        Sum(left, (-right.Number, right.Exponent)).Number.Sign;
}
