using System.Collections.Immutable;
using OdeDsl.Equilibria;
using OdeDsl.Integration;

namespace OdeDsl.Cycles;

/// <summary>A closed orbit followed once round: where it lies, and the extrema of its states.</summary>
internal sealed class OrbitTrace
{
    /// <summary>Samples of each integration step at least.</summary>
    private const int SamplesPerStep = 8;

    /// <summary>Bounds of a state's scale where the orbit hardly moves in it: parts of its value and of the region.</summary>
    private const double ValuePart = 1e-3;
    private const double RegionPart = 1e-6;

    private readonly SearchRegion region;
    private readonly double[][] samples;

    public OrbitTrace(Trajectory run, SearchRegion region)
    {
        this.region = region;
        Run = run;
        samples = Samples(run, region);
        int n = run.StateCount;
        var (minimum, maximum) = (new double[n], new double[n]);
        Scale = new double[n];
        for (int i = 0; i < n; i++)
        {
            Series series = run[run.System.Description.States[i].Name];
            (minimum[i], maximum[i]) = (series.Minimum.Value, series.Maximum.Value);
            Scale[i] = ScaleOf(region, i, minimum[i], maximum[i]);
        }

        (Minimum, Maximum) = ([.. minimum], [.. maximum]);
    }

    public Trajectory Run { get; }

    public ImmutableArray<double> Minimum { get; }

    public ImmutableArray<double> Maximum { get; }

    /// <summary>The scale of each state on this orbit.</summary>
    public double[] Scale { get; }

    /// <summary>The states along the orbit, angles unrolled.</summary>
    public IReadOnlyList<double[]> Points => samples;

    /// <summary>The scale of a state that moves between two values: its extent, at most a period, at least a trace of its size.</summary>
    public static double ScaleOf(SearchRegion region, int i, double low, double high)
    {
        double extent = region.Periods[i] > 0 ? Math.Min(high - low, region.Periods[i]) : high - low;
        double size = region.Periods[i] > 0 ? 0 : ValuePart * Math.Max(Math.Abs(low), Math.Abs(high));
        return Math.Max(extent, Math.Max(size, RegionPart * region.Width[i]));
    }

    /// <summary>The distance of a state from the orbit, in the orbit's scales.</summary>
    public double Distance(ReadOnlySpan<double> state)
    {
        double smallest = double.PositiveInfinity;
        for (int k = 1; k < samples.Length; k++)
            smallest = Math.Min(smallest, region.DistanceToSegment(state, samples[k - 1], samples[k], Scale));
        return smallest;
    }

    private static double[][] Samples(Trajectory run, SearchRegion region)
    {
        ReadOnlySpan<double> nodes = run.Times;
        var states = new List<double[]> { run.At(nodes[0]) };
        for (int k = 1; k < nodes.Length; k++)
        {
            double step = nodes[k] - nodes[k - 1];
            int parts = region.Cuts(run.StateAtNode(k - 1), run.StateAtNode(k), SamplesPerStep);
            for (int s = 1; s < parts; s++) states.Add(run.At(nodes[k - 1] + (step * s / parts)));
            states.Add(run.At(nodes[k]));
        }

        return [.. states];
    }
}
