namespace OdeDsl.Equilibria;

/// <summary>
/// How the linearised motion looks near an equilibrium. In more than two dimensions nodes and foci are told apart by the leading
/// eigenvalues, those nearest to the imaginary axis.
/// </summary>
public enum EquilibriumKind
{
    /// <summary>All real parts have one sign and the leading eigenvalue is real.</summary>
    Node,

    /// <summary>All real parts have one sign and the leading eigenvalues are a complex pair.</summary>
    Focus,

    /// <summary>
    /// Real parts of both signs: attracting in some directions and repelling in <see cref="Equilibrium.UnstableCount"/> others.
    /// </summary>
    Saddle,

    /// <summary>
    /// A complex pair whose real part is negligible beside its imaginary part: a linear centre. Whether the nonlinear motion spirals in,
    /// spirals out or closes is not decided by the linearisation.
    /// </summary>
    Centre,

    /// <summary>
    /// The Jacobian is singular within its accuracy (a double root, a line of equilibria), or it jumps at the equilibrium because the
    /// equilibrium lies on a switching surface: the linearisation decides nothing.
    /// </summary>
    Degenerate,
}
