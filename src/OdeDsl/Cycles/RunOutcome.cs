namespace OdeDsl.Cycles;

/// <summary>How a long run of the search ended.</summary>
public enum RunOutcome
{
    /// <summary>At an equilibrium, or resting on a switching surface.</summary>
    Rest,

    /// <summary>On one of the limit cycles found.</summary>
    LimitCycle,

    /// <summary>On a member of a family of closed orbits.</summary>
    ClosedOrbit,

    /// <summary>Far outside the region of interest, or growing until the integration failed.</summary>
    Runaway,

    /// <summary>Neither at rest nor closed within the allowed work: a slow transient, or quasi-periodic or irregular motion.</summary>
    Unsettled,

    /// <summary>The integration stopped for another reason.</summary>
    Failed,
}
