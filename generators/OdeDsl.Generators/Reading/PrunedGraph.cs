using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Reading;

/// <summary>The part of a graph that its results depend on, in the order in which it was built.</summary>
internal sealed record PrunedGraph(EquatableArray<Node> Nodes, int[] Roots, Dictionary<int, int> NewIndex)
{
    public static PrunedGraph Of(ExpressionGraph graph, int[] roots)
    {
        HashSet<int> used = [.. roots];
        for (int i = graph.Nodes.Count - 1; i >= 0; i--)
        {
            if (used.Contains(i)) used.UnionWith(Operands(graph[i]));
        }

        Dictionary<int, int> newIndex = new() { [-1] = -1 };
        List<Node> kept = [];
        for (int i = 0; i < graph.Nodes.Count; i++)
        {
            if (!used.Contains(i)) continue;
            Node node = graph[i];
            newIndex.Add(i, kept.Count);
            kept.Add(node with { First = newIndex[node.First], Second = newIndex[node.Second], Third = newIndex[node.Third] });
        }

        return new(new(kept.ToArray()), roots.Select(root => newIndex[root]).ToArray(), newIndex);
    }

    /// <summary>
    /// Results that are not numbers, for a model with problems. The build fails by the problems reported; the generated members are
    /// there all the same, so that code which uses them adds no messages of its own.
    /// </summary>
    public static PrunedGraph NotANumber(int count)
    {
        ExpressionGraph graph = new();
        int[] roots = Enumerable.Repeat(graph.Constant(double.NaN), count).ToArray();
        return new(new(graph.Nodes.ToArray()), roots, []);
    }

    private static IEnumerable<int> Operands(Node node) => new[] { node.First, node.Second, node.Third }.Where(static operand => operand >= 0);
}
