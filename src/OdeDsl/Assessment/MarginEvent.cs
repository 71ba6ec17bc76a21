namespace OdeDsl.Assessment;

/// <summary>What happens to the set of attractors at the edge of a margin.</summary>
public enum MarginEvent
{
    /// <summary>Nothing changes within the explored range.</summary>
    None,

    /// <summary>A stable rest and another rest meet: the stable rest disappears, or appears, beyond.</summary>
    Fold,

    /// <summary>A rest loses, or gains, its stability by oscillation.</summary>
    HopfPoint,

    /// <summary>A rest loses, or gains, its stability where another branch of rests crosses.</summary>
    BranchPoint,

    /// <summary>A stable rest reaches a switching surface and does not continue as a stable rest.</summary>
    SurfaceContact,

    /// <summary>A stable rest leaves the state bounds.</summary>
    LeavesBounds,

    /// <summary>A stable limit cycle is no longer found.</summary>
    CycleLost,

    /// <summary>A limit cycle is still found but no longer stable.</summary>
    CycleStabilityLost,

    /// <summary>The following stopped before the end of the range; what lies beyond is not known.</summary>
    Unknown,
}
