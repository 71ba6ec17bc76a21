using System.Numerics;

namespace OdeDsl.Branches;

/// <summary>A located special point of a branch.</summary>
public sealed record SpecialPoint
{
    /// <summary>What is special.</summary>
    public required SpecialPointKind Kind { get; init; }

    /// <summary>The parameter's value there, in its unit.</summary>
    public required double Parameter { get; init; }

    /// <summary>The equilibrium there, in the order of the state vector.</summary>
    public required IReadOnlyList<double> State { get; init; }

    /// <summary>The eigenvalues of the state Jacobian there.</summary>
    public required IReadOnlyList<Complex> Eigenvalues { get; init; }

    /// <summary>The angular frequency of the oscillation that begins, per unit of time; only for <see cref="SpecialPointKind.HopfPoint"/>.</summary>
    public double? Frequency { get; init; }

    /// <summary>The largest scaled rate left at the point: how well it is an equilibrium.</summary>
    public required double Residual { get; init; }

    /// <summary>
    /// The value left of the condition that defines the point (the eigenvalue's real part over the size of the Jacobian, or the
    /// switching function): how well it is a special point.
    /// </summary>
    public required double Condition { get; init; }

    /// <summary>The number of eigenvalues with a positive real part just before and just after the point.</summary>
    public required (int Before, int After) UnstableCounts { get; init; }

    /// <summary>The index in <see cref="BranchResult.Points"/> of the last ordinary point before it.</summary>
    public required int AfterPoint { get; init; }

    /// <summary>What was computed to say so, as one sentence.</summary>
    public required string Evidence { get; init; }

    /// <summary>Whether the equilibria before the point are stable and those after it are not, or the other way round.</summary>
    public bool ChangesStability => (UnstableCounts.Before == 0) != (UnstableCounts.After == 0);
}
