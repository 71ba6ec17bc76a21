using System.Globalization;
using OdeDsl.Cycles;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;

namespace OdeDsl.Assessment;

/// <summary>Finds for each parameter the nearest values, down and up, at which the set of attractors changes.</summary>
internal sealed class MarginSearch(
    DynamicSystem system, EquilibriumSearchResult rests, IReadOnlyList<LimitCycle> cycles, AssessmentOptions options, CancellationToken cancellation)
{
    // A cycle that is born or dies at a rest's Hopf point or fold cannot be followed quite that far; within this share of the distance
    // the two are one event, and the rest's value is the exact one.
    private const double SameEvent = 0.02;

    // One special point reached along two branches differs by rounding only.
    private const double SameValue = 1e-6;

    private readonly RestMargins restMargins = new(system, rests.Equilibria, cancellation);
    private readonly CycleMargins cycleMargins = new(system, cycles, options.CycleSteps, cancellation);
    private readonly ModelDescription description = system.Description;

    /// <summary>Finds them all.</summary>
    /// <param name="report">Receives the share done and the parameter's name.</param>
    public MarginsAnswer Run(Action<double, string> report)
    {
        var margins = new List<ParameterMargin>();
        for (int i = 0; i < system.ParameterCount; i++)
        {
            if (description.Parameters[i].IsFixed) continue;
            report((double)i / system.ParameterCount, description.Parameters[i].Name);
            double value = system.Parameters[i];
            ParameterRange range = ParameterRange.Of(description.Parameters[i], value, options.RangeFactor);
            margins.Add(new ParameterMargin
            {
                ParameterIndex = i,
                Parameter = description.Parameters[i],
                Value = value,
                Down = Edge(i, value, range.Lower),
                Up = Edge(i, value, range.Upper),
            });
        }

        return new MarginsAnswer
        {
            Parameters = [.. margins.OrderBy(static margin => margin.NearestPercent)],
            Completeness = Completeness(),
        };
    }

    private MarginEdge Edge(int parameter, double value, double end)
    {
        cancellation.ThrowIfCancellationRequested();
        if (end == value) return Unchanged(parameter, value, end);
        MarginCandidate[] ofRests = [.. restMargins.Between(parameter, value, end)];
        MarginCandidate? rest = Nearest(ofRests, value);
        MarginCandidate[] ofCycles = [.. cycleMargins.Between(parameter, value, rest?.Value ?? end)];
        MarginCandidate? cycle = Nearest(ofCycles, value);
        bool sameEvent = rest is not null && cycle is not null
            && Math.Abs(rest.Value - cycle.Value) <= SameEvent * Math.Abs(rest.Value - value);
        MarginCandidate? nearest = cycle is null || sameEvent ? rest : cycle;
        MarginCandidate? unknown = ofRests.Concat(ofCycles)
            .Where(candidate => candidate.Event == MarginEvent.Unknown
                && (nearest is null || Math.Abs(candidate.Value - value) < Math.Abs(nearest.Value - value)))
            .MinBy(candidate => Math.Abs(candidate.Value - value));
        if (nearest is null) return unknown is null ? Unchanged(parameter, value, end) : Found(parameter, value, end, unknown, null);
        return Found(parameter, value, end, nearest, unknown);
    }

    /// <summary>The nearest known change; where several rests met the same one, from the rest that has a name.</summary>
    private static MarginCandidate? Nearest(IEnumerable<MarginCandidate> candidates, double value)
    {
        MarginCandidate[] known =
        [
            .. candidates.Where(static candidate => candidate.Event != MarginEvent.Unknown)
                .OrderBy(static candidate => candidate.Attractor == AttractorNames.OtherRest),
        ];
        if (known.Length == 0) return null;
        double distance = known.Min(candidate => Math.Abs(candidate.Value - value));
        return known.First(candidate => Math.Abs(candidate.Value - value) <= (1 + SameValue) * distance);
    }

    private MarginEdge Unchanged(int parameter, double value, double end)
    {
        ParameterDescription item = description.Parameters[parameter];
        string text = end == value
            ? $"{item.Name} is at its bound, {AssessmentText.Quantity(value, item.Unit)}."
            : $"No change found from {AssessmentText.Quantity(value, item.Unit)} {(end < value ? "down" : "up")} to {AssessmentText.Quantity(end, item.Unit)}.";
        return new MarginEdge { Event = MarginEvent.None, ExploredTo = end, Text = text, Evidence = "" };
    }

    private MarginEdge Found(int parameter, double value, double end, MarginCandidate candidate, MarginCandidate? unknown)
    {
        ParameterDescription item = description.Parameters[parameter];
        double distance = candidate.Value - value;
        double? percent = distance == 0 ? 0 : value == 0 ? null : 100 * distance / Math.Abs(value);
        string at = string.Create(
            CultureInfo.InvariantCulture,
            $"{item.Name} {(end < value ? "down" : "up")} to {AssessmentText.Quantity(candidate.Value, item.Unit, "G6")}{(percent is { } share ? $" ({share:+0.##;-0.##;0} %)" : "")}");
        string evidence = candidate.Evidence;
        if (unknown is not null)
            evidence += string.Create(CultureInfo.InvariantCulture, $"; {unknown.Text} beyond {unknown.Value:G6}, so a nearer change is not excluded");
        return new MarginEdge
        {
            Event = candidate.Event,
            Value = candidate.Value,
            Distance = distance,
            Percent = percent,
            ExploredTo = candidate.Event == MarginEvent.Unknown ? candidate.Value : end,
            Attractor = candidate.Attractor,
            Frequency = candidate.Frequency,
            Uncertainty = candidate.Uncertainty,
            Text = $"{at}: {candidate.Text}.",
            Evidence = evidence,
        };
    }

    private string Completeness()
    {
        int stable = cycles.Count(static cycle => cycle.IsStable);
        int followed = rests.Equilibria.Count(static rest => !rest.IsSliding && rest.Set is null);
        var text = string.Create(
            CultureInfo.InvariantCulture,
            $"Followed one parameter at a time: {followed} rests, past folds, and {stable} stable limit cycles. An unbounded parameter is explored by the factor {options.RangeFactor:G3}. Attractors that appear away from these, and changes that need two parameters, are not seen.");
        int left = rests.Equilibria.Length - followed;
        return left == 0
            ? text
            : text + string.Create(CultureInfo.InvariantCulture, $" {left} rests that slide on a surface or form a continuum were not followed.");
    }
}
