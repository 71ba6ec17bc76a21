namespace OdeDsl.Integration;

/// <summary>What a guard watches.</summary>
internal enum GuardKind
{
    /// <summary>The surface of a switching function that bounds the locked regime.</summary>
    Surface,

    /// <summary>The side below a surface slid along no longer points at it.</summary>
    SlidingEndsBelow,

    /// <summary>The side above no longer does.</summary>
    SlidingEndsAbove,

    /// <summary>A section the caller asked for.</summary>
    Section,

    /// <summary>The guard of an event; the number of the event takes the place of the switch.</summary>
    Event,
}

/// <summary>A quantity that is positive while a motion may go on as it is: m = Sign (g − Surface) for a switching function g.</summary>
/// <param name="Kind">What it watches.</param>
/// <param name="Switch">The switch, or -1.</param>
/// <param name="Sign">1: the motion is above the surface; -1: below.</param>
/// <param name="Surface">The value of g on the surface.</param>
internal readonly record struct Guard(GuardKind Kind, int Switch, int Sign, double Surface);
