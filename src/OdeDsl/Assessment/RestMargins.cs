using System.Collections.Immutable;
using System.Globalization;
using OdeDsl.Branches;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;

namespace OdeDsl.Assessment;

/// <summary>
/// Changes of the set of stable rests when one parameter moves: every rest is followed, also past folds, because the branch beyond may
/// hold the rest that becomes or stops being an attractor first.
/// </summary>
internal sealed class RestMargins(DynamicSystem system, ImmutableArray<Equilibrium> rests, CancellationToken cancellation)
{
    // A wide range hides what lies near: the neighbourhood of this share of the value is followed first, with steps to match.
    private const double NearShare = 1;

    private readonly List<MarginCandidate> found = [];

    /// <summary>The changes met between the present value and the end of the range, in no order; some may lie beyond the nearest.</summary>
    public IReadOnlyList<MarginCandidate> Between(int parameter, double value, double end)
    {
        found.Clear();
        double near = value + Math.Sign(end - value) * NearShare * Math.Abs(value);
        if (value != 0 && Math.Abs(near - value) < Math.Abs(end - value)) FollowAll(parameter, value, near);
        if (!found.Exists(static candidate => candidate.Event != MarginEvent.Unknown))
        {
            found.Clear();
            FollowAll(parameter, value, end);
        }

        return [.. found];
    }

    private void FollowAll(int parameter, double value, double end)
    {
        // Stable rests first: where two rests meet, the stable one gives the change its name.
        foreach (int k in Enumerable.Range(0, rests.Length).OrderBy(index => rests[index].Stability == Stability.Unstable))
        {
            if (rests[k].IsSliding || rests[k].Set is not null) continue;
            string name = AttractorNames.Rest(k);
            try
            {
                BranchResult branch = BranchFollower.Follow(
                    system, parameter, rests[k].State.AsSpan(), value, end, new BranchOptions(), cancellation);
                Collect(branch, name);
            }
            catch (InvalidOperationException exception)
            {
                if (rests[k].Stability != Stability.Unstable)
                    found.Add(new MarginCandidate(MarginEvent.Unknown, value, name, $"{name} could not be followed", exception.Message));
            }
        }
    }

    private void Collect(BranchResult branch, string name)
    {
        if (PassesFromCentre(branch, name) is { } atOnce) found.Add(atOnce);
        bool folded = false;
        foreach (SpecialPoint point in branch.SpecialPoints)
        {
            if (point.ChangesStability) found.Add(Candidate(branch, point, folded ? AttractorNames.OtherRest : name));
            folded |= point.Kind == SpecialPointKind.Fold;
        }

        FollowedEquilibrium last = branch.Points[^1];
        if (last.UnstableCount > 0) return;
        string who = folded ? AttractorNames.OtherRest : name;
        if (branch.End == BranchEnd.StateBoundReached)
            found.Add(new MarginCandidate(MarginEvent.LeavesBounds, last.Parameter, who, $"{who} leaves the state bounds", branch.EndText));
        else if (branch.End == BranchEnd.SurfaceReached)
            found.Add(new MarginCandidate(MarginEvent.SurfaceContact, last.Parameter, who, $"{who} meets a switching surface and does not continue as an ordinary rest", branch.EndText));
        else if (branch.End is BranchEnd.StepTooSmall or BranchEnd.NotFinite or BranchEnd.PointLimit)
            found.Add(new MarginCandidate(MarginEvent.Unknown, last.Parameter, who, $"{who} could not be followed further", branch.EndText));
    }

    /// <summary>A rest that is a centre at the present value only: the change lies there.</summary>
    private static MarginCandidate? PassesFromCentre(BranchResult branch, string name)
    {
        FollowedEquilibrium first = branch.Points[0], next = branch.Points[Math.Min(1, branch.Points.Count - 1)];
        if (first.UnstableCount > 0 || first.IsStable || (next.UnstableCount == 0 && !next.IsStable)) return null;
        double frequency = first.Eigenvalues.Max(static value => value.Imaginary);
        if (frequency <= 0) return null;
        return new MarginCandidate(
            MarginEvent.HopfPoint,
            first.Parameter,
            name,
            $"{name} is a centre only at the present value and {(next.IsStable ? "stable" : "unstable")} beyond",
            "eigenvalues on the imaginary axis at the present value and off it at the next point followed",
            frequency);
    }

    private static MarginCandidate Candidate(BranchResult branch, SpecialPoint point, string who)
    {
        bool outward = MovesOutward(branch, point);
        bool losesOnTheWay = point.UnstableCounts.Before == 0;
        // Seen along the branch stability may be lost while, seen from the present value outward, it is gained.
        bool loses = losesOnTheWay == outward;
        string evidence = string.Create(
            CultureInfo.InvariantCulture, $"{point.Evidence} (residual {point.Residual:0.0E-0}, condition {point.Condition:0.0E-0})");
        return point.Kind switch
        {
            SpecialPointKind.Fold => new MarginCandidate(
                MarginEvent.Fold,
                point.Parameter,
                who,
                outward ? $"{who} meets another rest and both disappear (fold)" : "a new stable rest appears (fold)",
                evidence),
            SpecialPointKind.HopfPoint => new MarginCandidate(
                MarginEvent.HopfPoint,
                point.Parameter,
                who,
                $"{who} {(loses ? "loses" : "gains")} stability by oscillation at {AssessmentText.Frequency(branch.Description, point.Frequency!.Value)} (Hopf point)",
                evidence,
                point.Frequency),
            SpecialPointKind.BranchPoint => new MarginCandidate(
                MarginEvent.BranchPoint,
                point.Parameter,
                who,
                $"{who} {(loses ? "loses" : "gains")} stability where another branch of rests crosses (branch point)",
                evidence),
            _ => new MarginCandidate(
                MarginEvent.SurfaceContact,
                point.Parameter,
                who,
                $"{who} {(loses ? "loses" : "gains")} stability at a switching surface",
                evidence),
        };
    }

    /// <summary>Whether the branch moves away from its start value just before a special point.</summary>
    private static bool MovesOutward(BranchResult branch, SpecialPoint point)
    {
        int before = point.AfterPoint;
        while (before > 0 && branch.Points[before].Parameter == point.Parameter) before--;
        return Math.Sign(point.Parameter - branch.Points[before].Parameter) == Math.Sign(branch.To - branch.From);
    }
}
