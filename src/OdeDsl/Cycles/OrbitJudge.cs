using System.Globalization;
using OdeDsl.Equilibria;
using OdeDsl.Integration;
using OdeDsl.Modeling;

namespace OdeDsl.Cycles;

/// <summary>What a closed orbit turned out to be.</summary>
internal enum OrbitVerdict
{
    /// <summary>An equilibrium, or an orbit that could not be followed once round.</summary>
    Nothing,

    /// <summary>A limit cycle.</summary>
    LimitCycle,

    /// <summary>A limit cycle that repels in the direction of time it was sought in: met by accident, not reported.</summary>
    Repelling,

    /// <summary>It closes, but too inaccurately to say more.</summary>
    Untrusted,

    /// <summary>A member of a continuous family.</summary>
    FamilyMember,
}

/// <summary>Turns a closed orbit into a limit cycle, a member of a family, or nothing, with the evidence.</summary>
internal sealed class OrbitJudge(
    DynamicSystem system,
    SearchRegion region,
    OrbitShooter shooter,
    OrbitCollection orbits,
    double tolerance,
    CancellationToken cancellation)
{
    /// <summary>An orbit smaller than this part of the guess's extents is an equilibrium.</summary>
    private const double Collapsed = 0.02;

    /// <summary>Fractions of the period up to this one are tried as the minimal period.</summary>
    private const int LongestMultiple = 100;

    /// <summary>The orbit closes at a fraction of the period if it returns within this part of its extents.</summary>
    private const double FractionCloses = 1e-5;

    /// <summary>The displacements, in parts of the extents, from which neighbours in a family are sought.</summary>
    private static readonly double[] NeighbourDisplacements = [-0.02, 0.02, -0.05, 0.05, -0.005, 0.005];

    /// <summary>A neighbour lies between these multiples of the displacement away from the orbit.</summary>
    private const double NearestNeighbour = 0.3;
    private const double FarthestNeighbour = 3;

    /// <summary>A monodromy matrix that misses the direction of motion by more than this says nothing about stability.</summary>
    private const double UntrustedMultipliers = 1e-2;

    /// <summary>The number of neighbours that must close before a family is claimed; no more are sought.</summary>
    private const int NeighboursNeeded = 2;

    /// <summary>Judges an orbit and adds it to the collection.</summary>
    /// <param name="found">The orbit.</param>
    /// <param name="size">The extents of the motion it was found from.</param>
    /// <returns>What it is and its index among the cycles or families.</returns>
    public (OrbitVerdict Verdict, int Index) Judge(ShotOrbit found, double[] size)
    {
        if (Trace(found) is not OrbitTrace trace || IsCollapsed(found, trace, size)) return (OrbitVerdict.Nothing, -1);
        (ShotOrbit orbit, trace) = Minimal(found, trace);
        var multipliers = new OrbitMultipliers(orbit);
        if (!(multipliers.TrivialError <= UntrustedMultipliers)) return (OrbitVerdict.Untrusted, -1);
        int family = FamilyIndex(orbit, trace, multipliers);
        if (family >= 0) return (OrbitVerdict.FamilyMember, family);
        Stability accidental = orbit.SignedPeriod > 0 ? Stability.Unstable : Stability.Stable;
        if (multipliers.Stability == accidental) return (OrbitVerdict.Repelling, -1);
        return (OrbitVerdict.LimitCycle, orbits.Add(Describe(orbit, trace, multipliers), orbit, trace));
    }

    private static LimitCycle Describe(ShotOrbit orbit, OrbitTrace trace, OrbitMultipliers multipliers) => new()
    {
        Period = Math.Abs(orbit.SignedPeriod),
        State = [.. orbit.State],
        Multipliers = multipliers.All,
        TrivialMultiplierError = multipliers.TrivialError,
        MultiplierMethod = orbit.Slides ? MultiplierMethod.ReturnMapDifferences : MultiplierMethod.VariationalEquations,
        Stability = multipliers.Stability,
        Winding = [.. orbit.ForwardWinding],
        Minimum = trace.Minimum,
        Maximum = trace.Maximum,
        Residual = orbit.Residual,
        Slides = orbit.Slides,
        FoundInReversedTime = orbit.SignedPeriod < 0,
        Orbit = trace.Run,
    };

    private OrbitTrace? Trace(ShotOrbit orbit)
    {
        region.Wrap(orbit.State);
        try
        {
            var options = new SimulationOptions { RelativeTolerance = Math.Max(tolerance, 1e-11), ManyNodes = true };
            Trajectory run = system.WithInitialState(orbit.State).Simulate(orbit.SignedPeriod, options, null, cancellation);
            return new OrbitTrace(run, region);
        }
        catch (IntegrationException)
        {
            return null;
        }
    }

    // Newton's method may slide down to an equilibrium, which closes after any period.
    private static bool IsCollapsed(ShotOrbit orbit, OrbitTrace trace, double[] size)
    {
        for (int i = 0; i < size.Length; i++)
        {
            if (orbit.Winding[i] != 0 || trace.Maximum[i] - trace.Minimum[i] > Collapsed * size[i]) return false;
        }

        return true;
    }

    private (ShotOrbit Orbit, OrbitTrace Trace) Minimal(ShotOrbit orbit, OrbitTrace trace)
    {
        for (int multiple = LongestMultiple; multiple > 1; multiple--)
        {
            double[] state = trace.Run.At(orbit.SignedPeriod / multiple);
            double apart = 0;
            for (int i = 0; i < state.Length; i++)
                apart = Math.Max(apart, Math.Abs(region.Difference(i, state[i], orbit.State[i])) / trace.Scale[i]);
            if (!(apart <= FractionCloses)) continue;
            ShotOrbit? shorter = shooter.Close(orbit.State, orbit.SignedPeriod / multiple, trace.Scale);
            if (shorter is not null && Trace(shorter) is OrbitTrace once) return Minimal(shorter, once);
        }

        return (orbit, trace);
    }

    // Neighbours across the orbit in the direction of the unit multiplier: on a family they close too, beside an isolated orbit they do
    // not.
    private int FamilyIndex(ShotOrbit orbit, OrbitTrace trace, OrbitMultipliers multipliers)
    {
        if (multipliers.UnitDirection() is not (double[] direction, double error)) return -1;
        int known = orbits.FamilyOf(orbit, trace);
        if (known >= 0)
        {
            orbits.AddMember(known, orbit, trace);
            return known;
        }

        var neighbours = new List<(ShotOrbit Orbit, OrbitTrace Trace)>();
        double farthest = 0;
        foreach (double displacement in NeighbourDisplacements)
        {
            if (neighbours.Count == NeighboursNeeded) break;
            double[] guess = [.. orbit.State];
            for (int i = 0; i < guess.Length; i++) guess[i] += displacement * direction[i] * orbit.Scale[i];
            if (shooter.Close(guess, orbit.SignedPeriod, orbit.Scale) is not ShotOrbit neighbour) continue;
            if (!IsNeighbour(neighbour, orbit, trace, displacement) || Trace(neighbour) is not OrbitTrace beside) continue;
            neighbours.Add((neighbour, beside));
            farthest = Math.Max(farthest, Math.Abs(displacement));
        }

        if (neighbours.Count < NeighboursNeeded) return -1;
        string periods = string.Join(
            ", ", neighbours.Select(static beside => Math.Abs(beside.Orbit.SignedPeriod).ToString("g8", CultureInfo.InvariantCulture)));
        string itself = string.Create(
            CultureInfo.InvariantCulture,
            $"The orbit of period {Math.Abs(orbit.SignedPeriod):g8} has a second multiplier within {error:0.0E-0} of 1");
        string others = string.Create(
            CultureInfo.InvariantCulture,
            $"{neighbours.Count} neighbours up to {farthest:P1} of its size away close as well, with periods {periods}");
        string evidence = $"{itself}, and {others}.";
        int family = orbits.AddFamily(orbit, trace, error, evidence);
        orbits.AddMember(family, orbit, trace);
        foreach ((ShotOrbit neighbour, OrbitTrace beside) in neighbours) orbits.AddMember(family, neighbour, beside);
        return family;
    }

    // Displacements are in the guess's scales, distances in the orbit's own.
    private static bool IsNeighbour(ShotOrbit neighbour, ShotOrbit orbit, OrbitTrace trace, double displacement)
    {
        double distance = trace.Distance(neighbour.State) / Math.Abs(displacement);
        double smallest = orbit.Scale.Zip(trace.Scale, static (guess, own) => guess / own).Min();
        double largest = orbit.Scale.Zip(trace.Scale, static (guess, own) => guess / own).Max();
        return neighbour.Winding.AsSpan().SequenceEqual(orbit.Winding)
            && distance >= NearestNeighbour * smallest && distance <= FarthestNeighbour * largest;
    }
}
