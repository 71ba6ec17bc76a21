using OdeDsl.Modeling;

namespace OdeDsl.Equilibria;

/// <summary>
/// A piece of a switching surface between two regimes: switching function <paramref name="Switch"/> takes the value
/// <paramref name="Level"/> there (0 for relations, a whole number for rounding functions).
/// </summary>
/// <param name="Switch">The index of the first switching function that changes side.</param>
/// <param name="Level">Its value on the surface.</param>
/// <param name="Below">The regime where the function is below the level.</param>
/// <param name="Above">The regime where the function is above the level; other switches with the same surface change too.</param>
internal sealed record SwitchingFace(int Switch, double Level, double[] Below, double[] Above)
{
    /// <summary>Rates that differ by less than this part of their change over the region are continuous: a kink, not a jump.</summary>
    private const double Continuous = 1e-7;

    /// <summary>Whether the rates at a point on the surface differ between the two sides.</summary>
    public bool RatesJump(DynamicSystem system, SearchRegion region, ReadOnlySpan<double> state)
    {
        int n = system.StateCount;
        var (below, above, jacobian) = (new double[n], new double[n], new double[n * n]);
        system.Rates(0, state, Below, below);
        system.Rates(0, state, Above, above);
        system.StateJacobian(0, state, Below, jacobian);
        for (int i = 0; i < n; i++)
        {
            double size = Math.Max(Math.Abs(below[i]), Math.Abs(above[i]));
            for (int j = 0; j < n; j++) size = Math.Max(size, Math.Abs(jacobian[(i * n) + j]) * region.Width[j]);
            if (Math.Abs(above[i] - below[i]) > Continuous * size) return true;
        }

        return false;
    }

    public bool SameAs(SwitchingFace other) =>
        Switch == other.Switch && Level == other.Level
        && Below.AsSpan().SequenceEqual(other.Below) && Above.AsSpan().SequenceEqual(other.Above);
}
