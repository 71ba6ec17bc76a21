using System.Globalization;
using OdeDsl.Cycles;
using OdeDsl.Equilibria;
using OdeDsl.LinearAlgebra;
using OdeDsl.Modeling;

namespace OdeDsl.Assessment;

/// <summary>
/// Changes of the set of stable limit cycles when one parameter moves: each is carried along in steps that are halved where it does not
/// close, until it is lost or a multiplier leaves the unit circle.
/// </summary>
internal sealed class CycleMargins(DynamicSystem system, IReadOnlyList<LimitCycle> cycles, int steps, CancellationToken cancellation)
{
    // A cycle is given up when it does not close at this share of the first step, and its end is known to that.
    private const double SmallestStep = 1.0 / 256;

    // Steps grow where the cycle closes at once, up to this many first steps.
    private const double Growth = 1.5;
    private const double LongestStep = 4;

    // A stability change is located to this share of the step it was met in.
    private const double ChangeShare = 1e-6;

    /// <summary>The changes met between the present value and the end of the range: at most one for each stable cycle.</summary>
    public IEnumerable<MarginCandidate> Between(int parameter, double value, double end)
    {
        for (int k = 0; k < cycles.Count; k++)
        {
            if (!cycles[k].IsStable) continue;
            var follower = new CycleFollower(system, parameter, cancellation);
            string name = AttractorNames.Cycle(k);
            if (follower.Begin(cycles[k]) is not { } first)
                yield return new MarginCandidate(MarginEvent.Unknown, value, name, $"{name} could not be followed", "it does not close again at the present value");
            else if (Follow(follower, first, end, name) is { } change)
                yield return change;
        }
    }

    private MarginCandidate? Follow(CycleFollower follower, TrackedCycle first, double end, string name)
    {
        double whole = (end - first.Value) / steps, step = whole;
        TrackedCycle last = first;
        TrackedCycle? before = null;
        while (last.Value != end)
        {
            double value = Math.Abs(end - last.Value) <= Math.Abs(step) ? end : last.Value + step;
            TrackedCycle? next = follower.Move(last, before, value);
            if (next is null && Math.Abs(step) > SmallestStep * Math.Abs(whole))
            {
                step /= 2;
            }
            else if (next is null)
            {
                double beyond = Math.Abs(end - last.Value) <= Math.Abs(whole) ? end : last.Value + whole;
                if (Leap(follower, first, ref last, beyond, name) is { } change) return change;
                (before, step) = (null, whole);
            }
            else if (next.Stability == Stability.Unstable)
            {
                return LostStability(follower, last, next, name);
            }
            else
            {
                (before, last) = (last, next);
                step = Math.CopySign(Math.Min(Growth * Math.Abs(step), LongestStep * Math.Abs(whole)), whole);
            }
        }

        return null;
    }

    /// <summary>
    /// Where a cycle does not close by Newton's method the motion itself is followed at a value further on. It may settle on the cycle again,
    /// which has passed a corner between switching surfaces; or the two values are brought together until the cycle's end lies between.
    /// </summary>
    private static MarginCandidate? Leap(CycleFollower follower, TrackedCycle first, ref TrackedCycle last, double beyond, string name)
    {
        double accuracy = SmallestStep * Math.Abs(beyond - last.Value);
        double value = beyond;
        SettledMotion? elsewhere = null;
        while (elsewhere is null || Math.Abs(beyond - last.Value) > accuracy)
        {
            SettledMotion settled = follower.Settle(last, value);
            TrackedCycle? next = follower.On(settled, last, value);
            if (settled.Returns is not null && next is null) return NotClosed(last, value, name, settled);
            if (next is not null && CycleFollower.IsContinued(next, last))
            {
                last = next;
                if (elsewhere is null) return null;
            }
            else
            {
                (beyond, elsewhere) = (value, settled);
            }

            value = last.Value + ((beyond - last.Value) / 2);
        }

        return Lost(first, last, beyond, name, elsewhere);
    }

    private static MarginCandidate NotClosed(TrackedCycle last, double beyond, string name, SettledMotion settled) => new(
        MarginEvent.Unknown,
        last.Value,
        name,
        $"{name} could not be followed further",
        string.Create(CultureInfo.InvariantCulture, $"it does not close at {beyond:G9} by Newton's method, but {settled.Text}"));

    private static MarginCandidate Lost(TrackedCycle first, TrackedCycle last, double beyond, string name, SettledMotion settled)
    {
        string evidence = string.Create(
            CultureInfo.InvariantCulture,
            $"followed in steps up to here, where its extent is {last.SizeRelativeTo(first):P0} and its period {last.Period / first.Period:P0} of the present ones and its largest multiplier has modulus {last.LargestMultiplier:G4}; at {beyond:G9} {settled.Text}");
        return new MarginCandidate(
            MarginEvent.CycleLost, last.Value, name, $"{name} is no longer found, and {settled.Text}", evidence, null, Math.Abs(beyond - last.Value));
    }

    private static MarginCandidate LostStability(CycleFollower follower, TrackedCycle stable, TrackedCycle unstable, string name)
    {
        double width = Math.Abs(unstable.Value - stable.Value);
        TrackedCycle nearest = stable;
        double value = BracketedRoot.Find(
            trial =>
            {
                if (follower.Move(nearest, null, trial) is not { } cycle) return double.NaN;
                nearest = cycle;
                return cycle.LargestMultiplier - 1;
            },
            stable.Value,
            stable.LargestMultiplier - 1,
            unstable.Value,
            unstable.LargestMultiplier - 1,
            ChangeShare * width);
        string evidence = string.Create(
            CultureInfo.InvariantCulture,
            $"its largest multiplier has modulus {stable.LargestMultiplier:G6} at {stable.Value:G9} and {unstable.LargestMultiplier:G6} at {unstable.Value:G9}");
        return new MarginCandidate(
            MarginEvent.CycleStabilityLost, value, name, $"{name} loses stability", evidence, null, ChangeShare * width);
    }
}
