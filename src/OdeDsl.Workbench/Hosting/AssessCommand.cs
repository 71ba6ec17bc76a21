using System.Diagnostics;
using OdeDsl.Assessment;
using OdeDsl.Integration;
using OdeDsl.Modeling;
using OdeDsl.Workbench.Report;
using OdeDsl.Workbench.Terminal;

namespace OdeDsl.Workbench.Hosting;

/// <summary>Assesses models one after the other, prints what was found and writes the report.</summary>
internal sealed class AssessCommand
{
    public required IReadOnlyList<DynamicSystem> Systems { get; init; }

    public required string Title { get; init; }

    public required AssessmentOptions Options { get; init; }

    /// <summary>Whether each figure also becomes a file of its own.</summary>
    public required bool WritesFigures { get; init; }

    /// <summary>The full path of the folder to write to.</summary>
    public required string Folder { get; init; }

    public required Surroundings Surroundings { get; init; }

    /// <returns>The exit code.</returns>
    public int Run(CancellationToken cancellation)
    {
        AssessmentPrinter printer = new(Surroundings);
        try
        {
            WholeFiles.Prepare(Folder);
            List<ModelReport> reports = AssessAll(printer, cancellation);
            Provenance provenance = new(Surroundings.Clock.GetUtcNow(), Options.Seed, Options.SampledStarts, Options.WantedError);
            WholeFiles.Write(
                Folder,
                [
                    ("report.html", HtmlReport.Write(Title, reports, provenance)),
                    ("assessment.json", AssessmentFile.Write(reports, provenance)),
                    .. reports.Where(_ => WritesFigures).SelectMany(static report => report.Figures).Select(static figure => (figure.Id + ".svg", figure.Alone())),
                ]);
            printer.PrintEnd(reports, Folder);
            return reports.TrueForAll(static report => report.Assessment is not null) ? CommandLine.Done : CommandLine.Failed;
        }
        catch (OperationCanceledException)
        {
            Surroundings.Error.WriteLine("Stopped. Nothing was written.");
            return CommandLine.Failed;
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            Surroundings.Error.WriteLine($"The report cannot be written to {Folder}: {exception.Message} Choose another folder with --output.");
            return CommandLine.Failed;
        }
    }

    private List<ModelReport> AssessAll(AssessmentPrinter printer, CancellationToken cancellation)
    {
        List<ModelReport> reports = [];
        for (int i = 0; i < Systems.Count; i++)
        {
            ModelReport report;
            using (ProgressLine progress = new(Surroundings, $"{Systems[i].Description.Name} ({i + 1} of {Systems.Count})"))
                report = Assess(Systems[i], HtmlReport.Anchor(i), progress, cancellation);
            printer.Print(report);
            reports.Add(report);
        }

        return reports;
    }

    private ModelReport Assess(DynamicSystem system, string anchor, ProgressLine progress, CancellationToken cancellation)
    {
        Stopwatch watch = Stopwatch.StartNew();
        try
        {
            ModelAssessment assessment = system.Assess(Options, progress, cancellation);
            return new ModelReport
            {
                Description = system.Description,
                Assessment = assessment,
                Figures = ModelFigures.Of(system, assessment, anchor, cancellation),
                Elapsed = watch.Elapsed,
            };
        }
        catch (Exception exception) when (exception is IntegrationException or ArgumentException or ArithmeticException)
        {
            // What a model's equations or numbers make impossible is reported; the other models are still assessed.
            return new ModelReport { Description = system.Description, Failure = exception.Message, Elapsed = watch.Elapsed };
        }
    }
}
