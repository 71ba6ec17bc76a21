namespace OdeDsl.LinearAlgebra;

/// <summary>
/// Factors a square matrix into triangular ones by Gaussian elimination with partial pivoting (G. H. Golub, C. F. Van Loan, Matrix
/// Computations, section 3.4) and solves with the factors. Allocates nothing after construction. Not thread-safe.
/// </summary>
/// <remarks>Columns are contiguous, so that elimination and substitution are sums of columns, which run in whole registers.</remarks>
internal sealed class RealFactorization
{
    private readonly int stride;
    private readonly double[] columns;
    private readonly double[] reciprocalPivots;
    private readonly double[] work;
    private readonly int[] pivotRows;

    /// <param name="size">The number of rows and columns.</param>
    public RealFactorization(int size)
    {
        Size = size;
        stride = ColumnSums.Stride(size);
        columns = new double[size * stride];
        reciprocalPivots = new double[size];
        work = new double[stride];
        pivotRows = new int[size];
    }

    /// <summary>The number of rows and columns.</summary>
    public int Size { get; }

    /// <summary>An entry of the matrix to be factored; all must be set before each <see cref="Factor"/>.</summary>
    public double this[int row, int column]
    {
        set => columns[column * stride + ColumnSums.Room + row] = value;
    }

    /// <summary>Factors the matrix in place.</summary>
    /// <returns><see langword="false"/> if a pivot is zero or not finite: the factors are then of no use.</returns>
    public bool Factor()
    {
        int n = Size, room = ColumnSums.Room;
        for (int k = 0; k < n; k++)
        {
            Span<double> column = columns.AsSpan(k * stride + room, n);
            int pivot = k;
            double largest = Math.Abs(column[k]);
            for (int i = k + 1; i < column.Length; i++)
            {
                double size = Math.Abs(column[i]);
                if (size > largest) (pivot, largest) = (i, size);
            }

            pivotRows[k] = pivot;
            // Also false for a pivot that is not a number.
            if (!(largest > 0 && largest <= double.MaxValue)) return false;
            if (pivot != k) SwapRows(k, pivot);
            double reciprocal = reciprocalPivots[k] = 1 / column[k];
            for (int i = k + 1; i < column.Length; i++) column[i] *= reciprocal;
            for (int j = k + 1; j < n; j++)
            {
                double factor = columns[j * stride + room + k];
                if (factor != 0) ColumnSums.SubtractBelow(columns, j * stride, factor, columns, k * stride, k + 1, n);
            }
        }

        return true;
    }

    /// <summary>Solves A x = b with the factors.</summary>
    /// <param name="vector">b, replaced by x.</param>
    public void Solve(Span<double> vector)
    {
        int n = Size;
        Span<double> x = work.AsSpan(ColumnSums.Room, n);
        vector[..n].CopyTo(x);
        for (int k = 0; k < n; k++)
        {
            int pivot = pivotRows[k];
            double value = x[pivot];
            if (pivot != k) (x[pivot], x[k]) = (x[k], value);
        }

        for (int k = 0; k < n - 1; k++) ColumnSums.SubtractBelow(work, 0, x[k], columns, k * stride, k + 1, n);
        for (int k = n - 1; k >= 0; k--)
        {
            x[k] *= reciprocalPivots[k];
            ColumnSums.SubtractAbove(work, x[k], columns, k * stride, k);
        }

        x.CopyTo(vector);
    }

    private void SwapRows(int first, int second)
    {
        for (int at = ColumnSums.Room; at < columns.Length; at += stride)
            (columns[at + first], columns[at + second]) = (columns[at + second], columns[at + first]);
    }
}
