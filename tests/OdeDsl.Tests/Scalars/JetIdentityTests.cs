using CsCheck;
using OdeDsl.Scalars;
using Xunit;
using Jet = OdeDsl.Scalars.Jet<OdeDsl.Scalars.Order8>;
using Triple = OdeDsl.Tests.Scalars.Dual<OdeDsl.Tests.Scalars.Dual<OdeDsl.Tests.Scalars.Dual<OdeDsl.Scalars.ScalarDouble>>>;

namespace OdeDsl.Tests.Scalars;

/// <summary>Series against identities between functions, and against nested first derivatives.</summary>
public sealed class JetIdentityTests
{
    private static readonly Gen<double[]> Tails = Gen.Double[-1, 1].Array[8];

    // Values at least a half from zero keep the growth of the coefficients, (slope / value)^k, within what the tolerance allows for.
    private static readonly Gen<Jet> Positive =
        from value in Gen.Double[0.5, 4]
        from tail in Tails
        select new Jet([value, .. tail]);

    private static readonly Gen<Jet> AnySign =
        from series in Positive
        from negative in Gen.Bool
        select negative ? -series : series;

    private static readonly Gen<Jet> Small =
        from value in Gen.Double[-1.2, 1.2]
        from tail in Tails
        select new Jet([value, .. tail]);

    [Fact]
    public void Sine_and_cosine_lie_on_the_unit_circle() =>
        Small.Sample(x => CheckEqual(Jet.Constant(1), Jet.Square(Jet.Sin(x)) + Jet.Square(Jet.Cos(x)), Jet.Sin(x)));

    [Fact]
    public void Hyperbolic_functions_lie_on_the_hyperbola() =>
        Small.Sample(x => CheckEqual(Jet.Constant(1), Jet.Square(Jet.Cosh(x)) - Jet.Square(Jet.Sinh(x)), Jet.Cosh(x)));

    [Fact]
    public void Exponential_and_logarithm_undo_each_other() =>
        Positive.Sample(x =>
        {
            CheckEqual(x, Jet.Exp(Jet.Log(x)), Jet.Log(x));
            CheckEqual(x, Jet.Log(Jet.Exp(x)), Jet.Exp(x));
            CheckEqual(x, Jet.Exp(Jet.Log2(x) * Math.Log(2)), Jet.Log2(x));
            CheckEqual(x, Jet.Pow(Jet.Constant(10), Jet.Log10(x)), Jet.Log10(x));
            CheckEqual(x, Jet.Pow(Jet.Constant(3), Jet.Log(x, Jet.Constant(3))), Jet.Log(x));
        });

    [Fact]
    public void Roots_undo_powers() =>
        AnySign.Sample(x =>
        {
            CheckEqual(Jet.Square(x), Jet.Square(Jet.Sqrt(Jet.Square(x))), Jet.Sqrt(Jet.Square(x)));
            CheckEqual(x, Jet.Cbrt(x) * Jet.Cbrt(x) * Jet.Cbrt(x), Jet.Cbrt(x));
        });

    [Fact]
    public void Inverse_functions_undo_their_functions() =>
        Small.Sample(x =>
        {
            CheckEqual(x, Jet.Asin(Jet.Sin(x)), Jet.Tan(x));
            CheckEqual(x, Jet.Acos(Jet.Cos(x + 1.6)) - 1.6, 1.0 / Jet.Sin(x + 1.6));
            CheckEqual(x, Jet.Atan(Jet.Tan(x)), Jet.Tan(x));
            CheckEqual(x, Jet.Atan2(Jet.Sin(x), Jet.Cos(x)), Jet.Sin(x));
            CheckEqual(x, Jet.Asinh(Jet.Sinh(x)), Jet.Cosh(x));
            CheckEqual(x, Jet.Atanh(Jet.Tanh(x)), Jet.Square(Jet.Cosh(x)));
            CheckEqual(x, Jet.Acosh(Jet.Cosh(x + 2.0)) - 2.0, Jet.Cosh(x) / Jet.Sinh(x + 2.0));
        });

    [Fact]
    public void Tangents_are_quotients() =>
        Small.Sample(x =>
        {
            CheckEqual(Jet.Tan(x), Jet.Sin(x) / Jet.Cos(x), Jet.Tan(x));
            CheckEqual(Jet.Tanh(x), Jet.Sinh(x) / Jet.Cosh(x), Jet.Tanh(x));
        });

