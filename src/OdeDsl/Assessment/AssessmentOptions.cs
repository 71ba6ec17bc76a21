using System.Collections.Immutable;

namespace OdeDsl.Assessment;

/// <summary>How thoroughly to assess a model. All work is bounded by counts, never by time, so that equal options give equal results.</summary>
public sealed record AssessmentOptions
{
    /// <summary>Chooses the low-discrepancy sequences' shifts: equal seeds give equal results.</summary>
    public int Seed { get; init; } = 1;

    /// <summary>The number of starts spread over the state bounds whose ends are counted; 0 to 100 000.</summary>
    public int SampledStarts { get; init; } = 64;

    /// <summary>The largest number of integration steps of one run that looks for an attractor; at least 100.</summary>
    public int MaximumStepsPerRun { get; init; } = 20_000;

    /// <summary>
    /// Whether to look for margins. The range of a parameter reaches to its bounds; where a bound is infinite, to
    /// <see cref="RangeFactor"/> times the present value, or to the present value divided by it.
    /// </summary>
    public bool Margins { get; init; } = true;

    /// <summary>
    /// How far an unbounded parameter is explored, as a factor above 1; a parameter that is zero is explored from minus to plus this value.
    /// </summary>
    public double RangeFactor { get; init; } = 10;

    /// <summary>
    /// The first step with which limit cycles are followed is the range over this number; at least 4. Steps grow where the going is easy
    /// and shrink where it is not.
    /// </summary>
    public int CycleSteps { get; init; } = 20;

    /// <summary>The error, relative to the range of each state, that the recommended integration must not exceed; between 1e-10 and 0.1.</summary>
    public double WantedError { get; init; } = 1e-4;

    /// <summary>The relative tolerances at which the methods are measured.</summary>
    public ImmutableArray<double> Tolerances { get; init; } = [1e-3, 1e-4, 1e-6, 1e-8];

    /// <summary>The number of repeated runs whose median wall time is reported; 0 measures no time. The times are not deterministic.</summary>
    public int TimingRuns { get; init; } = 5;

    /// <summary>The number of batches of short times over which Lyapunov exponents are averaged; at least 5.</summary>
    public int ExponentBatches { get; init; } = 20;

    internal static void Validate(AssessmentOptions options)
    {
        Require(options.SampledStarts is >= 0 and <= 100_000, options.SampledStarts, "SampledStarts must lie between 0 and 100000.");
        Require(options.MaximumStepsPerRun >= 100, options.MaximumStepsPerRun, "MaximumStepsPerRun must be at least 100.");
        Require(options.RangeFactor > 1 && double.IsFinite(options.RangeFactor), options.RangeFactor, "RangeFactor must be finite and above 1.");
        Require(options.CycleSteps is >= 4 and <= 10_000, options.CycleSteps, "CycleSteps must lie between 4 and 10000.");
        Require(options.WantedError is >= 1e-10 and <= 0.1, options.WantedError, "WantedError must lie between 1e-10 and 0.1.");
        Require(options.TimingRuns is >= 0 and <= 1000, options.TimingRuns, "TimingRuns must lie between 0 and 1000.");
        Require(options.ExponentBatches is >= 5 and <= 1000, options.ExponentBatches, "ExponentBatches must lie between 5 and 1000.");
        bool tolerancesFit = !options.Tolerances.IsDefaultOrEmpty && options.Tolerances.All(static value => value is >= 1e-11 and <= 1e-2);
        Require(tolerancesFit, options.Tolerances, "Tolerances must hold at least one number, each between 1e-11 and 1e-2.");

        static void Require(bool fulfilled, object value, string message)
        {
            if (!fulfilled) throw new ArgumentOutOfRangeException(nameof(options), value, message);
        }
    }
}
