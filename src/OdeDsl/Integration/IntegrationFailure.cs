namespace OdeDsl.Integration;

/// <summary>Why an integration ended before its end time.</summary>
public enum IntegrationFailure
{
    /// <summary>
    /// The tolerance asks for steps so small that they no longer change the time: a solution that leaves to infinity in finite time,
    /// rates that jump without a condition the generator can see, or too tight a tolerance.
    /// </summary>
    StepTooSmall,

    /// <summary>A rate, Jacobian or switching function was infinite or not a number, at the start or however small the step was made.</summary>
    NotFinite,

    /// <summary>The permitted number of steps was used up.</summary>
    TooManySteps,

    /// <summary>The matrix of the implicit equations stayed singular however small the step was made.</summary>
    SingularMatrix,

    /// <summary>The model's equations threw an exception; it is the inner exception.</summary>
    EquationsThrew,

    /// <summary>Conditions change without end while time stands still: the motion accumulates on a surface or on several.</summary>
    CrossingsAccumulate,

    /// <summary>The motion would slide along two surfaces at once, for which the method has no rule.</summary>
    SlidingOnSeveralSurfaces,

    /// <summary>The argument of a table that does not extrapolate left its knots.</summary>
    OutsideTable,

    /// <summary>
    /// Events follow one another ever faster and accumulate at this time (Zeno), or an action leaves the motion on its own guard.
    /// </summary>
    EventsAccumulate,

    /// <summary>A terminal event ended the motion before the time that an analysis asked for.</summary>
    TerminalEvent,

    /// <summary>Time was to run backwards in a model with events, whose actions cannot be undone.</summary>
    EventsInReverse,

    /// <summary>The caller cancelled the run.</summary>
    Cancelled,
}
