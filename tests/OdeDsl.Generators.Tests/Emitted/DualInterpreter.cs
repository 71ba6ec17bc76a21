using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Tests.Emitted;

/// <summary>
/// A derivative with its scale: the size of the terms it was added up from. Rounding errors are a few units in the last place of
/// the scale, not of a difference of large terms. NaN on a kink, where there is no derivative.
/// </summary>
/// <param name="Derivative">The derivative.</param>
/// <param name="Scale">The size of its terms.</param>
/// <param name="Depends">Whether the expression depends on the seed at all.</param>
internal readonly record struct Tangent(double Derivative, double Scale, bool Depends)
{
    public Tangent Plus(double factor, Tangent a) => a.Depends
        ? new(Derivative + (factor * a.Derivative), Scale + (Math.Abs(factor) * a.Scale), true)
        : this;
}

/// <summary>
/// Derivatives by forward dual numbers on the expressions as written, the branch chosen by the values: independent of the symbolic
/// rules, of locking and of printing. Formulas differ from the generator's where there is a choice.
/// </summary>
internal sealed class DualInterpreter(ExpressionGraph graph, Interpreter values, Func<Node, double> seed)
{
    /// <summary>Squares and products of larger numbers overflow in one formula and not in another: nothing is compared there.</summary>
    private const double Huge = 1e100;

    private readonly Dictionary<int, Tangent> _tangents = [];

    public Tangent this[int index]
    {
        get
        {
            if (!_tangents.TryGetValue(index, out Tangent tangent)) _tangents.Add(index, tangent = Evaluate(index));
            return tangent;
        }
    }

    private Tangent Evaluate(int index)
    {
        Node node = graph[index];
        if (node.IsLeaf) return seed(node) is var s ? new Tangent(s, Math.Abs(s), s != 0) : default;
        if (node.Operator == Operator.Conditional) return this[values[node.First] == 1 ? node.Second : node.Third];
        double x = values[node.First], y = node.Second >= 0 ? values[node.Second] : 0, z = node.Third >= 0 ? values[node.Third] : 0;
        if (node.Operator is >= Operator.TableValue and <= Operator.TablePositionSlope) return OfTable(node, x, y);
        (double byFirst, double bySecond, double byThird) = Partials(node.Operator, values[index], x, y, z);
        Tangent sum = default(Tangent).Plus(byFirst, this[node.First]);
        if (node.Second >= 0) sum = sum.Plus(bySecond, this[node.Second]);
        if (node.Third >= 0) sum = sum.Plus(byThird, this[node.Third]);
        bool comparable = Math.Abs(x) < Huge && Math.Abs(y) < Huge && Math.Abs(z) < Huge;
        return comparable || !sum.Depends ? sum : new(double.NaN, double.NaN, true);
    }

    /// <summary>A table varies with its argument only; at a knot its slope depends on the side.</summary>
    private Tangent OfTable(Node node, double x, double segment)
    {
        Table table = RandomTables.All[TableNodes.TableOf(node)];
        if (node.Operator is Operator.TableSegment or Operator.TablePositionSlope) return default;
        if (node.Operator == Operator.TablePosition) return default(Tangent).Plus(table.PositionSlope(segment), this[node.First]);
        double slope = table.Knots.Contains(x) ? double.NaN : table.Derivative(1, x, table.Segment(x));
        return default(Tangent).Plus(slope, this[node.First]);
    }

    private static (double X, double Y, double Z) Partials(Operator operation, double value, double x, double y, double z) => operation switch
    {
        Operator.Add => (1, 1, 0),
        Operator.Subtract => (1, -1, 0),
        Operator.Multiply => (y, x, 0),
        Operator.Divide => (1 / y, -x / y / y, 0),
        Operator.Remainder or Operator.IEEERemainder when Math.Abs(x / y) > 1e12 => (double.NaN, double.NaN, 0), // the quotient is not known
        Operator.Remainder => (value == 0 ? double.NaN : 1, -Math.Truncate((x - value) / y * (1 + 1e-15)), 0),
        Operator.IEEERemainder => (1, -Math.Round((x - value) / y), 0),
        Operator.FusedMultiplyAdd => (y, x, 1),
        Operator.Pow => (y == 0 ? 0 : y * Math.Exp((y - 1) * Math.Log(x)), value == 0 ? 0 : value * Math.Log(x), 0),
        Operator.LogBase => (1 / (x * Math.Log(y)), -Math.Log(x) / Math.Log(y) / Math.Log(y) / y, 0),
        Operator.Atan2 => (y / (x * x + y * y), -x / (x * x + y * y), 0),
        Operator.CopySign => (x == 0 || y == 0 ? double.NaN : SignOf(x) * SignOf(y), 0, 0),
        Operator.Min => Chosen(x < y, x == y),
        Operator.Max => Chosen(x > y, x == y),
        Operator.MinMagnitude => Chosen(Math.Abs(x) < Math.Abs(y), Math.Abs(x) == Math.Abs(y)),
        Operator.MaxMagnitude => Chosen(Math.Abs(x) > Math.Abs(y), Math.Abs(x) == Math.Abs(y)),
        Operator.Clamp when x == y || x == z => (double.NaN, double.NaN, double.NaN),
        Operator.Clamp => x < y ? (0, 1, 0) : x > z ? (0, 0, 1) : (1, 0, 0),
        _ => (Slope(operation, value, x), 0, 0),
    };

    private static (double X, double Y, double Z) Chosen(bool first, bool tie) =>
        tie ? (double.NaN, double.NaN, 0) : first ? (1, 0, 0) : (0, 1, 0);

    private static double SignOf(double x) => x < 0 ? -1 : 1;

    private static double Slope(Operator operation, double value, double x) => operation switch
    {
        Operator.Negate => -1,
        Operator.Sqrt => 0.5 * Math.Pow(x, -0.5),
        Operator.Cbrt => value / (3 * x),
        Operator.Exp => Math.Exp(x),
        Operator.Log => 1 / x,
        Operator.Log2 => Math.Log2(Math.E) / x,
        Operator.Log10 => Math.Log10(Math.E) / x,
        Operator.Sin => Math.Cos(x),
        Operator.Cos => -Math.Sin(x),
        Operator.Tan => 1 / (Math.Cos(x) * Math.Cos(x)),
        Operator.Asin => 1 / Math.Cos(value),
        Operator.Acos => -1 / Math.Sin(value),
        Operator.Atan => 1 / ((x * x) + 1),
        Operator.Sinh => Math.Cosh(x),
        Operator.Cosh => Math.Sinh(x),
        Operator.Tanh => 4 / (Math.Exp(2 * x) + 2 + Math.Exp(-2 * x)),
        Operator.Asinh => 1 / Math.Cosh(value),
        Operator.Acosh => 1 / Math.Sinh(value),
        Operator.Atanh => Math.Cosh(value) * Math.Cosh(value),
        Operator.Abs => x == 0 ? double.NaN : SignOf(x),
        Operator.Sign or Operator.Floor or Operator.Ceiling or Operator.Truncate or Operator.Round or Operator.RoundAwayFromZero => 0,
        _ => throw new NotSupportedException(operation.ToString()),
    };
}
