using System.Globalization;
using OdeDsl.Modeling;

namespace OdeDsl.Branches;

/// <summary>Notices where a step passes a switching surface, beyond which the rates follow another formula.</summary>
internal sealed class SurfaceWatch(EquilibriumCurve curve, SpecialPointLocator locator, ModelDescription description)
{
    // Nearer to a surface than this, in scaled variables, the side is rounding: an equilibrium that stays on a surface keeps its regime.
    private const double OnSurface = 1e-9;

    /// <summary>The first surface a step passes, or <see langword="null"/>.</summary>
    public BranchStop? FirstPassed(CurvePoint from, CurvePoint to, double length)
    {
        if (curve.Regime.Length == 0) return null;
        double[] beyond = RegimeOf(to);
        BranchStop? first = null;
        for (int k = 0; k < beyond.Length; k++)
        {
            if (beyond[k] == curve.Regime[k] || Distance(to, k, beyond[k]) <= OnSurface) continue;
            if (Contact(from, to, length, k, beyond) is { } contact && (first is null || contact.Along < first.Along)) first = contact;
        }

        return first;
    }

    /// <summary>The value of one switching function above its surface's level, within the locked regime.</summary>
    public double Value(ReadOnlySpan<double> position, int index, double entryBeyond)
    {
        double[] values = new double[curve.Regime.Length];
        curve.SystemAt(position).SwitchingFunctions(0, curve.StateOf(position), curve.Regime, values);
        return values[index] - Level(index, entryBeyond);
    }

    private BranchStop? Contact(CurvePoint from, CurvePoint to, double length, int index, double[] beyond)
    {
        double entry = beyond[index];
        double start = Value(from.Position, index, entry);
        double end = Value(to.Position, index, entry);
        double along = 0;
        CurvePoint point = from;
        if (start * end < 0)
        {
            if (locator.Root(from, length, start, end, trial => Value(trial.Position, index, entry)) is not { } root) return null;
            (along, point) = root;
        }

        // A surface may belong to several switching functions: all that vanish here and differ beyond change together.
        var switches = new List<(int, double)>();
        for (int k = 0; k < beyond.Length; k++)
        {
            if (beyond[k] != curve.Regime[k] && (k == index || Distance(point, k, beyond[k]) <= OnSurface)) switches.Add((k, beyond[k]));
        }

        string text = string.Create(
            CultureInfo.InvariantCulture, $"The equilibrium reached the switching surface of \"{description.Switches[index].Text}\".");
        return new BranchStop(along, point, null, BranchEnd.SurfaceReached, text, switches);
    }

    private double[] RegimeOf(CurvePoint point)
    {
        double[] regime = new double[curve.Regime.Length];
        curve.SystemAt(point.Position).Regime(0, curve.StateOf(point.Position), regime);
        return regime;
    }

    /// <summary>The distance from a surface to first order, in scaled states.</summary>
    private double Distance(CurvePoint point, int index, double entryBeyond)
    {
        double[] gradients = new double[curve.Regime.Length * (point.Position.Length - 1)];
        int n = point.Position.Length - 1;
        curve.SystemAt(point.Position).SwitchingJacobian(0, curve.StateOf(point.Position), curve.Regime, gradients);
        double slope = 0;
        for (int i = 0; i < n; i++) slope += Math.Abs(gradients[index * n + i]) * curve.Scales[i];
        double value = Math.Abs(Value(point.Position, index, entryBeyond));
        return slope > 0 ? value / slope : value;
    }

    /// <summary>A relation's surface is g = 0; a whole-number entry changes where g passes the larger of the two entries.</summary>
    private double Level(int index, double entryBeyond) =>
        description.Switches[index].Kind == SwitchKind.WholeNumber
            ? (entryBeyond > curve.Regime[index] ? curve.Regime[index] + 1 : curve.Regime[index])
            : 0;
}
