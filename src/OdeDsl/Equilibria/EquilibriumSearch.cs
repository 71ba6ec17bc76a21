using System.Collections.Immutable;
using OdeDsl.Modeling;

namespace OdeDsl.Equilibria;

/// <summary>
/// Finds equilibria: from many evenly spread starts, in each regime by itself, by damped Newton's method, first plain and then deflated by
/// the roots already known.
/// </summary>
internal sealed class EquilibriumSearch
{
    private const int StartsPerState = 32;
    private const int FewestStarts = 64;
    private const int MostDefaultStarts = 512;

    /// <summary>However many regimes there are, each is searched from at least this many starts.</summary>
    private const int FewestStartsPerRegime = 32;

    /// <summary>The number of new roots that deflation may find from one start.</summary>
    private const int DeflationsPerStart = 8;

    private readonly DynamicSystem system;
    private readonly EquilibriumSearchOptions options;
    private readonly CancellationToken cancellation;
    private readonly SearchRegion region;
    private readonly RootCollection roots;
    private readonly List<double[]> firstStarts = [];
    private int starts;
    private int lastNewStart;

    private EquilibriumSearch(DynamicSystem system, EquilibriumSearchOptions options, CancellationToken cancellation)
    {
        this.system = system;
        this.options = options;
        this.cancellation = cancellation;
        region = SearchRegion.Of(system);
        roots = new RootCollection(region);
    }

    public static EquilibriumSearchResult Run(DynamicSystem system, EquilibriumSearchOptions options, CancellationToken cancellation) =>
        new EquilibriumSearch(system, options, cancellation).Run();

    private EquilibriumSearchResult Run()
    {
        CollectFirstStarts();
        var survey = new RegimeSurvey(system, region, options.Seed);
        bool lockEach = survey.Regimes.Count <= options.MaximumRegimes;
        int problems = lockEach ? survey.Regimes.Count : 1;
        int wanted = options.MinimumStarts > 0
            ? options.MinimumStarts
            : Math.Clamp(StartsPerState * system.StateCount, FewestStarts, MostDefaultStarts);
        int perRegime = Math.Max(FewestStartsPerRegime, wanted / problems);
        if (lockEach)
        {
            foreach (double[] regime in survey.Regimes) Search(new RegimeProblem(system, region, regime), perRegime);
        }
        else
        {
            Search(new RegimeProblem(system, region, null), wanted);
        }

        foreach (SwitchingFace face in survey.Faces) Search(new SurfaceProblem(system, region, face), FewestStartsPerRegime);
        return Result(lockEach ? problems : 0, survey.Faces.Count);
    }

    // The initial state and the given ones, each also carried along the motion towards rest.
    private void CollectFirstStarts()
    {
        var transient = new PseudoTransient(system, region);
        IEnumerable<double[]> given = options.ExtraStarts.Select(static start => start.ToArray()).Prepend(system.InitialState.ToArray());
        foreach (double[] start in given)
        {
            double[] carried = [.. start];
            transient.Advance(carried);
            firstStarts.Add(carried);
            firstStarts.Add(start);
        }
    }

    private void Search(RootProblem problem, int minimum)
    {
        var newton = new DampedNewton(problem, region);
        var nullSpace = new NullSpace(problem);
        var walk = new EquilibriumSetWalk(problem, nullSpace, newton, region);
        var deflation = new Deflation(region);
        var sequence = new LowDiscrepancySequence(system.StateCount, options.Seed);
        var (unit, start, point) = (new double[system.StateCount], new double[problem.Size], new double[problem.Size]);
        int lastNewHere = 0;
        for (int k = 1; (k <= minimum || k <= 2 * lastNewHere) && k <= Math.Max(minimum, options.MaximumStarts); k++)
        {
            cancellation.ThrowIfCancellationRequested();
            starts++;
            if (k <= firstStarts.Count)
            {
                firstStarts[k - 1].CopyTo(start, 0);
            }
            else
            {
                sequence.Point(k - firstStarts.Count, unit);
                region.Spread(unit, start);
            }

            problem.Begin(start);
            start.CopyTo(point, 0);
            bool found = newton.Solve(point) && roots.Land(problem, nullSpace, walk, point, deflation, countLanding: true);
            for (int d = 0; d < DeflationsPerStart && deflation.Count > 0; d++)
            {
                start.CopyTo(point, 0);
                if (!newton.Solve(point, deflation) || !roots.Land(problem, nullSpace, walk, point, deflation, countLanding: false)) break;
                found = true;
            }

            if (!found) continue;
            lastNewHere = k;
            lastNewStart = starts;
        }
    }

    private EquilibriumSearchResult Result(int regimes, int surfaces)
    {
        ImmutableArray<Equilibrium> equilibria = roots.Equilibria();
        int landed = equilibria.Sum(static equilibrium => equilibrium.Landings);
        int once = equilibria.Count(static equilibrium => equilibrium.Landings <= 1);
        return new EquilibriumSearchResult
        {
            Equilibria = equilibria,
            Lower = region.LowerCorner,
            Upper = region.UpperCorner,
            Starts = starts,
            Landed = landed,
            Rejected = roots.Rejected,
            LastNewStart = lastNewStart,
            UnseenShare = landed == 0 ? 1 : Math.Min(1, (double)once / landed),
            RegimesSearched = regimes,
            SurfacesSearched = surfaces,
        };
    }
}
