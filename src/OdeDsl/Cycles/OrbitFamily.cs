using System.Collections.Immutable;

namespace OdeDsl.Cycles;

/// <summary>
/// A continuous family of closed orbits, as around a centre or with a conserved quantity: no limit cycle, because a disturbance leads
/// to a neighbouring orbit instead of dying out or growing.
/// </summary>
public sealed record OrbitFamily
{
    /// <summary>Members found, by ascending period: the one the run met and neighbours that were closed as evidence.</summary>
    public required ImmutableArray<ClosedOrbit> Members { get; init; }

    /// <summary>For each state the whole turns every member makes in one period; 0 for states that are not angles.</summary>
    public required ImmutableArray<int> Winding { get; init; }

    /// <summary>How far the second multiplier is from 1.</summary>
    public required double SecondMultiplierError { get; init; }

    /// <summary>The evidence in one sentence.</summary>
    public required string Evidence { get; init; }
}
