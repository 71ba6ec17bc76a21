using OdeDsl.Modeling;
using OdeDsl.Workbench.Figures;

namespace OdeDsl.Workbench.Portraits;

/// <summary>The switching surfaces of a planar model at which its rates jump. Surfaces with a mere kink are left out.</summary>
internal sealed class JumpSurfaces(DynamicSystem system)
{
    // Rates that differ by less than this share of their size across a surface meet there.
    private const double JumpShare = 1e-6;

    public IReadOnlyList<IReadOnlyList<PlanePoint>> Lines(Axis x, Axis y)
    {
        List<IReadOnlyList<PlanePoint>> lines = [];
        for (int k = 0; k < system.SwitchCount; k++)
        {
            SwitchDescription surface = system.Description.Switches[k];
            if (!surface.DependsOnState || surface.Kind == SwitchKind.WholeNumber) continue;
            int index = k;
            foreach (IReadOnlyList<PlanePoint> line in Contours.Trace((a, b) => Value(index, a, b), x, y)) lines.AddRange(JumpingParts(index, line));
        }

        return lines;
    }

    private double Value(int index, double x, double y)
    {
        double[] regime = new double[system.SwitchCount], values = new double[system.SwitchCount];
        system.Regime(0, [x, y], regime);
        system.SwitchingFunctions(0, [x, y], regime, values);
        return values[index];
    }

    private IEnumerable<IReadOnlyList<PlanePoint>> JumpingParts(int index, IReadOnlyList<PlanePoint> line)
    {
        List<PlanePoint> part = [];
        foreach (PlanePoint point in line)
        {
            if (Jumps(index, point))
            {
                part.Add(point);
                continue;
            }

            if (part.Count > 1) yield return part;
            part = [];
        }

        if (part.Count > 1) yield return part;
    }

    private bool Jumps(int index, PlanePoint point)
    {
        double[] state = [point.X, point.Y], regime = new double[system.SwitchCount], one = new double[2], other = new double[2];
        system.Regime(0, state, regime);
        regime[index] = 0;
        system.Rates(0, state, regime, one);
        regime[index] = 1;
        system.Rates(0, state, regime, other);
        return Enumerable.Range(0, 2).Any(i => !(Math.Abs(one[i] - other[i]) <= JumpShare * Math.Max(Math.Abs(one[i]), Math.Abs(other[i]))));
    }
}
