using System.Collections.Generic;

namespace OdeDsl.Generators.Algebra;

/// <summary>
/// Replaces the functions that can throw (Clamp with crossed bounds, Sign of NaN, a table outside its knots) by conditions with the same value
/// everywhere else. For expressions that are computed whether or not the user's code would come to them.
/// </summary>
internal static class Quiet
{
    /// <summary>Whether evaluating the operation itself may throw.</summary>
    public static bool CanThrow(Operator operation) => operation is Operator.Clamp or Operator.Sign or Operator.TableValue;

    /// <summary>The quiet form of one operation whose operands are quiet.</summary>
    public static int Form(ExpressionGraph graph, int index)
    {
        Node node = graph[index];
        return node.Operator switch
        {
            Operator.Clamp => Choose(graph, Operator.Less, node.First, node.Second, node.Second, Choose(
                graph, Operator.Greater, node.First, node.Third, node.Third, node.First)),
            Operator.Sign => Choose(graph, Operator.Greater, node.First, graph.Constant(0.0), graph.Constant(1.0), Choose(
                graph, Operator.Less, node.First, graph.Constant(0.0), graph.Constant(-1.0), graph.Constant(0.0))),
            Operator.TableValue => TableNodes.Quiet(graph, node),
            _ => index,
        };
    }

    /// <summary>The quiet forms of whole expressions.</summary>
    public static int[] Forms(ExpressionGraph graph, IReadOnlyList<int> roots)
    {
        Dictionary<int, int> quiet = [];
        foreach (int index in Reach.Of(graph, roots))
        {
            Node node = graph[index];
            int rebuilt = graph.Intern(node with
            {
                First = node.First < 0 ? -1 : quiet[node.First],
                Second = node.Second < 0 ? -1 : quiet[node.Second],
                Third = node.Third < 0 ? -1 : quiet[node.Third],
            });
            quiet[index] = Form(graph, rebuilt);
        }

        int[] forms = new int[roots.Count];
        for (int i = 0; i < forms.Length; i++) forms[i] = quiet[roots[i]];
        return forms;
    }

    private static int Choose(ExpressionGraph graph, Operator relation, int a, int b, int chosen, int otherwise) =>
        graph.Ternary(Operator.Conditional, graph.Binary(relation, a, b), chosen, otherwise);
}
