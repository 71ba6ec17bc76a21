using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Tests.Harness;

/// <summary>Evaluates a model's expressions as they stand, without generating code.</summary>
internal sealed class GraphEvaluator(ModelDefinition model, double time, double[] state, double[] parameters)
{
    private readonly Dictionary<int, double> _known = [];

    /// <summary>The value of a node; a condition is 1 or 0.</summary>
    public double Value(int index)
    {
        if (_known.TryGetValue(index, out double known)) return known;
        double value = Compute(model.Nodes[index]);
        _known.Add(index, value);
        return value;
    }

    private double Compute(Node node) => node.Operator switch
    {
        Operator.Constant => node.Constant,
        Operator.State => state[node.Index],
        Operator.Parameter => parameters[node.Index],
        Operator.Time => time,
        Operator.BooleanConstant => node.Payload,
        Operator.Conditional => Holds(node.First) ? Value(node.Second) : Value(node.Third),
        Operator.And => Condition(Holds(node.First) && Holds(node.Second)),
        Operator.Or => Condition(Holds(node.First) || Holds(node.Second)),
        Operator.Not => Condition(!Holds(node.First)),
        _ when node.Second < 0 => Compute(node.Operator, Value(node.First)),
        _ => Compute(node.Operator, Value(node.First), Value(node.Second)),
    };

    private bool Holds(int index) => Value(index) == 1;

    private static double Condition(bool holds) => holds ? 1 : 0;

    private static double Compute(Operator operation, double x) => operation switch
    {
        Operator.Negate => -x,
        Operator.Abs => Math.Abs(x),
        Operator.Sign => Math.Sign(x),
        Operator.Floor => Math.Floor(x),
        Operator.Round => Math.Round(x),
        Operator.Cos => Math.Cos(x),
        _ => throw new NotSupportedException(operation.ToString()),
    };

    private static double Compute(Operator operation, double x, double y) => operation switch
    {
        Operator.Add => x + y,
        Operator.Subtract => x - y,
        Operator.Multiply => x * y,
        Operator.Divide => x / y,
        Operator.Remainder => x % y,
        Operator.Less => Condition(x < y),
        Operator.LessOrEqual => Condition(x <= y),
        Operator.Greater => Condition(x > y),
        Operator.GreaterOrEqual => Condition(x >= y),
        Operator.Equal => Condition(x == y),
        Operator.NotEqual => Condition(x != y),
        Operator.Min => Math.Min(x, y),
        Operator.Max => Math.Max(x, y),
        Operator.Pow => Math.Pow(x, y),
        Operator.Atan2 => Math.Atan2(x, y),
        _ => throw new NotSupportedException(operation.ToString()),
    };
}
