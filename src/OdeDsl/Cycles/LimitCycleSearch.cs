using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;

namespace OdeDsl.Cycles;

/// <summary>Finds limit cycles from long runs, forward and, in the plane, backwards.</summary>
internal sealed class LimitCycleSearch
{
    private const string CannotOscillate =
        "A single state that is no angle cannot oscillate: its rate would have to have both signs at one value.";

    private readonly DynamicSystem system;
    private readonly LimitCycleSearchOptions options;
    private readonly CancellationToken cancellation;
    private readonly SearchRegion region;
    private readonly ImmutableArray<Equilibrium> equilibria;
    private readonly OrbitCollection orbits;
    private readonly LongRun longRun;
    private readonly List<SearchRun> runs = [];

    private LimitCycleSearch(DynamicSystem system, LimitCycleSearchOptions options, CancellationToken cancellation)
    {
        this.system = system;
        this.options = options;
        this.cancellation = cancellation;
        region = SearchRegion.Of(system);
        equilibria = options.Equilibria
            ?? system.FindEquilibria(new EquilibriumSearchOptions { Seed = options.Seed }, cancellation).Equilibria;
        orbits = new OrbitCollection(system, region, equilibria);
        var shooter = new OrbitShooter(system, region, options.ClosingTolerance, cancellation);
        var judge = new OrbitJudge(system, region, shooter, orbits, options.ClosingTolerance, cancellation);
        var rests = new RestWatch(system, region, equilibria);
        longRun = new LongRun(system, region, orbits, judge, shooter, rests, options.MaximumStepsPerRun, cancellation);
    }

    public static LimitCycleSearchResult Run(DynamicSystem system, LimitCycleSearchOptions options, CancellationToken cancellation) =>
        new LimitCycleSearch(system, options, cancellation).Run();

    private LimitCycleSearchResult Run()
    {
        bool canOscillate = system.StateCount > 1 || region.Periods[0] > 0;
        Forward();
        if (canOscillate && options.ReverseTime && system.StateCount == 2) Backwards();
        Settle();
        return new LimitCycleSearchResult
        {
            Cycles = [.. orbits.Cycles.Select(static found => found.Cycle)],
            Families = orbits.Families,
            Equilibria = equilibria,
            Runs = [.. runs],
            Text = canOscillate ? Text() : CannotOscillate,
        };
    }

    private void Forward()
    {
        Follow(system.InitialState.ToArray(), 1);
        foreach (ImmutableArray<double> start in options.ExtraStarts) Follow([.. start], 1);
        foreach (double[] start in CycleStarts.BesideEquilibria(region, equilibria, 1)) Follow(start, 1);
        foreach (double[] start in CycleStarts.Spread(region, options.SpreadStarts, options.Seed)) Follow(start, 1);
    }

    // What repels forward attracts backwards; in the plane nothing else is needed to find unstable cycles.
    private void Backwards()
    {
        foreach (double[] start in CycleStarts.BesideEquilibria(region, equilibria, -1)) Follow(start, -1);
        foreach (double[] start in CycleStarts.BesideCycles(system, [.. orbits.Cycles])) Follow(start, -1);
        foreach (double[] start in CycleStarts.Spread(region, options.SpreadStarts, options.Seed)) Follow(start, -1);
    }

    // Orbits that turned out to belong to families take their runs with them.
    private void Settle()
    {
        int[] moved = orbits.Settle();
        for (int k = 0; k < runs.Count; k++)
        {
            SearchRun run = runs[k];
            if (run.Outcome != RunOutcome.LimitCycle) continue;
            int index = moved[run.Index];
            runs[k] = index >= 0
                ? run with { Index = index, Text = LongRun.OnCycle(index) }
                : run with { Outcome = RunOutcome.ClosedOrbit, Index = -1 - index, Text = LongRun.OnFamily(-1 - index) };
        }
    }

    private void Follow(double[] start, int direction)
    {
        cancellation.ThrowIfCancellationRequested();
        runs.Add(longRun.Follow(start, direction));
    }

    private string Text()
    {
        var text = new StringBuilder();
        text.Append(CultureInfo.InvariantCulture, $"{Outcomes("long runs", runs.Where(static run => !run.IsReversed))}. ");
        if (runs.Exists(static run => run.IsReversed))
            text.Append(CultureInfo.InvariantCulture, $"{Outcomes("runs in reversed time", runs.Where(static run => run.IsReversed))}. ");
        int stable = orbits.Cycles.Count(static found => found.Cycle.IsStable);
        if (orbits.Cycles.Count == 0) text.Append("No limit cycle was found. ");
        else text.Append(CultureInfo.InvariantCulture, $"Limit cycles found: {orbits.Cycles.Count}, of them stable: {stable}. ");
        foreach (OrbitFamily family in orbits.Families)
            text.Append("Closed orbits form a continuous family, no limit cycle: ").Append(family.Evidence).Append(' ');
        text.Append("Cycles that none of these runs approaches may exist all the same");
        return text.Append(system.StateCount > 2 ? ", unstable ones above all." : ".").ToString();
    }

    private static string Outcomes(string what, IEnumerable<SearchRun> some)
    {
        IEnumerable<string> counts = some.GroupBy(static run => run.Outcome).OrderBy(static group => group.Key).Select(Count);
        return string.Create(CultureInfo.InvariantCulture, $"{some.Count()} {what}: {string.Join(", ", counts)}");
    }

    private static string Count(IGrouping<RunOutcome, SearchRun> group)
    {
        string what = group.Key switch
        {
            RunOutcome.Rest => "came to rest",
            RunOutcome.LimitCycle => "closed on a limit cycle",
            RunOutcome.ClosedOrbit => "closed on an orbit of a family",
            RunOutcome.Runaway => "ran away",
            RunOutcome.Unsettled => "did not settle",
            _ => "failed",
        };
        return string.Create(CultureInfo.InvariantCulture, $"{group.Count()} {what}");
    }
}
