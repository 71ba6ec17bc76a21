namespace OdeDsl.Cycles;

/// <summary>How the multipliers of a closed orbit were computed.</summary>
public enum MultiplierMethod
{
    /// <summary>
    /// Eigenvalues of the monodromy matrix: the variational equations over one period, with the jump conditions at every crossing of a
    /// switching surface (M. A. Aizerman and F. R. Gantmakher, Q. J. Mech. Appl. Math. 11, 1958).
    /// </summary>
    VariationalEquations,

    /// <summary>Eigenvalues of the return map's derivative, by central differences of whole turns: used where the orbit slides.</summary>
    ReturnMapDifferences,
}
