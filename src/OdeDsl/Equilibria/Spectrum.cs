using System.Collections.Immutable;
using System.Numerics;
using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.LinearAlgebra.Double;
using MathNet.Numerics.LinearAlgebra.Factorization;

namespace OdeDsl.Equilibria;

/// <summary>The eigenvalues of a linearised motion and what they say.</summary>
internal sealed class Spectrum
{
    /// <summary>Rounding errors of eigenvalues, relative to the balanced matrix's norm, with a margin.</summary>
    private const double RoundingLevel = 1e-13;

    /// <summary>A real part this small beside its eigenvalue's modulus is negligible: a linear centre.</summary>
    private const double NeutralRatio = 1e-9;

    /// <summary>
    /// An imaginary part this small beside the modulus comes from a double real eigenvalue (√ of rounding) and is no oscillation.
    /// </summary>
    private const double OscillationRatio = 1e-7;

    private readonly double norm;

    private Spectrum(IEnumerable<Complex> eigenvalues, double norm)
    {
        Eigenvalues = [.. eigenvalues.OrderByDescending(static value => value.Real).ThenByDescending(static value => value.Imaginary)];
        this.norm = norm;
        Modes =
        [
            .. Eigenvalues.Where(static value => value.Imaginary >= 0)
                .OrderBy(static value => Math.Abs(value.Real)).ThenBy(static value => value.Imaginary)
                .Select(static value => new LinearMode(value)),
        ];
    }

    public ImmutableArray<Complex> Eigenvalues { get; }

    public ImmutableArray<LinearMode> Modes { get; }

    /// <summary>The eigenvalues of a matrix given by rows; scales are the sizes of the states.</summary>
    public static Spectrum Of(ReadOnlySpan<double> matrix, ReadOnlySpan<double> scale)
    {
        int n = scale.Length;
        var balanced = new double[n * n];
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++) balanced[(i * n) + j] = matrix[(i * n) + j] * scale[j] / scale[i];
        }

        return OfScaled(balanced, n);
    }

    /// <summary>The eigenvalues of a motion within the surface whose normal is the gradient: one fewer than states.</summary>
    public static Spectrum OnSurface(ReadOnlySpan<double> matrix, ReadOnlySpan<double> gradient, ReadOnlySpan<double> scale)
    {
        int n = scale.Length;
        var scaled = new DenseMatrix(n, n);
        var normal = new DenseVector(n);
        for (int i = 0; i < n; i++)
        {
            normal[i] = gradient[i] * scale[i];
            for (int j = 0; j < n; j++) scaled[i, j] = matrix[(i * n) + j] * scale[j] / scale[i];
        }

        if (n == 1) return new Spectrum([], 0);
        // The columns of Q after the first are an orthonormal basis of the tangent space.
        Matrix<double> basis = normal.ToColumnMatrix().QR(QRMethod.Full).Q.SubMatrix(0, n, 1, n - 1);
        return OfScaled(basis.TransposeThisAndMultiply(scaled * basis).ToRowMajorArray(), n - 1);
    }

    /// <summary>Draws the conclusions.</summary>
    /// <param name="nullity">The number of eigenvalues that are zero in exact arithmetic, as known from elsewhere.</param>
    /// <param name="set">The continuum of equilibria this one belongs to, if any.</param>
    public LinearVerdict Judge(int nullity, EquilibriumSet? set)
    {
        Complex[] bySize = [.. Eigenvalues.OrderBy(Complex.Abs)];
        int zeros = Math.Max(Math.Min(nullity, bySize.Length), bySize.Count(value => Complex.Abs(value) <= RoundingLevel * norm));
        Complex[] others = bySize[zeros..];
        int neutral = others.Count(IsNeutral);
        int unstable = others.Count(value => value.Real > 0 && !IsNeutral(value));
        if (zeros > 0)
        {
            bool decided = set is not null && zeros == set.Dimension && neutral == 0;
            Stability stability = unstable > 0 ? Stability.Unstable : decided ? Stability.Stable : Stability.Undecided;
            return new LinearVerdict(EquilibriumKind.Degenerate, stability, unstable);
        }

        Stability sign = unstable > 0 ? Stability.Unstable : neutral > 0 ? Stability.Undecided : Stability.Stable;
        if (neutral > 0) return new LinearVerdict(EquilibriumKind.Centre, sign, unstable);
        if (unstable > 0 && unstable < others.Length) return new LinearVerdict(EquilibriumKind.Saddle, sign, unstable);
        bool turns = others.Length > 0 && Oscillates(others.MinBy(static value => Math.Abs(value.Real)));
        return new LinearVerdict(turns ? EquilibriumKind.Focus : EquilibriumKind.Node, sign, unstable);
    }

    private static Spectrum OfScaled(double[] matrix, int n)
    {
        Balancing.Apply(matrix, n);
        double norm = Math.Sqrt(matrix.Sum(static entry => entry * entry));
        if (n == 1) return new Spectrum([matrix[0]], norm);
        return new Spectrum(Matrix<double>.Build.DenseOfRowMajor(n, n, matrix).Evd(Symmetricity.Asymmetric).EigenValues, norm);
    }

    private static bool Oscillates(Complex value) => Math.Abs(value.Imaginary) > OscillationRatio * Complex.Abs(value);

    private bool IsNeutral(Complex value) =>
        value.Imaginary != 0 && Math.Abs(value.Real) <= Math.Max(NeutralRatio * Complex.Abs(value), RoundingLevel * norm);
}
