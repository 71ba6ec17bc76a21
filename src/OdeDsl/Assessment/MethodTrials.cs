using System.Diagnostics;
using System.Globalization;
using OdeDsl.Integration;
using OdeDsl.Modeling;

namespace OdeDsl.Assessment;

/// <summary>Measures the integration methods on the model's own motion and recommends the cheapest setting that is accurate enough.</summary>
/// <remarks>
/// The recommendation rests on counts, so that it is the same on every machine; wall times are reported beside it.
/// </remarks>
internal sealed class MethodTrials(DynamicSystem system, AssessmentOptions options, CancellationToken cancellation)
{
    private const double ReferenceTolerance = 1e-12;
    private const double CheckTolerance = 1e-11;
    private const long MaximumReferenceSteps = 400_000;
    private const long MaximumTrialSteps = 200_000;

    // Where errors are compared: evenly spread times that seldom coincide with steps, so that dense output counts too.
    private const int Samples = 401;

    // A state that hardly moves is judged by its size: errors below this share of it are rounding.
    private const double StillShare = 1e-3;

    // A run longer than this is timed once: repeating it gains little and costs much.
    private static readonly TimeSpan LongRun = TimeSpan.FromMilliseconds(200);

    private static readonly IntegrationMethod[] Methods =
        [IntegrationMethod.DormandPrince54, IntegrationMethod.RadauIIA5, IntegrationMethod.Automatic];

    /// <summary>Measures over a duration from the model's own state.</summary>
    /// <param name="duration">The time to integrate over; shortened to what the reference reaches.</param>
    /// <param name="report">Receives the share done, 0 to 1.</param>
    public MethodAnswer Measure(double duration, Action<double> report)
    {
        if (!(duration > 0) || Reference(ref duration) is not { } reference) return NothingToMeasure(duration);
        double[][] exact = reference.Sample(Samples);
        double[] ranges = Ranges(exact);
        double uncertainty = Uncertainty(duration, exact, ranges);
        var measurements = new List<MethodMeasurement>();
        double[] tolerances = [.. options.Tolerances.Distinct().OrderDescending()];
        foreach (IntegrationMethod method in Methods)
        {
            foreach (double tolerance in tolerances)
            {
                measurements.Add(Trial(method, tolerance, duration, exact, ranges));
                report((double)measurements.Count / (Methods.Length * tolerances.Length));
            }
        }

        MethodMeasurement? best = measurements
            .Where(measurement => measurement.Error <= options.WantedError)
            .MinBy(static measurement => measurement.Work);
        return new MethodAnswer
        {
            Recommended = best?.Method,
            RelativeTolerance = best?.RelativeTolerance,
            Reason = Reason(best, measurements),
            TimingRemark = TimingRemark(best, measurements),
            WantedError = options.WantedError,
            Duration = duration,
            Reference = string.Create(
                CultureInfo.InvariantCulture,
                $"the same motion at the relative tolerance {ReferenceTolerance:0E-0}; a second method at {CheckTolerance:0E-0} agrees with it to {uncertainty:0.0E-0} of each state's range"),
            Measurements = measurements,
        };
    }

    private MethodAnswer NothingToMeasure(double duration) => new()
    {
        Reason = "The model's motion cannot be integrated at a tight tolerance even for a short time, so no method can be recommended.",
        WantedError = options.WantedError,
        Duration = duration,
        Reference = "none",
        Measurements = [],
    };

    /// <summary>The motion at a tight tolerance; the duration becomes what it reached if it could not reach all.</summary>
    private Trajectory? Reference(ref double duration)
    {
        var tight = new SimulationOptions { RelativeTolerance = ReferenceTolerance, MaximumSteps = MaximumReferenceSteps };
        try
        {
            return system.Simulate(duration, tight, cancellationToken: cancellation);
        }
        catch (IntegrationException exception) when (exception.Time > 0)
        {
            // The last part before a failure is what failed: leave a tenth out.
            duration = 0.9 * exception.Time;
        }
        catch (IntegrationException)
        {
            return null;
        }

        try
        {
            return system.Simulate(duration, tight, cancellationToken: cancellation);
        }
        catch (IntegrationException)
        {
            return null;
        }
    }

    private double Uncertainty(double duration, double[][] exact, double[] ranges)
    {
        try
        {
            var check = new SimulationOptions
            {
                RelativeTolerance = CheckTolerance, Method = IntegrationMethod.RadauIIA5, MaximumSteps = MaximumReferenceSteps,
            };
            return Error(system.Simulate(duration, check, cancellationToken: cancellation), exact, ranges);
        }
        catch (IntegrationException)
        {
            return double.NaN;
        }
    }

