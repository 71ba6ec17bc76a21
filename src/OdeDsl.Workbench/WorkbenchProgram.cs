using OdeDsl.Assessment;
using OdeDsl.Modeling;
using OdeDsl.Workbench.Hosting;

namespace OdeDsl.Workbench;

/// <summary>A command-line program over some models. Immutable: each addition gives a new program.</summary>
public sealed class WorkbenchProgram
{
    private readonly IReadOnlyList<DynamicSystem> systems;
    private readonly string title;
    private readonly AssessmentOptions options;

    internal WorkbenchProgram()
        : this([], "Assessment", new AssessmentOptions())
    {
    }

    private WorkbenchProgram(IReadOnlyList<DynamicSystem> systems, string title, AssessmentOptions options) =>
        (this.systems, this.title, this.options) = (systems, title, options);

    /// <summary>Adds a model, with the numbers it holds now.</summary>
    /// <typeparam name="TModel">The model class.</typeparam>
    /// <typeparam name="TSystem">Its equations.</typeparam>
    /// <param name="model">The model.</param>
    /// <returns>A program with this model too.</returns>
    /// <exception cref="ArgumentException">A state or parameter of the model is not finite.</exception>
    public WorkbenchProgram And<TModel, TSystem>(IOdeModel<TModel, TSystem> model)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem =>
        And(DynamicSystem.Of(model));

    /// <summary>Adds a system.</summary>
    /// <param name="system">The system.</param>
    /// <returns>A program with this system too.</returns>
    public WorkbenchProgram And(DynamicSystem system)
    {
        ArgumentNullException.ThrowIfNull(system);
        return new WorkbenchProgram([.. systems, system], title, options);
    }

    /// <summary>Names the report.</summary>
    /// <param name="reportTitle">The title.</param>
    /// <returns>A program whose report has this title.</returns>
    public WorkbenchProgram Titled(string reportTitle)
    {
        ArgumentException.ThrowIfNullOrWhiteSpace(reportTitle);
        return new WorkbenchProgram(systems, reportTitle, options);
    }

    /// <summary>Says how thoroughly to assess.</summary>
    /// <param name="assessmentOptions">The options; the command line may change the seed.</param>
    /// <returns>A program that assesses so.</returns>
    public WorkbenchProgram With(AssessmentOptions assessmentOptions)
    {
        ArgumentNullException.ThrowIfNull(assessmentOptions);
        return new WorkbenchProgram(systems, title, assessmentOptions);
    }

    /// <summary>Runs the program. Ctrl-C stops it; nothing is written then.</summary>
    /// <param name="arguments">The command line; <c>--help</c> explains it.</param>
    /// <returns>The exit code: 0 done, 1 an analysis failed or a file could not be written (said why), 2 bad usage.</returns>
    public Task<int> RunAsync(string[] arguments)
    {
        ArgumentNullException.ThrowIfNull(arguments);
        return RunAsync(arguments, Surroundings.OfProcess());
    }

    internal Task<int> RunAsync(string[] arguments, Surroundings surroundings, CancellationToken cancellation = default) =>
        CommandLine.RunAsync(arguments, systems, title, options, surroundings, cancellation);
}
