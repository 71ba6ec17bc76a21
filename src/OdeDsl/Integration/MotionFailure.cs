namespace OdeDsl.Integration;

/// <summary>Turns the outcome of a motion into the exceptions that callers see.</summary>
internal static class MotionFailure
{
    /// <summary>Makes the exception for a step that was not accepted.</summary>
    public static IntegrationException Of(StepStatus status, Motion motion, int stateCount, Trajectory? partial)
    {
        (IntegrationFailure reason, string detail) = status switch
        {
            StepStatus.NotFinite when motion.TableLeft is { } table => (
                IntegrationFailure.OutsideTable,
                $"the argument of {table} left the knots, and the table does not extrapolate; add knots, or choose another extrapolation."),
            StepStatus.NotFinite => (
                IntegrationFailure.NotFinite,
                "the rates are infinite or not a number here, however small the step; check the equations at this state."),
            StepStatus.SingularMatrix => (
                IntegrationFailure.SingularMatrix, "the matrix of the implicit equations is singular, however small the step."),
            StepStatus.TooManySteps => (
                IntegrationFailure.TooManySteps,
                "the permitted number of steps is used up; permit more (MaximumSteps), loosen the tolerance or choose another method."),
            StepStatus.CrossingsAccumulate => (
                IntegrationFailure.CrossingsAccumulate,
                "conditions in the model change without end while time stands still; the motion accumulates on their surfaces."),
            StepStatus.SlidingOnSeveralSurfaces => (
                IntegrationFailure.SlidingOnSeveralSurfaces,
                "the motion would slide along the surfaces of two conditions at once, for which there is no unique continuation."),
            StepStatus.EventsAccumulate => (
                IntegrationFailure.EventsAccumulate,
                "events follow one another without end while time stands still; give the model a mode for what comes after (a ball at rest)."),
            StepStatus.TerminalEvent => (IntegrationFailure.TerminalEvent, "a terminal event ended the motion before the time asked for."),
            StepStatus.EventsInReverse => (
                IntegrationFailure.EventsInReverse, "the actions of events cannot be undone, so time cannot run backwards in this model."),
            _ => (
                IntegrationFailure.StepTooSmall,
                "the tolerance asks for steps too small to change the time; the solution may leave to infinity here, or a rate may jump."),
        };
        return new IntegrationException(reason, motion.Time, motion.Current.LastTried, State(motion, stateCount), detail, partial);
    }

    /// <summary>Makes the exception for equations that threw.</summary>
    public static IntegrationException Of(Exception thrown, Motion motion, int stateCount, Trajectory? partial) =>
        new(
            IntegrationFailure.EquationsThrew,
            motion.Time,
            motion.Current.LastTried,
            State(motion, stateCount),
            $"the model's equations threw {thrown.GetType().Name}: {thrown.Message}",
            partial,
            thrown);

    /// <summary>Makes the exception for a cancelled run.</summary>
    public static IntegrationCanceledException Cancelled(Motion motion, int stateCount, Trajectory? partial, CancellationToken token) =>
        new(motion.Time, motion.Current.Proposed, State(motion, stateCount), partial, token);

    private static double[] State(Motion motion, int stateCount) => motion.Position[..stateCount].ToArray();
}
