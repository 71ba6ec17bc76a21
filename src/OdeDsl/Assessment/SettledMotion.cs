using System.Globalization;
using OdeDsl.Cycles;
using OdeDsl.Equilibria;
using OdeDsl.Integration;
using OdeDsl.Modeling;

namespace OdeDsl.Assessment;

/// <summary>
/// Where a motion ends that starts on a cycle's last known place, after the parameter has moved on: on a closed orbit again, at rest,
/// or far away. Tells a cycle that only failed to close by Newton's method, because it passes a corner between switching surfaces,
/// from one that is gone.
/// </summary>
/// <param name="State">Its last state; on the closed orbit if it repeats itself.</param>
/// <param name="Returns">Its returns to a section, if it repeats itself.</param>
/// <param name="Text">What it does, as a clause.</param>
internal sealed record SettledMotion(double[] State, ReturnSequence? Returns, string Text)
{
    // Far tighter than a return must close, far cheaper than shooting.
    private const double Tolerance = 1e-9;

    // Windows in periods of the cycle that was lost; each twice as long as the one before.
    private const double FirstWindow = 20;
    private const int Windows = 5;

    // Steps of one window at most: many for any cycle, few enough where the motion accumulates crossings.
    private const int MaximumSteps = 50_000;

    // Motion over a window below this part of the region is rest.
    private const double Still = 1e-6;

    // The returns of a motion that has settled repeat to this part of its extents.
    private const double Repeats = 1e-6;

    // A repetition smaller than this part of the cycle that was left is rounding on top of a slow drift.
    private const double SmallestPart = 1e-3;
    private const int Samples = 64;

    /// <summary>Follows the motion.</summary>
    public static SettledMotion Of(DynamicSystem system, SearchRegion region, TrackedCycle from, CancellationToken cancellation)
    {
        double[] state = [.. from.Orbit.State];
        double length = FirstWindow * from.Period;
        for (int window = 0; window < Windows; window++, length *= 2)
        {
            Trajectory run;
            try
            {
                run = system.WithInitialState(state).Simulate(
                    length, new SimulationOptions { RelativeTolerance = Tolerance, MaximumSteps = MaximumSteps, ManyNodes = true }, null, cancellation);
            }
            catch (IntegrationException failure)
            {
                return new SettledMotion(state, null, string.Create(
                    CultureInfo.InvariantCulture, $"the motion from it cannot be followed ({failure.Reason})"));
            }

            state = run.FinalState;
            if (region.IsRunaway(state)) return new SettledMotion(state, null, "the motion from it runs away");
            if (RestWatch.IsStill(run, region, Still)) return new SettledMotion(state, null, "the motion from it comes to rest");
            if (ReturnSequence.Of(run, region) is { Lag: > 0, Displacement: <= Repeats } returns && IsOfSize(run, returns, from))
            {
                return new SettledMotion([.. returns.States[^1]], returns, string.Create(
                    CultureInfo.InvariantCulture, $"the motion from it repeats itself after {AssessmentText.Time(system.Description, returns.SignedPeriod)}"));
            }

            region.Wrap(state);
        }

        return new SettledMotion(state, null, "the motion from it has neither settled nor come to rest within the work allowed");
    }

    // How far the motion goes during one repetition, against the cycle it came from.
    private static bool IsOfSize(Trajectory run, ReturnSequence returns, TrackedCycle from)
    {
        double[] low = run.At(returns.Times[^1]), high = [.. low];
        for (int k = 1; k < Samples; k++)
        {
            double[] state = run.At(returns.Times[^1] - (returns.SignedPeriod * k / Samples));
            for (int i = 0; i < state.Length; i++) (low[i], high[i]) = (Math.Min(low[i], state[i]), Math.Max(high[i], state[i]));
        }

        return Enumerable.Range(0, low.Length).Any(i => high[i] - low[i] >= SmallestPart * from.Extents[i]);
    }
}
