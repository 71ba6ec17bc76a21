using System.Collections.Immutable;
using System.Numerics;
using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.LinearAlgebra.Factorization;
using OdeDsl.Equilibria;
using Vector = MathNet.Numerics.LinearAlgebra.Vector<double>;

namespace OdeDsl.Cycles;

/// <summary>
/// The multipliers of a closed orbit. In a basis that starts with the direction of motion the monodromy matrix is block triangular, because
/// it maps that direction to itself: the trivial multiplier is the first entry, the others are the eigenvalues of the remaining block,
/// which is the derivative of the return map. They are well conditioned even where the full matrix is not diagonalisable, as on a family
/// of orbits.
/// </summary>
internal sealed class OrbitMultipliers
{
    /// <summary>Multipliers closer to the unit circle than this cannot be told from it, however accurate the rest is.</summary>
    private const double UnitFloor = 1e-5;

    /// <summary>Multipliers are trusted to this many times the error seen in the trivial one.</summary>
    private const double ErrorMargin = 10;

    /// <summary>
    /// Beside a double cycle a residual r leaves a multiplier off by a few √r: the residual is quadratic in the distance from the cycle,
    /// the multiplier's deviation from 1 linear.
    /// </summary>
    private const double DoubleCycleMargin = 50;

    /// <summary>A multiplier this close to 1 may belong to a family; the family's neighbours decide.</summary>
    private const double FamilyCandidate = 1e-4;

    private readonly Matrix<double> basis;
    private readonly Evd<double>? transverse;

    public OrbitMultipliers(ShotOrbit orbit)
    {
        int n = orbit.State.Length;
        Vector velocity = Vector.Build.DenseOfArray(orbit.Velocity);
        Matrix<double> monodromy = Matrix<double>.Build.DenseOfRowMajor(n, n, orbit.Monodromy);
        double speed = velocity.L2Norm();
        Vector mapped = monodromy * velocity;
        TrivialError = (mapped - velocity).L2Norm() / speed;
        Complex trivial = velocity * mapped / (speed * speed);
        Complex[] others = [];
        basis = Matrix<double>.Build.Dense(n, 0);
        if (n > 1)
        {
            basis = velocity.ToColumnMatrix().QR(QRMethod.Full).Q.SubMatrix(0, n, 1, n - 1);
            transverse = basis.TransposeThisAndMultiply(monodromy * basis).Evd(Symmetricity.Asymmetric);
            others = transverse.EigenValues.ToArray();
        }

        // Backwards in time the monodromy matrix is the inverse.
        if (orbit.SignedPeriod < 0) (trivial, others) = (1 / trivial, Array.ConvertAll(others, static value => 1 / value));
        All = [trivial, .. others.OrderByDescending(Complex.Abs).ThenByDescending(static value => value.Imaginary)];
        double slack = Math.Max(UnitFloor, Math.Max(ErrorMargin * TrivialError, DoubleCycleMargin * Math.Sqrt(orbit.Residual)));
        double largest = others.Length > 0 ? others.Max(Complex.Abs) : 0;
        Stability = largest < 1 - slack ? Stability.Stable : largest > 1 + slack ? Stability.Unstable : Stability.Undecided;
    }

    /// <summary>All multipliers, the trivial one first, then by descending modulus.</summary>
    public ImmutableArray<Complex> All { get; }

    /// <summary>How far the monodromy matrix is from mapping the direction of motion to itself, relative.</summary>
    public double TrivialError { get; }

    /// <summary>What the transverse multipliers say, for time running forward.</summary>
    public Stability Stability { get; }

    /// <summary>
    /// The direction across the orbit, in scaled states and of length one, that belongs to a transverse multiplier consistent with 1, and
    /// that multiplier's distance from 1; <see langword="null"/> if there is none.
    /// </summary>
    public (double[] Direction, double Error)? UnitDirection()
    {
        if (transverse is null) return null;
        int nearest = 0;
        for (int k = 1; k < transverse.EigenValues.Count; k++)
        {
            if (Complex.Abs(transverse.EigenValues[k] - 1) < Complex.Abs(transverse.EigenValues[nearest] - 1)) nearest = k;
        }

        double error = Complex.Abs(transverse.EigenValues[nearest] - 1);
        if (!(error <= Math.Max(FamilyCandidate, ErrorMargin * TrivialError))) return null;
        Vector direction = basis * transverse.EigenVectors.Column(nearest);
        return (direction.Normalize(2).ToArray(), error);
    }
}
