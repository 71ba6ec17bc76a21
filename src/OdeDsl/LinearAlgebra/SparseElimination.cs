using OdeDsl.Modeling;

namespace OdeDsl.LinearAlgebra;

/// <summary>
/// The symbolic part of a sparse elimination without exchanges: the order of the variables and the entries of both factors.
/// Found once for a pattern, shared by all factorisations of matrices with it.
/// </summary>
internal sealed class SparseElimination
{
    /// <summary>Up to this size the fill of every candidate pivot is weighed with the unsymmetric pattern (Markowitz).</summary>
    private const int LargestWeighed = 200;

    public SparseElimination(SparsityPattern pattern)
    {
        Pattern = pattern;
        Order = pattern.RowCount <= LargestWeighed ? MarkowitzOrder(pattern) : MinimumDegree.Order(pattern);
        int n = pattern.RowCount;
        var places = new int[n];
        for (int k = 0; k < n; k++) places[Order[k]] = k;
        EntryColumns = new int[pattern.EntryCount];
        for (int entry = 0; entry < EntryColumns.Length; entry++) EntryColumns[entry] = places[pattern.Columns[entry]];
        (LowerStarts, UpperStarts) = (new int[n + 1], new int[n + 1]);
        (LowerColumns, UpperColumns) = Fill();
    }

    /// <summary>The entries of the matrix; the diagonal counts as part of it.</summary>
    public SparsityPattern Pattern { get; }

    /// <summary>The row and column of the matrix that is the k-th of the factors.</summary>
    public int[] Order { get; }

    /// <summary>For each entry of the pattern, its column in the factors.</summary>
    public int[] EntryColumns { get; }

    /// <summary>For each row of the lower factor where its entries start, and the number of all last.</summary>
    public int[] LowerStarts { get; }

    /// <summary>The columns of the lower factor's entries, ascending within a row, without the diagonal.</summary>
    public int[] LowerColumns { get; }

    /// <inheritdoc cref="LowerStarts"/>
    public int[] UpperStarts { get; }

    /// <inheritdoc cref="LowerColumns"/>
    public int[] UpperColumns { get; }

    /// <summary>The multiplications that a factorisation takes.</summary>
    public long Operations
    {
        get
        {
            long sum = 0;
            foreach (int k in LowerColumns) sum += 1 + UpperStarts[k + 1] - UpperStarts[k];
            return sum;
        }
    }

    // Row by row: the entries of the row of the matrix, and those of the rows of the upper factor that are subtracted from it.
    private (int[] Lower, int[] Upper) Fill()
    {
        int n = Order.Length;
        List<int> lower = [], upper = [], right = [];
        var marks = new int[n];
        Array.Fill(marks, -1);
        var pending = new PriorityQueue<int, int>();
        for (int i = 0; i < n; i++)
        {
            marks[i] = i;
            right.Clear();
            int row = Order[i];
            for (int entry = Pattern.RowStarts[row]; entry < Pattern.RowStarts[row + 1]; entry++) Visit(EntryColumns[entry], i);
            while (pending.TryDequeue(out int k, out _))
            {
                lower.Add(k);
                for (int at = UpperStarts[k]; at < UpperStarts[k + 1]; at++) Visit(upper[at], i);
            }

            right.Sort();
            upper.AddRange(right);
            LowerStarts[i + 1] = lower.Count;
            UpperStarts[i + 1] = upper.Count;
        }

        return ([.. lower], [.. upper]);

        void Visit(int column, int i)
        {
            if (marks[column] == i) return;
            marks[column] = i;
            if (column < i) pending.Enqueue(column, column);
            else right.Add(column);
        }
    }

    // Always the diagonal entry that can fill the fewest places: (entries left in its row − 1) × (entries left in its column − 1) (H. M.
    // Markowitz, Management Science 3, 1957).
    private static int[] MarkowitzOrder(SparsityPattern pattern)
    {
        int n = pattern.RowCount;
        var filled = new bool[n, n];
        for (int i = 0; i < n; i++)
        {
            for (int entry = pattern.RowStarts[i]; entry < pattern.RowStarts[i + 1]; entry++) filled[i, pattern.Columns[entry]] = true;
        }

        List<int> rest = [.. Enumerable.Range(0, n)];
        var order = new int[n];
        for (int k = 0; k < n; k++)
        {
            int pivot = rest.MinBy(candidate =>
                rest.Count(j => j != candidate && filled[candidate, j]) * rest.Count(i => i != candidate && filled[i, candidate]));
            order[k] = pivot;
            rest.Remove(pivot);
            foreach (int i in rest)
            {
                if (!filled[i, pivot]) continue;
                foreach (int j in rest) filled[i, j] |= filled[pivot, j];
            }
        }

        return order;
    }
}
