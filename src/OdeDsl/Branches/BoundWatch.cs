using System.Globalization;
using OdeDsl.Modeling;

namespace OdeDsl.Branches;

/// <summary>Notices where a step leaves the parameter range or the state bounds.</summary>
internal sealed class BoundWatch
{
    // A variable may pass its bound by this scaled length unnoticed: rests that lie on a bound, such as an extinct species, are rounding apart from it.
    private const double Slack = 1e-9;

    private readonly EquilibriumCurve curve;
    private readonly SpecialPointLocator locator;
    private readonly List<Bound> bounds = [];

    public BoundWatch(
        EquilibriumCurve curve, SpecialPointLocator locator, ModelDescription description, int parameter, double from, double to, bool states)
    {
        this.curve = curve;
        this.locator = locator;
        int n = description.States.Length;
        int direction = Math.Sign(to - from);
        ParameterDescription moved = description.Parameters[parameter];
        bounds.Add(new Bound(n, to, direction, 0, BranchEnd.TargetReached, Text(moved.Name, moved.Unit, "reached the value asked for,", to)));
        bounds.Add(new Bound(
            n, from, -direction, 0, BranchEnd.StartValueReached, Text(moved.Name, moved.Unit, "came back to the value it started from,", from)));
        if (!states) return;
        for (int i = 0; i < n; i++)
        {
            StateDescription state = description.States[i];
            if (state.AnglePeriod is not null) continue;
            if (double.IsFinite(state.Lower))
                bounds.Add(new Bound(i, state.Lower, -1, Slack, BranchEnd.StateBoundReached, Text(state.Name, state.Unit, "reached its lower bound,", state.Lower)));
            if (double.IsFinite(state.Upper))
                bounds.Add(new Bound(i, state.Upper, 1, Slack, BranchEnd.StateBoundReached, Text(state.Name, state.Unit, "reached its upper bound,", state.Upper)));
        }
    }

    private sealed record Bound(int Variable, double Limit, int Direction, double Slack, BranchEnd End, string Text);

    /// <summary>The first bound a step passes, or <see langword="null"/>.</summary>
    public BranchStop? FirstPassed(CurvePoint from, CurvePoint to)
    {
        BranchStop? first = null;
        foreach (Bound bound in bounds)
        {
            double limit = bound.Limit / curve.Scales[bound.Variable];
            double before = bound.Direction * (from.Position[bound.Variable] - limit);
            double after = bound.Direction * (to.Position[bound.Variable] - limit);
            if (after <= bound.Slack || before > after) continue;
            if (StopAt(bound, limit, from, to) is { } stop && (first is null || stop.Along < first.Along)) first = stop;
        }

        return first;
    }

    private BranchStop? StopAt(Bound bound, double limit, CurvePoint from, CurvePoint to)
    {
        int variable = bound.Variable;
        double start = from.Position[variable] - limit;
        double end = to.Position[variable] - limit;
        double share = start * end < 0 ? start / (start - end) : 0;
        double[] predicted = new double[from.Position.Length];
        for (int i = 0; i < predicted.Length; i++)
            predicted[i] = from.Position[i] + share * (to.Position[i] - from.Position[i]);
        predicted[variable] = limit;
        double[] axis = new double[predicted.Length];
        axis[variable] = 1;
        double length = Distance(from, to);
        CurvePoint? point = curve.Correct(predicted, axis, from.Tangent);
        if (point is null || Math.Abs(Along(from, point)) > 2 * length)
            point = locator.Root(from, Along(from, to), start, end, other => other.Position[variable] - limit)?.Point;
        return point is null ? null : new BranchStop(Along(from, point), point, variable == point.Position.Length - 1 ? bound.Limit : null, bound.End, bound.Text, []);
    }

    private static double Along(CurvePoint from, CurvePoint to)
    {
        double along = 0;
        for (int i = 0; i < from.Position.Length; i++) along += from.Tangent[i] * (to.Position[i] - from.Position[i]);
        return along;
    }

    private static double Distance(CurvePoint from, CurvePoint to)
    {
        double sum = 0;
        for (int i = 0; i < from.Position.Length; i++) sum += Math.Pow(to.Position[i] - from.Position[i], 2);
        return Math.Sqrt(sum);
    }

    private static string Text(string name, string unit, string what, double value) =>
        string.Create(CultureInfo.InvariantCulture, $"{name} {what} {value:G6} {unit}").TrimEnd() + ".";
}
