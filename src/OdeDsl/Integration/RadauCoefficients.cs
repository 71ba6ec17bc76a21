using System.Numerics;

namespace OdeDsl.Integration;

/// <summary>
/// A Radau IIA method with s stages (odd), order 2s − 1 (E. Hairer, G. Wanner, Solving ODEs II, section IV.5), and the transformation that splits
/// its implicit equations into one real and (s − 1) / 2 complex systems (section IV.8). Nothing is typed in: everything is computed from the
/// definitions, the matrix in 28 decimal digits.
/// </summary>
internal sealed class RadauCoefficients
{
    private readonly double[] lagrange; // 1 / (cⱼ Π (cⱼ − cₖ))

    private RadauCoefficients(int stages)
    {
        Stages = stages;
        decimal[] c = Nodes(stages);
        decimal[,] a = Collocation(c);
        decimal[] estimate = ErrorEstimate(c);
        C = Array.ConvertAll(c, static value => (double)value);
        A = ToDouble(a);
        decimal[,] inverse = Invert(a);
        Complex[] eigenvalues = Eigenvalues(stages);
        Gamma = eigenvalues[0].Real;
        int pairs = (stages - 1) / 2;
        (Alpha, Beta) = (new double[pairs], new double[pairs]);
        for (int k = 0; k < pairs; k++) (Alpha[k], Beta[k]) = (eigenvalues[1 + k].Real, eigenvalues[1 + k].Imaginary);
        T = Transformation(ToDouble(inverse), Gamma, Alpha, Beta);
        InverseT = ToDouble(Invert(ToDecimal(T)));
        ErrorWeights = Array.ConvertAll(estimate, static value => (double)value);
        Dense = ToDouble(Nested(c));
        lagrange = new double[stages];
        for (int j = 0; j < stages; j++)
        {
            double product = C[j];
            for (int k = 0; k < stages; k++)
            {
                if (k != j) product *= C[j] - C[k];
            }

            lagrange[j] = 1 / product;
        }
    }

    /// <summary>Three stages, order 5.</summary>
    public static RadauCoefficients Three { get; } = new(3);

    /// <summary>Five stages, order 9.</summary>
    public static RadauCoefficients Five { get; } = new(5);

    /// <summary>Seven stages, order 13.</summary>
    public static RadauCoefficients Seven { get; } = new(7);

    /// <summary>The number of stages, s.</summary>
    public int Stages { get; }

    /// <summary>The places of the stages within a step.</summary>
    public double[] C { get; }

    /// <summary>The matrix of the method; its last row holds the weights.</summary>
    public double[,] A { get; }

    /// <summary>The real eigenvalue of A⁻¹.</summary>
    public double Gamma { get; }

    /// <summary>The real parts of the pairs of complex eigenvalues of A⁻¹.</summary>
    public double[] Alpha { get; }

    /// <summary>Their imaginary parts, above zero.</summary>
    public double[] Beta { get; }

    /// <summary>Columns: eigenvector for γ; real and imaginary part of that for each α − iβ. T⁻¹A⁻¹T = diag(γ, [α −β; β α], ...).</summary>
    public double[,] T { get; }

    /// <summary>The inverse of <see cref="T"/>.</summary>
    public double[,] InverseT { get; }

    /// <summary>
    /// The weights e of the error estimate (γ/h − J)⁻¹ (f₀ + Σ eᵢ zᵢ / h), zᵢ the stages less the start: it vanishes for solutions of degree s
    /// or less (equation IV.8.19 for s = 3).
    /// </summary>
    public double[] ErrorWeights { get; }

    /// <summary>The rows give the coefficients d₂, d₃, ... of the collocation polynomial (<see cref="DenseStep"/>) from the stages less the start.</summary>
    public double[,] Dense { get; }

    /// <summary>
    /// The weights that continue this method's polynomial into the stages of the next step: stage i less its start is Σⱼ wᵢⱼ zⱼ.
    /// </summary>
    /// <param name="next">The method of the next step.</param>
    /// <param name="ratio">The size of the next step in parts of the last.</param>
    /// <param name="weights">Receives stages of the next × stages of this one weights by rows.</param>
    public void Extrapolate(RadauCoefficients next, double ratio, Span<double> weights)
    {
        for (int i = 0; i < next.Stages; i++)
        {
            double theta = 1 + next.C[i] * ratio;
            Span<double> row = weights.Slice(i * Stages, Stages);
            for (int j = 0; j < row.Length; j++)
            {
                double product = theta * lagrange[j];
                for (int k = 0; k < row.Length; k++)
                {
                    if (k != j) product *= theta - C[k];
                }

                row[j] = product;
            }

            row[^1] -= 1;
        }
    }

