using System.Collections.Generic;

namespace OdeDsl.Generators.Algebra;

/// <summary>
/// Rewrites expressions for kinds of numbers other than doubles, which know comparisons, choices, Floor, Min, Max and
/// tables: every other function with a kink or a jump is put together from these so that at double the result is the same bit for bit, and nothing throws.
/// </summary>
internal static class GenericForms
{
    public static int[] Of(ExpressionGraph graph, IReadOnlyList<int> roots)
    {
        Dictionary<int, int> forms = [];
        foreach (int index in Reach.Of(graph, roots))
        {
            Node node = graph[index];
            int rebuilt = node.IsLeaf ? index : graph.Intern(node with
            {
                First = forms[node.First],
                Second = node.Second < 0 ? -1 : forms[node.Second],
                Third = node.Third < 0 ? -1 : forms[node.Third],
            });
            forms[index] = Form(graph, node.Operator == Operator.TableValue ? rebuilt : Quiet.Form(graph, rebuilt));
        }

        int[] results = new int[roots.Count];
        for (int i = 0; i < results.Length; i++) results[i] = forms[roots[i]];
        return results;
    }

    private static int Form(ExpressionGraph graph, int index)
    {
        Node node = graph[index];
        return node.Operator switch
        {
            Operator.Abs => Magnitude(graph, node.First),
            Operator.MinMagnitude => ExtremeMagnitude(graph, node, Operator.Less, Operator.Min),
            Operator.MaxMagnitude => ExtremeMagnitude(graph, node, Operator.Greater, Operator.Max),
            // At the segment of its own argument a polynomial is the table as written, which knows how to look up any kind of number.
            Operator.TablePolynomial when graph[node.Second].Operator == Operator.TableSegment =>
                TableNodes.Value(graph, TableNodes.TableOf(node), node.First),
            // −⌊−x⌋ also has the sign of the zero right.
            Operator.Ceiling => graph.Unary(Operator.Negate, graph.Unary(Operator.Floor, graph.Unary(Operator.Negate, node.First))),
            Operator.Truncate => graph.Binary(
                Operator.CopySign, graph.Unary(Operator.Floor, Magnitude(graph, node.First)), node.First),
            Operator.Round => Rounded(graph, node.First, tiesToEven: true),
            Operator.RoundAwayFromZero => Rounded(graph, node.First, tiesToEven: false),
            _ => index,
        };
    }

    private static int Magnitude(ExpressionGraph graph, int a) => graph.Binary(Operator.CopySign, a, graph.Constant(1.0));

    /// <summary>The operand whose magnitude is smaller (larger); of equal magnitudes the smaller (larger) number; the sum is NaN if one is.</summary>
    private static int ExtremeMagnitude(ExpressionGraph graph, Node node, Operator relation, Operator extremum)
    {
        (int a, int b) = (node.First, node.Second);
        (int sizeA, int sizeB) = (Magnitude(graph, a), Magnitude(graph, b));
        int equal = graph.Ternary(
            Operator.Conditional, graph.Binary(Operator.Equal, sizeA, sizeB), graph.Binary(extremum, a, b), graph.Binary(Operator.Add, sizeA, sizeB));
        return graph.Ternary(
            Operator.Conditional,
            graph.Binary(relation, sizeA, sizeB),
            a,
            graph.Ternary(Operator.Conditional, graph.Binary(relation, sizeB, sizeA), b, equal));
    }

    /// <summary>The magnitude's whole part n, or n + 1 where the rest, which is exact, says so; then the sign.</summary>
    private static int Rounded(ExpressionGraph graph, int a, bool tiesToEven)
    {
        int size = Magnitude(graph, a);
        int n = graph.Unary(Operator.Floor, size);
        int rest = graph.Binary(Operator.Subtract, size, n);
        int next = graph.Binary(Operator.Add, n, graph.Constant(1.0));
        int half = graph.Constant(0.5);
        int tie = tiesToEven ? graph.Ternary(Operator.Conditional, IsEven(graph, n), n, next) : next;
        int notBelow = graph.Ternary(Operator.Conditional, graph.Binary(Operator.Greater, rest, half), next, tie);
        int rounded = graph.Ternary(Operator.Conditional, graph.Binary(Operator.Less, rest, half), n, notBelow);
        return graph.Binary(Operator.CopySign, rounded, a);
    }

    private static int IsEven(ExpressionGraph graph, int n)
    {
        int half = graph.Binary(Operator.Multiply, n, graph.Constant(0.5));
        return graph.Binary(Operator.Equal, graph.Unary(Operator.Floor, half), half);
    }
}
