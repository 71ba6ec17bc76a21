using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Tests.Emitted;

namespace OdeDsl.Generators.Tests.Algebra;

/// <summary>
/// Reference values: mpmath 1.3 with 40 digits, derivative of its own function at the double given (numerical differentiation, so
/// independent of any table of derivatives), printed with 17 digits. Small derivatives and points near the end of a domain on purpose.
/// </summary>
public sealed class DerivativeTableTests
{
    [Theory]
    [InlineData(Operator.Sqrt, 0.37, 0.82199493652678645)]
    [InlineData(Operator.Sqrt, 5.21, 0.21905397716916176)]
    [InlineData(Operator.Cbrt, 0.37, 0.6467616533394882)]
    [InlineData(Operator.Cbrt, 5.21, 0.11091414347393748)]
    [InlineData(Operator.Exp, 0.37, 1.4477346146633245)]
    [InlineData(Operator.Exp, 5.21, 183.09405819371817)]
    [InlineData(Operator.Log, 0.37, 2.7027027027027027)]
    [InlineData(Operator.Log, 5.21, 0.19193857965451056)]
    [InlineData(Operator.Log2, 0.37, 3.8991757861863876)]
    [InlineData(Operator.Log2, 5.21, 0.27690883702283367)]
    [InlineData(Operator.Log10, 0.37, 1.1737688700087887)]
    [InlineData(Operator.Log10, 5.21, 0.083357866008301695)]
    [InlineData(Operator.Sin, 0.37, 0.93232734560603442)]
    [InlineData(Operator.Sin, 5.21, 0.47732764497752166)]
    [InlineData(Operator.Cos, 0.37, -0.36161543196496197)]
    [InlineData(Operator.Cos, 5.21, 0.87872539472818984)]
    [InlineData(Operator.Tan, 0.37, 1.1504378321696713)]
    [InlineData(Operator.Tan, 5.21, 4.3890125683070224)]
    [InlineData(Operator.Asin, 0.3, 1.0482848367219183)]
    [InlineData(Operator.Asin, 0.9990234375, 22.632943293569802)]
    [InlineData(Operator.Acos, -0.3, -1.0482848367219183)]
    [InlineData(Operator.Acos, 0.9990234375, -22.632943293569802)]
    [InlineData(Operator.Atan, 0.3, 0.91743119266055046)]
    [InlineData(Operator.Atan, 1234.5, 6.5617174639290088e-7)]
    [InlineData(Operator.Sinh, 0.37, 1.0692344726503396)]
    [InlineData(Operator.Sinh, 5.21, 91.549759933702904)]
    [InlineData(Operator.Cosh, 0.37, 0.3785001420129849)]
    [InlineData(Operator.Cosh, 5.21, 91.544298260015264)]
    [InlineData(Operator.Tanh, 0.7, 0.63473958998245862)]
    [InlineData(Operator.Tanh, 11.5, 4.1047518518383067e-10)]
    [InlineData(Operator.Asinh, 0.37, 0.93786184268122781)]
    [InlineData(Operator.Asinh, 5.21, 0.18849781369958075)]
    [InlineData(Operator.Acosh, 1.0625, 2.7852424952911654)]
    [InlineData(Operator.Acosh, 7.3, 0.13828996894083706)]
    [InlineData(Operator.Atanh, 0.3, 1.0989010989010989)]
    [InlineData(Operator.Atanh, -0.9990234375, 512.25012212994626)]
    [InlineData(Operator.Abs, -0.37, -1)]
    [InlineData(Operator.Floor, 0.37, 0)]
    public void Functions_of_one_argument_have_the_reference_derivative(object function, double x, double expected)
    {
        ExpressionGraph graph = new();
        int value = graph.Unary((Operator)function, graph.Leaf(Operator.Parameter, 0));
        Close(expected, Derivative(graph, value, 0, x));
    }

    [Theory]
    [InlineData(Operator.Pow, 0.37, 2.0, 0.73999999999999999, -0.13611313622077538)]
    [InlineData(Operator.Pow, 1.7, -2.0, -0.40708324852432326, 0.18360839137099322)]
    [InlineData(Operator.Pow, 2.3, 0.5, 0.32969023669789352, 1.2631692270862227)]
    [InlineData(Operator.Pow, 0.9, 1.5, 1.4230249470757707, -0.089958385330712492)]
    [InlineData(Operator.Pow, 3.1, 2.5, 13.645283067785733, 19.143494572735311)]
    [InlineData(Operator.Pow, 1.3, 4.7, 12.407613637912901, 0.90040611780429324)]
    [InlineData(Operator.Pow, 0.2, -0.3, -2.4309848950391433, -2.6083461697537531)]
    [InlineData(Operator.Pow, 1.9, 5.0, 65.160499999999988, 15.8929376569758)]
    [InlineData(Operator.Pow, 1.9, 3.0, 10.829999999999999, 4.4024758052564548)]
    [InlineData(Operator.Pow, 1.9, 4.0, 27.435999999999996, 8.3647040299872638)]
    [InlineData(Operator.LogBase, 3.3, 2.2, 0.38433315263910012, -0.87296538033966179)]
    [InlineData(Operator.LogBase, 0.4, 7.7, 1.2247575455985521, 0.028560302223702632)]
    [InlineData(Operator.Atan2, 0.3, 0.7, 1.206896551724138, -0.51724137931034487)]
    [InlineData(Operator.Atan2, -1.2, -0.4, -0.25000000000000003, 0.75000000000000001)]
    [InlineData(Operator.Divide, 0.3, 0.7, 1.4285714285714287, -0.61224489795918373)]
    [InlineData(Operator.Divide, -5.5, 3.25, 0.30769230769230769, 0.52071005917159763)]
    public void Functions_of_two_arguments_have_the_reference_derivatives(object function, double x, double y, double byFirst, double bySecond)
    {
        ExpressionGraph graph = new();
        int a = graph.Leaf(Operator.Parameter, 0), b = graph.Leaf(Operator.Parameter, 1);
        int value = graph.Binary((Operator)function, a, b);
        Close(byFirst, Derivative(graph, value, 0, x, y));
        Close(bySecond, Derivative(graph, value, 1, x, y));
        Close(byFirst, Derivative(graph, graph.Binary((Operator)function, a, graph.Constant(y)), 0, x));
    }

