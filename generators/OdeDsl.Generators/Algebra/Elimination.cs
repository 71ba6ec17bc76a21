using System.Collections.Generic;
using System.Linq;
using System.Threading;

namespace OdeDsl.Generators.Algebra;

/// <summary>
/// Gaussian elimination without pivoting of a matrix with the pattern of a Jacobian and its diagonal, worked out in advance. The order of
/// the pivots is chosen by the fewest operations next, (rows − 1)(columns − 1) of the diagonal candidate: H. M. Markowitz, Management Science
/// 3 (1957) 255, on the diagonal as in W. F. Tinney, J. W. Walker, Proc. IEEE 55 (1967) 1801, second scheme.
/// </summary>
/// <param name="Length">The places: entries of the pattern in its order, then missing diagonal ones, then those that fill in.</param>
/// <param name="DiagonalPlaces">The place of each row's diagonal entry.</param>
/// <param name="Pivots">The steps, in order.</param>
/// <param name="OperationCount">Multiplications and subtractions of the elimination.</param>
internal sealed record Elimination(
    int Length, IReadOnlyList<int> DiagonalPlaces, IReadOnlyList<PivotStep> Pivots, int OperationCount)
{
    /// <summary>The elimination of a matrix, or <see langword="null"/> if it takes more operations than are allowed.</summary>
    public static Elimination? Of(SparseMatrix matrix, int largestOperationCount, CancellationToken cancellationToken)
    {
        if (matrix.Rows > largestOperationCount || matrix.Entries.Count > largestOperationCount) return null;
        EliminationBuilder builder = new(matrix);
        while (builder.Remaining > 0)
        {
            cancellationToken.ThrowIfCancellationRequested();
            builder.EliminateNext();
            if (builder.OperationCount > largestOperationCount) return null;
        }

        return builder.Build();
    }
}

/// <summary>One pivot: its row's entries to the right, and the rows below it that change.</summary>
internal sealed record PivotStep(int Row, IReadOnlyList<MatrixPlace> Right, IReadOnlyList<RowUpdate> Updates);

/// <summary>A row minus a multiple of the pivot's: Multiplier becomes the factor, each Target loses the factor times its Source.</summary>
internal sealed record RowUpdate(int Row, int Multiplier, IReadOnlyList<(int Target, int Source)> Entries);

/// <summary>An entry's column and the place that holds it.</summary>
internal readonly record struct MatrixPlace(int Column, int Place);

/// <summary>The pattern while it fills in.</summary>
internal sealed class EliminationBuilder
{
    private readonly SortedDictionary<int, int>[] _rows;
    private readonly SortedSet<int>[] _columns;
    private readonly int[] _diagonal;
    private readonly SortedSet<int> _open;
    private readonly List<PivotStep> _pivots = [];
    private int _length;

    public EliminationBuilder(SparseMatrix matrix)
    {
        int n = matrix.Rows;
        _rows = [.. Enumerable.Range(0, n).Select(static _ => new SortedDictionary<int, int>())];
        _columns = [.. Enumerable.Range(0, n).Select(static _ => new SortedSet<int>())];
        foreach (MatrixEntry entry in matrix.Entries) PlaceOf(entry.Row, entry.Column);
        _diagonal = [.. Enumerable.Range(0, n).Select(i => PlaceOf(i, i))];
        _open = [.. Enumerable.Range(0, n)];
    }

    public int Remaining => _open.Count;

    public int OperationCount { get; private set; }

    public Elimination Build() => new(_length, _diagonal, _pivots, OperationCount);

    public void EliminateNext()
    {
        int pivot = _open.OrderBy(row => (_rows[row].Count - 1) * (_columns[row].Count - 1)).First();
        _open.Remove(pivot);
        _columns[pivot].Remove(pivot);
        MatrixPlace[] right = [.. _rows[pivot].Where(entry => entry.Key != pivot).Select(static entry => new MatrixPlace(entry.Key, entry.Value))];
        List<RowUpdate> updates = [];
        foreach (int row in _columns[pivot])
        {
            updates.Add(new RowUpdate(row, _rows[row][pivot], [.. right.Select(entry => (PlaceOf(row, entry.Column), entry.Place))]));
            _rows[row].Remove(pivot);
        }

        foreach (MatrixPlace entry in right) _columns[entry.Column].Remove(pivot);
        OperationCount += 1 + (updates.Count * (1 + (2 * right.Length)));
        _pivots.Add(new PivotStep(pivot, right, updates));
    }

    private int PlaceOf(int row, int column)
    {
        if (_rows[row].TryGetValue(column, out int place)) return place;
        _rows[row].Add(column, _length);
        _columns[column].Add(row);
        return _length++;
    }
}
