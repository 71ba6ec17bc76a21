using MathNet.Numerics.Distributions;
using OdeDsl.Equilibria;
using OdeDsl.Integration;
using OdeDsl.Modeling;

namespace OdeDsl.Ensembles;

/// <summary>Estimates Lyapunov exponents from tangents carried along one motion.</summary>
/// <remarks>
/// G. Benettin, L. Galgani, A. Giorgilli and J.-M. Strelcyn, Meccanica 15 (1980) 9 and 21: tangents are transported by the variational
/// equations and orthonormalised in regular intervals; the mean logarithm of the j-th tangent's remaining stretch is the j-th exponent.
/// The uncertainty comes from the scatter of means over equal batches of time (batch means with Student's t, e.g. A. M. Law,
/// Simulation Modeling and Analysis, chapter 9), which holds if a batch is long against the motion's memory.
/// </remarks>
internal sealed class LyapunovEstimator
{
    // The default duration in short times of the motion, and how often the short time is sampled during the transient.
    private const double DefaultShortTimes = 50_000;
    private const int TransientPieces = 32;

    // Each short time the integration may stretch a tangent wrongly by about its relative tolerance; a margin for several steps.
    private const double ToleranceMargin = 10;

    // Bounds of the number of intervals in one batch: enough for a mean, and an end to the work.
    private const double FewestIntervals = 10;
    private const double MostIntervals = 1e6;

    private readonly DynamicSystem system;
    private readonly LyapunovOptions options;
    private readonly CancellationToken cancellation;
    private readonly Flow flow;
    private readonly int n;
    private readonly double[] scale;
    private readonly double[] state;
    private readonly double[] regime;
    private readonly double[] jacobian;
    private double time;

    public LyapunovEstimator(DynamicSystem system, LyapunovOptions options, CancellationToken cancellation)
    {
        this.system = system;
        this.options = options;
        this.cancellation = cancellation;
        n = system.StateCount;
        flow = new Flow(system, new FlowOptions { RelativeTolerance = options.RelativeTolerance });
        scale = SearchRegion.Of(system).Width;
        state = system.InitialState.ToArray();
        regime = new double[system.SwitchCount];
        jacobian = new double[n * n];
    }

    public LyapunovResult Run()
    {
        double shortTime = PassTransient();
        double duration = options.Duration ?? DefaultShortTimes * shortTime;
        double interval = options.Interval ?? shortTime;
        int perBatch = (int)Math.Clamp(Math.Ceiling(duration / interval / options.Batches), FewestIntervals, MostIntervals);
        interval = duration / ((double)perBatch * options.Batches);
        var basis = new TangentBasis(scale, options.Count == 0 ? n : options.Count);
        Settle(basis, perBatch, interval);
        double[][] means = new double[options.Batches][];
        double divergence = 0;
        double floor = ToleranceMargin * options.RelativeTolerance / shortTime;
        for (int batch = 0; batch < means.Length; batch++)
            means[batch] = Batch(basis, perBatch, interval, ref divergence);
        return new LyapunovResult
        {
            Exponents = [.. Enumerable.Range(0, basis.Count).Select(j => Estimate(means, j, floor)).OrderByDescending(static exponent => exponent.Value)],
            Duration = duration,
            Batches = options.Batches,
            MeanDivergence = divergence / ((double)perBatch * options.Batches),
            FinalState = state,
            RateEvaluations = flow.RateEvaluations,
        };
    }

    /// <summary>Moves on to the attractor and returns the motion's short time.</summary>
    private double PassTransient()
    {
        double guess = options.Duration ?? DefaultShortTimes / JacobianNorm();
        double piece = (options.Transient ?? guess / 10) / TransientPieces;
        double sum = 0;
        for (int i = 0; i < TransientPieces; i++)
        {
            if (piece > 0) Advance(state, [], 0, piece);
            sum += JacobianNorm();
        }

        return TransientPieces / sum;
    }

    /// <summary>Lets the tangents find their directions: one batch that does not count.</summary>
    private void Settle(TangentBasis basis, int intervals, double interval)
    {
        double ignored = 0;
        Batch(basis, intervals, interval, ref ignored);
    }

    private double[] Batch(TangentBasis basis, int intervals, double interval, ref double divergence)
    {
        double[] sums = new double[basis.Count];
        Span<double> stretches = stackalloc double[basis.Count];
        for (int i = 0; i < intervals; i++)
        {
            Advance(state, basis.Columns, basis.Count, interval);
            basis.Orthonormalise(stretches);
            for (int j = 0; j < sums.Length; j++) sums[j] += Math.Log(stretches[j]);
            JacobianNorm();
            for (int j = 0; j < n; j++) divergence += jacobian[j * n + j];
        }

        for (int j = 0; j < sums.Length; j++) sums[j] /= intervals * interval;
        return sums;
    }

    private void Advance(Span<double> target, Span<double> tangents, int count, double duration)
    {
        double start = system.DependsOnTime ? time : 0;
        if (count == 0) flow.Advance(target, start, start + duration, cancellation);
        else flow.Advance(target, tangents, count, start, start + duration, cancellation);
        time += duration;
    }

    /// <summary>The largest row sum of the Jacobian in scaled states at the present state: an upper bound of how fast anything changes.</summary>
    private double JacobianNorm()
    {
        system.Regime(time, state, regime);
        system.StateJacobian(time, state, regime, jacobian);
        double largest = 0;
        for (int i = 0; i < n; i++)
        {
            double sum = 0;
            for (int j = 0; j < n; j++) sum += Math.Abs(jacobian[i * n + j]) * scale[j] / scale[i];
            largest = Math.Max(largest, sum);
        }

        return largest > 0 ? largest : 1;
    }

    private static LyapunovExponent Estimate(double[][] means, int index, double floor)
    {
        double mean = means.Average(batch => batch[index]);
        double variance = means.Sum(batch => Math.Pow(batch[index] - mean, 2)) / (means.Length - 1);
        double quantile = StudentT.InvCDF(0, 1, means.Length - 1, 0.975);
        return new LyapunovExponent(mean, Math.Max(floor, quantile * Math.Sqrt(variance / means.Length)));
    }
}
