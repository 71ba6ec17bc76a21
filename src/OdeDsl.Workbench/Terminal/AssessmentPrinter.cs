using System.Globalization;
using OdeDsl.Assessment;
using OdeDsl.Cycles;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;
using OdeDsl.Workbench.Hosting;
using OdeDsl.Workbench.Report;
using OdeDsl.Workbench.Wording;
using Spectre.Console;
using ConsoleTable = Spectre.Console.Table;

namespace OdeDsl.Workbench.Terminal;

/// <summary>Prints assessments as tables. Everything from a model is printed as text, never read as markup.</summary>
internal sealed class AssessmentPrinter
{
    // Wide enough for the tables; pipes and files have no width of their own.
    private const int PipeWidth = 120;

    private readonly IAnsiConsole console;

    public AssessmentPrinter(Surroundings surroundings)
    {
        console = AnsiConsole.Create(new AnsiConsoleSettings
        {
            Out = new AnsiConsoleOutput(surroundings.Output),
            Ansi = surroundings.IsTerminal ? AnsiSupport.Detect : AnsiSupport.No,
            Interactive = InteractionSupport.No,
        });
        if (!surroundings.IsTerminal) console.Profile.Width = PipeWidth;
    }

    public void Print(ModelReport report)
    {
        console.WriteLine();
        console.Write(new Rule(Markup.Escape($"{report.Description.Name} ({Seconds(report.Elapsed)})")) { Justification = Justify.Left });
        if (report.Description.Summary.Length > 0) console.Write(new Text(report.Description.Summary + "\n"));
        if (report.Assessment is not { } assessment)
        {
            console.Write(new Text("Not assessed: " + report.Failure + "\n"));
            return;
        }

        ConsoleTable answers = Grid("", "");
        answers.ShowHeaders = false;
        foreach (Answer answer in Answers.Of(assessment)) answers.AddRow(new Text(answer.Question), new Text(answer.Full));
        foreach (string remark in assessment.Remarks) answers.AddRow(new Text("Remark"), new Text(remark));
        console.Write(answers);
        if (assessment.Rests.Equilibria.Length > 0) console.Write(Rests(assessment));
        if (assessment.Motions.Cycles.Count > 0) console.Write(Cycles(assessment));
        if (assessment.Margins.Parameters.Count > 0) console.Write(Margins(assessment.Margins));
    }

    /// <summary>Says where the files are and repeats the caution.</summary>
    public void PrintEnd(IReadOnlyList<ModelReport> reports, string folder)
    {
        TimeSpan total = reports.Aggregate(TimeSpan.Zero, static (sum, report) => sum + report.Elapsed);
        console.WriteLine();
        console.Write(new Text($"{Words.Count(reports.Count, "model")} in {Seconds(total)}. Written: {Path.Combine(folder, "report.html")}, {Path.Combine(folder, "assessment.json")}\n"));
        console.Write(new Text("Caution. " + Words.Caution + "\n"));
    }

    private static ConsoleTable Rests(ModelAssessment assessment)
    {
        ModelDescription description = assessment.Description;
        ConsoleTable table = Grid(["Rest", "Kind", .. description.States.Select(static state => Heading(state.Name, state.Unit)), Heading("Changes by e in", description.TimeUnit)]);
        foreach ((int index, Equilibrium rest) in assessment.Rests.Equilibria.Index())
        {
            Add(
                table,
                [
                    Words.Rest(index),
                    Words.Kind(rest),
                    .. rest.State.Select((value, i) => NumberText.Plain(Answers.WithoutRounding(value, description.States[i]))),
                    Words.FactorTime(rest.LeadingMode, static value => NumberText.Plain(value)),
                ]);
        }

        return table;
    }

    private static ConsoleTable Cycles(ModelAssessment assessment)
    {
        ModelDescription description = assessment.Description;
        ConsoleTable table = Grid(["Cycle", "Kind", Heading("Period", description.TimeUnit), .. description.States.Select(static state => Heading(state.Name, state.Unit))]);
        foreach ((int index, LimitCycle cycle) in assessment.Motions.Cycles.Index())
        {
            Add(
                table,
                [
                    Words.Cycle(index),
                    Words.Kind(cycle),
                    NumberText.Plain(cycle.Period, 6),
                    .. description.States.Select((_, i) => cycle.Winding[i] != 0
                        ? string.Create(CultureInfo.InvariantCulture, $"{cycle.Winding[i]:+0;-0} turns")
                        : Range(NumberText.WithoutNoise(cycle.Minimum[i], cycle.Maximum[i]))),
                ]);
        }

        return table;
    }

    private static string Range((double Minimum, double Maximum) ends) => $"{NumberText.Plain(ends.Minimum)} to {NumberText.Plain(ends.Maximum)}";

    private static ConsoleTable Margins(MarginsAnswer margins)
    {
        ConsoleTable table = Grid("Parameter", "Value", "Nearest change below", "Nearest change above");
        foreach (ParameterMargin margin in margins.Parameters)
        {
            string unit = margin.Parameter.Unit;
            Add(table, [margin.Parameter.Name, NumberText.PlainWith(margin.Value, unit), Edge(margin.Down, unit), Edge(margin.Up, unit)]);
        }

        return table;
    }

    private static string Edge(MarginEdge edge, string unit) => edge.Event switch
    {
        MarginEvent.None => $"none to {NumberText.PlainWith(edge.ExploredTo, unit)}",
        MarginEvent.Unknown => $"not known beyond {NumberText.PlainWith(edge.Value ?? double.NaN, unit)}",
        _ => string.Create(
            CultureInfo.InvariantCulture,
            $"{NumberText.PlainWith(edge.Value ?? double.NaN, unit, 6)} ({edge.Percent:+0.#;-0.#} %), {Words.Of(edge.Event)}"),
    };

    private static ConsoleTable Grid(params ReadOnlySpan<string> headings)
    {
        ConsoleTable table = new() { Border = TableBorder.Horizontal };
        foreach (string heading in headings) table.AddColumn(new TableColumn(new Text(heading)));
        return table;
    }

    private static void Add(ConsoleTable table, IReadOnlyList<string> cells) => table.AddRow(cells.Select(static cell => new Text(cell)));

    private static string Heading(string name, string unit) => unit.Length == 0 ? name : $"{name} ({unit})";

    private static string Seconds(TimeSpan time) => time.TotalSeconds.ToString("F1", CultureInfo.InvariantCulture) + " s";
}
