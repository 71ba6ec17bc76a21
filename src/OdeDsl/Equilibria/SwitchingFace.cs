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
    public bool SameAs(SwitchingFace other) =>
        Switch == other.Switch && Level == other.Level
        && Below.AsSpan().SequenceEqual(other.Below) && Above.AsSpan().SequenceEqual(other.Above);
}
