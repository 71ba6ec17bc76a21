using System.Numerics;
using OdeDsl.Scalars;
using Xunit;

namespace OdeDsl.Tests.Scalars;

/// <summary>Taylor coefficients against published series and against Cauchy's integral formula.</summary>
public sealed class JetSeriesTests
{
    // M. Abramowitz and I. A. Stegun, Handbook of Mathematical Functions, 1964: equation numbers from memory, series about 0 or 1.
    public static TheoryData<string, double, double[]> Handbook => new()
    {
        { "Exp", 0, [1, 1, 1 / 2.0, 1 / 6.0, 1 / 24.0, 1 / 120.0, 1 / 720.0, 1 / 5040.0, 1 / 40320.0] }, // 4.2.1
        { "Log", 1, [0, 1, -1 / 2.0, 1 / 3.0, -1 / 4.0, 1 / 5.0, -1 / 6.0, 1 / 7.0, -1 / 8.0] }, // 4.1.24
        { "Sin", 0, [0, 1, 0, -1 / 6.0, 0, 1 / 120.0, 0, -1 / 5040.0, 0] }, // 4.3.65
        { "Cos", 0, [1, 0, -1 / 2.0, 0, 1 / 24.0, 0, -1 / 720.0, 0, 1 / 40320.0] }, // 4.3.66
        { "Tan", 0, [0, 1, 0, 1 / 3.0, 0, 2 / 15.0, 0, 17 / 315.0, 0] }, // 4.3.67
        { "Asin", 0, [0, 1, 0, 1 / 6.0, 0, 3 / 40.0, 0, 15 / 336.0, 0] }, // 4.4.40
        { "Acos", 0, [Math.PI / 2, -1, 0, -1 / 6.0, 0, -3 / 40.0, 0, -15 / 336.0, 0] }, // 4.4.2
        { "Atan", 0, [0, 1, 0, -1 / 3.0, 0, 1 / 5.0, 0, -1 / 7.0, 0] }, // 4.4.42
        { "Sinh", 0, [0, 1, 0, 1 / 6.0, 0, 1 / 120.0, 0, 1 / 5040.0, 0] }, // 4.5.62
        { "Cosh", 0, [1, 0, 1 / 2.0, 0, 1 / 24.0, 0, 1 / 720.0, 0, 1 / 40320.0] }, // 4.5.63
        { "Tanh", 0, [0, 1, 0, -1 / 3.0, 0, 2 / 15.0, 0, -17 / 315.0, 0] }, // 4.5.64
        { "Asinh", 0, [0, 1, 0, -1 / 6.0, 0, 3 / 40.0, 0, -15 / 336.0, 0] }, // 4.6.31
        { "Atanh", 0, [0, 1, 0, 1 / 3.0, 0, 1 / 5.0, 0, 1 / 7.0, 0] }, // 4.6.33
        { "Sqrt", 1, [1, 1 / 2.0, -1 / 8.0, 1 / 16.0, -5 / 128.0, 7 / 256.0, -21 / 1024.0, 33 / 2048.0, -429 / 32768.0] }, // 3.6.11
        { "Cbrt", 1, [1, 1 / 3.0, -1 / 9.0, 5 / 81.0, -10 / 243.0, 22 / 729.0, -154 / 6561.0, 374 / 19683.0, -935 / 59049.0] }, // 3.6.8
    };

    [Theory]
    [MemberData(nameof(Handbook))]
    public void A_function_has_the_handbook_s_coefficients(string name, double point, double[] coefficients)
    {
        Jet<Order8> high = FunctionTable.One<Jet<Order8>>(name)(Jet<Order8>.Variable(point, 1));
        Jet<Order3> low = FunctionTable.One<Jet<Order3>>(name)(Jet<Order3>.Variable(point, 1));
        for (int k = 0; k <= 8; k++)
        {
            Assert.True(Math.Abs(high[k] - coefficients[k]) <= 4e-16, $"{name}, order {k}: {high[k]:R}");
            if (k <= 3) Assert.True(Math.Abs(low[k] - coefficients[k]) <= 4e-16, $"{name}, order {k}: {low[k]:R}");
        }
    }

    [Fact]
    public void The_geometric_series_has_unit_coefficients() // 3.6.10
    {
        Assert.Equal(new Jet<Order8>([1, 1, 1, 1, 1, 1, 1, 1, 1]), 1.0 / (1.0 - Jet<Order8>.Variable(0, 1)));
        Assert.Equal(new Jet<Order3>([1, 1, 1, 1]), 1.0 / (1.0 - Jet<Order3>.Variable(0, 1)));
    }

    // y′ = 1 + y², y(0) = 0 is solved by the tangent: the coefficients follow one from another.
    [Fact]
    public void The_series_of_a_solution_follows_from_its_equation()
    {
        double[] y = new double[9];
        for (int k = 0; k < 8; k++) y[k + 1] = (Jet<Order8>.Square(new(y)) + 1.0)[k] / (k + 1);
        Jet<Order8> tangent = Jet<Order8>.Tan(Jet<Order8>.Variable(0, 1));
        for (int k = 0; k <= 8; k++) Assert.Equal(tangent[k], y[k], 1e-15);
    }

