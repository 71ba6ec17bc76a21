using System.Globalization;
using System.Numerics;
using OdeDsl.Scalars;
using Xunit;

namespace OdeDsl.Tests.Scalars;

/// <summary>Elementary functions of intervals against four-hundred-bit arithmetic and against plain code at points inside.</summary>
public sealed class IntervalFunctionTests
{
    public static TheoryData<string> Unary => FunctionTable.UnaryNames;

    public static TheoryData<string> Binary => FunctionTable.BinaryNames;

    // M. Abramowitz and I. A. Stegun, Handbook of Mathematical Functions, 1964, tables 1.1, 4.2, 4.6 (from memory).
    [Theory]
    [InlineData("Exp", 1, "2718281828459045235360287471352")]
    [InlineData("Log", 2, "0693147180559945309417232121458")]
    [InlineData("Log", 10, "2302585092994045684017991454684")]
    [InlineData("Sqrt", 2, "1414213562373095048801688724209")]
    [InlineData("Sin", 1, "0841470984807896506652502321630")]
    [InlineData("Cos", 1, "0540302305868139717400936607442")]
    public void The_reference_has_the_handbook_s_digits(string name, int argument, string digits)
    {
        CheckDigits(RealFunctions.Of(name, argument), digits);
    }

    [Fact]
    public void The_reference_knows_pi()
    {
        CheckDigits(RealFunctions.Pi, "3141592653589793238462643383279");
        Assert.True(Real.Abs((4 * RealFunctions.Atan2(1, 1)) - RealFunctions.Pi) < Real.Scale(1, -300));
    }

    [Theory]
    [MemberData(nameof(Unary))]
    public void A_point_s_enclosure_contains_the_true_value_and_plain_code_errs_by_less_than_allowed(string name)
    {
        FunctionTable.Unary function = FunctionTable.One(name);
        Func<Interval, Interval> interval = FunctionTable.One<Interval>(name);
        Random random = new(21);
        for (int i = 0; i < 700; i++)
        {
            double x = Doubles.In(random, function.Lower, function.Upper);
            if (name == "Atanh" && Math.Abs(x) == 1) continue;
            Real truth = RealFunctions.Of(name, Real.Of(x));
            Interval enclosure = interval(Interval.Constant(x));
            CheckContains(enclosure, truth, name, x);

            double plain = function.Plain(x);
            Real unit = Real.Of(Math.BitIncrement(Math.Abs(plain)) - Math.Abs(plain));
            if (!(Real.Abs(truth - Real.Of(plain)) <= Interval.FunctionError * unit)) Assert.Fail($"Math.{name}({x:R})");
            if (!(Doubles.Distance(enclosure.Lower, enclosure.Upper) <= 30)) Assert.Fail($"{name}({x:R}) is wide: {enclosure}");
        }
    }

    [Fact]
    public void A_power_s_enclosure_contains_the_true_value()
    {
        Random random = new(22);
        for (int i = 0; i < 700; i++)
        {
            double x = Math.Abs(Doubles.Ordinary(random)), y = Doubles.Between(random, -40, 40);
            Real truth = RealFunctions.Pow(Real.Of(x), Real.Of(y));
            Interval enclosure = Interval.Pow(Interval.Constant(x), Interval.Constant(y));
            CheckContains(enclosure, truth, "Pow", x, y);
            Assert.True(Doubles.Distance(enclosure.Lower, enclosure.Upper) <= 30);
        }
    }

    [Fact]
    public void An_angle_s_enclosure_contains_the_true_value()
    {
        Random random = new(23);
        for (int i = 0; i < 700; i++)
        {
            double x = Doubles.Ordinary(random), y = Doubles.Ordinary(random);
            Real truth = RealFunctions.Atan2(Real.Of(y), Real.Of(x));
            Interval enclosure = Interval.Atan2(Interval.Constant(y), Interval.Constant(x));
            CheckContains(enclosure, truth, "Atan2", y, x);
        }
    }

    [Theory]
    [MemberData(nameof(Unary))]
    public void An_enclosure_contains_what_plain_code_computes_at_points_inside(string name)
    {
        FunctionTable.Unary function = FunctionTable.One(name);
        Func<Interval, Interval> interval = FunctionTable.One<Interval>(name);
        Random random = new(24);
        for (int i = 0; i < 20_000; i++)
        {
            Interval argument = Argument(random, function);
            Interval enclosure = interval(argument);
            for (int k = 0; k < 5; k++)
            {
                double x = Point(random, argument, k), value = function.Plain(x);
                if (double.IsNaN(value) || enclosure.Contains(value)) continue;
                Assert.Fail($"{name}({x:R}) = {value:R} outside {enclosure} for {argument}");
            }
        }
    }

