using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.LinearAlgebra.Factorization;

namespace OdeDsl.Equilibria;

/// <summary>
/// Solves square linear systems whose matrix may be singular: rows are equilibrated, columns scaled by the unknowns' sizes, and the
/// solution has the smallest scaled length. Regular matrices take the fast path (elimination with partial pivoting); nearly singular ones
/// the singular value decomposition with small values cut (G. H. Golub and C. F. Van Loan, "Matrix Computations", section 5.5).
/// </summary>
internal sealed class MinimumNormSolver
{
    /// <summary>The rank cut for matrices known to rounding.</summary>
    private const double RoundingCut = 1e-12;

    /// <summary>A smallest pivot below this many rank cuts, relative to the largest, calls for the singular value decomposition.</summary>
    private const double PivotMargin = 100;

    private readonly int n;
    private readonly double rankCut;
    private readonly double[] columnScale;
    private readonly double[] rowScale;
    private readonly double[] scaled;
    private readonly double[] factors;
    private readonly int[] pivots;
    private readonly double[] work;
    private Svd<double>? decomposition;

    /// <summary>Makes a solver.</summary>
    /// <param name="columnScale">The sizes of the unknowns.</param>
    /// <param name="rankCut">Singular values up to this part of the largest count as zero when solving: the accuracy of the
    /// matrices.</param>
    public MinimumNormSolver(ReadOnlySpan<double> columnScale, double rankCut = RoundingCut)
    {
        this.rankCut = rankCut;
        n = columnScale.Length;
        this.columnScale = columnScale.ToArray();
        (rowScale, work) = (new double[n], new double[n]);
        (scaled, factors) = (new double[n * n], new double[n * n]);
        pivots = new int[n];
    }

    /// <summary>Whether the last factored matrix was so close to singular that its singular values were needed.</summary>
    public bool NearlySingular => decomposition is not null;

    /// <summary>Factors a matrix given by rows.</summary>
    /// <param name="matrix">The matrix.</param>
    /// <param name="rowSizes">The size of each row in scaled unknowns; empty: the largest entry of each row.</param>
    /// <returns><see langword="false"/> if an entry is not finite.</returns>
    public bool Factor(ReadOnlySpan<double> matrix, ReadOnlySpan<double> rowSizes = default)
    {
        for (int i = 0; i < n; i++)
        {
            double largest = 0;
            for (int j = 0; j < n; j++)
            {
                double value = matrix[(i * n) + j] * columnScale[j];
                if (!double.IsFinite(value)) return false;
                scaled[(i * n) + j] = value;
                largest = Math.Max(largest, Math.Abs(value));
            }

            if (!rowSizes.IsEmpty) largest = rowSizes[i];
            rowScale[i] = largest > 0 ? 1 / largest : 1;
            for (int j = 0; j < n; j++) scaled[(i * n) + j] *= rowScale[i];
        }

        decomposition = Eliminate() ? null : Matrix<double>.Build.DenseOfRowMajor(n, n, scaled).Svd();
        return true;
    }

    /// <summary>Solves for a right-hand side; the two may be the same span.</summary>
    public void Solve(ReadOnlySpan<double> right, Span<double> solution)
    {
        for (int i = 0; i < n; i++) work[i] = right[i] * rowScale[i];
        if (decomposition is null) Substitute(solution);
        else SolveBySingularValues(decomposition, solution);
        for (int j = 0; j < n; j++) solution[j] *= columnScale[j];
    }

    /// <summary>
    /// The directions the last factored matrix maps to (nearly) zero: right singular vectors, in scaled unknowns, of singular values up to
    /// <paramref name="ratio"/> times the largest.
    /// </summary>
    public double[][] NullVectors(double ratio)
    {
        Svd<double> svd = decomposition ?? Matrix<double>.Build.DenseOfRowMajor(n, n, scaled).Svd();
        double largest = svd.S[0];
        var vectors = new List<double[]>();
        for (int k = 0; k < n; k++)
        {
            if (svd.S[k] <= ratio * largest) vectors.Add(svd.VT.Row(k).ToArray());
        }

        return [.. vectors];
    }

    /// <summary>The smallest singular value of the scaled matrix over the largest; 0 for a zero matrix.</summary>
    public double SmallestSingularRatio()
    {
        Svd<double> svd = decomposition ?? Matrix<double>.Build.DenseOfRowMajor(n, n, scaled).Svd(computeVectors: false);
        return svd.S[0] > 0 ? svd.S[n - 1] / svd.S[0] : 0;
    }

    /// <summary>The sign of the last factored matrix's determinant: 1, -1, or 0 if elimination met a zero pivot.</summary>
    public int DeterminantSign { get; private set; }

    private bool Eliminate()
    {
        scaled.CopyTo(factors, 0);
        double largest = 0, smallest = double.PositiveInfinity;
        int sign = 1;
        for (int k = 0; k < n; k++)
        {
            int pivot = k;
            for (int i = k + 1; i < n; i++)
            {
                if (Math.Abs(factors[(i * n) + k]) > Math.Abs(factors[(pivot * n) + k])) pivot = i;
            }

            pivots[k] = pivot;
            if (pivot != k) sign = -sign;
            SwapRows(k, pivot);
            double value = factors[(k * n) + k];
            if (value < 0) sign = -sign;
            largest = Math.Max(largest, Math.Abs(value));
            smallest = Math.Min(smallest, Math.Abs(value));
            if (value == 0)
            {
                DeterminantSign = 0;
                return false;
            }

            for (int i = k + 1; i < n; i++)
            {
                double factor = factors[(i * n) + k] /= value;
                if (factor == 0) continue;
                for (int j = k + 1; j < n; j++) factors[(i * n) + j] -= factor * factors[(k * n) + j];
            }
        }

        DeterminantSign = sign;
        return smallest > PivotMargin * rankCut * largest;
    }

    private void SwapRows(int a, int b)
    {
        if (a == b) return;
        for (int j = 0; j < n; j++) (factors[(a * n) + j], factors[(b * n) + j]) = (factors[(b * n) + j], factors[(a * n) + j]);
    }

    private void Substitute(Span<double> solution)
    {
        for (int k = 0; k < n; k++) (work[k], work[pivots[k]]) = (work[pivots[k]], work[k]);
        for (int k = 0; k < n; k++)
        {
            for (int i = k + 1; i < n; i++) work[i] -= factors[(i * n) + k] * work[k];
        }

        for (int i = n - 1; i >= 0; i--)
        {
            double sum = work[i];
            for (int j = i + 1; j < n; j++) sum -= factors[(i * n) + j] * solution[j];
            solution[i] = sum / factors[(i * n) + i];
        }
    }

    private void SolveBySingularValues(Svd<double> svd, Span<double> solution)
    {
        solution[..n].Clear();
        Vector<double> values = svd.S;
        for (int k = 0; k < n; k++)
        {
            if (values[k] <= rankCut * values[0] || values[k] == 0) continue;
            double projection = 0;
            for (int i = 0; i < n; i++) projection += svd.U[i, k] * work[i];
            projection /= values[k];
            for (int j = 0; j < n; j++) solution[j] += projection * svd.VT[k, j];
        }
    }
}
