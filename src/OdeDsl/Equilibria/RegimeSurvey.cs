using OdeDsl.Modeling;

namespace OdeDsl.Equilibria;

/// <summary>
/// Which regimes a region shows and which surfaces part them: low-discrepancy points, and the segments between consecutive ones cut
/// by bisection wherever the regime changes. Small regimes can be missed; the survey is a sample, not a proof.
/// </summary>
internal sealed class RegimeSurvey
{
    /// <summary>The number of sample points. Our choice: a regime filling half a per cent of the region is almost surely met.</summary>
    private const int Samples = 2048;

    /// <summary>The number of crossings located on one segment at most.</summary>
    private const int CrossingsPerSegment = 16;

    /// <summary>The number of faces kept at most.</summary>
    private const int MaximumFaces = 128;

    /// <summary>Bisection down to rounding of the segment's parameter.</summary>
    private const int Bisections = 50;

    private readonly DynamicSystem system;
    private readonly SearchRegion region;
    private readonly List<double[]> regimes = [];
    private readonly List<SwitchingFace> faces = [];
    private readonly double[] point;

    public RegimeSurvey(DynamicSystem system, SearchRegion region, int seed)
    {
        this.system = system;
        this.region = region;
        int n = system.StateCount;
        point = new double[n];
        if (system.SwitchCount == 0)
        {
            regimes.Add([]);
            return;
        }

        var sequence = new LowDiscrepancySequence(n, seed);
        var (from, to, unit) = (system.InitialState.ToArray(), new double[n], new double[n]);
        Note(RegimeAt(from, from, 0));
        for (int k = 1; k <= Samples; k++)
        {
            sequence.Point(k, unit);
            region.Spread(unit, to);
            Walk(from, to);
            (from, to) = (to, from);
        }
    }

    /// <summary>The regimes met.</summary>
    public IReadOnlyList<double[]> Regimes => regimes;

    /// <summary>The faces met across which the rates jump.</summary>
    public IReadOnlyList<SwitchingFace> Faces => faces;

    private void Walk(double[] from, double[] to)
    {
        double[] last = RegimeAt(from, to, 1);
        Note(last);
        double done = 0;
        double[] here = RegimeAt(from, to, 0);
        for (int k = 0; k < CrossingsPerSegment && !here.AsSpan().SequenceEqual(last); k++)
        {
            double low = done, high = 1;
            double[] beyond = last;
            for (int i = 0; i < Bisections; i++)
            {
                double middle = low + ((high - low) / 2);
                double[] there = RegimeAt(from, to, middle);
                if (there.AsSpan().SequenceEqual(here)) low = middle;
                else (high, beyond) = (middle, there);
            }

            Note(beyond);
            NoteFace(from, to, high, here, beyond);
            (done, here) = (high, beyond);
        }
    }

    private double[] RegimeAt(double[] from, double[] to, double fraction)
    {
        for (int i = 0; i < point.Length; i++) point[i] = from[i] + (fraction * (to[i] - from[i]));
        var regime = new double[system.SwitchCount];
        system.Regime(0, point, regime);
        return regime;
    }

    private void Note(double[] regime)
    {
        if (!regimes.Exists(known => known.AsSpan().SequenceEqual(regime))) regimes.Add(regime);
    }

    private void NoteFace(double[] from, double[] to, double fraction, double[] before, double[] after)
    {
        if (faces.Count >= MaximumFaces || MakeFace(before, after) is not SwitchingFace face || faces.Exists(face.SameAs)) return;
        for (int i = 0; i < point.Length; i++) point[i] = from[i] + (fraction * (to[i] - from[i]));
        if (face.RatesJump(system, region, point)) faces.Add(face);
    }

    private SwitchingFace? MakeFace(double[] before, double[] after)
    {
        int k = 0;
        while (before[k] == after[k]) k++;
        SwitchKind kind = system.Description.Switches[k].Kind;
        bool wholeNumber = kind == SwitchKind.WholeNumber;
        if (wholeNumber && Math.Abs(before[k] - after[k]) != 1) return null;
        double level = wholeNumber ? Math.Max(before[k], after[k]) : 0;
        bool oneIsBelow = kind is SwitchKind.Below or SwitchKind.NotAbove;
        bool beforeIsBelow = before[k] < after[k] != oneIsBelow;
        return beforeIsBelow ? new SwitchingFace(k, level, before, after) : new SwitchingFace(k, level, after, before);
    }
}