    // The function for complex arguments, a range of points, and the distance from a point to the nearest singularity.
    private static readonly Dictionary<string, (Func<Complex, Complex> Function, double Lower, double Upper, Func<double, double> Distance)>
        Analytic = new()
    {
        ["Negate"] = (z => -z, -3, 3, _ => 2),
        ["Square"] = (z => z * z, -3, 3, _ => 2),
        ["Sqrt"] = (Complex.Sqrt, 0.3, 5, x => x),
        ["Cbrt"] = (z => Complex.Pow(z, 1.0 / 3), 0.3, 5, x => x),
        ["Exp"] = (Complex.Exp, -3, 3, _ => 2),
        ["Log"] = (Complex.Log, 0.3, 5, x => x),
        ["Log2"] = (z => Complex.Log(z) / Math.Log(2), 0.3, 5, x => x),
        ["Log10"] = (z => Complex.Log(z) / Math.Log(10), 0.3, 5, x => x),
        ["Sin"] = (Complex.Sin, -5, 5, _ => 2),
        ["Cos"] = (Complex.Cos, -5, 5, _ => 2),
        ["Tan"] = (Complex.Tan, -1.2, 1.2, x => (Math.PI / 2) - Math.Abs(x)),
        ["Asin"] = (Complex.Asin, -0.8, 0.8, x => 1 - Math.Abs(x)),
        ["Acos"] = (Complex.Acos, -0.8, 0.8, x => 1 - Math.Abs(x)),
        ["Atan"] = (Complex.Atan, -3, 3, x => double.Hypot(x, 1)),
        ["Sinh"] = (Complex.Sinh, -3, 3, _ => 2),
        ["Cosh"] = (Complex.Cosh, -3, 3, _ => 2),
        ["Tanh"] = (Complex.Tanh, -3, 3, x => double.Hypot(x, Math.PI / 2)),
        ["Asinh"] = (z => Complex.Log(z + Complex.Sqrt((z * z) + 1)), -1, 3, x => double.Hypot(x, 1)),
        ["Acosh"] = (z => Complex.Log(z + (Complex.Sqrt(z - 1) * Complex.Sqrt(z + 1))), 1.3, 5, x => x - 1),
        ["Atanh"] = (z => 0.5 * Complex.Log((1 + z) / (1 - z)), -0.8, 0.8, x => 1 - Math.Abs(x)),
    };

    public static TheoryData<string> Unary => FunctionTable.UnaryNames;

    [Theory]
    [MemberData(nameof(Unary))]
    public void A_function_of_a_series_agrees_with_the_integral_around_the_point(string name)
    {
        (Func<Complex, Complex> function, double lower, double upper, Func<double, double> distance) = Analytic[name];
        Random random = new(41);
        for (int i = 0; i < 100; i++)
        {
            double point = Doubles.Between(random, lower, upper);
            double[] u = Polynomial(random, point, 0.5 * distance(point));
            Jet<Order8> actual = FunctionTable.One<Jet<Order8>>(name)(new(u));
            CheckCauchy(t => function(Evaluate(u, t)), actual, $"{name} at {point:R}");
        }
    }

    [Theory]
    [InlineData("Multiply")]
    [InlineData("Divide")]
    [InlineData("Pow")]
    [InlineData("LogBase")]
    [InlineData("Atan2")]
    public void An_operation_on_two_series_agrees_with_the_integral_around_the_point(string name)
    {
        Func<Complex, Complex, Complex> function = name switch
        {
            "Multiply" => Complex.Multiply,
            "Divide" => Complex.Divide,
            "Pow" => Complex.Pow,
            "LogBase" => static (x, b) => Complex.Log(x) / Complex.Log(b),
            _ => static (y, x) => Complex.Atan(y / x), // for points right of the vertical axis
        };
        Random random = new(42);
        for (int i = 0; i < 200; i++)
        {
            double[] x = Polynomial(random, Doubles.Between(random, 1.5, 4), 0.4);
            double[] y = Polynomial(random, Doubles.Between(random, 2, 3), random.Next(3) == 0 ? 0 : 0.4); // sometimes a constant
            Jet<Order8> actual = FunctionTable.Two<Jet<Order8>>(name)(new(x), new(y));
            CheckCauchy(t => function(Evaluate(x, t), Evaluate(y, t)), actual, $"{name} at ({x[0]:R}, {y[0]:R})");
        }
    }

    // A polynomial whose values on the unit circle stay within a distance of its value at zero.
    private static double[] Polynomial(Random random, double value, double distance)
    {
        double[] coefficients = new double[9];
        for (int k = 1; k < coefficients.Length; k++) coefficients[k] = distance / 8 * Doubles.Between(random, -1, 1);
        coefficients[0] = value;
        return coefficients;
    }

    private static Complex Evaluate(double[] coefficients, Complex t)
    {
        Complex sum = 0;
        for (int k = coefficients.Length - 1; k >= 0; k--) sum = (sum * t) + coefficients[k];
        return sum;
    }

    // Cauchy's formula by the trapezoidal rule on the unit circle: exact but for coefficients above order 120.
    private static void CheckCauchy(Func<Complex, Complex> function, Jet<Order8> actual, string what)
    {
        const int Points = 128;
        Complex[] values = new Complex[Points];
        double size = 0;
        for (int i = 0; i < Points; i++)
        {
            values[i] = function(Complex.FromPolarCoordinates(1, 2 * Math.PI * i / Points));
            size = Math.Max(size, values[i].Magnitude);
        }

        for (int k = 0; k <= 8; k++)
        {
            Complex sum = 0;
            for (int i = 0; i < Points; i++) sum += values[i] * Complex.FromPolarCoordinates(1, -2 * Math.PI * (i * k % Points) / Points);
            double expected = sum.Real / Points;
            if (!(Math.Abs(expected - actual[k]) <= 1e-13 * size)) Assert.Fail($"{what}, order {k}: {actual[k]:R}, not {expected:R}");
        }
    }
}
