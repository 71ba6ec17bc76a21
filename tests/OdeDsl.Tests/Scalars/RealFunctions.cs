using System.Numerics;

namespace OdeDsl.Tests.Scalars;

/// <summary>Elementary functions to some three hundred bits, from their power series after a reduction of the argument.</summary>
internal static class RealFunctions
{
    // Halvings of the argument before, and squarings or doublings after, summing a series.
    private const int Halvings = 16;

    // Machin 1706: π/4 = 4 arctan(1/5) − arctan(1/239).
    public static readonly Real Pi = 4 * ((4 * ArctanSeries((Real)1 / 5)) - ArctanSeries((Real)1 / 239));

    // Abramowitz and Stegun 4.1.27 at z = 2.
    private static readonly Real Log2 = 2 * ArtanhSeries((Real)1 / 3);

    public static Real Of(string name, Real x) => name switch
    {
        "Negate" => -x,
        "Square" => x * x,
        "Sqrt" => Real.Sqrt(x),
        "Cbrt" => x.Sign == 0 ? x : x.Sign < 0 ? -Exp(Log(-x) / 3) : Exp(Log(x) / 3),
        "Exp" => Exp(x),
        "Log" => Log(x),
        "Log2" => Log(x) / Log2,
        "Log10" => Log(x) / Log(10),
        "Sin" => SinCos(x).Sine,
        "Cos" => SinCos(x).Cosine,
        "Tan" => SinCos(x) is var (s, c) ? s / c : default,
        "Asin" => Atan2(x, Real.Sqrt((1 - x) * (1 + x))),
        "Acos" => Atan2(Real.Sqrt((1 - x) * (1 + x)), x),
        "Atan" => Atan2(x, 1),
        "Sinh" => Real.Scale(Exp(x) - Exp(-x), -1),
        "Cosh" => Real.Scale(Exp(x) + Exp(-x), -1),
        "Tanh" => (Exp(x) - Exp(-x)) / (Exp(x) + Exp(-x)),
        "Asinh" => x.Sign < 0 ? -Of(name, -x) : Log(x + Real.Sqrt((x * x) + 1)),
        "Acosh" => Log(x + Real.Sqrt((x - 1) * (x + 1))),
        "Atanh" => Real.Scale(Log((1 + x) / (1 - x)), -1),
        _ => throw new ArgumentOutOfRangeException(nameof(name), name, "No such function."),
    };

    public static Real Pow(Real x, Real y) => Exp(y * Log(x));

    public static Real Exp(Real x)
    {
        BigInteger twos = Real.Round(x / Log2);
        Real reduced = Real.Scale(x - (Whole(twos) * Log2), -Halvings);
        Real sum = 1, term = 1;
        for (int k = 1; !Real.Negligible(term, sum); k++)
        {
            term = term * reduced / k;
            sum += term;
        }

        for (int k = 0; k < Halvings; k++) sum *= sum;
        return Real.Scale(sum, (int)twos);
    }

    // From the double's logarithm by y + 2 (x − e^y) / (x + e^y), which triples the digits (Halley's method on the exponential).
    public static Real Log(Real x)
    {
        Real y = Real.Of(Math.Log(x.ToDouble()));
        if (x.ToDouble() is 0 or double.PositiveInfinity) throw new ArgumentOutOfRangeException(nameof(x), "Beyond the doubles.");
        for (int k = 0; k < 3; k++)
        {
            Real power = Exp(y);
            y += 2 * (x - power) / (x + power);
        }

        return y;
    }

    public static (Real Sine, Real Cosine) SinCos(Real x)
    {
        BigInteger quarters = Real.Round(2 * x / Pi);
        Real reduced = Real.Scale(x - Real.Scale(Whole(quarters) * Pi, -1), -Halvings);
        Real square = -(reduced * reduced);
        Real sine = reduced, term = reduced;
        for (int k = 3; !Real.Negligible(term, sine); k += 2)
        {
            term = term * square / (k * (k - 1));
            sine += term;
        }

        // sin 2x = 2 sin x cos x, and 1 − cos 2x = 2 sin² x, which does not cancel.
        Real cosine = Real.Sqrt(1 - (sine * sine));
        for (int k = 0; k < Halvings; k++) (sine, cosine) = (2 * sine * cosine, 1 - (2 * sine * sine));
        return (int)(quarters & 3) switch
        {
            0 => (sine, cosine),
            1 => (cosine, -sine),
            2 => (-sine, -cosine),
            _ => (-cosine, sine),
        };
    }

    public static Real Atan2(Real y, Real x)
    {
        if (x.Sign == 0 && y.Sign == 0) return Real.Zero;
        // tan(a / 2) = y / (r + x): from the half plane of positive x, then halved some more.
        Real radius = Real.Sqrt((x * x) + (y * y));
        if (x.Sign < 0) return y.Sign < 0 ? Atan2(-y, -x) - Pi : Pi - Atan2(y, -x);
        Real tangent = y / (radius + x);
        for (int k = 1; k < Halvings; k++) tangent /= 1 + Real.Sqrt(1 + (tangent * tangent));
        return Real.Scale(ArctanSeries(tangent), Halvings);
    }

    // Abramowitz and Stegun 4.4.42.
    private static Real ArctanSeries(Real x)
    {
        Real square = -(x * x), sum = x, power = x;
        for (int k = 3; !Real.Negligible(power, sum); k += 2)
        {
            power *= square;
            sum += power / k;
        }

        return sum;
    }

    // Abramowitz and Stegun 4.6.33.
    private static Real ArtanhSeries(Real x)
    {
        Real square = x * x, sum = x, power = x;
        for (int k = 3; !Real.Negligible(power, sum); k += 2)
        {
            power *= square;
            sum += power / k;
        }

        return sum;
    }

    private static Real Whole(BigInteger value)
    {
        Real result = Real.Zero;
        for (BigInteger rest = BigInteger.Abs(value), place = 0; !rest.IsZero; rest >>= 30, place += 30)
        {
            result += Real.Scale((int)(rest & 0x3FFFFFFF), (int)place);
        }

        return value.Sign < 0 ? -result : result;
    }
}
