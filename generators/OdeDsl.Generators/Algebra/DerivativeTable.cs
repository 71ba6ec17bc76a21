using System.Collections.Generic;
using System.Linq;
using System.Threading;

namespace OdeDsl.Generators.Algebra;

/// <summary>The derivatives of a list of expressions, by states, parameters, time, or along a direction in state space.</summary>
internal sealed class DerivativeTable(ExpressionGraph graph, IReadOnlyList<int> roots)
{
    private readonly Differentiator _differentiator = new(graph, roots);

    /// <summary>The matrix of derivatives by all states or by all parameters.</summary>
    public SparseMatrix By(Operator leaf, int count, CancellationToken cancellationToken)
    {
        List<MatrixEntry> entries = [];
        for (int column = 0; column < count; column++)
        {
            Dictionary<int, int> derivatives = _differentiator.Along([new(graph.Leaf(leaf, column), _differentiator.One)], cancellationToken);
            for (int row = 0; row < roots.Count; row++)
            {
                if (derivatives.TryGetValue(roots[row], out int derivative)) entries.Add(new MatrixEntry(row, column, derivative));
            }
        }

        return new SparseMatrix(roots.Count, count, [.. entries.OrderBy(static entry => entry.Row).ThenBy(static entry => entry.Column)]);
    }

    public int[] ByTime(CancellationToken cancellationToken) =>
        Along([new(graph.Leaf(Operator.Time), _differentiator.One)], cancellationToken);

    public int[] AlongDirection(int stateCount, CancellationToken cancellationToken) => Along(
        [.. Enumerable.Range(0, stateCount).Select(
            i => new KeyValuePair<int, int>(graph.Leaf(Operator.State, i), graph.Leaf(Operator.Direction, i)))],
        cancellationToken);

    private int[] Along(KeyValuePair<int, int>[] seeds, CancellationToken cancellationToken)
    {
        Dictionary<int, int> derivatives = _differentiator.Along(seeds, cancellationToken);
        return [.. roots.Select(root => derivatives.TryGetValue(root, out int derivative) ? derivative : _differentiator.Zero)];
    }
}
