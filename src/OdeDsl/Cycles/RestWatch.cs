using System.Collections.Immutable;
using System.Globalization;
using OdeDsl.Equilibria;
using OdeDsl.Integration;
using OdeDsl.Modeling;

namespace OdeDsl.Cycles;

/// <summary>Recognises runs that have come to rest, or are bound to.</summary>
internal sealed class RestWatch(DynamicSystem system, SearchRegion region, ImmutableArray<Equilibrium> equilibria)
{
    /// <summary>A state this close to an attracting equilibrium, in widths, and approaching it, settles there.</summary>
    private const double Near = 1e-3;

    /// <summary>Motion over half a window below this part of the region is rest.</summary>
    private const double Still = 1e-9;

    /// <summary>Approaching means that half a window shrinks the distance to at most this part.</summary>
    private const double Shrinking = 0.9;

    /// <summary>How closely the decay from turn to turn must agree with the eigenvalue for the linear theory to be trusted.</summary>
    private const double RateAgreement = 0.05;

    /// <summary>The linear theory is trusted within this part of the region only.</summary>
    private const double LinearReach = 0.2;

    /// <summary>Decay over turns is judged from at least this many.</summary>
    private const int FewestTurns = 5;

    /// <summary>Says where a run rests, if it does.</summary>
    /// <param name="run">The run; it may go backwards.</param>
    /// <returns>The index of the equilibrium (-1: none of the known ones) and the sentence; <see langword="null"/> if it does not
    /// rest.</returns>
    public (int Index, string Text)? Rests(Trajectory run)
    {
        ReadOnlySpan<double> end = run.StateAtNode(run.Times.Length - 1);
        ReadOnlySpan<double> middle = run.StateAtNode(run.Times.Length / 2);
        for (int k = 0; k < equilibria.Length; k++)
        {
            if (Repels(equilibria[k], run.EndTime < run.StartTime)) continue;
            double distance = DistanceTo(equilibria[k], end);
            if (distance <= Near && distance <= Math.Max(Still, Shrinking * DistanceTo(equilibria[k], middle)))
                return (k, Invariant($"settles at equilibrium {k + 1}."));
        }

        return IsStill(run, region, Still) ? Unlisted(end) : null;
    }

    /// <summary>
    /// Whether a run stays within a part of the region around its end. All of the later half counts: a cycle that meets surfaces has steps that
    /// end at the very same places turn after turn.
    /// </summary>
    public static bool IsStill(Trajectory run, SearchRegion region, double still)
    {
        ReadOnlySpan<double> end = run.StateAtNode(run.Times.Length - 1);
        for (int node = run.Times.Length / 2; node < run.Times.Length; node++)
        {
            if (!(region.Distance(end, run.StateAtNode(node)) <= still)) return false;
        }

        return true;
    }

    /// <summary>
    /// Recognises a slow spiral: every turn brings the state closer to a stable focus by the factor that the focus's eigenvalue predicts.
    /// </summary>
    public (int Index, string Text)? SpiralsIn(ReturnSequence returns)
    {
        if (returns.States.Count <= FewestTurns * returns.Lag || returns.Lag == 0) return null;
        for (int k = 0; k < equilibria.Length; k++)
        {
            Equilibrium focus = equilibria[k];
            if (focus.Kind != EquilibriumKind.Focus || !focus.IsStable || focus.IsSliding) continue;
            double last = region.Distance(focus.State.AsSpan(), returns.States[^1]);
            double first = region.Distance(focus.State.AsSpan(), returns.States[0]);
            if (!(last <= LinearReach && first <= LinearReach)) continue;
            double seen = Math.Log(first / last) / Math.Abs(returns.Times[^1] - returns.Times[0]);
            double predicted = -focus.Eigenvalues[0].Real;
            if (!(Math.Abs(seen - predicted) <= RateAgreement * predicted)) continue;
            string rates = Invariant($"its swings shrink at the rate {seen:g3}, as its eigenvalue predicts ({predicted:g3})");
            return (k, Invariant($"spirals towards equilibrium {k + 1}: {rates}; not followed to the end."));
        }

        return null;
    }

    // Whether some disturbance grows in the direction of time of the run.
    private static bool Repels(Equilibrium equilibrium, bool backwards) => backwards
        ? equilibrium.Stability == Stability.Stable || equilibrium.UnstableCount < equilibrium.Eigenvalues.Length
        : equilibrium.Stability == Stability.Unstable;

    // Held still although nothing attracts there as far as is known.
    private (int Index, string Text) Unlisted(ReadOnlySpan<double> end)
    {
        for (int k = 0; k < equilibria.Length; k++)
        {
            if (DistanceTo(equilibria[k], end) <= Near)
                return (k, Invariant($"stays at equilibrium {k + 1}, which repels other motions: this one started where it is attracted."));
        }

        double[] refined = end.ToArray();
        bool vanishes = EquilibriumAnalysis.TryRefine(system, refined, out _) && region.Distance(refined, end) <= Near;
        return (-1, vanishes ? "settles at an equilibrium that the search had not found." : "stays at a state held by switching surfaces.");
    }

    private double DistanceTo(Equilibrium equilibrium, ReadOnlySpan<double> state)
    {
        if (equilibrium.Set is not EquilibriumSet { Dimension: 1 } set) return region.Distance(equilibrium.State.AsSpan(), state);
        double smallest = double.PositiveInfinity;
        for (int k = 1; k < set.Points.Length; k++)
        {
            ReadOnlySpan<double> from = set.Points[k - 1].AsSpan(), to = set.Points[k].AsSpan();
            smallest = Math.Min(smallest, region.DistanceToSegment(state, from, to, region.Width));
        }

        return smallest;
    }

    private static string Invariant(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);
}
