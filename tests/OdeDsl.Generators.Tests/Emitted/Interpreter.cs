using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Tests.Emitted;

/// <summary>
/// Evaluates an expression graph node by node with System.Math, branches as C# takes them (only the branch that is chosen). Knows
/// nothing of schedules, locking or printing.
/// </summary>
internal sealed class Interpreter(ExpressionGraph graph, double time, double[] state, double[] parameters, double[]? regime = null)
{
    private readonly Dictionary<int, double> _values = [];

    /// <summary>Conditions are 1 or 0.</summary>
    public double this[int index]
    {
        get
        {
            if (!_values.TryGetValue(index, out double value)) _values.Add(index, value = Evaluate(graph[index]));
            return value;
        }
    }

    private double Evaluate(Node node) => node.Operator switch
    {
        Operator.Constant => node.Constant,
        Operator.BooleanConstant => node.Payload,
        Operator.State => state[node.Index],
        Operator.Parameter or Operator.Mode or Operator.Input or Operator.InputSlope => parameters[node.Index],
        Operator.Time => time,
        Operator.Side => regime![node.Index] == 1 ? 1 : 0,
        Operator.WholeNumber => regime![node.Index],
        Operator.Conditional => this[node.First] == 1 ? this[node.Second] : this[node.Third],
        Operator.And => this[node.First] == 1 && this[node.Second] == 1 ? 1 : 0,
        Operator.Or => this[node.First] == 1 || this[node.Second] == 1 ? 1 : 0,
        Operator.Not => 1 - this[node.First],
        Operator.FusedMultiplyAdd => Math.FusedMultiplyAdd(this[node.First], this[node.Second], this[node.Third]),
        Operator.Clamp => Math.Clamp(this[node.First], this[node.Second], this[node.Third]),
        >= Operator.TableValue and <= Operator.TablePositionSlope => OfTable(node, RandomTables.All[TableNodes.TableOf(node)]),
        _ => node.Second < 0 ? Unary(node.Operator, this[node.First]) : Binary(node.Operator, this[node.First], this[node.Second]),
    };

    private double OfTable(Node node, Table table) => node.Operator switch
    {
        Operator.TableValue => table.At(this[node.First]),
        Operator.TableSegment => table.Segment(this[node.First]),
        Operator.TablePolynomial when TableNodes.OrderOf(node) == 0 => table.At(this[node.First], this[node.Second]),
        Operator.TablePolynomial => table.Derivative(TableNodes.OrderOf(node), this[node.First], this[node.Second]),
        Operator.TablePosition => table.Position(this[node.First], this[node.Second]),
        _ => table.PositionSlope(this[node.First]),
    };

    private static double Unary(Operator operation, double x) => operation switch
    {
        Operator.Negate => -x,
        Operator.Sqrt => Math.Sqrt(x),
        Operator.Cbrt => Math.Cbrt(x),
        Operator.Exp => Math.Exp(x),
        Operator.Log => Math.Log(x),
        Operator.Log2 => Math.Log2(x),
        Operator.Log10 => Math.Log10(x),
        Operator.Sin => Math.Sin(x),
        Operator.Cos => Math.Cos(x),
        Operator.Tan => Math.Tan(x),
        Operator.Asin => Math.Asin(x),
        Operator.Acos => Math.Acos(x),
        Operator.Atan => Math.Atan(x),
        Operator.Sinh => Math.Sinh(x),
        Operator.Cosh => Math.Cosh(x),
        Operator.Tanh => Math.Tanh(x),
        Operator.Asinh => Math.Asinh(x),
        Operator.Acosh => Math.Acosh(x),
        Operator.Atanh => Math.Atanh(x),
        Operator.Abs => Math.Abs(x),
        Operator.Sign => Math.Sign(x),
        Operator.Floor => Math.Floor(x),
        Operator.Ceiling => Math.Ceiling(x),
        Operator.Truncate => Math.Truncate(x),
        Operator.Round => Math.Round(x),
        Operator.RoundAwayFromZero => Math.Round(x, MidpointRounding.AwayFromZero),
        _ => throw new NotSupportedException(operation.ToString()),
    };

    private static double Binary(Operator operation, double x, double y) => operation switch
    {
        Operator.Add => x + y,
        Operator.Subtract => x - y,
        Operator.Multiply => x * y,
        Operator.Divide => x / y,
        Operator.Remainder => x % y,
        Operator.LogBase => Math.Log(x, y),
        Operator.Pow => Math.Pow(x, y),
        Operator.Atan2 => Math.Atan2(x, y),
        Operator.CopySign => Math.CopySign(x, y),
        Operator.IEEERemainder => Math.IEEERemainder(x, y),
        Operator.Min => Math.Min(x, y),
        Operator.Max => Math.Max(x, y),
        Operator.MinMagnitude => Math.MinMagnitude(x, y),
        Operator.MaxMagnitude => Math.MaxMagnitude(x, y),
        Operator.Less => x < y ? 1 : 0,
        Operator.LessOrEqual => x <= y ? 1 : 0,
        Operator.Greater => x > y ? 1 : 0,
        Operator.GreaterOrEqual => x >= y ? 1 : 0,
        Operator.Equal => x == y ? 1 : 0,
        Operator.NotEqual => x != y ? 1 : 0,
        _ => throw new NotSupportedException(operation.ToString()),
    };
}
