namespace OdeDsl.Equilibria;

/// <summary>
/// Scales a matrix by a diagonal similarity of powers of two until rows and columns have about equal norms, which leaves the
/// eigenvalues unchanged and their rounding errors small (B. N. Parlett and C. Reinsch, Numer. Math. 13, 1969).
/// </summary>
internal static class Balancing
{
    /// <summary>A scaling is worth applying if it shrinks the norms' sum at least to this part. From the paper.</summary>
    private const double WorthWhile = 0.95;

    /// <summary>The paper's iteration converges in a few sweeps; this only guards against overflowing input.</summary>
    private const int MaximumSweeps = 100;

    public static void Apply(Span<double> matrix, int n)
    {
        bool changed = true;
        for (int sweep = 0; changed && sweep < MaximumSweeps; sweep++)
        {
            changed = false;
            for (int i = 0; i < n; i++)
            {
                double row = 0, column = 0;
                for (int j = 0; j < n; j++)
                {
                    if (j == i) continue;
                    row += Math.Abs(matrix[(i * n) + j]);
                    column += Math.Abs(matrix[(j * n) + i]);
                }

                if (!(row > 0 && column > 0) || !double.IsFinite(row + column)) continue;
                double factor = Math.ScaleB(1, (int)Math.Round(Math.Log2(row / column) / 2));
                if (factor == 1 || (column * factor) + (row / factor) >= WorthWhile * (column + row)) continue;
                changed = true;
                for (int j = 0; j < n; j++)
                {
                    matrix[(i * n) + j] /= factor;
                    matrix[(j * n) + i] *= factor;
                }
            }
        }
    }
}
