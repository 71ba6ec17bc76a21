namespace OdeDsl.Equilibria;

/// <summary>What the linearised motion says about an equilibrium.</summary>
internal readonly record struct LinearVerdict(EquilibriumKind Kind, Stability Stability, int UnstableCount)
{
    /// <summary>The verdict where the Jacobian jumps at the equilibrium: one side's eigenvalues decide nothing.</summary>
    public LinearVerdict WithoutLinearisation() => this with { Kind = EquilibriumKind.Degenerate, Stability = Stability.Undecided };

    /// <summary>The verdict on a surface that repels: one more direction in which disturbances grow.</summary>
    /// <param name="within">The number of directions within the surface.</param>
    public LinearVerdict WithRepellingSurface(int within) => this with
    {
        Kind = Kind == EquilibriumKind.Degenerate || UnstableCount == within ? Kind : EquilibriumKind.Saddle,
        Stability = Stability.Unstable,
        UnstableCount = UnstableCount + 1,
    };
}
