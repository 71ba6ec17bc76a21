using System.CommandLine;
using System.CommandLine.Parsing;
using System.Globalization;
using OdeDsl.Assessment;
using OdeDsl.Modeling;

namespace OdeDsl.Workbench.Hosting;

/// <summary>What may be said on the command line. To add a command: one <see cref="Command"/> in <see cref="Root"/> with its own action.</summary>
internal static class CommandLine
{
    public const int Done = 0, Failed = 1, BadUsage = 2;

    // After Ctrl-C the analysis ends at its next step; a model whose single evaluation takes longer than this is ended by force.
    private static readonly TimeSpan TimeToStop = TimeSpan.FromSeconds(10);

    public static async Task<int> RunAsync(
        string[] arguments,
        IReadOnlyList<DynamicSystem> systems,
        string title,
        AssessmentOptions options,
        Surroundings surroundings,
        CancellationToken cancellation)
    {
        RootCommand root = Root(systems, title, options, surroundings);
        ParseResult parsed = root.Parse(arguments);
        if (parsed.Errors.Count > 0)
        {
            foreach (ParseError error in parsed.Errors) await surroundings.Error.WriteLineAsync(error.Message).ConfigureAwait(false);
            await surroundings.Error.WriteLineAsync("Use --help to see what can be asked.").ConfigureAwait(false);
            return BadUsage;
        }

        InvocationConfiguration configuration = new()
        {
            Output = surroundings.Output,
            Error = surroundings.Error,
            EnableDefaultExceptionHandler = false,
            ProcessTerminationTimeout = TimeToStop,
        };
        return await parsed.InvokeAsync(configuration, cancellation).ConfigureAwait(false);
    }

    private static RootCommand Root(IReadOnlyList<DynamicSystem> systems, string title, AssessmentOptions options, Surroundings surroundings)
    {
        string[] names = [.. systems.Select(static system => system.Description.Name)];
        Option<string> output = new("--output")
        {
            Description = "The folder to write report.html and assessment.json to; made if it does not exist.",
            HelpName = "DIR",
            DefaultValueFactory = static _ => ".",
        };
        output.Validators.Add(static result =>
        {
            if (string.IsNullOrWhiteSpace(result.GetValueOrDefault<string>())) result.AddError("--output needs the name of a folder.");
        });
        Option<string[]> models = new("--model") { Description = $"Only this model; may be given several times. One of: {string.Join(", ", names)}.", HelpName = "NAME" };
        models.Validators.Add(result =>
        {
            foreach (string name in result.GetValueOrDefault<string[]>() ?? [])
            {
                if (!names.Contains(name, StringComparer.OrdinalIgnoreCase))
                    result.AddError($"There is no model '{name}'. There are: {string.Join(", ", names)}.");
            }
        });
        Option<int> seed = new("--seed")
        {
            Description = "The seed of all sampling: equal seeds give equal results.",
            HelpName = "N",
            DefaultValueFactory = _ => options.Seed,
            CustomParser = static result =>
            {
                string text = result.Tokens.Count == 1 ? result.Tokens[0].Value : "";
                if (int.TryParse(text, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out int value)) return value;
                result.AddError($"--seed needs a whole number between {int.MinValue} and {int.MaxValue}; '{text}' is none.");
                return default;
            },
        };
        Option<bool> figures = new("--figures") { Description = "Also write each figure as an SVG file of its own." };
        RootCommand root = new($"{title}: assesses each model and writes report.html and assessment.json. "
            + "Exit codes: 0 done, 1 an analysis failed or a file could not be written, 2 bad usage.")
        {
            output, models, seed, figures,
        };
        root.SetAction((parsed, cancellation) =>
        {
            string[] wanted = parsed.GetValue(models) ?? [];
            AssessCommand command = new()
            {
                Systems = [.. systems.Where(system => wanted.Length == 0 || wanted.Contains(system.Description.Name, StringComparer.OrdinalIgnoreCase))],
                Title = title,
                Options = options with { Seed = parsed.GetValue(seed) },
                WritesFigures = parsed.GetValue(figures),
                Folder = Path.GetFullPath(parsed.GetValue(output)!),
                Surroundings = surroundings,
            };
            return Task.Run(() => command.Run(cancellation), CancellationToken.None);
        });
        return root;
    }
}
