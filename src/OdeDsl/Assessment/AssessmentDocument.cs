using System.Text.Json.Serialization;

namespace OdeDsl.Assessment;

// The shape of the JSON text of an assessment, described in docs/assessment.md. Property names are written in camel case.

internal sealed record AssessmentDocument(
    int Schema,
    string Model,
    string Summary,
    string TimeUnit,
    IReadOnlyList<ParameterDocument> Parameters,
    IReadOnlyDictionary<string, double> InitialState,
    IReadOnlyDictionary<string, string> StateUnits,
    RestsDocument Rests,
    MotionsDocument Motions,
    MarginsDocument Margins,
    MethodDocument Method,
    IReadOnlyList<string> Remarks,
    string Caution);

internal sealed record ParameterDocument(string Name, string Unit, double Value, double Lower, double Upper);

internal sealed record RestsDocument(IReadOnlyList<RestDocument> Items, string Completeness);

internal sealed record RestDocument(
    string Name,
    IReadOnlyDictionary<string, double> State,
    string Kind,
    string Stability,
    int UnstableCount,
    IReadOnlyList<ComplexDocument> Eigenvalues,
    IReadOnlyList<ModeDocument> Modes,
    double Residual,
    string? SlidesOn,
    int? ContinuumDimension);

internal sealed record ComplexDocument(double Real, double Imaginary);

internal sealed record ModeDocument(double TimeConstant, double NaturalFrequency, double DampingRatio, double Period);

internal sealed record MotionsDocument(
    VerdictDocument Working,
    IReadOnlyList<OutcomeDocument> Outcomes,
    IReadOnlyList<CycleDocument> Cycles,
    IReadOnlyList<FamilyDocument> Families,
    ExponentsDocument? Exponents,
    int SampledStarts,
    string Completeness);

internal sealed record VerdictDocument(
    string Kind, string Label, string Text, IReadOnlyList<string> Evidence, ExponentDocument? LargestExponent, double Duration);

internal sealed record OutcomeDocument(
    string Kind, string Label, int Starts, double Share, double ShareLower, double ShareUpper, IReadOnlyDictionary<string, double> ExampleStart);

internal sealed record CycleDocument(
    string Name,
    double Period,
    string Stability,
    IReadOnlyDictionary<string, int> Turns,
    IReadOnlyDictionary<string, double> State,
    IReadOnlyDictionary<string, double> Minimum,
    IReadOnlyDictionary<string, double> Maximum,
    IReadOnlyDictionary<string, double> Amplitude,
    IReadOnlyList<ComplexDocument> Multipliers,
    double Residual,
    bool Slides);

internal sealed record FamilyDocument(
    string Name,
    IReadOnlyDictionary<string, int> Turns,
    IReadOnlyList<MemberDocument> Members,
    double SecondMultiplierError,
    string Evidence);

internal sealed record MemberDocument(
    double Period, IReadOnlyDictionary<string, double> Minimum, IReadOnlyDictionary<string, double> Maximum, double Residual);

internal sealed record ExponentsDocument(IReadOnlyList<ExponentDocument> Items, double Duration, int Batches, double MeanDivergence);

internal sealed record ExponentDocument(double Value, double Uncertainty);

internal sealed record MarginsDocument(string? Narrowest, IReadOnlyList<MarginDocument> Items, string Completeness);

internal sealed record MarginDocument(string Parameter, string Unit, double Value, EdgeDocument Down, EdgeDocument Up);

internal sealed record EdgeDocument(
    string Event,
    double? Value,
    double? Distance,
    double? Percent,
    double ExploredTo,
    string Attractor,
    double? Frequency,
    double Uncertainty,
    string Text,
    string Evidence);

internal sealed record MethodDocument(
    string? Recommended,
    double? RelativeTolerance,
    string Reason,
    double WantedError,
    double Duration,
    string Reference,
    IReadOnlyList<MeasurementDocument> Measurements,
    [property: JsonIgnore(Condition = JsonIgnoreCondition.WhenWritingNull)] string? TimingRemark);

internal sealed record MeasurementDocument(
    string Method,
    double RelativeTolerance,
    double Error,
    double Work,
    long? AcceptedSteps,
    long? RejectedSteps,
    long? RateEvaluations,
    long? JacobianEvaluations,
    long? Factorisations,
    string Failure,
    [property: JsonIgnore(Condition = JsonIgnoreCondition.WhenWritingNull)] double? WallTimeSeconds,
    [property: JsonIgnore(Condition = JsonIgnoreCondition.WhenWritingNull)] long? AllocatedBytes);

/// <summary>The serialisation code, made at compile time: works without reflection.</summary>
[JsonSourceGenerationOptions(
    WriteIndented = true,
    PropertyNamingPolicy = JsonKnownNamingPolicy.CamelCase,
    Converters = [typeof(FiniteNumberConverter)])]
[JsonSerializable(typeof(AssessmentDocument))]
internal sealed partial class AssessmentJsonContext : JsonSerializerContext;
