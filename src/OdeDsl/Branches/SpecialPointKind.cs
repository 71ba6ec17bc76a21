namespace OdeDsl.Branches;

/// <summary>What is special about a point of a branch of equilibria.</summary>
public enum SpecialPointKind
{
    /// <summary>Two equilibria meet and disappear: the branch turns back in the parameter (a real eigenvalue passes zero).</summary>
    Fold,

    /// <summary>An oscillation begins: a pair of complex eigenvalues passes the imaginary axis.</summary>
    HopfPoint,

    /// <summary>Another branch of equilibria crosses this one (a real eigenvalue passes zero without the branch turning back).</summary>
    BranchPoint,

    /// <summary>The equilibrium reaches a switching surface: beyond it the rates follow another formula.</summary>
    SurfaceContact,
}
