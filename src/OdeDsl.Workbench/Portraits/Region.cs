using OdeDsl.Assessment;
using OdeDsl.Modeling;
using OdeDsl.Workbench.Figures;

namespace OdeDsl.Workbench.Portraits;

/// <summary>The part of the state space that figures show, an axis for each state.</summary>
internal static class Region
{
    private const double Margin = 0.05;
    private const double Negligible = 1e-6;

    /// <summary>
    /// The state bounds, widened to hold every rest and cycle found; where a bound is missing, the extent of what was found and of the
    /// model's own motion. Angles show one period.
    /// </summary>
    /// <param name="assessment">What was found.</param>
    /// <param name="motion">The model's own motion.</param>
    public static Axis[] Of(ModelAssessment assessment, IReadOnlyList<double[]> motion) =>
        [.. assessment.Description.States.Select((state, i) => AxisOf(state, i, assessment, motion))];

    private static Axis AxisOf(StateDescription state, int index, ModelAssessment assessment, IReadOnlyList<double[]> motion)
    {
        if (state.AnglePeriod is { } period)
        {
            bool boundsAreATurn = Math.Abs(state.Upper - state.Lower - period) <= 1e-9 * period;
            double from = boundsAreATurn ? state.Lower : -period / 2;
            return new Axis { Name = state.Name, Unit = state.Unit, Lower = from, Upper = from + period, Period = period };
        }

        List<double> found =
        [
            .. assessment.Rests.Equilibria.Select(rest => rest.State[index]),
            .. assessment.Motions.Cycles.SelectMany(cycle => new[] { cycle.Minimum[index], cycle.Maximum[index] }),
            assessment.InitialState[index],
        ];
        if (!double.IsFinite(state.Lower) || !double.IsFinite(state.Upper)) found.AddRange(motion.Select(point => point[index]));
        found.RemoveAll(static value => !double.IsFinite(value));
        double lower = Math.Min(double.IsFinite(state.Lower) ? state.Lower : double.PositiveInfinity, found.Min());
        double upper = Math.Max(double.IsFinite(state.Upper) ? state.Upper : double.NegativeInfinity, found.Max());
        double slack = lower == upper ? Math.Max(1, Math.Abs(lower)) : Margin * (upper - lower);
        // What lies outside by rounding only does not widen.
        bool isLowerKept = double.IsFinite(state.Lower) && lower >= state.Lower - Negligible * slack && lower != upper;
        bool isUpperKept = double.IsFinite(state.Upper) && upper <= state.Upper + Negligible * slack && lower != upper;
        return new Axis
        {
            Name = state.Name,
            Unit = state.Unit,
            Lower = isLowerKept ? state.Lower : lower - slack,
            Upper = isUpperKept ? state.Upper : upper + slack,
        };
    }
}
