using OdeDsl.Assessment;
using OdeDsl.Integration;
using OdeDsl.Modeling;

namespace OdeDsl.Workbench.Portraits;

/// <summary>Computes motions to draw: states at close intervals, as far as the integration and the region of interest reach.</summary>
internal sealed class MotionTracer(DynamicSystem system, CancellationToken cancellation)
{
    private const double Tolerance = 1e-8;
    private const long MaximumSteps = 20_000;

    // Curves bend within a step: that many points per step are drawn.
    private const int PointsPerStep = 8;

    // A separatrix is followed in that many parts, after each of which it is asked whether it is still of interest.
    private const int Parts = 60;

    /// <summary>The states of a motion over a duration; fewer if the integration fails on the way.</summary>
    /// <param name="start">Where it starts.</param>
    /// <param name="duration">How long; negative for reversed time.</param>
    public List<double[]> Follow(ReadOnlySpan<double> start, double duration)
    {
        List<double[]> states = [];
        if (Run(start, duration) is not { } run) return states;
        for (int step = 0; step + 1 < run.Times.Length; step++)
        {
            double from = run.Times[step], to = run.Times[step + 1];
            for (int i = 0; i < PointsPerStep; i++) states.Add(run.At(from + (to - from) * i / PointsPerStep));
        }

        states.Add(run.FinalState);
        return states;
    }

    /// <summary>The states of a motion until it is no longer of interest, at the latest after a duration.</summary>
    /// <param name="start">Where it starts.</param>
    /// <param name="duration">How long at most; negative for reversed time.</param>
    /// <param name="isDone">Whether a state ends the motion.</param>
    public List<double[]> FollowUntil(double[] start, double duration, Predicate<double[]> isDone)
    {
        List<double[]> states = [];
        double[] state = start;
        for (int part = 0; part < Parts; part++)
        {
            List<double[]> more = Follow(state, duration / Parts);
            int end = more.FindIndex(isDone);
            states.AddRange(end < 0 ? more : more[..(end + 1)]);
            if (end >= 0 || more.Count < 2) break;
            state = more[^1];
        }

        return states;
    }

    /// <summary>A run over a duration, or as much of it as the integration reaches; null if it reaches nothing.</summary>
    public Trajectory? Run(ReadOnlySpan<double> start, double duration)
    {
        try
        {
            SimulationOptions options = new() { RelativeTolerance = Tolerance, MaximumSteps = MaximumSteps };
            return system.WithInitialState(start).Simulate(duration, options, cancellationToken: cancellation);
        }
        catch (IntegrationException exception)
        {
            return exception.Partial is { Times.Length: > 1 } partial ? partial : null;
        }
    }

    /// <summary>How long the model's own motion is worth looking at, from what it does in the long run.</summary>
    public static double TellingDuration(ModelAssessment assessment)
    {
        MotionVerdict verdict = assessment.Motions.Working;
        double wanted = (verdict.Kind, verdict.Index) switch
        {
            (MotionKind.Settles, { } index) when assessment.Rests.Equilibria[index].Modes is { Length: > 0 } modes => 5 * modes.Max(static mode => Math.Abs(mode.TimeConstant)),
            (MotionKind.Oscillates or MotionKind.Rotates, { } index) => 8 * assessment.Motions.Cycles[index].Period,
            (MotionKind.ClosedOrbits, { } index) => 5 * assessment.Motions.Families[index].Members.Max(static member => member.Period),
            (MotionKind.Irregular, _) when verdict.Exponent is { Value: > 0 } exponent => 15 / exponent.Value,
            _ => verdict.Duration,
        };
        return double.IsFinite(wanted) && wanted > 0 ? wanted : verdict.Duration;
    }
}
