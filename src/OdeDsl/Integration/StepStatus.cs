namespace OdeDsl.Integration;

/// <summary>How a step ended.</summary>
internal enum StepStatus
{
    /// <summary>The step was accepted.</summary>
    Accepted,

    /// <summary>The error test or Newton's method asked for a step that no longer changes the time.</summary>
    StepTooSmall,

    /// <summary>Newton's method did not converge; a smaller step will be tried.</summary>
    NewtonFailed,

    /// <summary>Values that are not finite, however small the step.</summary>
    NotFinite,

    /// <summary>The implicit equations stayed singular.</summary>
    SingularMatrix,

    /// <summary>The permitted number of attempts was used up.</summary>
    TooManySteps,

    /// <summary>Crossings without end at one time.</summary>
    CrossingsAccumulate,

    /// <summary>Two surfaces attract at once.</summary>
    SlidingOnSeveralSurfaces,

    /// <summary>Events without end at one time.</summary>
    EventsAccumulate,

    /// <summary>A terminal event came before the end that was asked for.</summary>
    TerminalEvent,

    /// <summary>Time runs backwards in a model with events.</summary>
    EventsInReverse,
}
