using System.Collections.Generic;
using System.Threading;

namespace OdeDsl.Generators.Algebra;

/// <summary>One line of straight code: a shared value gets a name, or a result is delivered.</summary>
/// <param name="Node">The expression.</param>
/// <param name="Output">The position of the result it is, or -1 for a shared value.</param>
internal readonly record struct Step(int Node, int Output);

/// <summary>
/// The order in which a list of results is computed: each shared value once, before its first use and as late as that allows;
/// everything used once stays inside the expression that uses it, up to a size that stays readable (and that compilers can nest).
/// </summary>
internal sealed class Schedule
{
    /// <summary>Operations that one expression holds at most.</summary>
    private const int LargestExpression = 24;

    private readonly HashSet<int> _shared = [];

    private Schedule(ExpressionGraph graph, IReadOnlyList<int> reached)
    {
        Graph = graph;
        Reached = reached;
    }

    public ExpressionGraph Graph { get; }

    /// <summary>All nodes involved, operands before users.</summary>
    public IReadOnlyList<int> Reached { get; }

    public List<Step> Steps { get; } = [];

    /// <summary>The number of operations, each counted once.</summary>
    public int OperationCount { get; private set; }

    public bool IsShared(int node) => _shared.Contains(node);

    public static Schedule Of(ExpressionGraph graph, IReadOnlyList<int> results, CancellationToken cancellationToken)
    {
        Schedule schedule = new(graph, Reach.Of(graph, results));
        schedule.FindShared(results);
        HashSet<int> done = [];
        for (int output = 0; output < results.Count; output++)
        {
            cancellationToken.ThrowIfCancellationRequested();
            foreach (int node in schedule.SharedBelow(results[output], done)) schedule.Steps.Add(new Step(node, -1));
            schedule.Steps.Add(new Step(results[output], output));
        }

        return schedule;
    }

    private void FindShared(IReadOnlyList<int> results)
    {
        Dictionary<int, int> uses = [];
        foreach (int result in results) uses[result] = Count(uses, result) + 1;
        foreach (int index in Reached)
        {
            foreach (int operand in Graph[index].Operands) uses[operand] = Count(uses, operand) + 1;
        }

        Dictionary<int, int> sizes = [];
        foreach (int index in Reached)
        {
            if (Graph[index].IsLeaf) continue;
            OperationCount++;
            int size = 1;
            foreach (int operand in Graph[index].Operands) size += Count(sizes, operand);
            if (uses[index] > 1 || size > LargestExpression) _shared.Add(index);
            else sizes[index] = size;
        }
    }

    private static int Count(Dictionary<int, int> counts, int node) => counts.TryGetValue(node, out int count) ? count : 0;

    /// <summary>The shared values that a result needs and that are not done yet, in order.</summary>
    private List<int> SharedBelow(int result, HashSet<int> done)
    {
        List<int> needed = [];
        HashSet<int> seen = [result];
        Stack<int> open = new();
        open.Push(result);
        while (open.Count > 0)
        {
            int index = open.Pop();
            if (IsShared(index))
            {
                if (!done.Add(index)) continue;
                needed.Add(index);
            }

            foreach (int operand in Graph[index].Operands)
            {
                if (seen.Add(operand)) open.Push(operand);
            }
        }

        needed.Sort();
        return needed;
    }
}
