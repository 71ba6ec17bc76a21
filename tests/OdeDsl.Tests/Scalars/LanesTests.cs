using System.Runtime.Intrinsics;
using OdeDsl.Scalars;
using Xunit;

namespace OdeDsl.Tests.Scalars;

public sealed class LanesTests
{
    private const int Cases = 6_000;

    // The bounds promised in the documentation of the lanes, in units in the last place. What is not listed is exact.
    private static readonly Dictionary<string, ulong> Promised = new()
    {
        ["Sin"] = 1, ["Cos"] = 1, ["Exp"] = 2, ["Log"] = 3, ["Log2"] = 4, ["Tan"] = 4, ["Pow"] = 4, ["Cosh"] = 4, ["Log10"] = 5,
        ["Sinh"] = 5, ["Tanh"] = 5,
    };

    public static TheoryData<string> Unary => FunctionTable.UnaryNames;

    public static TheoryData<string> Binary => FunctionTable.BinaryNames;

    [Theory]
    [MemberData(nameof(Unary))]
    public void A_function_stays_within_the_promised_units_of_plain_code_in_each_lane(string name)
    {
        FunctionTable.Unary function = FunctionTable.One(name);
        Func<Lanes4, Lanes4> four = FunctionTable.One<Lanes4>(name);
        Func<Lanes8, Lanes8> eight = FunctionTable.One<Lanes8>(name);
        Random random = new(5);
        double[] x = new double[8];
        for (int i = 0; i < Cases; i++)
        {
            for (int lane = 0; lane < 8; lane++) x[lane] = Argument(random, function);
            Lanes4 ofFour = four(new Lanes4(x));
            Lanes8 ofEight = eight(new Lanes8(x));
            for (int lane = 0; lane < 8; lane++)
            {
                double expected = function.Plain(x[lane]);
                Check(name, expected, ofEight[lane], x[lane]);
                if (lane < 4) Check(name, expected, ofFour[lane], x[lane]);
            }
        }
    }

    [Theory]
    [MemberData(nameof(Binary))]
    public void An_operation_on_two_numbers_stays_within_the_promised_units_in_each_lane(string name)
    {
        Func<double, double, double> plain = FunctionTable.Two(name).Plain;
        Func<Lanes4, Lanes4, Lanes4> four = FunctionTable.Two<Lanes4>(name);
        Func<Lanes8, Lanes8, Lanes8> eight = FunctionTable.Two<Lanes8>(name);
        Random random = new(6);
        double[] x = new double[8], y = new double[8];
        for (int i = 0; i < Cases; i++)
        {
            bool wild = random.Next(2) == 0; // with one special value in a lane, powers are computed one by one
            for (int lane = 0; lane < 8; lane++)
            {
                x[lane] = wild ? Doubles.Any(random) : Doubles.Ordinary(random);
                y[lane] = wild ? Doubles.Any(random) : Exponent(random);
            }

            Lanes4 ofFour = four(new Lanes4(x), new Lanes4(y));
            Lanes8 ofEight = eight(new Lanes8(x), new Lanes8(y));
            for (int lane = 0; lane < 8; lane++)
            {
                double expected = plain(x[lane], y[lane]);
                Check(name, expected, ofEight[lane], x[lane], y[lane]);
                if (lane < 4) Check(name, expected, ofFour[lane], x[lane], y[lane]);
            }
        }
    }

    [Theory]
    [InlineData("Add")]
    [InlineData("Subtract")]
    [InlineData("Multiply")]
    [InlineData("Divide")]
    public void An_operator_with_a_literal_is_exact_in_each_lane(string name)
    {
        Func<double, double, double> plain = FunctionTable.Two(name).Plain;
        Random random = new(7);
        double[] x = new double[8];
        for (int i = 0; i < Cases; i++)
        {
            double y = Doubles.Any(random);
            for (int lane = 0; lane < 8; lane++) x[lane] = Doubles.Any(random);
            Lanes8 right = FunctionTable.Mixed<Lanes8>(name).Right(new Lanes8(x), y);
            Lanes4 left = FunctionTable.Mixed<Lanes4>(name).Left(y, new Lanes4(x));
            for (int lane = 0; lane < 8; lane++)
            {
                Check(name, plain(x[lane], y), right[lane], x[lane], y);
                if (lane < 4) Check(name, plain(y, x[lane]), left[lane], y, x[lane]);
            }
        }
    }

