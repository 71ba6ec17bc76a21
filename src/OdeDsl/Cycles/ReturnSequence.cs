using OdeDsl.Equilibria;
using OdeDsl.Integration;

namespace OdeDsl.Cycles;

/// <summary>
/// The returns of a run to a local section: the plane through a point of the run across its direction of motion there, near that point
/// only, and modulo whole turns.
/// </summary>
internal sealed class ReturnSequence
{
    /// <summary>The part of the run at its beginning whose extents are not looked at: the transient.</summary>
    private const double Discarded = 0.4;

    /// <summary>Passages further from the section's point than this part of the orbit's extents are other strands.</summary>
    private const double Nearness = 0.3;

    /// <summary>
    /// Closing is tried where the last return misses by less than this part of the orbit; later windows bring slow ones nearer.
    /// </summary>
    private const double WorthClosing = 0.03;

    /// <summary>Returns this good are as good as the long run's tolerance lets them be.</summary>
    private const double Closed = 1e-5;

    /// <summary>A run that moves less than this part of the region does not oscillate visibly.</summary>
    private const double Still = 1e-7;

    /// <summary>Returns may close after this many passages of the section.</summary>
    private const int MaximumLag = 8;

    /// <summary>Intervals of each step, at least, on which a passage is looked for.</summary>
    private const int IntervalsPerStep = 4;

    /// <summary>Bisections that locate a passage to rounding of the time.</summary>
    private const int Bisections = 50;

    /// <summary>A lag is preferred to longer ones if it closes within this factor of the best.</summary>
    private const double LagPreference = 2;

    private readonly Trajectory run;
    private readonly SearchRegion region;
    private readonly double[] centre;
    private readonly double[] normal;
    private readonly double[] scratch;

    private ReturnSequence(Trajectory run, SearchRegion region, double[] scale)
    {
        this.run = run;
        this.region = region;
        Scale = scale;
        scratch = new double[scale.Length];
        (centre, normal) = Section();
        CollectReturns();
        ChooseLag();
    }

    /// <summary>The scale of each state in the later part of the run.</summary>
    public double[] Scale { get; }

    /// <summary>The times of the returns, in the order of the run.</summary>
    public List<double> Times { get; } = [];

    /// <summary>The states at the returns.</summary>
    public List<double[]> States { get; } = [];

    /// <summary>The number of passages after which the run comes closest to repeating itself; 0 if there were too few.</summary>
    public int Lag { get; private set; }

    /// <summary>How far the last return is from the one <see cref="Lag"/> passages earlier, in parts of the extents.</summary>
    public double Displacement { get; private set; } = double.PositiveInfinity;

    /// <summary>
    /// Whether it is worth closing an orbit here: the run nearly repeats itself, and did not do so much better one passage earlier, as
    /// irregular motion does when it leaves an unstable orbit that it met by chance.
    /// </summary>
    public bool NearlyCloses =>
        Displacement <= WorthClosing && (Displacement <= Closed || Displacement <= LagPreference * EarlierDisplacement());

    /// <summary>The time between these two, signed like the run.</summary>
    public double SignedPeriod => Times[^1] - Times[^(1 + Lag)];

    /// <summary>Looks at a run.</summary>
    /// <returns>The returns, or <see langword="null"/> if the run does not move visibly.</returns>
    public static ReturnSequence? Of(Trajectory run, SearchRegion region)
    {
        int nodes = run.Times.Length;
        int first = (int)(Discarded * nodes);
        if (nodes - first < 3) return null;
        int n = run.StateCount;
        var (low, high, scale) = (new double[n], new double[n], new double[n]);
        run.StateAtNode(first).CopyTo(low);
        run.StateAtNode(first).CopyTo(high);
        for (int k = first; k < nodes; k++)
        {
            ReadOnlySpan<double> state = run.StateAtNode(k);
            for (int i = 0; i < n; i++) (low[i], high[i]) = (Math.Min(low[i], state[i]), Math.Max(high[i], state[i]));
        }

        double largest = 0;
        for (int i = 0; i < n; i++)
        {
            scale[i] = OrbitTrace.ScaleOf(region, i, low[i], high[i]);
            largest = Math.Max(largest, (high[i] - low[i]) / region.Width[i]);
        }

        return largest > Still ? new ReturnSequence(run, region, scale) : null;
    }

