using OdeDsl.Cycles;
using OdeDsl.Equilibria;
using OdeDsl.Integration;
using OdeDsl.Modeling;

namespace OdeDsl.Assessment;

/// <summary>Puts the four answers together.</summary>
internal sealed class Assessor(
    DynamicSystem system, AssessmentOptions options, IProgress<AssessmentProgress>? progress, CancellationToken cancellation)
{
    // The shares of the work after which the stages end, from measurements on models of two to three states: common practice for bars.
    private const double RestsDone = 0.05;
    private const double MotionsDone = 0.45;
    private const double MarginsDone = 0.85;

    private readonly ModelDescription description = system.Description;
    private readonly List<string> remarks = [];

    public ModelAssessment Run()
    {
        Report(AssessmentStage.Rests, 0, "rests");
        bool works = WorksAtInitialState();
        bool autonomous = !system.DependsOnTime;
        if (!autonomous)
            remarks.Add("The rates depend on time explicitly: rests, limit cycles and margins have no meaning and are not answered. Make the driving a state (for a periodic drive, an angle with a constant rate) to have them assessed.");
        EquilibriumSearchResult rests = autonomous
            ? system.FindEquilibria(new EquilibriumSearchOptions { Seed = options.Seed }, cancellation)
            : Empty.Rests(system);
        Report(AssessmentStage.Cycles, RestsDone, "limit cycles and long runs");
        MotionsAnswer motions = autonomous && works
            ? new MotionAnalysis(system, rests, options, cancellation).Run()
            : Empty.Motions(works ? MotionKind.Undecided : MotionKind.Fails, remarks[^1]);
        MarginsAnswer margins = autonomous && options.Margins
            ? new MarginSearch(system, rests, motions.Cycles, options, cancellation).Run(
                (share, name) => Report(AssessmentStage.Margins, MotionsDone + share * (MarginsDone - MotionsDone), name))
            : Empty.Margins(autonomous ? "Not asked for." : "Not answered: the rates depend on time explicitly.");
        Report(AssessmentStage.Methods, MarginsDone, "integration methods");
        double duration = works ? new MotionLength(system, cancellation).For(motions) : 0;
        MethodAnswer method = new MethodTrials(system, options, cancellation).Measure(
            duration, share => Report(AssessmentStage.Methods, MarginsDone + share * (1 - MarginsDone), "integration methods"));
        Report(AssessmentStage.Methods, 1, "done");
        return new ModelAssessment
        {
            Description = description,
            Parameters = system.Parameters.ToArray(),
            InitialState = system.InitialState.ToArray(),
            Rests = rests,
            Motions = motions,
            Margins = margins,
            Method = method,
            Remarks = remarks,
        };
    }

    private void Report(AssessmentStage stage, double fraction, string detail)
    {
        cancellation.ThrowIfCancellationRequested();
        progress?.Report(new AssessmentProgress(stage, fraction, detail));
    }

    /// <summary>Whether the rates can be computed at the model's own state; if not, says why.</summary>
    private bool WorksAtInitialState()
    {
        double[] rates = new double[system.StateCount];
        try
        {
            system.Rates(0, system.InitialState, rates);
        }
        catch (Exception exception) when (exception is ArgumentException or ArithmeticException)
        {
            remarks.Add($"The rates throw at the model's own state: {exception.Message}");
            return false;
        }

        int bad = Array.FindIndex(rates, static rate => !double.IsFinite(rate));
        if (bad < 0) return true;
        remarks.Add($"The rate of {description.States[bad].Name} is {rates[bad]} at the model's own state: its motion cannot be followed.");
        return false;
    }
}