    [Fact]
    public void A_fused_multiply_add_rounds_once_in_each_lane()
    {
        Random random = new(8);
        for (int i = 0; i < Cases; i++)
        {
            double x = Doubles.Ordinary(random), y = Doubles.Ordinary(random), z = -x * y;
            double expected = Math.FusedMultiplyAdd(x, y, z);
            Assert.Equal(expected, Lanes4.FusedMultiplyAdd(Lanes4.Constant(x), Lanes4.Constant(y), Lanes4.Constant(z))[3]);
            Assert.Equal(expected, Lanes8.FusedMultiplyAdd(Lanes8.Constant(x), Lanes8.Constant(y), Lanes8.Constant(z))[7]);
        }
    }

    [Theory]
    [InlineData(-700, 1)] // the result is small, but a normal number
    [InlineData(690, 1)]
    [InlineData(0.001, -700_000)]
    public void A_power_near_the_ends_of_the_range_keeps_its_accuracy(double logarithm, double factor)
    {
        Random random = new(9);
        for (int i = 0; i < Cases; i++)
        {
            double x = Math.Exp(logarithm * Doubles.Between(random, 0.98, 0.99));
            double y = factor * Doubles.Between(random, 0.98, 0.99);
            Check("Pow", Math.Pow(x, y), Lanes4.Pow(Lanes4.Constant(x), Lanes4.Constant(y))[0], x, y);
        }
    }

    [Fact]
    public void Lanes_are_read_from_and_written_to_spans_in_order()
    {
        double[] numbers = [1, 2, 3, 4, 5, 6, 7, 8, 9];
        double[] copy = new double[9];
        new Lanes8(numbers).CopyTo(copy);
        Assert.Equal([1, 2, 3, 4, 5, 6, 7, 8, 0], copy);
        new Lanes4(numbers.AsSpan(5)).CopyTo(copy);
        Assert.Equal([6, 7, 8, 9, 5, 6, 7, 8, 0], copy);
        Assert.Equal(8, new Lanes8(Vector512.Create(8.0))[7]);
        Assert.Equal(Lanes8.Count, Vector512<double>.Count);
        Assert.Equal(Lanes4.Count, Vector256<double>.Count);
        Assert.Throws<ArgumentOutOfRangeException>(() => new Lanes4(numbers.AsSpan(6)));
        Assert.Throws<ArgumentOutOfRangeException>(() => new Lanes8(numbers)[8]);
        Assert.ThrowsAny<ArgumentException>(() => new Lanes8(numbers).CopyTo(copy.AsSpan(2)));
    }

    [Fact]
    public void Lanes_are_equal_as_doubles_are()
    {
        Assert.True(Lanes4.Constant(0) == Lanes4.Constant(-0.0));
        Assert.True(Lanes8.Constant(double.NaN) != Lanes8.Constant(double.NaN));
        Assert.False(new Lanes4([1, 2, 3, 4]).Equals(new Lanes4([1, 2, 3, 5])));
    }

    private static double Argument(Random random, FunctionTable.Unary function) => random.Next(3) switch
    {
        0 => Doubles.Any(random),
        1 => Doubles.Ordinary(random),
        _ => Doubles.In(random, function.Lower, function.Upper),
    };

    private static double Exponent(Random random) =>
        random.Next(2) == 0 ? random.Next(-20, 21) : Doubles.Between(random, -60, 60);

    private static void Check(string name, double expected, double actual, double x, double y = double.NaN)
    {
        ulong distance = Doubles.Distance(expected, actual);
        ulong allowed = double.IsNormal(expected) || double.IsSubnormal(expected) ? Promised.GetValueOrDefault(name) : 0;
        bool sameSign = expected != 0 || double.IsNegative(expected) == double.IsNegative(actual);
        if (!(distance <= allowed && sameSign)) Assert.Fail($"{name}({x:R}, {y:R}) is {actual:R}, not {expected:R}: {distance} units");
    }
}
