using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Writing;

/// <summary>
/// Decides which expressions of a printed method get a name: those used more than once, those too long to read, and those that a loop
/// uses but that stay the same in it. Each is computed in the outermost loop it can stand in.
/// </summary>
internal sealed class LoopPlan
{
    /// <summary>Operations that one expression holds at most.</summary>
    private const int LargestExpression = 24;

    private readonly ExpressionGraph _graph;
    private readonly FreeSymbols _symbols;
    private readonly HashSet<int> _named = [];

    /// <param name="results">The expressions delivered, each with the index of the innermost loop in which that happens, or -1.</param>
    public LoopPlan(ExpressionGraph graph, FreeSymbols symbols, IReadOnlyList<(int Node, int Loop)> results)
    {
        _graph = graph;
        _symbols = symbols;
        Dictionary<int, int> uses = [];
        foreach ((int node, int loop) in results) Use(node, loop, uses);
        List<int> reached = Reach.Of(graph, results.Select(static result => result.Node));
        foreach (int index in reached)
        {
            Node node = graph[index];
            bool isLoop = node.Operator is Operator.Fold or Operator.Sum;
            int loop = LoopOf(index);
            if (isLoop)
            {
                _named.Add(index);
                if (node.Operator == Operator.Fold) Use(node.First, loop, uses);
                Use(node.Operator == Operator.Fold ? node.Second : node.First, node.Symbol, uses);
            }
            else
            {
                foreach (int operand in node.Operands) Use(operand, loop, uses);
            }
        }

        Dictionary<int, int> sizes = [];
        foreach (int index in reached)
        {
            Node node = graph[index];
            if (node.Operator is Operator.State or Operator.Parameter or Operator.Direction) _named.Add(index);
            if (IsFree(node)) continue;
            int size = node.IsLeaf ? 0 : 1;
            foreach (int operand in node.Operands) size += sizes.TryGetValue(operand, out int known) ? known : 0;
            if (uses[index] > 1 || size > LargestExpression) _named.Add(index);
            if (!_named.Contains(index)) sizes[index] = size;
        }
    }

    public bool IsNamed(int node) => _named.Contains(node);

    /// <summary>The index of the innermost loop that an expression must stand in, or -1.</summary>
    public int LoopOf(int node) => _symbols.Innermost(node);

    /// <summary>The named expressions below some results that stand directly in a loop, operands before users.</summary>
    public IEnumerable<int> NamedIn(int loop, IEnumerable<int> results) =>
        Reach.Of(_graph, results).Where(index => IsNamed(index) && LoopOf(index) == loop);

    private void Use(int node, int loop, Dictionary<int, int> uses)
    {
        uses[node] = (uses.TryGetValue(node, out int count) ? count : 0) + 1;
        if (LoopOf(node) != loop && !IsFree(_graph[node])) _named.Add(node);
    }

    /// <summary>What needs no name because its text is one already.</summary>
    private static bool IsFree(Node node) =>
        node.Operator is Operator.Constant or Operator.BooleanConstant or Operator.Time or Operator.Accumulator;
}
