using System;
using System.Collections.Generic;
using System.Globalization;
using System.Linq;

namespace OdeDsl.Generators.Algebra;

/// <summary>
/// Schedules compute both branches of a condition. Numbers do not mind, but Clamp, Sign and tables can throw: where the user's code comes to
/// one only on some branch, its operands are replaced by harmless ones off that branch. The values that are chosen stay the same.
/// </summary>
/// <remarks>
/// Works by regions: the operations that are evaluated together with a root, without looking into branches. A guard is the
/// condition under which the user's code comes to a region. An operation that a region surely evaluates has that region's guard,
/// in the regions inside as well.
/// </remarks>
internal sealed class BranchGuard
{
    private readonly ExpressionGraph _graph;
    private readonly Dictionary<int, HashSet<int>> _reachable = [];
    private readonly Dictionary<int, HashSet<int>> _certain = [];
    private readonly Dictionary<string, int> _rewritten = [];
    private readonly HashSet<int> _conditional;
    private readonly int _always;

    /// <param name="graph">The graph to read and to append to.</param>
    /// <param name="conditional">The operations that can throw and are only reached by branches.</param>
    private BranchGuard(ExpressionGraph graph, HashSet<int> conditional)
    {
        _graph = graph;
        _conditional = conditional;
        _always = graph.Constant(true);
    }

    /// <summary>The expressions with operations that can throw guarded.</summary>
    public static int[] Apply(ExpressionGraph graph, IReadOnlyList<int> roots)
    {
        List<int> reached = Reach.Of(graph, roots);
        HashSet<int> conditional = [.. reached.Where(index => Quiet.CanThrow(graph[index].Operator))];
        if (conditional.Count > 0) conditional.ExceptWith(Region(graph, roots, static _ => true));
        if (conditional.Count == 0) return [.. roots];
        BranchGuard guard = new(graph, conditional);
        foreach (int index in reached) guard.Inspect(index);
        Dictionary<int, int> certain = [];
        foreach (int root in roots) guard.Enter(root, guard._always, certain);
        Dictionary<int, int> rewritten = guard.RewriteRegion(roots, guard._always, certain);
        return [.. roots.Select(root => rewritten.TryGetValue(root, out int other) ? other : root)];
    }

    /// <summary>Notes which throwing operations are below a node, and which of them its evaluation surely comes to.</summary>
    private void Inspect(int index)
    {
        Node node = _graph[index];
        HashSet<int> reachable = [.. node.Operands.SelectMany(ReachableFrom)];
        HashSet<int> certain = [.. Unconditional(node).SelectMany(CertainIn)];
        if (node.Operator == Operator.Conditional) certain.UnionWith(CertainIn(node.Second).Intersect(CertainIn(node.Third)));
        if (_conditional.Contains(index))
        {
            reachable.Add(index);
            certain.Add(index);
        }

        if (reachable.Count == 0) return;
        _reachable.Add(index, reachable);
        _certain.Add(index, certain);
    }

    private IEnumerable<int> ReachableFrom(int index) => _reachable.TryGetValue(index, out HashSet<int>? found) ? found : [];

    private IEnumerable<int> CertainIn(int index) => _certain.TryGetValue(index, out HashSet<int>? found) ? found : [];

    /// <summary>The operands that are evaluated whenever the operation is.</summary>
    private static IEnumerable<int> Unconditional(Node node) =>
        node.Operator is Operator.Conditional or Operator.And or Operator.Or ? [node.First] : node.Operands;

    /// <summary>Notes the guard of what a region surely evaluates, unless it is evaluated earlier already.</summary>
    private void Enter(int root, int guard, Dictionary<int, int> guards)
    {
        foreach (int index in CertainIn(root))
        {
            if (!guards.ContainsKey(index)) guards.Add(index, guard);
        }
    }

    private Dictionary<int, int> RewriteRegion(IEnumerable<int> roots, int guard, Dictionary<int, int> guards)
    {
        Dictionary<int, int> rewritten = [];
        foreach (int index in Region(_graph, roots, _reachable.ContainsKey))
        {
            Node node = _graph[index];
            int first = At(rewritten, node.First);
            rewritten[index] = node.Operator switch
            {
                Operator.Conditional => _graph.Ternary(
                    Operator.Conditional,
                    first,
                    RewriteBranch(node.Second, Both(guard, first), guards),
                    RewriteBranch(node.Third, Both(guard, Not(first)), guards)),
                Operator.And => _graph.Binary(Operator.And, first, RewriteBranch(node.Second, Both(guard, first), guards)),
                Operator.Or => _graph.Binary(Operator.Or, first, RewriteBranch(node.Second, Both(guard, Not(first)), guards)),
                Operator.Clamp when _conditional.Contains(index) => _graph.Ternary(
                    Operator.Clamp, first, Masked(guards[index], At(rewritten, node.Second), double.NaN), At(rewritten, node.Third)),
                Operator.Sign when _conditional.Contains(index) => _graph.Unary(Operator.Sign, Masked(guards[index], first, 0.0)),
                Operator.TableValue when _conditional.Contains(index) =>
                    TableNodes.Value(_graph, TableNodes.TableOf(node), Masked(guards[index], first, double.NaN)),
                _ => _graph.Intern(node with { First = first, Second = At(rewritten, node.Second), Third = At(rewritten, node.Third) }),
            };
        }

        return rewritten;
    }

    private int RewriteBranch(int root, int guard, Dictionary<int, int> outer)
    {
        if (!_reachable.TryGetValue(root, out HashSet<int>? reachable)) return root;
        Dictionary<int, int> guards = new(outer);
        Enter(root, guard, guards);
        string key = Key(root, reachable, guard, guards);
        if (!_rewritten.TryGetValue(key, out int known)) _rewritten.Add(key, known = RewriteRegion([root], guard, guards)[root]);
        return known;
    }

    /// <summary>What the rewritten form depends on: the guards below the root, and its own guard only if something below has none yet.</summary>
    private static string Key(int root, HashSet<int> reachable, int guard, Dictionary<int, int> guards)
    {
        IEnumerable<int> known = reachable.OrderBy(static index => index).Select(index => guards.TryGetValue(index, out int g) ? g : -1);
        int own = reachable.All(guards.ContainsKey) ? -1 : guard;
        return string.Join(",", new[] { root, own }.Concat(known).Select(static number => number.ToString(CultureInfo.InvariantCulture)));
    }

    /// <summary>The wanted nodes of a region, operands before users.</summary>
    private static List<int> Region(ExpressionGraph graph, IEnumerable<int> roots, Func<int, bool> isWanted)
    {
        HashSet<int> seen = [.. roots.Where(isWanted)];
        Stack<int> open = new(seen);
        while (open.Count > 0)
        {
            foreach (int operand in Unconditional(graph[open.Pop()]))
            {
                if (isWanted(operand) && seen.Add(operand)) open.Push(operand);
            }
        }

        List<int> region = [.. seen];
        region.Sort();
        return region;
    }

    private static int At(Dictionary<int, int> rewritten, int index) => rewritten.TryGetValue(index, out int other) ? other : index;

    private int Both(int a, int b) => a == _always ? b : _graph.Binary(Operator.And, a, b);

    private int Not(int a) => _graph.Unary(Operator.Not, a);

    private int Masked(int guard, int operand, double harmless) =>
        guard == _always ? operand : _graph.Ternary(Operator.Conditional, guard, operand, _graph.Constant(harmless));
}