    /// <summary>Limits of the derivative, by hand: the formula b a^(b−1) and a^b ln a at the edge of what they say.</summary>
    [Theory]
    [InlineData(0.0, 2.0, 0.0)]
    [InlineData(-1.5, 2.0, -3.0)]
    [InlineData(-1.5, 3.0, 6.75)]
    [InlineData(-2.0, 4.0, -32.0)]
    [InlineData(0.0, 1.0, 1.0)]
    [InlineData(0.0, 0.0, 0.0)]
    [InlineData(0.0, 0.5, double.PositiveInfinity)]
    [InlineData(0.0, -1.0, double.NegativeInfinity)]
    public void Powers_are_differentiable_at_zero_and_for_negative_bases(double x, double power, double expected)
    {
        ExpressionGraph graph = new();
        int a = graph.Leaf(Operator.Parameter, 0), b = graph.Leaf(Operator.Parameter, 1);
        Assert.Equal(expected, Derivative(graph, graph.Binary(Operator.Pow, a, graph.Constant(power)), 0, x));
        Assert.Equal(expected, Derivative(graph, graph.Binary(Operator.Pow, a, b), 0, x, power));
    }

    [Fact]
    public void A_power_of_zero_does_not_change_with_its_positive_exponent()
    {
        ExpressionGraph graph = new();
        int value = graph.Binary(Operator.Pow, graph.Leaf(Operator.Parameter, 0), graph.Leaf(Operator.Parameter, 1));
        Assert.Equal(0, Derivative(graph, value, 1, 0.0, 1.7));
    }

    [Fact]
    public void The_derivative_of_x_ln_x_is_minus_infinity_at_zero_and_not_undefined()
    {
        ExpressionGraph graph = new();
        int x = graph.Leaf(Operator.Parameter, 0);
        Assert.Equal(double.NegativeInfinity, Derivative(graph, graph.Binary(Operator.Multiply, x, graph.Unary(Operator.Log, x)), 0, 0.0));
    }

    [Theory]
    [InlineData(7.3, 2.5, 1, -2)]
    [InlineData(-7.3, 2.5, 1, 2)]
    public void Remainders_lose_a_whole_number_of_divisors(double a, double b, double byFirst, double bySecond)
    {
        ExpressionGraph graph = new();
        int value = graph.Binary(Operator.Remainder, graph.Leaf(Operator.Parameter, 0), graph.Leaf(Operator.Parameter, 1));
        Assert.Equal(byFirst, Derivative(graph, value, 0, a, b));
        Assert.Equal(bySecond, Derivative(graph, value, 1, a, b));
    }

    [Fact]
    public void Derivatives_share_the_values_they_are_made_of_and_are_shortened()
    {
        ExpressionGraph graph = new();
        int x = graph.Leaf(Operator.State, 0);
        int exponential = graph.Unary(Operator.Exp, x);
        int square = graph.Binary(Operator.Multiply, x, x);
        Assert.Equal(exponential, Derivative(graph, exponential, x));
        Assert.Equal(graph.Binary(Operator.Multiply, graph.Constant(2.0), x), Derivative(graph, square, x));
        Assert.Equal(graph.Constant(0.0), Derivative(graph, graph.Unary(Operator.Sin, graph.Leaf(Operator.Time)), x));
        int quotient = graph.Binary(Operator.Divide, x, graph.Leaf(Operator.Parameter, 0));
        Assert.Equal(graph.Binary(Operator.Divide, graph.Constant(1.0), graph.Leaf(Operator.Parameter, 0)), Derivative(graph, quotient, x));
    }

    private static int Derivative(ExpressionGraph graph, int value, int leaf)
    {
        Differentiator differentiator = new(graph, [value]);
        return differentiator.Along([new(leaf, differentiator.One)], CancellationToken.None).GetValueOrDefault(value, differentiator.Zero);
    }

    private static double Derivative(ExpressionGraph graph, int value, int parameter, params double[] parameters) =>
        new Interpreter(graph, 0, [], parameters)[Derivative(graph, value, graph.Leaf(Operator.Parameter, parameter))];

    /// <summary>A handful of roundings: the formulas have fewer than ten operations.</summary>
    private static void Close(double expected, double actual) =>
        Assert.True(Math.Abs(actual - expected) <= 8e-16 * Math.Abs(expected), $"{actual:R} instead of {expected:R}");
}
