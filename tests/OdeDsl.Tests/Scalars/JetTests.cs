using OdeDsl.Scalars;
using Xunit;

namespace OdeDsl.Tests.Scalars;

public sealed class JetTests
{
    public static TheoryData<string> Unary => FunctionTable.UnaryNames;

    public static TheoryData<string> Binary => FunctionTable.BinaryNames;

    [Fact]
    public void A_series_keeps_its_coefficients()
    {
        Jet<Order8> series = new([1, 2, 3, 4, 5, 6, 7, 8, 9]);
        for (int k = 0; k <= 8; k++) Assert.Equal(k + 1, series[k]);
        Assert.Equal((1, false), (series.Value, series.IsConstant));
        Assert.Equal(40320 * 9, series.Derivative(8));
        Assert.Equal("[1, 2.5, 0, 0]", new Jet<Order3>([1, 2.5]).ToString());
        Assert.Equal(new Jet<Order3>([1, 2.5]), Jet<Order3>.Variable(1, 2.5));
        Assert.True(new Jet<Order3>([7]).IsConstant && Jet<Order3>.Constant(7) == new Jet<Order3>([7]));
        Assert.True(Jet<Order3>.Variable(1, 2) != Jet<Order3>.Variable(1, 3));
        Assert.Equal(Jet<Order8>.Variable(1, 2).GetHashCode(), Jet<Order8>.Variable(1, 2).GetHashCode());
        double[] copy = new double[4];
        Jet<Order3>.Variable(1, 2).CopyTo(copy);
        Assert.Equal([1, 2, 0, 0], copy);
        Assert.Equal((3, 8), (Jet<Order3>.Order, Jet<Order8>.Order));
    }

