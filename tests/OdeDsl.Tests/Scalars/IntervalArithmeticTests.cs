using System.Runtime.Intrinsics;
using System.Runtime.Intrinsics.X86;
using OdeDsl.Scalars;
using Xunit;

namespace OdeDsl.Tests.Scalars;

/// <summary>
/// The four operations against exact arithmetic, for each way of rounding this machine has. An operation's extrema over two intervals lie
/// at their corners, so a result that contains the four exact corner values is an enclosure.
/// </summary>
public sealed class IntervalArithmeticTests
{
    private delegate Vector128<double> Operation(Vector128<double> left, Vector128<double> right);

    // Rounding in the instruction is only there to test where the processor has it.
    public static TheoryData<string> Roundings => Avx512F.IsSupported ? ["widened", "embedded"] : ["widened"];

    public static TheoryData<string, string> OperationsAndRoundings
    {
        get
        {
            TheoryData<string, string> data = [];
            foreach (string operation in (string[])["Add", "Subtract", "Multiply", "Divide"])
            {
                data.Add(operation, "widened");
                if (Avx512F.IsSupported) data.Add(operation, "embedded");
            }

            return data;
        }
    }

    [Theory]
    [MemberData(nameof(OperationsAndRoundings))]
    public void A_million_results_of_moderate_size_contain_the_exact_values_and_little_more(string name, string rounding)
    {
        Operation operation = Find(name, rounding);
        ExactArithmetic.Oracle oracle = ExactArithmetic.Moderate(name);
        Random random = new(11);
        for (int i = 0; i < 1_000_000; i++)
        {
            (double Lower, double Upper) a = Bounds(random, static r => Doubles.WithExponent(r, -200, 200));
            (double Lower, double Upper) b = Bounds(random, static r => Doubles.WithExponent(r, -200, 200));
            if (name == "Divide" && b.Lower <= 0 && b.Upper >= 0) continue;
            CheckCorners(name, oracle, operation, a, b, tight: true);
        }
    }

    [Theory]
    [MemberData(nameof(OperationsAndRoundings))]
    public void Results_of_any_magnitude_contain_the_exact_values(string name, string rounding)
    {
        Operation operation = Find(name, rounding);
        ExactArithmetic.Oracle oracle = ExactArithmetic.Exact(name);
        Random random = new(12);
        for (int i = 0; i < 10_000; i++)
        {
            Func<Random, double> kind = (i % 4) switch
            {
                0 => Doubles.Finite,
                1 => static r => Doubles.WithExponent(r, -560, -500), // products near and below the smallest normal number
                2 => static r => Doubles.WithExponent(r, -1074, -1015), // subnormal numbers
                _ => static r => Doubles.WithExponent(r, 1015, 1023), // overflow
            };
            (double Lower, double Upper) a = Bounds(random, kind);
            (double Lower, double Upper) b = Bounds(random, random.Next(3) == 0 ? Doubles.Ordinary : kind);
            if (name == "Divide" && b.Lower <= 0 && b.Upper >= 0) continue;
            CheckCorners(name, oracle, operation, a, b, tight: false);
        }
    }

    [Fact]
    public void The_two_oracles_agree()
    {
        Random random = new(13);
        for (int i = 0; i < 20_000; i++)
        {
            double a = Doubles.WithExponent(random, -20, 20), b = Doubles.WithExponent(random, -20, 20);
            (string name, double near) = (i % 4) switch
            {
                0 => ("Add", a + b),
                1 => ("Subtract", a - b),
                2 => ("Multiply", a * b),
                _ => ("Divide", a / b),
            };
            ExactArithmetic.Oracle exact = ExactArithmetic.Exact(name), moderate = ExactArithmetic.Moderate(name);
            double above = Math.BitIncrement(near);
            Assert.Equal((exact(a, b, near), exact(a, b, above)), (moderate(a, b, near), moderate(a, b, above)));
        }
    }

    [Theory]
    [MemberData(nameof(Roundings))]
    public void Products_with_a_number_and_squares_contain_the_exact_values(string rounding)
    {
        bool embedded = rounding == "embedded";
        ExactArithmetic.Oracle oracle = ExactArithmetic.Exact("Multiply");
        Random random = new(14);
        for (int i = 0; i < 20_000; i++)
        {
            Func<Random, double> kind = i % 2 == 0 ? Doubles.Finite : Doubles.Ordinary;
            (double Lower, double Upper) a = Bounds(random, kind);
            double factor = kind(random);
            Vector128<double> bounds = Vector128.Create(-a.Lower, a.Upper);
            Vector128<double> product = embedded
                ? IntervalArithmetic<EmbeddedRounding>.Scale(bounds, factor)
                : IntervalArithmetic<WidenedRounding>.Scale(bounds, factor);
            CheckContains("Multiply", oracle, a.Lower, factor, product);
            CheckContains("Multiply", oracle, a.Upper, factor, product);

            Vector128<double> square = embedded
                ? IntervalArithmetic<EmbeddedRounding>.Square(bounds)
                : IntervalArithmetic<WidenedRounding>.Square(bounds);
            CheckContains("Multiply", oracle, a.Lower, a.Lower, square);
            CheckContains("Multiply", oracle, a.Upper, a.Upper, square);
            Assert.True(-square[0] >= 0);
            if (a.Lower <= 0 && a.Upper >= 0) Assert.Equal(0, -square[0]);
        }
    }

