namespace OdeDsl.Equilibria;

/// <summary>
/// Points that fill the unit cube evenly: the Kronecker sequence x_k = frac(shift + k α) with α_j = φ^(-j), where φ is the positive
/// root of φ^(d+1) = φ + 1 (H. Weyl, Math. Ann. 77, 1916, for equidistribution; M. Roberts, "The unreasonable effectiveness of
/// quasirandom sequences", 2018, for this α).
/// </summary>
internal sealed class LowDiscrepancySequence
{
    /// <summary>More than enough fixed-point iterations: each shrinks the error of φ by at least two.</summary>
    private const int RootIterations = 64;

    private readonly double[] step;
    private readonly double[] shift;

    public LowDiscrepancySequence(int dimension, int seed)
    {
        double phi = 2;
        for (int i = 0; i < RootIterations; i++) phi = Math.Pow(1 + phi, 1.0 / (dimension + 1));
        step = new double[dimension];
        shift = new double[dimension];
        // The seed walks the shift along a golden-ratio rotation, different for each coordinate.
        double golden = (Math.Sqrt(5) - 1) / 2;
        for (int j = 0; j < dimension; j++)
        {
            step[j] = Math.Pow(phi, -(j + 1));
            shift[j] = Fraction(0.5 + ((seed - 1.0) * golden * (j + 1)));
        }
    }

    /// <summary>Writes point k, counted from 1.</summary>
    public void Point(int k, Span<double> point)
    {
        for (int j = 0; j < step.Length; j++) point[j] = Fraction(shift[j] + (k * step[j]));
    }

    private static double Fraction(double value) => value - Math.Floor(value);
}