    [Fact]
    public void Orders_that_are_not_kept_are_refused()
    {
        ArgumentException error = Assert.Throws<ArgumentException>(() => new Jet<Order3>([1, 2, 3, 4, 5]));
        Assert.Contains("1 to 4 coefficients, not 5", error.Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentException>(() => new Jet<Order8>([]));
        Assert.Throws<ArgumentOutOfRangeException>(() => Jet<Order3>.Constant(1)[4]);
        Assert.Throws<ArgumentOutOfRangeException>(() => Jet<Order8>.Constant(1)[-1]);
        Assert.Throws<ArgumentException>(() => Jet<Order8>.Constant(1).CopyTo(new double[8]));
    }

    [Theory]
    [MemberData(nameof(Unary))]
    public void The_value_of_a_function_equals_plain_code_bit_for_bit(string name)
    {
        Func<double, double> plain = FunctionTable.One(name).Plain;
        Func<Jet<Order3>, Jet<Order3>> three = FunctionTable.One<Jet<Order3>>(name);
        Func<Jet<Order8>, Jet<Order8>> eight = FunctionTable.One<Jet<Order8>>(name);
        Random random = new(31);
        for (int i = 0; i < 5_000; i++)
        {
            double x = Doubles.Any(random), slope = random.Next(2);
            if (!Doubles.SameBits(plain(x), three(Jet<Order3>.Variable(x, slope)).Value)
                || !Doubles.SameBits(plain(x), eight(Jet<Order8>.Variable(x, slope)).Value))
            {
                Assert.Fail($"{name}({x:R}) with slope {slope}");
            }
        }
    }

    [Theory]
    [MemberData(nameof(Binary))]
    public void The_value_of_an_operation_equals_plain_code_bit_for_bit(string name)
    {
        Func<double, double, double> plain = FunctionTable.Two(name).Plain;
        Func<Jet<Order3>, Jet<Order3>, Jet<Order3>> three = FunctionTable.Two<Jet<Order3>>(name);
        Func<Jet<Order8>, Jet<Order8>, Jet<Order8>> eight = FunctionTable.Two<Jet<Order8>>(name);
        Random random = new(32);
        for (int i = 0; i < 5_000; i++)
        {
            double x = Doubles.Any(random), y = i % 3 == 0 ? random.Next(-20, 21) : Doubles.Any(random);
            double slope = random.Next(2), other = random.Next(2);
            if (!Doubles.SameBits(plain(x, y), three(Jet<Order3>.Variable(x, slope), Jet<Order3>.Variable(y, other)).Value)
                || !Doubles.SameBits(plain(x, y), eight(Jet<Order8>.Variable(x, slope), Jet<Order8>.Variable(y, other)).Value))
            {
                Assert.Fail($"{name}({x:R}, {y:R}) with slopes {slope} and {other}");
            }
        }
    }

    [Theory]
    [InlineData("Add")]
    [InlineData("Subtract")]
    [InlineData("Multiply")]
    [InlineData("Divide")]
    public void An_operator_with_a_literal_does_what_the_constant_series_does(string name)
    {
        (Func<Jet<Order8>, double, Jet<Order8>> right, Func<double, Jet<Order8>, Jet<Order8>> left) =
            FunctionTable.Mixed<Jet<Order8>>(name);
        Func<Jet<Order8>, Jet<Order8>, Jet<Order8>> operation = FunctionTable.Two<Jet<Order8>>(name);
        Random random = new(33);
        for (int i = 0; i < 2_000; i++)
        {
            double number = Doubles.Ordinary(random);
            Jet<Order8> series = Series<Order8>(random, Doubles.Ordinary(random));
            CheckClose(operation(series, Jet<Order8>.Constant(number)), right(series, number));
            CheckClose(operation(Jet<Order8>.Constant(number), series), left(number, series));
            Assert.Equal(FunctionTable.Two(name).Plain(series.Value, number), right(series, number).Value);
            Assert.Equal(FunctionTable.Two(name).Plain(number, series.Value), left(number, series).Value);
        }
    }

    [Theory]
    [MemberData(nameof(Unary))]
    public void A_constant_gives_a_constant_also_at_the_ends_of_the_domain(string name)
    {
        FunctionTable.Unary function = FunctionTable.One(name);
        foreach (double x in (double[])[function.Lower, function.Upper, 0, 1])
        {
            Jet<Order8> result = FunctionTable.One<Jet<Order8>>(name)(Jet<Order8>.Constant(x));
            Assert.True(result.IsConstant && Doubles.SameBits(function.Plain(x), result.Value), $"{name}({x}) = {result}");
        }
    }

    [Theory]
    [MemberData(nameof(Unary))]
    public void A_low_order_series_is_the_beginning_of_a_high_order_one(string name)
    {
        FunctionTable.Unary function = FunctionTable.One(name);
        Random random = new(34);
        for (int i = 0; i < 500; i++)
        {
            double x = Doubles.Between(random, Math.Max(function.Lower, -2), Math.Min(function.Upper, 2));
            double[] coefficients = [x, 0.5, -0.25, 0.125, 0.3, -0.2, 0.1, 0.7, -0.9];
            Jet<Order8> high = FunctionTable.One<Jet<Order8>>(name)(new(coefficients));
            Jet<Order3> low = FunctionTable.One<Jet<Order3>>(name)(new(coefficients.AsSpan(0, 4)));
            for (int k = 0; k <= 3; k++) Assert.True(Math.Abs(high[k] - low[k]) <= 1e-13 * Math.Abs(low[k]), $"{name}({x:R}), order {k}");
        }
    }

    [Fact]
    public void Whole_powers_of_a_series_through_zero_are_exact_polynomials()
    {
        Jet<Order8> t = Jet<Order8>.Variable(0, 2);
        Assert.Equal(new Jet<Order8>([0, 0, 0, 8]), Jet<Order8>.Pow(t, Jet<Order8>.Constant(3)));
        Assert.Equal(Jet<Order8>.Constant(1), Jet<Order8>.Pow(t, Jet<Order8>.Constant(0)));
        Assert.Equal(new Jet<Order8>([0]), Jet<Order8>.Pow(t, Jet<Order8>.Constant(9)));
        Assert.Equal(new Jet<Order8>([0]), Jet<Order8>.Pow(t, Jet<Order8>.Constant(1000)));
        Jet<Order8> root = Jet<Order8>.Pow(t, Jet<Order8>.Constant(2.5));
        Assert.Equal((0, 0, 0), (root[0], root[1], root[2]));
        Assert.True(double.IsNaN(root[3]) && double.IsNaN(root[8]));
    }

    [Fact]
    public void A_missing_derivative_is_not_finite_and_leaves_the_value_alone()
    {
        Jet<Order8> root = Jet<Order8>.Sqrt(Jet<Order8>.Variable(0, 1));
        Assert.Equal(0, root.Value);
        Assert.False(double.IsFinite(root[1]));
        Assert.Equal(6, ((root + 2.0) * Jet<Order8>.Variable(3, 1)).Value);
    }

    [Fact]
    public void Remainders_and_copied_signs_keep_or_turn_all_coefficients()
    {
        Jet<Order3> x = new([7.5, 1, 2, 3]);
        Assert.Equal(new Jet<Order3>([1.5, 1, 2, 3]), x % Jet<Order3>.Constant(2));
        Assert.Equal(new Jet<Order3>([-0.5, 1, 2, 3]), Jet<Order3>.IEEERemainder(x, Jet<Order3>.Constant(2)));
        Assert.Equal(new Jet<Order3>([1.5, -2, 2, 3]), x % Jet<Order3>.Variable(2, 1)); // x - 3 (2 + t)
        Assert.Equal(-x, Jet<Order3>.CopySign(x, Jet<Order3>.Variable(-0.0, 1)));
        Assert.Equal(x, Jet<Order3>.CopySign(-x, Jet<Order3>.Constant(2)));
    }

    private static Jet<TOrder> Series<TOrder>(Random random, double value)
        where TOrder : struct, IJetOrder<TOrder>
    {
        double[] coefficients = new double[TOrder.Order + 1];
        for (int k = 0; k < coefficients.Length; k++) coefficients[k] = Doubles.Between(random, -1, 1);
        coefficients[0] = value;
        return new(coefficients);
    }

    private static void CheckClose(Jet<Order8> expected, Jet<Order8> actual)
    {
        for (int k = 0; k <= 8; k++)
        {
            if (!(Math.Abs(expected[k] - actual[k]) <= 1e-12 * Math.Abs(expected[k]))) Assert.Fail($"{actual} is not {expected}");
        }
    }
}
