using System.Numerics;

namespace OdeDsl.Branches;

/// <summary>A corrected point of the branch in scaled variables, with what the following needs to know about it.</summary>
/// <param name="Position">The n scaled states and the scaled parameter.</param>
/// <param name="Tangent">The unit tangent of the branch, pointing onward.</param>
/// <param name="Eigenvalues">The eigenvalues of the state Jacobian, largest real part first.</param>
/// <param name="Residual">The largest scaled rate left.</param>
/// <param name="Iterations">How many Newton corrections it took.</param>
internal sealed record CurvePoint(double[] Position, double[] Tangent, Complex[] Eigenvalues, double Residual, int Iterations)
{
    /// <summary>Real parts smaller than this share of the largest eigenvalue's modulus count as zero: rounding of the eigenvalues.</summary>
    public const double NegligibleShare = 1e-9;

    /// <summary>The scaled parameter.</summary>
    public double Parameter => Position[^1];

    /// <summary>How fast the scaled parameter moves along the branch; zero at a fold.</summary>
    public double ParameterSlope => Tangent[^1];

    /// <summary>The modulus of the largest eigenvalue.</summary>
    public double SpectralRadius { get; } = Eigenvalues.Length == 0 ? 0 : Eigenvalues.Max(Complex.Abs);

    /// <summary>How many real parts are positive beyond rounding.</summary>
    public int UnstableCount => Eigenvalues.Count(value => value.Real > NegligibleShare * SpectralRadius);

    /// <summary>How many real parts are negative beyond rounding.</summary>
    public int StableCount => Eigenvalues.Count(value => value.Real < -NegligibleShare * SpectralRadius);
}
