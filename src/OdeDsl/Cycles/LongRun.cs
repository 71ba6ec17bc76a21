using System.Globalization;
using OdeDsl.Equilibria;
using OdeDsl.Integration;
using OdeDsl.Modeling;

namespace OdeDsl.Cycles;

/// <summary>
/// Follows one start until it rests, closes, runs away or has used up its steps. The run is cut into windows counted in integration
/// steps, not in time: a step is the motion's own measure of time. Each window is twice as long as the one before; its first part counts
/// as transient.
/// </summary>
internal sealed class LongRun(
    DynamicSystem system,
    SearchRegion region,
    OrbitCollection orbits,
    OrbitJudge judge,
    OrbitShooter shooter,
    RestWatch rests,
    int maximumSteps,
    CancellationToken cancellation)
{
    /// <summary>The tolerance of long runs: enough to see the long-run behaviour, which shooting then makes exact.</summary>
    private const double RunTolerance = 1e-7;

    /// <summary>The steps of the first window: some ten turns of a smooth oscillation.</summary>
    private const int FirstWindow = 600;

    /// <summary>The time of the first window in units of the inverse norm of the Jacobian; grows when steps are left over.</summary>
    private const double FirstHorizon = 1e3;
    private const double HorizonGrowth = 10;

    /// <summary>Windows at most, however few steps each needs.</summary>
    private const int MaximumWindows = 40;

    /// <summary>A window with this many returns is long enough; longer ones are not made, and only a few more are looked at.</summary>
    private const int ManyReturns = 50;
    private const int WindowsWithManyReturns = 6;

    private static readonly SimulationOptions Options = new() { RelativeTolerance = RunTolerance, ManyNodes = true };

    /// <summary>Follows a start.</summary>
    /// <param name="start">The start.</param>
    /// <param name="direction">1: forward; -1: backwards in time.</param>
    public SearchRun Follow(double[] start, int direction)
    {
        double[] state = [.. start];
        double elapsed = 0, horizon = FirstHorizon / FastestRate(start), displacement = double.PositiveInfinity;
        long steps = FirstWindow, left = maximumSteps;
        int longWindows = 0;
        for (int window = 0; window < MaximumWindows && longWindows < WindowsWithManyReturns && left > 0; window++)
        {
            cancellation.ThrowIfCancellationRequested();
            (Trajectory? run, IntegrationException? failure) = Window(state, direction * horizon, Math.Min(steps, left));
            bool complete = failure is null;
            if (run is not null)
            {
                elapsed += run.EndTime;
                state = run.FinalState;
                left -= run.Statistics.AcceptedSteps + run.Statistics.RejectedSteps;
            }

            SearchRun End(RunOutcome outcome, int index, string text) => new([.. start], [.. state], elapsed, outcome, index, text);
            if (region.IsRunaway(state)) return End(RunOutcome.Runaway, -1, "runs away.");
            bool usedUp = failure?.Reason == IntegrationFailure.TooManySteps && run is not null;
            if (failure is not null && !usedUp) return EndOfFailure(failure, End);
            if (run!.Times.Length < 2) return End(RunOutcome.Failed, -1, "makes no progress.");
            if (rests.Rests(run) is (int rest, string settled)) return End(RunOutcome.Rest, rest, settled);
            if (ReturnSequence.Of(run, region) is ReturnSequence { Lag: > 0 } returns)
            {
                displacement = returns.Displacement;
                if (Conclude(returns) is (RunOutcome outcome, int index, string text)) return End(outcome, index, text);
                if (returns.States.Count >= ManyReturns) longWindows++;
                else if (complete) horizon *= HorizonGrowth;
            }
            else if (complete)
            {
                horizon *= HorizonGrowth;
            }

            if (!complete) steps *= 2;
            region.Wrap(state);
        }

        return new SearchRun([.. start], [.. state], elapsed, RunOutcome.Unsettled, -1, UnsettledText(displacement));
    }

    /// <summary>The sentence for a run that ended on a limit cycle.</summary>
    public static string OnCycle(int index) => Invariant($"closes on limit cycle {index + 1}.");

    /// <summary>The sentence for a run that ended in a family of closed orbits.</summary>
    public static string OnFamily(int index) => Invariant($"closes as a member of family {index + 1}.");

    private (RunOutcome Outcome, int Index, string Text)? Conclude(ReturnSequence returns)
    {
        double[] last = [.. returns.States[^1]];
        region.Wrap(last); // angles that have turned often have lost digits
        int reached = orbits.CycleReachedBy(last, returns.SignedPeriod < 0);
        if (reached >= 0) return (RunOutcome.LimitCycle, reached, OnCycle(reached));
        if (rests.SpiralsIn(returns) is (int focus, string spiral)) return (RunOutcome.Rest, focus, spiral);
        if (!returns.NearlyCloses) return null;
        if (shooter.Close(last, returns.SignedPeriod, returns.Scale) is not ShotOrbit orbit) return null;
        (OrbitVerdict verdict, int index) = judge.Judge(orbit, returns.Scale);
        return verdict switch
        {
            OrbitVerdict.FamilyMember => (RunOutcome.ClosedOrbit, index, OnFamily(index)),
            OrbitVerdict.LimitCycle => (RunOutcome.LimitCycle, index, OnCycle(index)),
            _ => null,
        };
    }

    private (Trajectory? Run, IntegrationException? Failure) Window(double[] state, double until, long steps)
    {
        try
        {
            return (system.WithInitialState(state).Simulate(until, Options with { MaximumSteps = steps }, null, cancellation), null);
        }
        catch (IntegrationException failure)
        {
            return (failure.Partial, failure);
        }
    }

    // The message's own time counts from the start of a window; the run's duration says more.
    private static SearchRun EndOfFailure(IntegrationException failure, Func<RunOutcome, int, string, SearchRun> end) =>
        failure.Reason is IntegrationFailure.StepTooSmall or IntegrationFailure.NotFinite
            ? end(RunOutcome.Runaway, -1, Invariant($"grows, or leaves the domain of the equations, and cannot go on ({failure.Reason})."))
            : end(RunOutcome.Failed, -1, Invariant($"cannot be integrated further ({failure.Reason})."));

    // The norm of the Jacobian in scaled states.
    private double FastestRate(double[] state)
    {
        int n = state.Length;
        var (regime, jacobian, rates) = (new double[system.SwitchCount], new double[n * n], new double[n]);
        system.Regime(0, state, regime);
        system.StateJacobian(0, state, regime, jacobian);
        system.Rates(0, state, regime, rates);
        double square = 0;
        for (int i = 0; i < n; i++)
        {
            square += rates[i] / region.Width[i] * (rates[i] / region.Width[i]);
            for (int j = 0; j < n; j++)
            {
                double entry = jacobian[(i * n) + j] * region.Width[j] / region.Width[i];
                square += entry * entry;
            }
        }

        double norm = Math.Sqrt(square);
        return norm > 0 && double.IsFinite(norm) ? norm : 1;
    }

    private static string UnsettledText(double displacement) => double.IsFinite(displacement)
        ? Invariant($"has not settled within the allowed steps; a return misses by {displacement:0.0E-0} of its extent and does not close.")
        : "has not settled within the allowed steps and does not return.";

    private static string Invariant(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);
}
