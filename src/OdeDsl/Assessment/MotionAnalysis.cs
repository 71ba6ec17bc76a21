using System.Collections.Immutable;
using System.Globalization;
using OdeDsl.Cycles;
using OdeDsl.Ensembles;
using OdeDsl.Equilibria;
using OdeDsl.Integration;
using OdeDsl.Modeling;

namespace OdeDsl.Assessment;

/// <summary>Says what the model does from its own state and from sampled starts.</summary>
internal sealed class MotionAnalysis(
    DynamicSystem system, EquilibriumSearchResult rests, AssessmentOptions options, CancellationToken cancellation)
{
    // Sampled runs that do not settle are examined by exponents, but not all of them.
    private const int MostExamined = 2;

    // Tangents that separate by less than this power of e over the whole run may do so without being irregular: linear and quadratic
    // growth, as between the turns of a conservative system, stay below it in any run of practicable length.
    private const double LeastSeparation = 20;

    // Intervals of orthonormalisation in a batch: a run of tens of thousands of steps then has a few steps in each.
    private const int IntervalsPerBatch = 500;

    // More states than this: only the largest exponent, whose cost grows with the number of states and not with its square.
    private const int MostForSpectrum = 4;

    private readonly ModelDescription description = system.Description;

    public MotionsAnswer Run()
    {
        ImmutableArray<ImmutableArray<double>> starts = Starts();
        LimitCycleSearchResult search = system.FindLimitCycles(
            new LimitCycleSearchOptions
            {
                Equilibria = rests.Equilibria,
                ExtraStarts = starts,
                MaximumStepsPerRun = options.MaximumStepsPerRun,
                Seed = options.Seed,
            },
            cancellation);
        SearchRun working = search.Runs[0];
        SearchRun[] sampled = [.. search.Runs.Skip(1).Take(starts.Length)];
        (LyapunovResult? exponents, int examined, int irregular) = Examine([working, .. sampled]);
        bool allIrregular = examined > 0 && irregular == examined;
        return new MotionsAnswer
        {
            Working = Verdict(working, search, exponents, allIrregular),
            Outcomes = Outcomes(sampled, search, allIrregular),
            Cycles = search.Cycles,
            Families = search.Families,
            Exponents = exponents,
            SampledStarts = sampled.Length,
            Completeness = search.Text + Examined(sampled, examined, irregular),
        };
    }

    /// <summary>Starts spread evenly over the state bounds.</summary>
    private ImmutableArray<ImmutableArray<double>> Starts()
    {
        SearchRegion region = SearchRegion.Of(system);
        var sequence = new LowDiscrepancySequence(region.Count, options.Seed);
        double[] unit = new double[region.Count], state = new double[region.Count];
        var starts = ImmutableArray.CreateBuilder<ImmutableArray<double>>(options.SampledStarts);
        for (int k = 1; k <= options.SampledStarts; k++)
        {
            sequence.Point(k, unit);
            region.Spread(unit, state);
            starts.Add([.. state]);
        }

        return starts.MoveToImmutable();
    }

    /// <summary>Lyapunov exponents of the first runs that did not settle; the last one examined is returned.</summary>
    private (LyapunovResult? Exponents, int Examined, int Irregular) Examine(IEnumerable<SearchRun> runs)
    {
        LyapunovResult? first = null;
        int examined = 0, irregular = 0;
        // In the plane a bounded motion that is not at rest tends to a cycle or a chain of saddles (Poincaré 1881, Bendixson 1901).
        if (system.StateCount < 3) return (null, 0, 0);
        foreach (SearchRun run in runs.Where(static run => run.Outcome == RunOutcome.Unsettled).Take(MostExamined))
        {
            if (Exponents(run) is not { } exponents) continue;
            first ??= exponents;
            examined++;
            if (IsIrregular(exponents)) irregular++;
        }

        return (first, examined, irregular);
    }

    private LyapunovResult? Exponents(SearchRun run)
    {
        var setting = new LyapunovOptions
        {
            Count = system.StateCount <= MostForSpectrum ? 0 : 1,
            Transient = 0,
            Duration = run.Duration,
            Interval = run.Duration / ((double)options.ExponentBatches * IntervalsPerBatch),
            Batches = options.ExponentBatches,
            RelativeTolerance = 1e-8,
        };
        try
        {
            LyapunovResult result = system.WithInitialState(run.End.AsSpan()).LyapunovExponents(setting, cancellation);
            return double.IsFinite(result.Largest.Value) ? result : null;
        }
        catch (IntegrationException)
        {
            return null;
        }
    }

    private static bool IsIrregular(LyapunovResult exponents) =>
        exponents.Largest.IsPositive && exponents.Largest.Value * exponents.Duration >= LeastSeparation;

    private MotionVerdict Verdict(SearchRun run, LimitCycleSearchResult search, LyapunovResult? exponents, bool allIrregular)
    {
        (MotionKind kind, int? index, string label) = Classify(run, search, allIrregular);
        var evidence = new List<string> { Sentence(run.Text) };
        string text = "From its own state the model " + Describe(kind, index, search);
        if (kind == MotionKind.Settles && index is { } rest) evidence.Add(RestEvidence(rest));
        if (kind is MotionKind.Oscillates or MotionKind.Rotates) evidence.Add(CycleEvidence(search.Cycles[index!.Value]));
        if (kind == MotionKind.ClosedOrbits) evidence.Add(Sentence(search.Families[index!.Value].Evidence));
        LyapunovExponent? largest = run.Outcome == RunOutcome.Unsettled ? exponents?.Largest : null;
        if (largest is { } value)
        {
            evidence.Add(string.Create(
                CultureInfo.InvariantCulture,
                $"The largest Lyapunov exponent over {AssessmentText.Time(description, exponents!.Duration)} is {value.Value:G4} ± {value.Uncertainty:G2} per unit of time (95 %)."));
        }
        else if (kind == MotionKind.Undecided && system.StateCount < 3)
        {
            evidence.Add("With two states the motion cannot be irregular: it is a slow transient, or nears a chain of saddles.");
        }

        return new MotionVerdict
        {
            Kind = kind, Index = index, Label = label, Text = text, Evidence = evidence, Exponent = largest, Duration = run.Duration,
        };
    }

    private static (MotionKind Kind, int? Index, string Label) Classify(SearchRun run, LimitCycleSearchResult search, bool allIrregular)
    {
        switch (run.Outcome)
        {
            case RunOutcome.Rest:
                return run.Index >= 0 ? (MotionKind.Settles, run.Index, AttractorNames.Rest(run.Index)) : (MotionKind.Settles, null, "rest outside the list");
            case RunOutcome.LimitCycle:
                MotionKind kind = search.Cycles[run.Index].Rotates ? MotionKind.Rotates : MotionKind.Oscillates;
                return (kind, run.Index, AttractorNames.Cycle(run.Index));
            case RunOutcome.ClosedOrbit:
                return (MotionKind.ClosedOrbits, run.Index, AttractorNames.Family(run.Index));
            case RunOutcome.Runaway:
                return (MotionKind.RunsAway, null, "runs away");
            case RunOutcome.Failed:
                return (MotionKind.Fails, null, "fails");
            default:
                return allIrregular ? (MotionKind.Irregular, null, "irregular") : (MotionKind.Undecided, null, "undecided");
        }
    }

    private string Describe(MotionKind kind, int? index, LimitCycleSearchResult search) => kind switch
    {
        MotionKind.Settles when index is { } rest =>
            $"settles at {AttractorNames.Rest(rest)} ({AssessmentText.State(description, rests.Equilibria[rest].State)}).",
        MotionKind.Settles => "comes to rest at a place that is not in the list of rests.",
        MotionKind.Oscillates or MotionKind.Rotates =>
            $"{(kind == MotionKind.Rotates ? "rotates" : "oscillates")} on {AttractorNames.Cycle(index!.Value)} with the period {AssessmentText.Time(description, search.Cycles[index.Value].Period)}.",
        MotionKind.ClosedOrbits =>
            $"moves on one of a continuous family of closed orbits ({AttractorNames.Family(index!.Value)}); its swing depends on the start, and there is no limit cycle.",
        MotionKind.Irregular => "stays bounded and moves irregularly: neighbouring motions separate exponentially.",
        MotionKind.RunsAway => "runs away.",
        MotionKind.Fails => "cannot be integrated on.",
        _ => "neither settles nor closes nor runs away within the allowed work; what it does in the long run is undecided.",
    };

    private string RestEvidence(int index)
    {
        Equilibrium rest = rests.Equilibria[index];
        string slowest = rest.Modes.Length > 0 && double.IsFinite(rest.Modes[0].TimeConstant)
            ? $", slowest time constant {AssessmentText.Time(description, rest.Modes[0].TimeConstant)}"
            : "";
        return string.Create(
            CultureInfo.InvariantCulture,
            $"{AttractorNames.Rest(index)} is a {rest.Stability.ToString().ToLowerInvariant()} {rest.Kind.ToString().ToLowerInvariant()}{slowest}, residual {rest.Residual:0.0E-0}.");
    }

    private static string CycleEvidence(LimitCycle cycle)
    {
        string largest = cycle.TransverseMultipliers.Length > 0
            ? string.Create(CultureInfo.InvariantCulture, $"largest multiplier of modulus {cycle.TransverseMultipliers[0].Magnitude:G4}")
            : "no multiplier but the trivial one";
        return string.Create(
            CultureInfo.InvariantCulture,
            $"Closed to {cycle.Residual:0.0E-0} of its extent; {largest}, the trivial one off by {cycle.TrivialMultiplierError:0.0E-0}.");
    }

    private static Outcome[] Outcomes(SearchRun[] sampled, LimitCycleSearchResult search, bool allIrregular) =>
    [
        .. sampled.Select(run => (Run: run, Class: Classify(run, search, allIrregular)))
            .GroupBy(static item => item.Class)
            .Select(group =>
            {
                int count = group.Count();
                (double lower, double upper) = WilsonInterval.Of(count, sampled.Length);
                return new Outcome
                {
                    Kind = group.Key.Kind,
                    Index = group.Key.Index,
                    Label = group.Key.Label,
                    Starts = count,
                    Share = (double)count / sampled.Length,
                    ShareLower = lower,
                    ShareUpper = upper,
                    ExampleStart = group.First().Run.Start,
                };
            })
            .OrderByDescending(static outcome => outcome.Starts)
            .ThenBy(static outcome => outcome.Label, StringComparer.Ordinal),
    ];

    private static string Examined(SearchRun[] sampled, int examined, int irregular)
    {
        int unsettled = sampled.Count(static run => run.Outcome == RunOutcome.Unsettled);
        return examined == 0
            ? ""
            : string.Create(
                CultureInfo.InvariantCulture,
                $" Of {unsettled} sampled runs that stayed bounded without settling and the model's own, {examined} were examined by Lyapunov exponents and {irregular} found irregular.");
    }

    private static string Sentence(string text)
    {
        string trimmed = text.Trim();
        if (trimmed.Length == 0) return trimmed;
        string capital = char.ToUpperInvariant(trimmed[0]) + trimmed[1..];
        return capital.EndsWith('.') ? capital : capital + ".";
    }
}