    // The roots of P_s(2x − 1) − P_{s−1}(2x − 1) (Legendre polynomials): found apart by signs, then by Newton's method.
    private static decimal[] Nodes(int s)
    {
        const int Scan = 2000;
        var nodes = new List<decimal>();
        for (int i = 0; i < Scan; i++)
        {
            decimal left = (i + 0.3m) / Scan, right = (i + 1.3m) / Scan;
            if (right > 1 || Math.Sign(Legendre(s, left).Value) == Math.Sign(Legendre(s, right).Value)) continue;
            decimal x = (left + right) / 2;
            for (int iteration = 0; iteration < 12; iteration++)
            {
                (decimal value, decimal slope) = Legendre(s, x);
                x -= value / slope;
            }

            nodes.Add(x);
        }

        nodes.Add(1);
        return [.. nodes];
    }

    private static (decimal Value, decimal Slope) Legendre(int s, decimal x)
    {
        decimal u = 2 * x - 1, p0 = 1, p1 = u, d0 = 0, d1 = 1;
        for (int k = 1; k < s; k++)
        {
            (p0, p1, d0, d1) = (p1, ((2 * k + 1) * u * p1 - k * p0) / (k + 1), d1, ((2 * k + 1) * (p1 + u * d1) - k * d0) / (k + 1));
        }

        return (p1 - p0, 2 * (d1 - d0));
    }

    // Σⱼ aᵢⱼ cⱼ^(q−1) = cᵢ^q / q for q = 1, ..., s.
    private static decimal[,] Collocation(decimal[] c)
    {
        int s = c.Length;
        decimal[,] inverse = Invert(Powers(c, 0)), right = Powers(c, 1);
        var a = new decimal[s, s];
        for (int i = 0; i < s; i++)
        {
            for (int j = 0; j < s; j++)
            {
                for (int q = 0; q < s; q++) a[i, j] += right[i, q] / (q + 1) * inverse[q, j];
            }
        }

        return a;
    }

    // Σᵢ eᵢ cᵢ^q = −1 for q = 1, 0 for q = 2, ..., s.
    private static decimal[] ErrorEstimate(decimal[] c)
    {
        int s = c.Length;
        decimal[,] inverse = Invert(Powers(c, 1));
        var e = new decimal[s];
        for (int i = 0; i < s; i++) e[i] = -inverse[0, i];
        return e;
    }

    // The polynomial through (0, 0) and the stages as d₁ θ + d₂ θ (1 − θ) + d₃ θ² (1 − θ) + ...: the basis functions' values at the nodes, inverted.
    private static decimal[,] Nested(decimal[] c)
    {
        int s = c.Length;
        var values = new decimal[s, s];
        for (int i = 0; i < s; i++)
        {
            decimal product = c[i];
            for (int k = 0; k < s; k++)
            {
                values[i, k] = product;
                product *= k % 2 == 0 ? 1 - c[i] : c[i];
            }
        }

        decimal[,] inverse = Invert(values);
        var rows = new decimal[s - 1, s];
        for (int k = 1; k < s; k++)
        {
            for (int i = 0; i < s; i++) rows[k - 1, i] = inverse[k, i];
        }

        return rows;
    }

    // The roots of the denominator of the stability function, the Padé approximation of exp(z) with degrees s − 1 and s (section IV.3, equation
    // 3.29), by Durand and Kerner's iteration; the real one first.
    private static Complex[] Eigenvalues(int s)
    {
        var coefficients = new double[s + 1];
        coefficients[0] = 1;
        for (int i = 1; i <= s; i++) coefficients[i] = -coefficients[i - 1] * (s - i + 1) / ((2.0 * s - i) * i);
        var roots = new Complex[s];
        double radius = Math.Pow(Math.Abs(1 / coefficients[s]), 1.0 / s);
        for (int i = 0; i < s; i++) roots[i] = Complex.FromPolarCoordinates(radius, 2 * Math.PI * (i + 0.25) / s);
        for (int iteration = 0; iteration < 200; iteration++)
        {
            for (int i = 0; i < s; i++)
            {
                Complex value = coefficients[s], others = coefficients[s];
                for (int k = s - 1; k >= 0; k--) value = value * roots[i] + coefficients[k];
                for (int j = 0; j < s; j++)
                {
                    if (j != i) others *= roots[i] - roots[j];
                }

                roots[i] -= value / others;
            }
        }

        Complex real = roots.MinBy(static root => Math.Abs(root.Imaginary));
        return [new Complex(real.Real, 0), .. roots.Where(root => root != real && root.Imaginary > 0).OrderBy(static root => root.Imaginary)];
    }