    private MethodMeasurement Trial(IntegrationMethod method, double tolerance, double duration, double[][] exact, double[] ranges)
    {
        var setting = new SimulationOptions { Method = method, RelativeTolerance = tolerance, MaximumSteps = MaximumTrialSteps };
        Trajectory run;
        try
        {
            run = system.Simulate(duration, setting, cancellationToken: cancellation);
        }
        catch (IntegrationException exception)
        {
            return new MethodMeasurement
            {
                Method = method, RelativeTolerance = tolerance, Error = double.NaN, Work = double.NaN, Failure = exception.Message,
            };
        }

        var measurement = new MethodMeasurement
        {
            Method = method,
            RelativeTolerance = tolerance,
            Error = Error(run, exact, ranges),
            Work = Work(run.Statistics),
            Statistics = run.Statistics,
        };
        return options.TimingRuns > 0 ? Timed(measurement, setting, duration) : measurement;
    }

    private MethodMeasurement Timed(MethodMeasurement measurement, SimulationOptions setting, double duration)
    {
        var times = new List<TimeSpan>();
        long before = GC.GetAllocatedBytesForCurrentThread();
        long bytes = 0;
        while (times.Count < options.TimingRuns && (times.Count == 0 || times[0] < LongRun))
        {
            long start = Stopwatch.GetTimestamp();
            system.Simulate(duration, setting, cancellationToken: cancellation);
            times.Add(Stopwatch.GetElapsedTime(start));
            if (times.Count == 1) bytes = GC.GetAllocatedBytesForCurrentThread() - before;
        }

        times.Sort();
        return measurement with { WallTime = times[times.Count / 2], AllocatedBytes = bytes };
    }

    /// <summary>The cost in evaluations of the rates, by <see cref="MethodAnswer.WorkRule"/>.</summary>
    private double Work(IntegrationStatistics statistics)
    {
        double n = system.StateCount;
        return statistics.RateEvaluations
            + Math.Max(1, n / 2) * statistics.JacobianEvaluations
            + (n * n / 8 + n) * statistics.Factorisations
            + n / 4 * statistics.NewtonIterations;
    }

    private static double Error(Trajectory run, double[][] exact, double[] ranges)
    {
        double[][] states = run.Sample(exact.Length);
        double error = 0;
        for (int k = 0; k < states.Length; k++)
        {
            for (int i = 0; i < ranges.Length; i++) error = Math.Max(error, Math.Abs(states[k][i] - exact[k][i]) / ranges[i]);
        }

        return error;
    }

    /// <summary>The size errors are compared with: the range a state passes through, an angle's period at most.</summary>
    private double[] Ranges(double[][] exact)
    {
        double[] ranges = new double[system.StateCount];
        for (int i = 0; i < ranges.Length; i++)
        {
            double low = exact.Min(state => state[i]), high = exact.Max(state => state[i]);
            double still = StillShare * Math.Max(Math.Abs(low), Math.Abs(high));
            ranges[i] = Math.Max(high - low, still > 0 ? still : 1);
            if (system.Description.States[i].AnglePeriod is { } period) ranges[i] = Math.Min(ranges[i], period);
        }

        return ranges;
    }

    private string Reason(MethodMeasurement? best, List<MethodMeasurement> measurements)
    {
        if (best is null)
        {
            double smallest = measurements.Select(static measurement => measurement.Error).Where(double.IsFinite).DefaultIfEmpty(double.NaN).Min();
            return string.Create(
                CultureInfo.InvariantCulture,
                $"No method reached the error {options.WantedError:G2} at the tolerances tried; the smallest error was {smallest:0.0E-0}. Ask for tighter tolerances, or for less accuracy.");
        }

        string chosen = string.Create(
            CultureInfo.InvariantCulture,
            $"{best.Method} at the relative tolerance {best.RelativeTolerance:0E-0} is the cheapest setting tried with an error below {options.WantedError:G2}: error {best.Error:0.0E-0} of each state's range, {best.Statistics!.AcceptedSteps} steps, {best.Statistics.RateEvaluations} evaluations, work {best.Work:F0}.");
        MethodMeasurement? other = measurements
            .Where(measurement => measurement.Method != best.Method && measurement.Error <= options.WantedError)
            .MinBy(static measurement => measurement.Work);
        return other is null
            ? chosen + " No other method reached that error."
            : chosen + string.Create(
                CultureInfo.InvariantCulture,
                $" The next, {other.Method} at {other.RelativeTolerance:0E-0}, takes {other.Work / best.Work:F1} times the work.");
    }

    private string TimingRemark(MethodMeasurement? best, List<MethodMeasurement> measurements)
    {
        if (best?.WallTime is not { } time) return "";
        MethodMeasurement fastest = measurements.Where(measurement => measurement.Error <= options.WantedError).MinBy(static m => m.WallTime)!;
        return string.Create(
            CultureInfo.InvariantCulture,
            $"Measured here: {time.TotalMilliseconds:G3} ms and {best.AllocatedBytes / 1024.0:F0} KiB a run; the fastest accurate setting was {fastest.Method} at {fastest.RelativeTolerance:0E-0} with {fastest.WallTime!.Value.TotalMilliseconds:G3} ms.");
    }
}
