namespace OdeDsl.Integration;

/// <summary>
/// The coefficients of the backward differentiation formulas of orders 1 to 5 in terms of backward differences, with the corrections κ that make
/// them numerical differentiation formulas (R. W. Klopfenstein; L. F. Shampine, M. W. Reichelt, The MATLAB ODE suite, SIAM Journal on
/// Scientific Computing 18, 1997, table 1): Σₖ ∇ᵏy / k − κ γ (y − predicted) = h f, γₖ = 1 + 1/2 + ... + 1/k.
/// </summary>
internal static class DifferenceFormulas
{
    public const int LargestOrder = 5;

    private static readonly double[] Kappa = [0, -0.1850, -1.0 / 9, -0.0823, -0.0415, 0];

    /// <summary>γₖ.</summary>
    public static readonly double[] Gamma = Sums();

    /// <summary>(1 − κ) γ: the factor on the correction.</summary>
    public static readonly double[] Alpha = [.. Gamma.Zip(Kappa, static (gamma, kappa) => (1 - kappa) * gamma)];

    /// <summary>The error of a step in parts of the correction.</summary>
    public static readonly double[] ErrorConstant = [.. Gamma.Select(static (gamma, k) => Kappa[k] * gamma + 1.0 / (k + 1))];

    /// <summary>
    /// For each order the weights that give the coefficients d₂, d₃, ... of <see cref="DenseStep"/> from the differences ∇¹, ∇², ... at the end.
    /// </summary>
    public static readonly double[][,] Nested = [.. Enumerable.Range(0, LargestOrder + 1).Select(NestedWeights)];

    /// <summary>
    /// The matrix that converts differences to another step size: new difference i is Σⱼ mᵢⱼ times difference j (the interpolating polynomial
    /// stays the same).
    /// </summary>
    /// <param name="order">The order.</param>
    /// <param name="ratio">The new size in parts of the old.</param>
    /// <param name="matrix">Receives (order + 1)² numbers by rows.</param>
    public static void Convert(int order, double ratio, Span<double> matrix)
    {
        int n = order + 1;
        Span<double> r = stackalloc double[(LargestOrder + 1) * (LargestOrder + 1)], u = stackalloc double[(LargestOrder + 1) * (LargestOrder + 1)];
        Products(n, ratio, r);
        Products(n, 1, u);
        // The transpose of R U.
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
            {
                double sum = 0;
                for (int k = 0; k < n; k++) sum += r[j * n + k] * u[k * n + i];
                matrix[i * n + j] = sum;
            }
        }
    }

    // Entry (i, j) is Π over m = 1, ..., i of (m − 1 − ratio j) / m.
    private static void Products(int n, double ratio, Span<double> matrix)
    {
        for (int j = 0; j < n; j++)
        {
            double product = 1;
            for (int i = 0; i < n; i++)
            {
                if (i > 0) product *= (i - 1 - ratio * j) / i;
                matrix[i * n + j] = product;
            }
        }
    }

    private static double[] Sums()
    {
        var sums = new double[LargestOrder + 1];
        for (int k = 1; k <= LargestOrder; k++) sums[k] = sums[k - 1] + 1.0 / k;
        return sums;
    }

    // y(θ) = y₁ + Σⱼ ∇ʲ s (s + 1) ... (s + j − 1) / j! with s = θ − 1. Written as y₀ + θ (y₁ − y₀ + (1 − θ) q(θ)), the term of ∇ʲ gives
    // q = −(s + 2) ... (s + j − 1) / j! for j ≥ 2; its nested coefficients follow from its values at 0 and 1, again and again.
    private static double[,] NestedWeights(int order)
    {
        var rows = new double[Math.Max(order - 1, 0), Math.Max(order, 0)];
        for (int j = 2; j <= order; j++)
        {
            // Coefficients of q by powers of θ.
            var q = new double[order];
            q[0] = -1;
            double factorial = 2;
            for (int m = 2; m < j; m++)
            {
                factorial *= m + 1;
                for (int power = order - 1; power >= 0; power--) q[power] = (m - 1) * q[power] + (power > 0 ? q[power - 1] : 0);
            }

            for (int power = 0; power < order; power++) q[power] /= factorial;
            for (int k = 0; k + 1 < order; k++) rows[k, j - 1] = k % 2 == 0 ? SplitTheta(q) : SplitRest(q);
        }

        return rows;
    }

    // q = c + θ p: returns c, leaves p.
    private static double SplitTheta(double[] q)
    {
        double constant = q[0];
        for (int power = 0; power + 1 < q.Length; power++) q[power] = q[power + 1];
        q[^1] = 0;
        return constant;
    }

    // q = c + (1 − θ) p: returns c = q(1), leaves p.
    private static double SplitRest(double[] q)
    {
        double atOne = q.Sum();
        // (q − q(1)) / (1 − θ) by synthetic division: p's coefficients are minus the partial sums from above.
        double carry = 0;
        for (int power = q.Length - 1; power >= 1; power--)
        {
            double coefficient = q[power];
            q[power] = -carry;
            carry += coefficient;
        }

        q[0] = -carry;
        return atOne;
    }
}
