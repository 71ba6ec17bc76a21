using OdeDsl.Modeling;

namespace OdeDsl.LinearAlgebra;

/// <summary>
/// σ I − J for a J whose entries lie near the diagonal: Gaussian elimination with partial pivoting within the band (G. H. Golub,
/// C. F. Van Loan, Matrix Computations, section 4.3). Work and memory grow with the size times the width of the band.
/// </summary>
internal sealed class BandedFactorization<T>
    where T : struct, IFieldNumber<T>
{
    private readonly SparsityPattern pattern;
    private readonly int size, lower, width;

    // Entry (i, j) at i width + j − i + lower; exchanges of rows make the upper band wider by the lower one.
    private readonly T[] band;
    private readonly T[] multipliers;
    private readonly T[] reciprocals;
    private readonly int[] pivotRows;

    /// <param name="pattern">The entries of J.</param>
    /// <param name="lower">The number of diagonals below the main one.</param>
    /// <param name="upper">The number of diagonals above it.</param>
    public BandedFactorization(SparsityPattern pattern, int lower, int upper)
    {
        this.pattern = pattern;
        this.lower = lower;
        size = pattern.RowCount;
        width = 2 * lower + upper + 1;
        band = new T[checked(size * width)];
        multipliers = new T[checked(size * lower)];
        reciprocals = new T[size];
        pivotRows = new int[size];
    }

    /// <summary>The number of numbers held.</summary>
    public long EntryCount => band.Length + multipliers.Length + (long)size;

    /// <summary>Loads and factors the matrix; false if a pivot is zero or not finite.</summary>
    public bool Factor(ReadOnlySpan<double> jacobian, T shift)
    {
        Load(jacobian, shift);
        for (int k = 0; k < size; k++)
        {
            int last = Math.Min(size - 1, k + lower), pivot = k;
            double largest = band[At(k, k)].Size;
            for (int i = k + 1; i <= last; i++)
            {
                double here = band[At(i, k)].Size;
                if (here > largest) (pivot, largest) = (i, here);
            }

            pivotRows[k] = pivot;
            // Also false for a pivot that is not a number.
            if (!(largest > 0 && largest <= double.MaxValue)) return false;
            int end = Math.Min(size, k + width - lower);
            Span<T> source = band.AsSpan(At(k, k), end - k);
            if (pivot != k)
            {
                Span<T> other = band.AsSpan(At(pivot, k), end - k);
                for (int j = 0; j < source.Length; j++) (source[j], other[j]) = (other[j], source[j]);
            }

            T reciprocal = reciprocals[k] = source[0].Reciprocal();
            for (int i = k + 1; i <= last; i++)
            {
                Span<T> row = band.AsSpan(At(i, k), end - k);
                T factor = multipliers[k * lower + i - k - 1] = row[0] * reciprocal;
                for (int j = 1; j < row.Length; j++) row[j] = row[j].Minus(factor, source[j]);
            }
        }

        return true;
    }

    /// <summary>Solves with the factors, in place.</summary>
    public void Solve(Span<T> x)
    {
        for (int k = 0; k < size; k++)
        {
            int pivot = pivotRows[k];
            if (pivot != k) (x[k], x[pivot]) = (x[pivot], x[k]);
            int count = Math.Min(lower, size - 1 - k);
            for (int i = 0; i < count; i++) x[k + 1 + i] = x[k + 1 + i].Minus(multipliers[k * lower + i], x[k]);
        }

        for (int k = size - 1; k >= 0; k--)
        {
            ReadOnlySpan<T> row = band.AsSpan(At(k, k), Math.Min(size, k + width - lower) - k);
            T sum = x[k];
            for (int j = 1; j < row.Length; j++) sum = sum.Minus(row[j], x[k + j]);
            x[k] = sum * reciprocals[k];
        }
    }

    private int At(int row, int column) => row * width + column - row + lower;

    private void Load(ReadOnlySpan<double> jacobian, T shift)
    {
        ReadOnlySpan<int> starts = pattern.RowStarts.AsSpan(), columns = pattern.Columns.AsSpan();
        Array.Clear(band);
        for (int i = 0; i < size; i++)
        {
            band[At(i, i)] = shift;
            for (int entry = starts[i]; entry < starts[i + 1]; entry++) band[At(i, columns[entry])] += -jacobian[entry];
        }
    }
}
