namespace OdeDsl.Equilibria;

/// <summary>Whether small disturbances die out, as far as the linearised motion decides it.</summary>
public enum Stability
{
    /// <summary>Every small disturbance dies out.</summary>
    Stable,

    /// <summary>Some small disturbance grows.</summary>
    Unstable,

    /// <summary>None grows and at least one neither grows nor dies out within the accuracy of the linearisation.</summary>
    Undecided,
}