    [Fact]
    public void Operators_use_the_arithmetic_tested_here()
    {
        Interval a = new(-1, 3), b = new(2, 5);
        Assert.Equal((true, true), (Near(a + b, 1, 8), Near(a - b, -6, 1)));
        Assert.Equal((true, true), (Near(a * b, -5, 15), Near(a / b, -0.5, 1.5)));
        Assert.Equal((true, true), (Near(a * -2.0, -6, 2), Near(-2.0 * a, -6, 2)));
        Assert.Equal((true, true), (Near(a + 1.0, 0, 4), Near(1.0 - a, -2, 2)));
        Assert.Equal((true, true), (Near(a - 1.0, -2, 2), Near(1.0 + a, 0, 4)));
        Assert.Equal((true, true), (Near(b / 2.0, 1, 2.5), Near(10.0 / b, 2, 5)));
        Assert.Equal(new Interval(-3, 1), -a);
        Assert.True(Near(Interval.FusedMultiplyAdd(a, b, b), -3, 20));
        Assert.True(Near(Interval.Square(a), 0, 9));
    }

    private static bool Near(Interval actual, double lower, double upper) =>
        actual.Contains(new Interval(lower, upper))
        && Doubles.Distance(actual.Lower + 32, lower + 32) <= 1
        && Doubles.Distance(actual.Upper + 32, upper + 32) <= 1;

    private static Operation Find(string name, string rounding) => (name, rounding) switch
    {
        ("Add", "widened") => IntervalArithmetic<WidenedRounding>.Add,
        ("Subtract", "widened") => IntervalArithmetic<WidenedRounding>.Subtract,
        ("Multiply", "widened") => IntervalArithmetic<WidenedRounding>.Multiply,
        ("Divide", "widened") => IntervalArithmetic<WidenedRounding>.Divide,
        ("Add", "embedded") => IntervalArithmetic<EmbeddedRounding>.Add,
        ("Subtract", "embedded") => IntervalArithmetic<EmbeddedRounding>.Subtract,
        ("Multiply", "embedded") => IntervalArithmetic<EmbeddedRounding>.Multiply,
        ("Divide", "embedded") => IntervalArithmetic<EmbeddedRounding>.Divide,
        _ => throw new ArgumentOutOfRangeException(nameof(name), name, "No such operation."),
    };

    // Mostly narrow intervals; every fourth between two independent numbers, every eighth a point.
    private static (double Lower, double Upper) Bounds(Random random, Func<Random, double> number)
    {
        double first = number(random);
        double second = random.Next(8) switch
        {
            0 => first,
            1 or 2 => number(random),
            _ => first * (1 + Math.ScaleB(random.NextDouble(), -random.Next(50))),
        };
        if (!double.IsFinite(second)) second = first;
        return (Math.Min(first, second), Math.Max(first, second));
    }

    private static void CheckCorners(
        string name,
        ExactArithmetic.Oracle oracle,
        Operation operation,
        (double Lower, double Upper) a,
        (double Lower, double Upper) b,
        bool tight)
    {
        Vector128<double> result = operation(Vector128.Create(-a.Lower, a.Upper), Vector128.Create(-b.Lower, b.Upper));
        CheckContains(name, oracle, a.Lower, b.Lower, result);
        CheckContains(name, oracle, a.Lower, b.Upper, result);
        CheckContains(name, oracle, a.Upper, b.Lower, result);
        CheckContains(name, oracle, a.Upper, b.Upper, result);
        if (!tight) return;

        // Two doubles further in, some corner is outside: the bounds are within two units of the exact range.
        double lower = Math.BitIncrement(Math.BitIncrement(-result[0])), upper = Math.BitDecrement(Math.BitDecrement(result[1]));
        if (AnyCorner(oracle, a, b, lower, -1) && AnyCorner(oracle, a, b, upper, 1)) return;
        Assert.Fail($"{name} [{a.Lower:R}, {a.Upper:R}] [{b.Lower:R}, {b.Upper:R}] gives the wide [{-result[0]:R}, {result[1]:R}].");
    }

    private static bool AnyCorner(
        ExactArithmetic.Oracle oracle, (double Lower, double Upper) a, (double Lower, double Upper) b, double bound, int side) =>
        oracle(a.Lower, b.Lower, bound) * side >= 0 || oracle(a.Lower, b.Upper, bound) * side >= 0
        || oracle(a.Upper, b.Lower, bound) * side >= 0 || oracle(a.Upper, b.Upper, bound) * side >= 0;

    private static void CheckContains(string name, ExactArithmetic.Oracle oracle, double a, double b, Vector128<double> result)
    {
        double lower = -result[0], upper = result[1];
        bool contained = lower <= upper && oracle(a, b, lower) >= 0 && oracle(a, b, upper) <= 0;
        if (!contained) Assert.Fail($"{name}({a:R}, {b:R}) lies outside [{lower:R}, {upper:R}].");
    }
}
