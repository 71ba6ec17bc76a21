namespace OdeDsl.Tests.Scalars;

/// <summary>Random doubles of several characters, and how far two doubles are apart.</summary>
internal static class Doubles
{
    private static readonly double[] Special =
    [
        0, -0.0, 1, -1, 2, -2, 0.5, 3, -3, 10, 1e16, -1e16, double.Epsilon, -double.Epsilon, double.MaxValue, double.MinValue,
        double.PositiveInfinity, double.NegativeInfinity, double.NaN, Math.PI, -Math.PI, 2.2250738585072014e-308,
    ];

    /// <summary>A third special values, a third random bit patterns, a third of ordinary size.</summary>
    public static double Any(Random random) => random.Next(3) switch
    {
        0 => Special[random.Next(Special.Length)],
        1 => BitConverter.Int64BitsToDouble(random.NextInt64(long.MinValue, long.MaxValue)),
        _ => Ordinary(random),
    };

    /// <summary>Of either sign with a magnitude between 1e-6 and 1e3, evenly in its logarithm.</summary>
    public static double Ordinary(Random random) => Sign(random) * Math.Exp(Between(random, Math.Log(1e-6), Math.Log(1e3)));

    /// <summary>A random significand with a binary exponent between two bounds, either sign.</summary>
    public static double WithExponent(Random random, int lowest, int highest) =>
        Sign(random) * Math.ScaleB(1 + random.NextDouble(), random.Next(lowest, highest + 1));

    /// <summary>A finite double of any magnitude: random bits.</summary>
    public static double Finite(Random random)
    {
        while (true)
        {
            double value = BitConverter.Int64BitsToDouble(random.NextInt64(long.MinValue, long.MaxValue));
            if (double.IsFinite(value)) return value;
        }
    }

    public static double Between(Random random, double lower, double upper) => lower + ((upper - lower) * random.NextDouble());

    /// <summary>A point of a range: evenly, or close to an end, or with a logarithmically even distance from zero.</summary>
    public static double In(Random random, double lower, double upper)
    {
        double point = random.Next(4) switch
        {
            0 => lower + ((upper - lower) * Math.ScaleB(random.NextDouble(), -random.Next(30))),
            1 => upper - ((upper - lower) * Math.ScaleB(random.NextDouble(), -random.Next(30))),
            2 => Sign(random) * Math.ScaleB(Math.Max(Math.Abs(lower), Math.Abs(upper)), -random.Next(40)) * random.NextDouble(),
            _ => Between(random, lower, upper),
        };
        return Math.Clamp(point, lower, upper);
    }

    /// <summary>How many doubles lie between two, counting one of the ends; huge if one is NaN and the other is not.</summary>
    public static ulong Distance(double a, double b)
    {
        if (double.IsNaN(a) || double.IsNaN(b)) return double.IsNaN(a) && double.IsNaN(b) ? 0 : ulong.MaxValue;
        (long x, long y) = (Place(a), Place(b));
        return x > y ? (ulong)(x - y) : (ulong)(y - x);
    }

    public static bool SameBits(double a, double b) =>
        BitConverter.DoubleToInt64Bits(a) == BitConverter.DoubleToInt64Bits(b) || (double.IsNaN(a) && double.IsNaN(b));

    private static int Sign(Random random) => random.Next(2) == 0 ? 1 : -1;

    // Places in the order of the real line; both zeros have place zero.
    private static long Place(double value)
    {
        long bits = BitConverter.DoubleToInt64Bits(value);
        return bits < 0 ? long.MinValue - bits : bits;
    }
}
