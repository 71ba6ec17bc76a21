using System.Globalization;
using OdeDsl.Assessment;
using OdeDsl.Cycles;
using OdeDsl.Ensembles;
using OdeDsl.Modeling;
using OdeDsl.Workbench.Figures;
using OdeDsl.Workbench.Wording;

namespace OdeDsl.Workbench.Report;

/// <summary>Whether the model keeps moving: cycles, families, irregular motion, where sampled starts end.</summary>
internal static class MotionsPart
{
    public static void Write(Markup markup, ModelAssessment assessment)
    {
        MotionsAnswer motions = assessment.Motions;
        markup.Element("h3", "Whether it keeps moving").Line();
        if (motions.Cycles.Count > 0) Cycles(markup, assessment);
        if (motions.Families.Count > 0) Families(markup, assessment);
        if (motions.Exponents is { } exponents) Exponents(markup, exponents, assessment.Description.TimeUnit);
        if (motions.Outcomes.Count > 0) Outcomes(markup, motions);
        Page.Paragraphs(markup, [.. motions.Working.Evidence, motions.Completeness], "small quiet");
    }

    private static void Cycles(Markup markup, ModelAssessment assessment)
    {
        ModelDescription description = assessment.Description;
        Page.Table(
            markup,
            "Limit cycles, with the range of each state over a period",
            ["Cycle", "Kind", "#" + UnitText.Labelled("Period", description.TimeUnit), .. description.States.Select(static state => "#" + UnitText.Labelled(state.Name, state.Unit)), "#Largest multiplier", "#Closes to"],
            assessment.Motions.Cycles.Select((cycle, i) => (IReadOnlyList<string>)
            [
                Words.Cycle(i),
                Words.Kind(cycle),
                NumberText.Format(cycle.Period, 6),
                .. description.States.Select((state, k) => Range(cycle, state, k)),
                LargestMultiplier(cycle),
                NumberText.Format(cycle.Residual, 2),
            ]));
    }

    private static string Range(LimitCycle cycle, StateDescription state, int index)
    {
        bool turns = state.AnglePeriod is not null && cycle.Winding[index] != 0;
        if (turns) return Words.Count(Math.Abs(cycle.Winding[index]), "turn") + (cycle.Winding[index] < 0 ? " backwards" : "");
        (double minimum, double maximum) = NumberText.WithoutNoise(cycle.Minimum[index], cycle.Maximum[index]);
        return $"{NumberText.Format(minimum)} … {NumberText.Format(maximum)}";
    }

    private static string LargestMultiplier(LimitCycle cycle) =>
        cycle.TransverseMultipliers.IsEmpty ? "–" : NumberText.Format(cycle.TransverseMultipliers.Max(static multiplier => multiplier.Magnitude), 3);

    private static void Families(Markup markup, ModelAssessment assessment)
    {
        ModelDescription description = assessment.Description;
        for (int i = 0; i < assessment.Motions.Families.Count; i++)
        {
            OrbitFamily family = assessment.Motions.Families[i];
            Page.Table(
                markup,
                $"{Words.Family(i)}: closed orbits that a disturbance exchanges for one another; no limit cycle",
                ["#" + UnitText.Labelled("Period", description.TimeUnit), .. description.States.Select(static state => "#" + UnitText.Labelled(state.Name, state.Unit)), "#Closes to"],
                family.Members.Select(member => (IReadOnlyList<string>)
                [
                    NumberText.Format(member.Period, 6),
                    .. member.Minimum.Zip(member.Maximum, static (low, high) => $"{NumberText.Format(low)} … {NumberText.Format(high)}"),
                    NumberText.Format(member.Residual, 2),
                ]));
            Page.Paragraphs(markup, [family.Evidence], "small quiet");
        }
    }

    private static void Exponents(Markup markup, LyapunovResult exponents, string timeUnit) => Page.Table(
        markup,
        $"Lyapunov exponents over {NumberText.With(exponents.Duration, timeUnit)}, largest first; half-widths of 95 % confidence intervals. "
        + $"Their sum is {NumberText.Format(exponents.Sum)}, the mean divergence of the rates {NumberText.Format(exponents.MeanDivergence)}.",
        ["Exponent", "#" + UnitText.Labelled("Value", UnitText.Reciprocal(timeUnit)), "#" + UnitText.Labelled("±", UnitText.Reciprocal(timeUnit))],
        exponents.Exponents.Select(static (exponent, i) => (IReadOnlyList<string>)
        [
            (i + 1).ToString(CultureInfo.InvariantCulture), NumberText.Format(exponent.Value), NumberText.Format(exponent.Uncertainty, 2),
        ]));

    private static void Outcomes(Markup markup, MotionsAnswer motions) => Page.Table(
        markup,
        $"Where {motions.SampledStarts} starts spread over the state bounds end",
        ["End", "What it does", "#Starts", "#Share", "#95 % interval"],
        motions.Outcomes.Select(static outcome => (IReadOnlyList<string>)
        [
            outcome.Label,
            Words.Of(outcome.Kind),
            outcome.Starts.ToString(CultureInfo.InvariantCulture),
            Percent(outcome.Share),
            $"{Percent(outcome.ShareLower)} … {Percent(outcome.ShareUpper)}",
        ]));

    private static string Percent(double share) => (100 * share).ToString("0.#", CultureInfo.InvariantCulture) + "\u00A0%";
}
