using System.Collections.Immutable;

namespace OdeDsl.Equilibria;

/// <summary>The roots a search has met, told apart, with the number of starts that ended on each.</summary>
internal sealed class RootCollection(SearchRegion region)
{
    /// <summary>Regular roots closer than this, relative to their local size, are one.</summary>
    private const double SameRegular = 1e-8;

    /// <summary>Multiple roots are found with √ or ∛ of the accuracy of regular ones only.</summary>
    private const double SameDegenerate = 1e-4;

    /// <summary>A member of a continuum this close to a walked line, in widths, belongs to it: chords of the walk are that exact.</summary>
    private const double OnLine = 0.01;

    private readonly List<Root> roots = [];
    private readonly List<double[]> rejected = [];

    /// <summary>The number of landings on roots that are no rests inside the bounds.</summary>
    public int Rejected { get; private set; }

    /// <summary>Takes a root; the deflation learns isolated roots that it did not know.</summary>
    /// <returns>Whether a new equilibrium was found.</returns>
    public bool Land(
        RootProblem problem, NullSpace nullSpace, EquilibriumSetWalk walk, double[] point, Deflation deflation, bool countLanding)
    {
        Span<double> state = point.AsSpan(0, region.Count);
        region.Wrap(state);
        region.Tidy(state);
        if (!problem.Accepts(point))
        {
            if (countLanding) Rejected++;
            if (IsKnownRejected(state)) return false;
            rejected.Add(state.ToArray());
            deflation.Add(state);
            return false;
        }

        double[][] nullDirections = nullSpace.Directions(point);
        if (Find(state, nullDirections.Length > 0) is Root known)
        {
            if (countLanding) known.Landings++;
            if (known.Set is null && known.Deflations.Add(deflation)) deflation.Add(known.State);
            return false;
        }

        EquilibriumSet? set = nullDirections.Length > 0 ? walk.SetThrough(point, nullDirections) : null;
        int nullity = set?.Dimension ?? (nullSpace.IsMultiple(point, nullDirections) ? nullDirections.Length : 0);
        var root = new Root(state.ToArray(), nullity > 0, set, problem.Describe(point, nullity, set));
        if (countLanding) root.Landings++;
        if (set is null && root.Deflations.Add(deflation)) deflation.Add(root.State);
        roots.Add(root);
        return true;
    }

    /// <summary>The distinct equilibria in ascending order of their states; isolated ones on a continuum are part of it.</summary>
    public ImmutableArray<Equilibrium> Equilibria()
    {
        List<Root> sets = roots.FindAll(static root => root.Set is not null);
        IEnumerable<Root> kept = roots.Where(root => root.Set is not null || !sets.Exists(set => IsEnd(set.Set!, root.State)));
        return
        [
            .. kept.OrderBy(static root => root.State, StateOrder.Instance)
                .Select(static root => root.Equilibrium with { Landings = root.Landings }),
        ];
    }

    private Root? Find(ReadOnlySpan<double> state, bool degenerate)
    {
        foreach (Root root in roots)
        {
            if (root.Set is EquilibriumSet set && degenerate && IsOn(set, state)) return root;
            double tolerance = root.IsDegenerate && degenerate ? SameDegenerate : SameRegular;
            if (region.LocalDistance(root.State, state) <= tolerance) return root;
        }

        return null;
    }

    private bool IsKnownRejected(ReadOnlySpan<double> state)
    {
        foreach (double[] root in rejected)
        {
            if (region.LocalDistance(root, state) <= SameRegular) return true;
        }

        return false;
    }

    // Members of a set of two or more dimensions are not told apart: it stands for all of them.
    private bool IsOn(EquilibriumSet set, ReadOnlySpan<double> state)
    {
        if (set.Dimension > 1) return true;
        for (int k = 1; k < set.Points.Length; k++)
        {
            if (region.DistanceToSegment(state, set.Points[k - 1].AsSpan(), set.Points[k].AsSpan(), region.Width) <= OnLine) return true;
        }

        return false;
    }

    private bool IsEnd(EquilibriumSet set, double[] state)
    {
        return set.Points.Any(point => region.LocalDistance(point.AsSpan(), state) <= SameDegenerate);
    }

    private sealed class Root(double[] state, bool isDegenerate, EquilibriumSet? set, Equilibrium equilibrium)
    {
        public double[] State { get; } = state;

        public bool IsDegenerate { get; } = isDegenerate;

        public EquilibriumSet? Set { get; } = set;

        public Equilibrium Equilibrium { get; } = equilibrium;

        public int Landings { get; set; }

        /// <summary>The deflations that know this root.</summary>
        public HashSet<Deflation> Deflations { get; } = [];
    }

    private sealed class StateOrder : IComparer<double[]>
    {
        public static readonly StateOrder Instance = new();

        public int Compare(double[]? x, double[]? y) => x.AsSpan().SequenceCompareTo(y);
    }
}
