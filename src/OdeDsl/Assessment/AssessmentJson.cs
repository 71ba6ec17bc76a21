using System.Collections.Immutable;
using System.Numerics;
using System.Text.Json;
using OdeDsl.Cycles;
using OdeDsl.Ensembles;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;

namespace OdeDsl.Assessment;

/// <summary>Writes assessments as JSON.</summary>
public static class AssessmentJson
{
    // Raised whenever a property is renamed, removed or changes its meaning.
    private const int Schema = 1;

    private const string Caution =
        "Results are predictions of a model. Where people or plant depend on them, they support and do not replace verification, local "
        + "codes and the judgement of licensed engineers.";

    /// <summary>The assessment as JSON text, in the schema of docs/assessment.md.</summary>
    /// <param name="assessment">The assessment.</param>
    /// <param name="includeTimings">
    /// Whether to write wall times and allocated bytes. Without them equal models, options and seeds give equal text.
    /// </param>
    /// <returns>Indented JSON. Numbers that are infinite or not a number are written as null.</returns>
    public static string ToJson(this ModelAssessment assessment, bool includeTimings = true)
    {
        ArgumentNullException.ThrowIfNull(assessment);
        return JsonSerializer.Serialize(Document(assessment, includeTimings), AssessmentJsonContext.Default.AssessmentDocument);
    }

    private static AssessmentDocument Document(ModelAssessment assessment, bool includeTimings)
    {
        ModelDescription description = assessment.Description;
        return new AssessmentDocument(
            Schema,
            description.Name,
            description.Summary,
            description.TimeUnit,
            [.. description.Parameters.Select((parameter, i) =>
                new ParameterDocument(parameter.Name, parameter.Unit, assessment.Parameters[i], parameter.Lower, parameter.Upper))],
            Named(description, assessment.InitialState),
            description.States.ToDictionary(static state => state.Name, static state => state.Unit),
            Rests(description, assessment.Rests),
            Motions(description, assessment.Motions),
            Margins(assessment.Margins),
            Method(assessment.Method, includeTimings),
            assessment.Remarks,
            Caution);
    }

    private static Dictionary<string, T> Named<T>(ModelDescription description, IEnumerable<T> values) =>
        description.States.Zip(values).ToDictionary(static pair => pair.First.Name, static pair => pair.Second);

    private static ComplexDocument[] Complexes(IEnumerable<Complex> values) =>
        [.. values.Select(static value => new ComplexDocument(value.Real, value.Imaginary))];

    private static RestsDocument Rests(ModelDescription description, EquilibriumSearchResult rests) => new(
        [.. rests.Equilibria.Select((rest, k) => new RestDocument(
            AttractorNames.Rest(k),
            Named(description, rest.State),
            rest.Kind.ToString(),
            rest.Stability.ToString(),
            rest.UnstableCount,
            Complexes(rest.Eigenvalues),
            [.. rest.Modes.Select(static mode => new ModeDocument(mode.TimeConstant, mode.NaturalFrequency, mode.DampingRatio, mode.Period))],
            rest.Residual,
            rest.Surface is { } surface ? description.Switches[surface].Text : null,
            rest.Set?.Dimension))],
        rests.Completeness);

    private static MotionsDocument Motions(ModelDescription description, MotionsAnswer motions) => new(
        new VerdictDocument(
            motions.Working.Kind.ToString(),
            motions.Working.Label,
            motions.Working.Text,
            motions.Working.Evidence,
            motions.Working.Exponent is { } exponent ? Exponent(exponent) : null,
            motions.Working.Duration),
        [.. motions.Outcomes.Select(outcome => new OutcomeDocument(
            outcome.Kind.ToString(),
            outcome.Label,
            outcome.Starts,
            outcome.Share,
            outcome.ShareLower,
            outcome.ShareUpper,
            Named(description, outcome.ExampleStart)))],
        [.. motions.Cycles.Select((cycle, k) => Cycle(description, cycle, k))],
        [.. motions.Families.Select((family, k) => Family(description, family, k))],
        motions.Exponents is { } exponents
            ? new ExponentsDocument([.. exponents.Exponents.Select(Exponent)], exponents.Duration, exponents.Batches, exponents.MeanDivergence)
            : null,
        motions.SampledStarts,
        motions.Completeness);

    private static ExponentDocument Exponent(LyapunovExponent exponent) => new(exponent.Value, exponent.Uncertainty);

    private static CycleDocument Cycle(ModelDescription description, LimitCycle cycle, int index) => new(
        AttractorNames.Cycle(index),
        cycle.Period,
        cycle.Stability.ToString(),
        Turns(description, cycle.Winding),
        Named(description, cycle.State),
        Named(description, cycle.Minimum),
        Named(description, cycle.Maximum),
        Named(description, cycle.Amplitude),
        Complexes(cycle.Multipliers),
        cycle.Residual,
        cycle.Slides);

    private static FamilyDocument Family(ModelDescription description, OrbitFamily family, int index) => new(
        AttractorNames.Family(index),
        Turns(description, family.Winding),
        [.. family.Members.Select(member =>
            new MemberDocument(member.Period, Named(description, member.Minimum), Named(description, member.Maximum), member.Residual))],
        family.SecondMultiplierError,
        family.Evidence);

    /// <summary>The whole turns of the states that are angles.</summary>
    private static Dictionary<string, int> Turns(ModelDescription description, ImmutableArray<int> winding) =>
        description.States.Zip(winding)
            .Where(static pair => pair.First.AnglePeriod is not null)
            .ToDictionary(static pair => pair.First.Name, static pair => pair.Second);

    private static MarginsDocument Margins(MarginsAnswer margins) => new(
        margins.Narrowest?.Parameter.Name,
        [.. margins.Parameters.Select(static margin =>
            new MarginDocument(margin.Parameter.Name, margin.Parameter.Unit, margin.Value, Edge(margin.Down), Edge(margin.Up)))],
        margins.Completeness);

    private static EdgeDocument Edge(MarginEdge edge) => new(
        edge.Event.ToString(),
        edge.Value,
        edge.Distance,
        edge.Percent,
        edge.ExploredTo,
        edge.Attractor,
        edge.Frequency,
        edge.Uncertainty,
        edge.Text,
        edge.Evidence);

    private static MethodDocument Method(MethodAnswer method, bool includeTimings) => new(
        method.Recommended?.ToString(),
        method.RelativeTolerance,
        method.Reason,
        method.WantedError,
        method.Duration,
        method.Reference,
        [.. method.Measurements.Select(measurement => new MeasurementDocument(
            measurement.Method.ToString(),
            measurement.RelativeTolerance,
            measurement.Error,
            measurement.Work,
            measurement.Statistics?.AcceptedSteps,
            measurement.Statistics?.RejectedSteps,
            measurement.Statistics?.RateEvaluations,
            measurement.Statistics?.JacobianEvaluations,
            measurement.Statistics?.Factorisations,
            measurement.Failure,
            includeTimings ? measurement.WallTime?.TotalSeconds : null,
            includeTimings ? measurement.AllocatedBytes : null))],
        includeTimings && method.TimingRemark.Length > 0 ? method.TimingRemark : null);
}
