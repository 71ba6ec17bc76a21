using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>The loop of a recorded run.</summary>
internal static class Simulation
{
    private const double ProgressInterval = 0.01;

    public static Trajectory Run(
        DynamicSystem system, double until, SimulationOptions options, IProgress<double>? progress, CancellationToken cancellationToken)
    {
        var motion = new Motion(system, options, tangentCount: 0);
        var run = new Trajectory(system, options.From, motion.Statistics);
        double reported = 0;
        try
        {
            motion.Begin(options.From, system.InitialState);
            while (motion.Time != until && !motion.IsOver)
            {
                if (cancellationToken.IsCancellationRequested)
                    throw MotionFailure.Cancelled(motion, system.StateCount, run, cancellationToken);
                StepStatus status = motion.Step(until);
                // A motion that cannot go on beyond a surface has made its way up to there.
                if (motion.Time != run.EndTime) run.Append(motion.Current);
                if (status == StepStatus.Accepted && motion.EventsDue)
                {
                    status = motion.Fire();
                    if (status == StepStatus.Accepted) run.Append(motion.NewEvents);
                }

                foreach (Crossing crossing in motion.NewCrossings) run.Append(crossing);
                if (status != StepStatus.Accepted) throw MotionFailure.Of(status, motion, system.StateCount, run);
                double done = (motion.Time - options.From) / (until - options.From);
                if (progress is null || (done - reported < ProgressInterval && motion.Time != until)) continue;
                reported = done;
                progress.Report(done);
            }
        }
        catch (Exception thrown) when (thrown is not IIntegrationFailure)
        {
            throw MotionFailure.Of(thrown, motion, system.StateCount, run);
        }

        return run;
    }
}
