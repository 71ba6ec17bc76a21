using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Reading;

/// <summary>The part of a graph that its results depend on, in the order in which it was built.</summary>
internal sealed class PrunedGraph
{
    private readonly Dictionary<int, int> _newIndex;

    private PrunedGraph(Node[] nodes, int[] results, Dictionary<int, int> newIndex) =>
        (Nodes, Results, _newIndex) = (new(nodes), results, newIndex);

    public EquatableArray<Node> Nodes { get; }

    /// <summary>The results' nodes, in the order they were asked for.</summary>
    public int[] Results { get; }

    public static PrunedGraph Of(ExpressionGraph graph, int[] results)
    {
        HashSet<int> used = [.. results];
        for (int i = graph.Nodes.Count - 1; i >= 0; i--)
        {
            if (used.Contains(i)) used.UnionWith([graph[i].First, graph[i].Second, graph[i].Third]);
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

        return new([.. kept], results.Select(result => newIndex[result]).ToArray(), newIndex);
    }

    /// <summary>
    /// Results that are not numbers, for a model with problems. The build fails by the problems reported; the generated members are
    /// there all the same, so that code which uses them adds no messages of its own.
    /// </summary>
    public static PrunedGraph NotANumber(int count)
    {
        ExpressionGraph graph = new();
        int[] results = Enumerable.Repeat(graph.Constant(double.NaN), count).ToArray();
        return new([.. graph.Nodes], results, []);
    }

    /// <summary>The texts of the nodes that are left, in their order.</summary>
    public EquatableArray<ConditionText> Renumber(IReadOnlyDictionary<int, string> texts) => new(texts
        .Where(pair => _newIndex.ContainsKey(pair.Key))
        .Select(pair => new ConditionText(_newIndex[pair.Key], pair.Value))
        .OrderBy(static text => text.Node)
        .ToArray());
}
