using System.Collections.Generic;
using System.Threading;

namespace OdeDsl.Generators.Algebra;

/// <summary>
/// Differentiates the expressions of a graph by the chain rule, forwards, one direction at a time. Derivatives are appended to the
/// same graph, so they share everything they can with the values and with one another.
/// </summary>
internal sealed class Differentiator
{
    private readonly ExpressionGraph _graph;
    private readonly DerivativeRules _rules;
    private readonly List<int>?[] _usersOf;

    /// <param name="graph">The graph to read and to append to.</param>
    /// <param name="roots">The expressions that will be asked for.</param>
    public Differentiator(ExpressionGraph graph, IEnumerable<int> roots)
    {
        _graph = graph;
        _rules = new DerivativeRules(graph);
        _usersOf = new List<int>?[graph.Count];
        foreach (int index in Reach.Of(graph, roots))
        {
            foreach (int operand in graph[index].Operands) (_usersOf[operand] ??= []).Add(index);
        }
    }

    public int Zero => _rules.Algebra.Zero;

    public int One => _rules.Algebra.One;

    /// <summary>The derivatives, along one direction, of all expressions that depend on it.</summary>
    /// <param name="seeds">The leaves that change, each with its own derivative.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <returns>For each expression with a derivative other than zero, that derivative.</returns>
    public Dictionary<int, int> Along(IEnumerable<KeyValuePair<int, int>> seeds, CancellationToken cancellationToken)
    {
        Dictionary<int, int> derivatives = [];
        foreach (KeyValuePair<int, int> seed in seeds) derivatives[seed.Key] = seed.Value;
        foreach (int index in DependentsOf(derivatives.Keys))
        {
            cancellationToken.ThrowIfCancellationRequested();
            int derivative = _rules.Derivative(index, operand => derivatives.TryGetValue(operand, out int known) ? known : Zero);
            if (!_rules.Algebra.IsZero(derivative)) derivatives[index] = derivative;
        }

        return derivatives;
    }

    /// <summary>The expressions that use a leaf directly or through others, operands before users.</summary>
    private List<int> DependentsOf(IEnumerable<int> leaves)
    {
        HashSet<int> seen = [];
        List<int> found = [];
        Stack<int> open = new(leaves);
        while (open.Count > 0)
        {
            int index = open.Pop();
            if (index >= _usersOf.Length) continue;
            foreach (int user in _usersOf[index] ?? [])
            {
                if (!seen.Add(user)) continue;
                found.Add(user);
                open.Push(user);
            }
        }

        found.Sort();
        return found;
    }
}