    // Through the node of median speed in the middle of the later part: neither where the motion creeps nor where it jumps.
    private (double[] Centre, double[] Normal) Section()
    {
        int nodes = run.Times.Length;
        int first = Math.Max(1, (int)(Discarded * nodes));
        int[] candidates = [.. Enumerable.Range(first, Math.Max(1, (nodes - first) / 2)).Where(k => k + 1 < nodes)];
        if (candidates.Length == 0) candidates = [nodes - 2];
        double[] speeds = Array.ConvertAll(candidates, k => Velocity(k).Speed);
        Array.Sort(speeds, candidates);
        int node = candidates[candidates.Length / 2];
        return (run.StateAtNode(node).ToArray(), Velocity(node).Direction);
    }

    // From the dense output, so that motion along a switching surface has a direction too. Scaled.
    private (double[] Direction, double Speed) Velocity(int node)
    {
        const double Part = 0.01; // of the neighbouring steps: short enough for a direction
        double time = run.Times[node];
        double before = time - (Part * (time - run.Times[node - 1])), after = time + (Part * (run.Times[node + 1] - time));
        double[] from = run.At(before), to = run.At(after);
        double square = 0;
        for (int i = 0; i < from.Length; i++)
        {
            from[i] = (to[i] - from[i]) / Scale[i];
            square += from[i] * from[i];
        }

        return (from, Math.Sqrt(square) / Math.Abs(after - before));
    }

    private void CollectReturns()
    {
        ReadOnlySpan<double> nodes = run.Times;
        double before = nodes[0], valueBefore = Value(run.StateAtNode(0));
        for (int k = 1; k < nodes.Length; k++)
        {
            int parts = region.Cuts(run.StateAtNode(k - 1), run.StateAtNode(k), IntervalsPerStep);
            for (int s = 1; s <= parts; s++)
            {
                double time = s == parts ? nodes[k] : nodes[k - 1] + ((nodes[k] - nodes[k - 1]) * s / parts);
                double value = ValueAt(time);
                if (valueBefore < 0 && value >= 0) AddIfNear(before, time);
                (before, valueBefore) = (time, value);
            }
        }
    }

    private void AddIfNear(double low, double high)
    {
        for (int k = 0; k < Bisections && low != high; k++)
        {
            double middle = low + ((high - low) / 2);
            if (ValueAt(middle) < 0) low = middle;
            else high = middle;
        }

        double[] state = run.At(high);
        if (Distance(state, centre) > Nearness) return;
        Times.Add(high);
        States.Add(state);
    }

    private void ChooseLag()
    {
        int longest = Math.Min(MaximumLag, States.Count - 1);
        if (longest < 1) return;
        double[] displacements = [.. Enumerable.Range(1, longest).Select(lag => Distance(States[^1], States[^(1 + lag)]))];
        double best = displacements.Min();
        Lag = 1 + Array.FindIndex(displacements, displacement => displacement <= LagPreference * best);
        Displacement = displacements[Lag - 1];
    }

    private double EarlierDisplacement() =>
        States.Count > Lag + 1 ? Distance(States[^2], States[^(2 + Lag)]) : double.PositiveInfinity;

    private double ValueAt(double time)
    {
        run.StateAt(time, scratch);
        return Value(scratch);
    }

    private double Value(ReadOnlySpan<double> state)
    {
        double value = 0;
        for (int i = 0; i < normal.Length; i++) value += normal[i] * region.Difference(i, state[i], centre[i]) / Scale[i];
        return value;
    }

    private double Distance(ReadOnlySpan<double> a, ReadOnlySpan<double> b)
    {
        double largest = 0;
        for (int i = 0; i < Scale.Length; i++) largest = Math.Max(largest, Math.Abs(region.Difference(i, a[i], b[i])) / Scale[i]);
        return largest;
    }
}
