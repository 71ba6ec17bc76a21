using System.Collections.Immutable;

namespace OdeDsl.Cycles;

/// <summary>One member of a family of closed orbits.</summary>
/// <param name="Period">The minimal period, in the model's time unit.</param>
/// <param name="State">A state on the orbit.</param>
/// <param name="Minimum">The smallest value of each state over the period.</param>
/// <param name="Maximum">The largest value of each state over the period.</param>
/// <param name="Residual">How far the end of one period misses its start, relative to the size of the orbit in each state.</param>
public sealed record ClosedOrbit(
    double Period,
    ImmutableArray<double> State,
    ImmutableArray<double> Minimum,
    ImmutableArray<double> Maximum,
    double Residual);
