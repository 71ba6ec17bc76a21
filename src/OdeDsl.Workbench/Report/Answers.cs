using OdeDsl.Assessment;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;
using OdeDsl.Workbench.Wording;

namespace OdeDsl.Workbench.Report;

/// <summary>One of the four answers in words.</summary>
/// <param name="Question">The question.</param>
/// <param name="Short">The answer in a few words.</param>
/// <param name="Full">The answer as a sentence.</param>
internal sealed record Answer(string Question, string Short, string Full);

/// <summary>The four answers of an assessment in words, for summaries on page and console.</summary>
internal static class Answers
{
    // A rest found to rounding of double numbers misses zero by about this share of the state's range.
    private const double RoundingShare = 1e-13;

    public static IReadOnlyList<Answer> Of(ModelAssessment assessment) =>
        [Rests(assessment.Rests), Motion(assessment.Motions, assessment.Description.TimeUnit), Margin(assessment.Margins), Method(assessment.Method)];

    private static Answer Rests(EquilibriumSearchResult rests)
    {
        string kinds = string.Join(", ", rests.Equilibria.GroupBy(Words.Kind).Select(static group => group.Count() == 1 ? group.Key : $"{group.Count()} × {group.Key}"));
        string full = rests.Equilibria.Length == 0 ? "No rest was found in the state bounds." : $"{Words.Count(rests.Equilibria.Length, "rest")} found: {kinds}.";
        return new Answer("Where it rests", rests.Equilibria.Length == 0 ? "none found" : kinds, full);
    }

    private static Answer Motion(MotionsAnswer motions, string timeUnit)
    {
        MotionVerdict verdict = motions.Working;
        string goal = verdict.Index is null ? "" : $" ({verdict.Label})";
        string period = verdict.Kind is MotionKind.Oscillates or MotionKind.Rotates && verdict.Index is { } index
            ? $", period {NumberText.With(motions.Cycles[index].Period, timeUnit)}"
            : "";
        return new Answer("Whether it keeps moving", Words.Of(verdict.Kind) + goal + period, verdict.Text);
    }

    private static Answer Margin(MarginsAnswer margins)
    {
        if (margins.Narrowest is not { } narrowest)
            return new Answer("How far from a change", "none found in the explored ranges", "No change of the attractors was found in the explored range of any parameter.");
        MarginEdge nearest = narrowest.Nearest;
        string place = $"{narrowest.Parameter.Name} {Percent(nearest)} ({NumberText.With(nearest.Value ?? double.NaN, narrowest.Parameter.Unit)})";
        return new Answer("How far from a change", $"{place}: {Words.Of(nearest.Event)}", nearest.Text);
    }

    private static Answer Method(MethodAnswer method) => new("Which method computes it", Words.Recommendation(method), method.Reason);

    /// <summary>The distance in per cent, signed, or a dash if there is none.</summary>
    public static string Percent(MarginEdge edge) =>
        edge.Percent is { } percent ? $"{(percent > 0 ? "+" : "")}{NumberText.Format(percent, 3)}\u00A0%" : "–";

    /// <summary>A coordinate of a rest, with zero for what is no more than rounding beside the state's range.</summary>
    public static double WithoutRounding(double value, StateDescription state)
    {
        double range = state.Upper - state.Lower;
        return Math.Abs(value) <= RoundingShare * (double.IsFinite(range) ? range : 1) ? 0 : value;
    }
}
