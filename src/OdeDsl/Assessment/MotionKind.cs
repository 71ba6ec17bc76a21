namespace OdeDsl.Assessment;

/// <summary>What a motion does in the long run.</summary>
public enum MotionKind
{
    /// <summary>It ends at a stable rest.</summary>
    Settles,

    /// <summary>It ends on a limit cycle on which every state returns to its value.</summary>
    Oscillates,

    /// <summary>It ends on a limit cycle on which an angle gains whole turns.</summary>
    Rotates,

    /// <summary>It moves on one of a continuous family of closed orbits, as a conservative system does; no limit cycle.</summary>
    ClosedOrbits,

    /// <summary>It stays bounded and neighbouring motions separate exponentially: the largest Lyapunov exponent is positive.</summary>
    Irregular,

    /// <summary>It leaves every bound.</summary>
    RunsAway,

    /// <summary>The integration cannot go on: the rates throw or are not finite at a bounded state.</summary>
    Fails,

    /// <summary>None of these could be shown within the allowed work.</summary>
    Undecided,
}
