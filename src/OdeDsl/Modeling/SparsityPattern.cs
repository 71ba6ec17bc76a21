using System.Collections.Immutable;

namespace OdeDsl.Modeling;

/// <summary>Positions of the entries of a matrix that are not identically zero, in compressed rows.</summary>
public sealed class SparsityPattern
{
    /// <summary>Makes a pattern.</summary>
    /// <param name="rowCount">The number of rows.</param>
    /// <param name="columnCount">The number of columns.</param>
    /// <param name="rowStarts">For each row the position of its first entry, and the number of entries last: rows + 1 numbers.</param>
    /// <param name="columns">The column of each entry, ascending within a row.</param>
    /// <exception cref="ArgumentException">The arrays do not describe a matrix of this size.</exception>
    public SparsityPattern(int rowCount, int columnCount, ImmutableArray<int> rowStarts, ImmutableArray<int> columns)
    {
        if (rowStarts.Length != rowCount + 1 || rowStarts[0] != 0 || rowStarts[rowCount] != columns.Length)
            throw new ArgumentException("Row starts must hold one position per row and the number of entries last.", nameof(rowStarts));
        for (int row = 0; row < rowCount; row++)
        {
            for (int entry = rowStarts[row]; entry < rowStarts[row + 1]; entry++)
            {
                bool ascending = entry == rowStarts[row] || columns[entry] > columns[entry - 1];
                if (!ascending || columns[entry] < 0 || columns[entry] >= columnCount)
                    throw new ArgumentException("Columns must ascend within a row and lie inside the matrix.", nameof(columns));
            }
        }

        RowCount = rowCount;
        ColumnCount = columnCount;
        RowStarts = rowStarts;
        Columns = columns;
    }

    /// <summary>The number of rows.</summary>
    public int RowCount { get; }

    /// <summary>The number of columns.</summary>
    public int ColumnCount { get; }

    /// <summary>For each row the position of its first entry, and the number of entries last.</summary>
    public ImmutableArray<int> RowStarts { get; }

    /// <summary>The column of each entry, ascending within a row.</summary>
    public ImmutableArray<int> Columns { get; }

    /// <summary>The number of entries.</summary>
    public int EntryCount => Columns.Length;

    /// <summary>Whether an entry is part of the pattern.</summary>
    /// <param name="row">The row.</param>
    /// <param name="column">The column.</param>
    /// <returns><see langword="true"/> if the entry may differ from zero.</returns>
    public bool Contains(int row, int column)
    {
        for (int entry = RowStarts[row]; entry < RowStarts[row + 1]; entry++)
        {
            if (Columns[entry] == column) return true;
        }

        return false;
    }

    /// <summary>Spreads the values of the entries over the whole matrix, in place and without allocation.</summary>
    /// <param name="matrix">
    /// On entry <see cref="EntryCount"/> values at the front, in the order of the pattern; on return rows × columns values by rows, zeros
    /// included. What lies behind is left alone.
    /// </param>
    /// <exception cref="ArgumentOutOfRangeException">The vector is shorter than rows × columns.</exception>
    public void Expand(Span<double> matrix)
    {
        matrix = matrix[..checked(RowCount * ColumnCount)];
        ReadOnlySpan<int> starts = RowStarts.AsSpan(), columns = Columns.AsSpan();
        int end = matrix.Length;

        // From the back: an entry's place in the matrix is never before its place in the list, so nothing unread is overwritten.
        for (int row = RowCount - 1; row >= 0; row--)
        {
            for (int entry = starts[row + 1] - 1; entry >= starts[row]; entry--)
            {
                int place = (row * ColumnCount) + columns[entry];
                double value = matrix[entry];
                matrix[(place + 1)..end].Clear();
                matrix[place] = value;
                end = place;
            }
        }

        matrix[..end].Clear();
    }
}
