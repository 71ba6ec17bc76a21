using System.Numerics;

namespace OdeDsl.Branches;

/// <summary>One computed equilibrium on a branch.</summary>
/// <param name="Parameter">The parameter's value, in its unit.</param>
/// <param name="State">The equilibrium, in the order of the state vector, on the unrolled line.</param>
/// <param name="Eigenvalues">The eigenvalues of the state Jacobian.</param>
/// <param name="UnstableCount">How many of them have a positive real part.</param>
/// <param name="IsStable">Whether all of them have a negative real part.</param>
/// <param name="ArcLength">The length of the branch up to here, in scaled variables.</param>
/// <param name="Residual">The largest scaled rate left.</param>
public sealed record FollowedEquilibrium(
    double Parameter,
    IReadOnlyList<double> State,
    IReadOnlyList<Complex> Eigenvalues,
    int UnstableCount,
    bool IsStable,
    double ArcLength,
    double Residual);