    private static double[,] Transformation(double[,] inverse, double gamma, double[] alpha, double[] beta)
    {
        int s = inverse.GetLength(0);
        var t = new double[s, s];
        for (int k = 0; k <= alpha.Length; k++)
        {
            Complex[] vector = Eigenvector(inverse, k == 0 ? gamma : new Complex(alpha[k - 1], -beta[k - 1]));
            for (int i = 0; i < s; i++)
            {
                if (k == 0) t[i, 0] = vector[i].Real;
                else (t[i, 2 * k - 1], t[i, 2 * k]) = (vector[i].Real, vector[i].Imaginary);
            }
        }

        return t;
    }

    // The first s − 1 equations of (M − λ) v = 0 with v_s = 1, by elimination with exchanges.
    private static Complex[] Eigenvector(double[,] m, Complex eigenvalue)
    {
        int n = m.GetLength(0) - 1;
        var rows = new Complex[n][];
        for (int i = 0; i < n; i++)
        {
            rows[i] = new Complex[n + 1];
            for (int j = 0; j < n; j++) rows[i][j] = m[i, j] - (i == j ? eigenvalue : 0);
            rows[i][n] = -m[i, n];
        }

        for (int k = 0; k < n; k++)
        {
            int pivot = Enumerable.Range(k, n - k).MaxBy(i => rows[i][k].Magnitude);
            (rows[k], rows[pivot]) = (rows[pivot], rows[k]);
            for (int i = 0; i < n; i++)
            {
                if (i == k) continue;
                Complex factor = rows[i][k] / rows[k][k];
                for (int j = k; j <= n; j++) rows[i][j] -= factor * rows[k][j];
            }
        }

        return [.. Enumerable.Range(0, n).Select(i => rows[i][n] / rows[i][i]), 1];
    }

    private static decimal[,] Powers(decimal[] c, int first)
    {
        int s = c.Length;
        var powers = new decimal[s, s];
        for (int i = 0; i < s; i++)
        {
            decimal power = first == 0 ? 1 : c[i];
            for (int q = 0; q < s; q++, power *= c[i]) powers[i, q] = power;
        }

        return powers;
    }

    // Gauss-Jordan elimination with exchanges of rows.
    private static decimal[,] Invert(decimal[,] matrix)
    {
        int n = matrix.GetLength(0);
        var m = (decimal[,])matrix.Clone();
        var inverse = new decimal[n, n];
        for (int i = 0; i < n; i++) inverse[i, i] = 1;
        for (int k = 0; k < n; k++)
        {
            int pivot = Enumerable.Range(k, n - k).MaxBy(i => Math.Abs(m[i, k]));
            for (int j = 0; j < n; j++)
            {
                (m[k, j], m[pivot, j]) = (m[pivot, j], m[k, j]);
                (inverse[k, j], inverse[pivot, j]) = (inverse[pivot, j], inverse[k, j]);
            }

            decimal scale = m[k, k];
            for (int j = 0; j < n; j++)
            {
                m[k, j] /= scale;
                inverse[k, j] /= scale;
            }

            for (int i = 0; i < n; i++)
            {
                decimal factor = m[i, k];
                if (i == k || factor == 0) continue;
                for (int j = 0; j < n; j++)
                {
                    m[i, j] -= factor * m[k, j];
                    inverse[i, j] -= factor * inverse[k, j];
                }
            }
        }

        return inverse;
    }

    private static double[,] ToDouble(decimal[,] m)
    {
        var result = new double[m.GetLength(0), m.GetLength(1)];
        for (int i = 0; i < result.GetLength(0); i++)
        {
            for (int j = 0; j < result.GetLength(1); j++) result[i, j] = (double)m[i, j];
        }

        return result;
    }

    // A double's own conversion keeps 15 digits only: the rest is added.
    private static decimal[,] ToDecimal(double[,] m)
    {
        var result = new decimal[m.GetLength(0), m.GetLength(1)];
        for (int i = 0; i < result.GetLength(0); i++)
        {
            for (int j = 0; j < result.GetLength(1); j++)
            {
                decimal rough = (decimal)m[i, j];
                result[i, j] = rough + (decimal)(m[i, j] - (double)rough);
            }
        }

        return result;
    }
}
