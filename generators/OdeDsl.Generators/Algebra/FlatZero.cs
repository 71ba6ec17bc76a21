using System.Collections.Generic;
using System.Threading;

namespace OdeDsl.Generators.Algebra;

/// <summary>
/// A switching function is meant to vanish on a thin surface, but it can also vanish on a whole region: inside a dead band, or
/// everywhere when a gain is zero. There the surface rule "either side will do" is wrong.
/// </summary>
internal static class FlatZero
{
    /// <summary>
    /// The condition that a value vanishes together with its derivatives by state, time and input, so that it stays zero around the point.
    /// </summary>
    /// <returns>A condition; the constant false where the value can be seen to vary everywhere, as a plain state does.</returns>
    public static int Condition(ExpressionGraph graph, int value, CancellationToken cancellationToken)
    {
        Differentiator differentiator = new(graph, [value]);
        int condition = graph.Binary(Operator.Equal, value, differentiator.Zero);
        foreach (int leaf in Reach.Of(graph, [value]))
        {
            if (graph[leaf].Operator is not (Operator.State or Operator.StateElement or Operator.Time or Operator.Input)) continue;
            Dictionary<int, int> derivatives = differentiator.Along([new(leaf, differentiator.One)], cancellationToken);
            if (!derivatives.TryGetValue(value, out int derivative)) continue;
            if (graph[derivative].Operator == Operator.Constant) return graph.Constant(false);
            condition = graph.Binary(Operator.And, condition, graph.Binary(Operator.Equal, derivative, differentiator.Zero));
        }

        return condition;
    }

    /// <summary>"Where the value is flatly zero a, elsewhere b".</summary>
    public static int Choose(ExpressionGraph graph, int value, int a, int b, CancellationToken cancellationToken)
    {
        int condition = Condition(graph, value, cancellationToken);
        return graph[condition].Operator == Operator.BooleanConstant ? b : graph.Ternary(Operator.Conditional, condition, a, b);
    }
}
