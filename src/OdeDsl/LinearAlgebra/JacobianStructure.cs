using OdeDsl.Modeling;

namespace OdeDsl.LinearAlgebra;

/// <summary>
/// How the state Jacobian of a system is held and its implicit equations are solved: whole, near the diagonal, or by its entries alone.
/// Chosen once from the pattern. Safe to use from several threads at once.
/// </summary>
internal sealed class JacobianStructure
{
    /// <summary>Below this size whole matrices are fastest, whatever their pattern.</summary>
    private const int SmallestSparse = 6;

    /// <summary>Matrices filled to more than this part are handled whole.</summary>
    private const double LargestDensity = 0.45;

    /// <summary>A band is used if it has at most this many places for each entry of the pattern.</summary>
    private const double LargestBandExcess = 2.5;

    private readonly int lower, upper;
    private readonly SparseElimination? plan;

    private JacobianStructure(int size, SparsityPattern? pattern, int lower, int upper, SparseElimination? plan)
    {
        Size = size;
        Pattern = pattern;
        (this.lower, this.upper) = (lower, upper);
        this.plan = plan;
    }

    /// <summary>The number of rows and columns.</summary>
    public int Size { get; }

    /// <summary>The entries held; <see langword="null"/>: all, by rows.</summary>
    public SparsityPattern? Pattern { get; }

    /// <summary>The number of entries held.</summary>
    public int EntryCount => Pattern?.EntryCount ?? checked(Size * Size);

    /// <summary>Whether the equations are solved within a band.</summary>
    public bool IsBanded => Pattern is not null && plan is null;

    /// <summary>A structure that holds every entry.</summary>
    public static JacobianStructure Dense(int size) => new(size, null, 0, 0, null);

    /// <summary>Chooses the structure for a pattern.</summary>
    public static JacobianStructure Of(SparsityPattern pattern)
    {
        int n = pattern.RowCount;
        if (n < SmallestSparse || pattern.EntryCount > LargestDensity * n * n) return Dense(n);
        int below = 0, above = 0;
        for (int i = 0; i < n; i++)
        {
            if (pattern.RowStarts[i] == pattern.RowStarts[i + 1]) continue;
            below = Math.Max(below, i - pattern.Columns[pattern.RowStarts[i]]);
            above = Math.Max(above, pattern.Columns[pattern.RowStarts[i + 1] - 1] - i);
        }

        double places = (2.0 * below + above + 1) * n;
        return places <= LargestBandExcess * (pattern.EntryCount + n)
            ? new JacobianStructure(n, pattern, below, above, null)
            : new JacobianStructure(n, pattern, 0, 0, new SparseElimination(pattern));
    }

    /// <summary>Makes a solver for real shifts.</summary>
    public ShiftedSolver MakeReal() =>
        Pattern is null ? new DenseShiftedSolver(Size)
        : plan is null ? new BandedShiftedSolver(Pattern, lower, upper)
        : new SparseShiftedSolver(plan);

    /// <summary>Makes a solver for complex shifts.</summary>
    public ComplexShiftedSolver MakeComplex() =>
        Pattern is null ? new DenseComplexShiftedSolver(Size)
        : plan is null ? new BandedComplexShiftedSolver(Pattern, lower, upper)
        : new SparseComplexShiftedSolver(plan);

    /// <summary>The product of a Jacobian with a vector.</summary>
    /// <param name="jacobian">The entries held.</param>
    /// <param name="vector">n values.</param>
    /// <param name="product">Receives n values.</param>
    public void Multiply(ReadOnlySpan<double> jacobian, ReadOnlySpan<double> vector, Span<double> product)
    {
        if (Pattern is null)
        {
            for (int i = 0; i < Size; i++)
            {
                ReadOnlySpan<double> row = jacobian.Slice(i * Size, Size);
                double sum = 0;
                for (int j = 0; j < row.Length; j++) sum += row[j] * vector[j];
                product[i] = sum;
            }

            return;
        }

        ReadOnlySpan<int> starts = Pattern.RowStarts.AsSpan(), columns = Pattern.Columns.AsSpan();
        for (int i = 0; i < Size; i++)
        {
            double sum = 0;
            for (int entry = starts[i]; entry < starts[i + 1]; entry++) sum += jacobian[entry] * vector[columns[entry]];
            product[i] = sum;
        }
    }

    /// <summary>An upper bound of the size of a Jacobian's eigenvalues: the smaller of its row-sum norm and its Frobenius norm, in the units of scales.</summary>
    /// <param name="jacobian">The entries held.</param>
    /// <param name="scales">n sizes above zero that make the states comparable.</param>
    public double Norm(ReadOnlySpan<double> jacobian, ReadOnlySpan<double> scales)
    {
        double rows = 0, squares = 0;
        int at = 0;
        for (int i = 0; i < Size; i++)
        {
            int end = Pattern is null ? at + Size : Pattern.RowStarts[i + 1], first = at;
            double row = 0;
            for (; at < end; at++)
            {
                int j = Pattern is null ? at - first : Pattern.Columns[at];
                double entry = Math.Abs(jacobian[at]) * scales[j] / scales[i];
                row += entry;
                squares += entry * entry;
            }

            rows = Math.Max(rows, row);
        }

        return Math.Min(rows, Math.Sqrt(squares));
    }
}
