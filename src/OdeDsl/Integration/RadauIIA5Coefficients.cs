using System.Numerics;

namespace OdeDsl.Integration;

/// <summary>
/// The Radau IIA method with three stages, order 5 (E. Hairer, G. Wanner, Solving ODEs II, section IV.5, table 5.6), and the transformation
/// that splits its implicit equations into a real and a complex system (section IV.8). Everything is computed from the
/// exact formulas.
/// </summary>
internal static class RadauIIA5Coefficients
{
    private static readonly double Root6 = Math.Sqrt(6);
    private static readonly double CubeRoot3 = Math.Cbrt(3);

    /// <summary>The places of the stages within a step.</summary>
    public static readonly double C1 = (4 - Root6) / 10;

    /// <inheritdoc cref="C1"/>
    public static readonly double C2 = (4 + Root6) / 10;

    /// <summary>The matrix A of the method; its last row holds the weights.</summary>
    public static readonly double[,] A =
    {
        { (88 - 7 * Root6) / 360, (296 - 169 * Root6) / 1800, (-2 + 3 * Root6) / 225 },
        { (296 + 169 * Root6) / 1800, (88 + 7 * Root6) / 360, (-2 - 3 * Root6) / 225 },
        { (16 - Root6) / 36, (16 + Root6) / 36, 1.0 / 9 },
    };

    /// <summary>The real eigenvalue of A⁻¹: the real root of λ³ − 9λ² + 36λ − 60.</summary>
    public static readonly double Gamma = 3 + CubeRoot3 * CubeRoot3 - CubeRoot3;

    /// <summary>The real part of the pair of complex eigenvalues of A⁻¹.</summary>
    public static readonly double Alpha = (9 - Gamma) / 2;

    /// <summary>The imaginary part of the pair of complex eigenvalues of A⁻¹.</summary>
    public static readonly double Beta = Math.Sqrt(60 / Gamma - Alpha * Alpha);

    /// <summary>Columns: eigenvector for γ, real and imaginary part of the eigenvector for α − iβ. Then T⁻¹A⁻¹T = diag(γ, [α −β; β α]).</summary>
    public static readonly double[,] T = Transformation();

    /// <summary>The inverse of <see cref="T"/>.</summary>
    public static readonly double[,] InverseT = Invert(T);

    /// <summary>
    /// The weights of the error estimate (equation IV.8.19): γ₀ times these is the combination of the stages that, with the rates at the start,
    /// agrees with the solution to order 3.
    /// </summary>
    public static readonly double E1 = -(13 + 7 * Root6) / 3, E2 = (-13 + 7 * Root6) / 3, E3 = -1.0 / 3;

    private static double[,] Transformation()
    {
        double[,] inverse = Invert(A);
        var t = new double[3, 3];
        Complex[] real = Eigenvector(inverse, Gamma), pair = Eigenvector(inverse, new Complex(Alpha, -Beta));
        for (int i = 0; i < 3; i++) (t[i, 0], t[i, 1], t[i, 2]) = (real[i].Real, pair[i].Real, pair[i].Imaginary);
        return t;
    }

    // Orthogonal to two rows of M − λ, scaled so that the last component is 1.
    private static Complex[] Eigenvector(double[,] m, Complex eigenvalue)
    {
        Complex a0 = m[0, 0] - eigenvalue, a1 = m[0, 1], a2 = m[0, 2], b0 = m[1, 0], b1 = m[1, 1] - eigenvalue, b2 = m[1, 2];
        Complex last = a0 * b1 - a1 * b0;
        return [(a1 * b2 - a2 * b1) / last, (a2 * b0 - a0 * b2) / last, 1];
    }

    private static double[,] Invert(double[,] m)
    {
        var inverse = new double[3, 3];
        double determinant = 0;
        for (int i = 0; i < 3; i++)
        {
            for (int j = 0; j < 3; j++)
            {
                int r = (j + 1) % 3, s = (j + 2) % 3, c = (i + 1) % 3, d = (i + 2) % 3;
                inverse[i, j] = m[r, c] * m[s, d] - m[r, d] * m[s, c];
            }

            determinant += m[0, i] * inverse[i, 0];
        }

        for (int i = 0; i < 3; i++)
        {
            // The whole first column is complete only after the loop above.
            for (int j = 0; j < 3; j++) inverse[i, j] /= determinant;
        }

        return inverse;
    }
}
