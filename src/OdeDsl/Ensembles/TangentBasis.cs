namespace OdeDsl.Ensembles;

/// <summary>
/// Tangents of a motion, kept apart by orthonormalisation in scaled states: k columns of an n × k matrix by rows, in the model's units.
/// </summary>
internal sealed class TangentBasis
{
    private readonly int n;
    private readonly double[] scale;

    public TangentBasis(ReadOnlySpan<double> scale, int count)
    {
        n = scale.Length;
        this.scale = scale.ToArray();
        Count = count;
        Columns = new double[n * count];
        for (int j = 0; j < count; j++) Columns[j * count + j] = scale[j];
        // A start that is no axis: an axis may lie in an invariant plane and never leave it. Any generic directions do.
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < count; j++) Columns[i * count + j] += scale[i] * 0.5 * Math.Sin(1 + i * 1.7 + j * 2.9);
        }

        Orthonormalise(stackalloc double[count]);
    }

    /// <summary>The number of tangents.</summary>
    public int Count { get; }

    /// <summary>The tangents: entry (i, j) at i k + j.</summary>
    public double[] Columns { get; }

    /// <summary>
    /// Makes the tangents orthonormal in scaled states (modified Gram-Schmidt, twice for orthogonality to rounding: B. N. Parlett, The
    /// Symmetric Eigenvalue Problem, 1980, section 6.9).
    /// </summary>
    /// <param name="stretches">Receives for each tangent the length it had left after the earlier ones were taken out of it.</param>
    public void Orthonormalise(Span<double> stretches)
    {
        int k = Count;
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < k; j++) Columns[i * k + j] /= scale[i];
        }

        for (int j = 0; j < k; j++)
        {
            double length = Length(j);
            for (int pass = 0; pass < 2; pass++)
            {
                for (int earlier = 0; earlier < j; earlier++) Subtract(j, earlier);
            }

            double left = Length(j);
            stretches[j] = left;
            // A tangent lost to rounding has shrunk by more than doubles can tell: its length is unknown, not zero.
            double factor = left > 1e-15 * length ? 1 / left : double.NaN;
            for (int i = 0; i < n; i++) Columns[i * k + j] *= factor;
        }

        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < k; j++) Columns[i * k + j] *= scale[i];
        }
    }

    private void Subtract(int column, int unit)
    {
        double product = 0;
        for (int i = 0; i < n; i++) product += Columns[i * Count + column] * Columns[i * Count + unit];
        for (int i = 0; i < n; i++) Columns[i * Count + column] -= product * Columns[i * Count + unit];
    }

    private double Length(int column)
    {
        double sum = 0;
        for (int i = 0; i < n; i++) sum += Columns[i * Count + column] * Columns[i * Count + column];
        return Math.Sqrt(sum);
    }
}
