using System.Collections.Generic;
using System.Linq;
using System.Threading;

namespace OdeDsl.Generators.Algebra;

/// <summary>The derivatives of a list of expressions, by states, parameters, time, or along a direction in state space.</summary>
internal sealed class DerivativeTable
{
    private readonly ExpressionGraph _graph;
    private readonly IReadOnlyList<int> _roots;
    private readonly Differentiator _differentiator;
    private readonly Dictionary<int, List<int>> _rowsOf = [];

    public DerivativeTable(ExpressionGraph graph, IReadOnlyList<int> roots)
    {
        _graph = graph;
        _roots = roots;
        _differentiator = new Differentiator(graph, roots);
        for (int row = 0; row < roots.Count; row++)
        {
            if (!_rowsOf.TryGetValue(roots[row], out List<int>? rows)) _rowsOf.Add(roots[row], rows = []);
            rows.Add(row);
        }
    }

    /// <summary>The matrix of derivatives by all states or by all parameters.</summary>
    public SparseMatrix By(Operator leaf, int count, CancellationToken cancellationToken)
    {
        List<MatrixEntry> entries = [];
        for (int column = 0; column < count; column++)
        {
            Dictionary<int, int> derivatives = _differentiator.Along([new(_graph.Leaf(leaf, column), _differentiator.One)], cancellationToken);
            foreach (KeyValuePair<int, int> derivative in derivatives)
            {
                if (!_rowsOf.TryGetValue(derivative.Key, out List<int>? rows)) continue;
                entries.AddRange(rows.Select(row => new MatrixEntry(row, column, derivative.Value)));
            }
        }

        return new SparseMatrix(_roots.Count, count, [.. entries.OrderBy(static entry => entry.Row).ThenBy(static entry => entry.Column)]);
    }

    /// <summary>The derivatives by time, explicit and by way of the inputs, whose slopes stand behind them.</summary>
    public int[] ByTime(int inputCount, CancellationToken cancellationToken)
    {
        List<KeyValuePair<int, int>> seeds = [new(_graph.Leaf(Operator.Time), _differentiator.One)];
        for (int leaf = _graph.Count - 1; leaf >= 0; leaf--)
        {
            if (_graph[leaf].Operator == Operator.Input)
                seeds.Add(new(leaf, _graph.Leaf(Operator.InputSlope, _graph[leaf].Index + inputCount)));
        }

        return Along([.. seeds], cancellationToken);
    }

    public int[] AlongDirection(int stateCount, CancellationToken cancellationToken) => Along(
        [.. Enumerable.Range(0, stateCount).Select(
            i => new KeyValuePair<int, int>(_graph.Leaf(Operator.State, i), _graph.Leaf(Operator.Direction, i)))],
        cancellationToken);

    private int[] Along(KeyValuePair<int, int>[] seeds, CancellationToken cancellationToken)
    {
        Dictionary<int, int> derivatives = _differentiator.Along(seeds, cancellationToken);
        return [.. _roots.Select(root => derivatives.TryGetValue(root, out int derivative) ? derivative : _differentiator.Zero)];
    }
}