    [Theory]
    [MemberData(nameof(Binary))]
    public void An_enclosure_of_two_arguments_contains_what_plain_code_computes_inside(string name)
    {
        Func<double, double, double> plain = FunctionTable.Two(name).Plain;
        Func<Interval, Interval, Interval> interval = FunctionTable.Two<Interval>(name);
        Random random = new(25);
        for (int i = 0; i < 20_000; i++)
        {
            Interval first = Around(random, Doubles.Ordinary(random));
            Interval second = random.Next(3) == 0 ? Interval.Constant(random.Next(-6, 7)) : Around(random, random.Next(-6, 7));
            Interval enclosure = interval(first, second);
            for (int k = 0; k < 5; k++)
            {
                double x = Point(random, first, k), y = Point(random, second, random.Next(5));
                if (random.Next(2) == 0 && second.Contains(Math.Round(y))) y = Math.Round(y); // whole exponents and quotients
                double value = plain(x, y);
                // A divisor of zero gives a result that is no value of the function.
                if (double.IsNaN(value) || (y == 0 && name == "Divide")) continue;
                if (!enclosure.Contains(value)) Assert.Fail($"{name}({x:R}, {y:R}) = {value:R} outside {enclosure} for {first}, {second}");
            }
        }
    }

    [Fact]
    public void Long_and_distant_arguments_of_periodic_functions_are_enclosed()
    {
        Random random = new(26);
        foreach (string name in (string[])["Sin", "Cos", "Tan"])
        {
            FunctionTable.Unary function = FunctionTable.One(name);
            for (int i = 0; i < 20_000; i++)
            {
                double centre = Doubles.WithExponent(random, -5, 60), radius = Doubles.WithExponent(random, -30, 3);
                Interval argument = new(centre - Math.Abs(radius), centre + Math.Abs(radius));
                Interval enclosure = FunctionTable.One<Interval>(name)(argument);
                for (int k = 0; k < 5; k++)
                {
                    double x = Point(random, argument, k);
                    if (!enclosure.Contains(function.Plain(x))) Assert.Fail($"{name}({x:R}) outside {enclosure} for {argument}");
                }
            }
        }
    }

    private static Interval Argument(Random random, FunctionTable.Unary function) =>
        Around(random, random.Next(4) == 0 ? Doubles.Ordinary(random) : Doubles.In(random, function.Lower, function.Upper));

    private static Interval Around(Random random, double centre)
    {
        double radius = random.Next(4) == 0 ? 0 : (1 + Math.Abs(centre)) * Math.ScaleB(random.NextDouble(), -random.Next(40));
        return random.Next(50) switch
        {
            0 => new Interval(double.NegativeInfinity, centre),
            1 => new Interval(centre, double.PositiveInfinity),
            _ => new Interval(centre - radius, centre + (radius * random.NextDouble())),
        };
    }

    private static double Point(Random random, Interval interval, int k)
    {
        if (k == 0 && double.IsFinite(interval.Lower)) return interval.Lower;
        if (k == 1 && double.IsFinite(interval.Upper)) return interval.Upper;
        double lower = Math.Max(interval.Lower, -1e6 - Math.Abs(interval.Midpoint));
        double upper = Math.Min(interval.Upper, 1e6 + Math.Abs(interval.Midpoint));
        return Math.Clamp(Doubles.Between(random, lower, upper), lower, upper);
    }

    private static void CheckDigits(Real value, string digits)
    {
        for (int k = 0; k < 30; k++) value *= 10;
        Assert.True(BigInteger.Abs(Real.Round(value) - BigInteger.Parse(digits, CultureInfo.InvariantCulture)) <= 1);
    }

    private static void CheckContains(Interval enclosure, Real truth, string name, params double[] arguments)
    {
        if (Real.Of(enclosure.Lower) <= truth && truth <= Real.Of(enclosure.Upper)) return;
        Assert.Fail($"{name}({string.Join(", ", arguments)}) outside {enclosure}");
    }
}