    [Fact]
    public void Quotients_undo_products() =>
        Gen.Select(Small, AnySign).Sample((x, y) =>
        {
            CheckEqual(x, x / y * y, x / y);
            CheckEqual(x * y, y * x, x * y);
            CheckEqual(Jet.FusedMultiplyAdd(x, y, x), (x * y) + x, x * y);
        });

    [Fact]
    public void Powers_agree_with_products_and_exponentials() =>
        Gen.Select(Positive, Small).Sample((x, y) =>
        {
            CheckEqual(x * x * x, Jet.Pow(x, Jet.Constant(3)), x * x * x);
            CheckEqual(1.0 / Jet.Square(x), Jet.Pow(x, Jet.Constant(-2)), 1.0 / Jet.Square(x));
            CheckEqual(Jet.Sqrt(x), Jet.Pow(x, Jet.Constant(0.5)), Jet.Sqrt(x));
            CheckEqual(Jet.Exp(y * Jet.Log(x)), Jet.Pow(x, y), Jet.Pow(x, y));
            CheckEqual(Jet.Pow(x, Jet.Constant(20)), Jet.Square(Jet.Pow(x, Jet.Constant(10))), Jet.Pow(x, Jet.Constant(20)));
        });

    public static TheoryData<string> Unary => FunctionTable.UnaryNames;

    [Theory]
    [MemberData(nameof(Unary))]
    public void Derivatives_agree_with_nested_first_derivatives(string name)
    {
        FunctionTable.Unary function = FunctionTable.One(name);
        Func<Jet<Order3>, Jet<Order3>> series = FunctionTable.One<Jet<Order3>>(name);
        Func<Triple, Triple> nested = FunctionTable.One<Triple>(name);
        Random random = new(51);
        for (int i = 0; i < 1000; i++)
        {
            double x = Doubles.Between(random, Math.Max(0.9 * function.Lower, -3), Math.Min(0.9 * function.Upper, 3));
            if (name == "Acosh") x = Doubles.Between(random, 1.2, 4);
            CheckDerivatives(series(Jet<Order3>.Variable(x, 1)), nested(Variable(x)), $"{name}({x:R})");
        }
    }

    [Theory]
    [InlineData("Multiply")]
    [InlineData("Divide")]
    [InlineData("Pow")]
    [InlineData("LogBase")]
    [InlineData("Atan2")]
    public void Derivatives_of_two_arguments_agree_with_nested_first_derivatives(string name)
    {
        Func<Jet<Order3>, Jet<Order3>, Jet<Order3>> series = FunctionTable.Two<Jet<Order3>>(name);
        Func<Triple, Triple, Triple> nested = FunctionTable.Two<Triple>(name);
        Random random = new(52);
        for (int i = 0; i < 1000; i++)
        {
            double a = Doubles.Between(random, 0.5, 3), b = Doubles.Between(random, 1.5, 3), slope = random.Next(3) - 1;
            Jet<Order3> t = Jet<Order3>.Variable(a, 1);
            Triple u = Variable(a);
            CheckDerivatives(series(t, (slope * t) + b + 3.0), nested(u, (slope * u) + b + 3.0), $"{name}({a:R}, {b:R})");
        }
    }

    private static Triple Variable(double x)
    {
        static Dual<T> Seed<T>(T value)
            where T : struct, IScalar<T> => new(value, T.Constant(1));
        return Seed(Seed(Seed(new ScalarDouble(x))));
    }

    private static void CheckDerivatives(Jet<Order3> series, Triple nested, string what)
    {
        double[] expected =
        [
            nested.Value.Value.Value.Value, nested.Slope.Value.Value.Value, nested.Slope.Slope.Value.Value, nested.Slope.Slope.Slope.Value,
        ];
        double size = expected.Max(Math.Abs);
        for (int k = 0; k <= 3; k++)
        {
            double error = Math.Abs(series.Derivative(k) - expected[k]);
            if (!(error <= 1e-11 * (1 + size))) Assert.Fail($"{what}, derivative {k}: {series.Derivative(k):R}, not {expected[k]:R}");
        }
    }

    // Rounding is relative to the largest coefficient that occurs on the way.
    private static void CheckEqual(Jet expected, Jet actual, Jet onTheWay)
    {
        double size = 1;
        for (int k = 0; k <= 8; k++) size = Math.Max(size, Math.Max(Math.Abs(onTheWay[k]), Math.Abs(expected[k])));
        for (int k = 0; k <= 8; k++)
        {
            double error = Math.Abs(expected[k] - actual[k]);
            if (!(error <= 1e-11 * size * size)) Assert.Fail($"order {k}: {actual[k]:R}, not {expected[k]:R}");
        }
    }
}
