using System.Collections.Immutable;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;

namespace OdeDsl.Cycles;

/// <summary>The closed orbits a search has met, told apart.</summary>
internal sealed class OrbitCollection(DynamicSystem system, SearchRegion region, ImmutableArray<Equilibrium> equilibria)
{
    /// <summary>Periods that differ by less than this part are equal.</summary>
    private const double SamePeriod = 1e-5;

    /// <summary>Orbits closer than this part of their extents are one.</summary>
    private const double SameOrbit = 1e-3;

    /// <summary>A run this close to a cycle that attracts it has reached it.</summary>
    private const double Reached = 1e-3;

    /// <summary>Members of a family that are kept.</summary>
    private const int MembersKept = 12;

    private readonly List<FoundCycle> cycles = [];
    private readonly List<Family> families = [];

    /// <summary>The limit cycles with where they lie.</summary>
    public IReadOnlyList<FoundCycle> Cycles => cycles;

    /// <summary>The families found.</summary>
    public ImmutableArray<OrbitFamily> Families => [.. families.Select(static family => family.ToResult())];

    /// <summary>Takes a limit cycle.</summary>
    /// <returns>Its index among those found.</returns>
    public int Add(LimitCycle cycle, ShotOrbit orbit, OrbitTrace trace)
    {
        int known = cycles.FindIndex(other => IsSame(other.Cycle, other.Trace, cycle, trace));
        if (known >= 0) return known;
        cycles.Add(new FoundCycle(cycle, orbit, trace));
        return cycles.Count - 1;
    }

    /// <summary>
    /// Moves orbits whose multipliers decide nothing into the families they belong to: found before a family was known, or too near its
    /// edge to have neighbours that close.
    /// </summary>
    /// <returns>For each cycle its new index, or -1 - (index of the family) if it moved.</returns>
    public int[] Settle()
    {
        var moved = new int[cycles.Count];
        var kept = new List<FoundCycle>();
        for (int k = 0; k < cycles.Count; k++)
        {
            FoundCycle found = cycles[k];
            int family = found.Cycle.Stability == Stability.Undecided ? FamilyOf(found.Orbit, found.Trace) : -1;
            moved[k] = family >= 0 ? -1 - family : kept.Count;
            if (family >= 0) AddMember(family, found.Orbit, found.Trace);
            else kept.Add(found);
        }

        cycles.Clear();
        cycles.AddRange(kept);
        return moved;
    }

    /// <summary>The cycle a state is on, among those that attract in a direction of time; -1 if none.</summary>
    public int CycleReachedBy(ReadOnlySpan<double> state, bool backwards)
    {
        Stability attracting = backwards ? Stability.Unstable : Stability.Stable;
        for (int k = 0; k < cycles.Count; k++)
        {
            if (cycles[k].Cycle.Stability == attracting && cycles[k].Trace.Distance(state) <= Reached) return k;
        }

        return -1;
    }

    /// <summary>The family an orbit belongs to: equal turns and, in the plane, the same equilibria inside; -1 if it is a new one.</summary>
    public int FamilyOf(ShotOrbit orbit, OrbitTrace trace)
    {
        ImmutableArray<int> enclosed = Enclosed(orbit, trace);
        return families.FindIndex(family => family.Matches(orbit.ForwardWinding, enclosed));
    }

    /// <summary>Begins a family.</summary>
    /// <returns>Its index.</returns>
    public int AddFamily(ShotOrbit orbit, OrbitTrace trace, double secondMultiplierError, string evidence)
    {
        families.Add(new Family(orbit.ForwardWinding, Enclosed(orbit, trace), secondMultiplierError, evidence));
        return families.Count - 1;
    }

    /// <summary>Notes a member of a family.</summary>
    public void AddMember(int family, ShotOrbit orbit, OrbitTrace trace)
    {
        List<ClosedOrbit> members = families[family].Members;
        bool known = members.Exists(member => trace.Distance(member.State.AsSpan()) <= SameOrbit);
        if (known || members.Count >= MembersKept) return;
        members.Add(new ClosedOrbit(
            Math.Abs(orbit.SignedPeriod), [.. orbit.State], trace.Minimum, trace.Maximum, orbit.Residual));
    }

    private static bool IsSame(LimitCycle a, OrbitTrace traceA, LimitCycle b, OrbitTrace traceB) =>
        Math.Abs(a.Period - b.Period) <= SamePeriod * Math.Max(a.Period, b.Period)
        && a.Winding.AsSpan().SequenceEqual(b.Winding.AsSpan())
        && traceA.Distance(b.State.AsSpan()) <= SameOrbit
        && traceB.Distance(a.State.AsSpan()) <= SameOrbit;

    // In the plane a closed orbit without turns goes round some equilibria; neighbours in a family go round the same ones.
    private ImmutableArray<int> Enclosed(ShotOrbit orbit, OrbitTrace trace)
    {
        if (system.StateCount != 2 || Array.Exists(orbit.Winding, static turns => turns != 0)) return [];
        var enclosed = new List<int>();
        for (int k = 0; k < equilibria.Length; k++)
        {
            double[] point = [.. equilibria[k].State];
            for (int i = 0; i < 2; i++) point[i] = trace.Points[0][i] - region.Difference(i, trace.Points[0][i], point[i]);
            if (IsInside(trace.Points, point)) enclosed.Add(k);
        }

        return [.. enclosed];
    }

    // Even-odd rule: a ray to the right crosses the polygon an odd number of times.
    private static bool IsInside(IReadOnlyList<double[]> polygon, double[] point)
    {
        bool inside = false;
        for (int k = 1; k < polygon.Count; k++)
        {
            (double[] a, double[] b) = (polygon[k - 1], polygon[k]);
            if (a[1] > point[1] == b[1] > point[1]) continue;
            double crossing = a[0] + ((point[1] - a[1]) / (b[1] - a[1]) * (b[0] - a[0]));
            if (crossing > point[0]) inside = !inside;
        }

        return inside;
    }

    private sealed class Family(int[] winding, ImmutableArray<int> enclosed, double secondMultiplierError, string evidence)
    {
        public List<ClosedOrbit> Members { get; } = [];

        public bool Matches(int[] otherWinding, ImmutableArray<int> otherEnclosed) =>
            winding.AsSpan().SequenceEqual(otherWinding) && enclosed.AsSpan().SequenceEqual(otherEnclosed.AsSpan());

        public OrbitFamily ToResult() => new()
        {
            Members = [.. Members.OrderBy(static member => member.Period)],
            Winding = [.. winding],
            SecondMultiplierError = secondMultiplierError,
            Evidence = evidence,
        };
    }
}
