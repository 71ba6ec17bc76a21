using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Writing;

/// <summary>The lines of one printed method.</summary>
/// <param name="Steps">The lines.</param>
/// <param name="Leaves">The leaves they read.</param>
/// <param name="Loads">Shared values of earlier methods that it reads, with their places in the scratch vector.</param>
/// <param name="Stores">Shared values that later methods read, with their places.</param>
/// <param name="ScratchLength">The length of the scratch vector, the same for all methods of a quantity.</param>
internal sealed record MethodPart(
    IReadOnlyList<Step> Steps,
    IReadOnlyCollection<int> Leaves,
    IReadOnlyDictionary<int, int> Loads,
    IReadOnlyDictionary<int, int> Stores,
    int ScratchLength);

/// <summary>
/// Cuts a schedule into methods the JIT still optimises. Its limits are 60,000 bytes of intermediate code, 20,000 instructions and
/// 2,000 locals; measured, code stays at full speed up to about half of that.
/// </summary>
internal static class MethodCutter
{
    public static IReadOnlyList<MethodPart> Cut(Schedule schedule, MethodBudget budget)
    {
        List<List<Step>> groups = [];
        Dictionary<int, int> definedIn = [];
        (int Operations, int Bytes, int Locals) total = (0, 0, 0);
        foreach (Step step in schedule.Steps)
        {
            (int operations, int bytes) = Size(schedule, step);
            total = (total.Operations + operations, total.Bytes + bytes, total.Locals + (step.Output < 0 ? 1 : 0));
            bool isFull = total.Operations > budget.Operations || total.Bytes > budget.Bytes || total.Locals > budget.Locals;
            if (groups.Count == 0 || isFull)
            {
                groups.Add([]);
                total = (operations, bytes, step.Output < 0 ? 1 : 0);
            }

            groups[groups.Count - 1].Add(step);
            if (step.Output < 0) definedIn[step.Node] = groups.Count - 1;
        }

        return Connect(schedule, groups, definedIn);
    }

    /// <summary>Gives each value that crosses from one method into a later one a place in the scratch vector.</summary>
    private static IReadOnlyList<MethodPart> Connect(Schedule schedule, List<List<Step>> groups, Dictionary<int, int> definedIn)
    {
        List<HashSet<int>> reads = [.. groups.Select(group => ReadsOf(schedule, group))];
        Dictionary<int, int> lastUse = [];
        for (int i = 0; i < groups.Count; i++)
        {
            foreach (int node in reads[i])
            {
                if (definedIn.TryGetValue(node, out int definition) && definition < i) lastUse[node] = i;
            }
        }

        ScratchPlaces places = new(lastUse);
        Dictionary<int, int>[] loads = new Dictionary<int, int>[groups.Count];
        Dictionary<int, int>[] stores = new Dictionary<int, int>[groups.Count];
        for (int i = 0; i < groups.Count; i++)
        {
            loads[i] = reads[i].Where(node => definedIn.TryGetValue(node, out int definition) && definition < i)
                .OrderBy(static node => node).ToDictionary(static node => node, places.Of);
            stores[i] = groups[i].Where(step => step.Output < 0 && lastUse.ContainsKey(step.Node))
                .ToDictionary(static step => step.Node, step => places.Take(step.Node));
            places.ReleaseAfter(i);
        }

        return [.. groups.Select((group, i) => new MethodPart(
            group, [.. reads[i].Where(node => schedule.Graph[node].IsLeaf)], loads[i], stores[i], places.Length))];
    }

    /// <summary>The leaves and shared values that lines refer to.</summary>
    private static HashSet<int> ReadsOf(Schedule schedule, List<Step> steps)
    {
        HashSet<int> reads = [];
        foreach (Step step in steps)
        {
            foreach (int node in NodesOf(schedule, step))
            {
                if (schedule.Graph[node].IsLeaf || schedule.IsShared(node)) reads.Add(node);
            }
        }

        return reads;
    }

    /// <summary>The nodes that the printed line shows: its own operation and what is not shared, down to leaves and names.</summary>
    private static IEnumerable<int> NodesOf(Schedule schedule, Step step)
    {
        Stack<int> open = new();
        if (step.Output >= 0) open.Push(step.Node);
        else foreach (int operand in schedule.Graph[step.Node].Operands) open.Push(operand);
        while (open.Count > 0)
        {
            int node = open.Pop();
            yield return node;
            if (schedule.IsShared(node)) continue;
            foreach (int operand in schedule.Graph[node].Operands) open.Push(operand);
        }
    }

    /// <summary>Operations and, roughly, bytes of intermediate code of a line.</summary>
    private static (int Operations, int Bytes) Size(Schedule schedule, Step step)
    {
        (int operations, int bytes) = (0, 14);
        foreach (int node in NodesOf(schedule, step))
        {
            if (schedule.IsShared(node)) bytes += 12;
            else
            {
                if (!schedule.Graph[node].IsLeaf) operations++;
                bytes += BytesOf(schedule.Graph[node].Operator);
            }
        }

        return step.Output < 0 ? (operations + 1, bytes + BytesOf(schedule.Graph[step.Node].Operator)) : (operations, bytes);
    }

    private static int BytesOf(Operator operation) => operation switch
    {
        Operator.Constant => 9,
        Operator.State or Operator.Parameter or Operator.Direction or Operator.WholeNumber
            or Operator.Mode or Operator.Input or Operator.InputSlope => 13,
        Operator.Side => 25,
        Operator.Time => 2,
        Operator.Add or Operator.Subtract or Operator.Multiply or Operator.Divide or Operator.Remainder or Operator.Negate => 1,
        Operator.Conditional or (>= Operator.Less and <= Operator.Not) => 12,
        _ => 6,
    };
}

/// <summary>Places of a scratch vector, reused when their value is no longer needed.</summary>
internal sealed class ScratchPlaces(IReadOnlyDictionary<int, int> lastUse)
{
    private readonly Dictionary<int, int> _placeOf = [];
    private readonly Stack<int> _unused = new();

    public int Length { get; private set; }

    public int Of(int node) => _placeOf[node];

    public int Take(int node) => _placeOf[node] = _unused.Count > 0 ? _unused.Pop() : Length++;

    public void ReleaseAfter(int part)
    {
        foreach (int node in _placeOf.Keys.Where(node => lastUse[node] == part).OrderBy(static node => node).ToArray())
        {
            _unused.Push(_placeOf[node]);
            _placeOf.Remove(node);
        }
    }
}
