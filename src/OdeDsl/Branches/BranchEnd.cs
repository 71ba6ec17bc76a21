namespace OdeDsl.Branches;

/// <summary>Why the following of a branch ended.</summary>
public enum BranchEnd
{
    /// <summary>The parameter reached the value asked for.</summary>
    TargetReached,

    /// <summary>The branch turned back and reached the parameter value it was started at.</summary>
    StartValueReached,

    /// <summary>A state reached its bound.</summary>
    StateBoundReached,

    /// <summary>The branch closed on itself: it came back to its first point.</summary>
    ReturnedToStart,

    /// <summary>The equilibrium reached a switching surface and does not continue beyond it.</summary>
    SurfaceReached,

    /// <summary>No equilibrium was found near the last one, however short the step.</summary>
    StepTooSmall,

    /// <summary>The rates or their derivatives are not finite beyond the last point.</summary>
    NotFinite,

    /// <summary>The number of points allowed was used up.</summary>
    PointLimit,
}
