using System.Text.Json;
using OdeDsl.Workbench;

namespace WorkbenchTests;

public class CommandLineTests
{
    private static readonly WorkbenchProgram Program = Workbench.For(new Swing()).Titled("Test works");

    [Fact]
    public async Task Assessing_prints_the_answers_and_writes_both_files()
    {
        using Hosts.Folder folder = new();

        (int code, string output, string error) = await Hosts.Run(Program, ["--output", folder.Path]);

        Assert.Equal(0, code);
        Assert.Equal("", error);
        Assert.Contains("Swing", output, StringComparison.Ordinal);
        Assert.Contains("stable focus", output, StringComparison.Ordinal);
        Assert.Equal(["assessment.json", "report.html"], folder.Names);
        using JsonDocument json = JsonDocument.Parse(folder.Read("assessment.json"));
        Assert.Equal("Swing", json.RootElement.GetProperty("assessments")[0].GetProperty("model").GetString());
        Assert.Equal(0, json.RootElement.GetProperty("failures").GetArrayLength());
    }

    [Fact]
    public async Task The_output_folder_is_made_if_it_does_not_exist()
    {
        using Hosts.Folder folder = new();
        string inner = Path.Combine(folder.Path, "new", "place");

        (int code, _, _) = await Hosts.Run(Program, ["--output", inner]);

        Assert.Equal(0, code);
        Assert.True(File.Exists(Path.Combine(inner, "report.html")));
    }

    [Theory]
    [InlineData("--nonsense")]
    [InlineData("--output")]
    [InlineData("--seed", "many")]
    [InlineData("--model", "Nobody")]
    [InlineData("stray")]
    [InlineData("--output", "")]
    public async Task Bad_usage_is_exit_code_two_with_a_message_and_nothing_done(params string[] arguments)
    {
        (int code, string output, string error) = await Hosts.Run(Program, arguments);

        Assert.Equal(2, code);
        Assert.Equal("", output);
        Assert.Contains("--help", error, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("abc")]
    [InlineData("1.5")]
    [InlineData("99999999999")]
    public async Task A_seed_that_is_no_whole_number_is_answered_in_plain_words(string seed)
    {
        (int code, _, string error) = await Hosts.Run(Program, ["--seed", seed]);

        Assert.Equal(2, code);
        Assert.Contains($"--seed needs a whole number between -2147483648 and 2147483647; '{seed}' is none.", error, StringComparison.Ordinal);
        Assert.DoesNotContain("Int32", error, StringComparison.Ordinal);
    }

    [Fact]
    public async Task An_unknown_model_is_answered_with_those_there_are()
    {
        (_, _, string error) = await Hosts.Run(Program, ["--model", "Nobody"]);

        Assert.Contains("There is no model 'Nobody'. There are: Swing.", error, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Help_explains_options_and_exit_codes()
    {
        (int code, string output, _) = await Hosts.Run(Program, ["--help"]);

        Assert.Equal(0, code);
        Assert.All(["--output", "--model", "--seed", "0 done", "1 an analysis failed", "2 bad usage"], part => Assert.Contains(part, output, StringComparison.Ordinal));
    }

    [Fact]
    public async Task A_folder_that_cannot_be_written_is_exit_code_one_before_any_work()
    {
        using Hosts.Folder folder = new();
        string file = Path.Combine(folder.Path, "file");
        await File.WriteAllTextAsync(file, "in the way");

        (int code, string output, string error) = await Hosts.Run(Program, ["--output", Path.Combine(file, "below")]);

        Assert.Equal(1, code);
        Assert.Equal("", output);
        Assert.Contains("cannot be written", error, StringComparison.Ordinal);
        Assert.Contains("--output", error, StringComparison.Ordinal);
        Assert.Equal(["file"], folder.Names);
    }

    [Fact]
    public async Task Stopped_it_writes_nothing_and_says_so()
    {
        using Hosts.Folder folder = new();

        (int code, _, string error) = await Hosts.Run(Program, ["--output", folder.Path], cancellation: new CancellationToken(canceled: true));

        Assert.Equal(1, code);
        Assert.Contains("Nothing was written", error, StringComparison.Ordinal);
        Assert.Empty(folder.Names);
    }

    [Fact]
    public async Task A_model_that_cannot_be_assessed_is_reported_and_the_others_are_assessed()
    {
        using Hosts.Folder folder = new();

        (int code, string output, _) = await Hosts.Run(Workbench.For(new Broken()).And(new Swing()), ["--output", folder.Path]);

        using JsonDocument json = JsonDocument.Parse(folder.Read("assessment.json"));
        int assessed = json.RootElement.GetProperty("assessments").GetArrayLength(), failed = json.RootElement.GetProperty("failures").GetArrayLength();
        Assert.Equal(2, assessed + failed);
        Assert.Equal(failed > 0 ? 1 : 0, code);
        Assert.Contains("stable focus", output, StringComparison.Ordinal);
        Assert.Contains("Broken", folder.Read("report.html"), StringComparison.Ordinal);
    }

    [Fact]
    public async Task Progress_is_shown_only_where_somebody_watches_and_leaves_no_trace()
    {
        using Hosts.Folder folder = new();

        (_, string output, string error) = await Hosts.Run(Program, ["--output", folder.Path], showsProgress: true);

        Assert.Contains("Swing (1 of 1)", error, StringComparison.Ordinal);
        Assert.EndsWith("\r", error, StringComparison.Ordinal);
        Assert.DoesNotContain("1 of 1", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Only_the_models_asked_for_are_assessed()
    {
        using Hosts.Folder folder = new();

        (int code, string output, _) = await Hosts.Run(Workbench.For(new Broken()).And(new Swing()), ["--output", folder.Path, "--model", "swing"]);

        Assert.Equal(0, code);
        Assert.DoesNotContain("Broken", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Figures_are_written_as_files_of_their_own_when_asked_for()
    {
        using Hosts.Folder folder = new();

        await Hosts.Run(Program, ["--output", folder.Path, "--figures"]);

        Assert.Contains("model-1-portrait.svg", folder.Names);
        Assert.All(folder.Names.Where(static name => name.EndsWith(".svg", StringComparison.Ordinal)), name =>
            Assert.Contains("@font-face", System.Xml.Linq.XElement.Parse(folder.Read(name)).Value, StringComparison.Ordinal));
    }

    [Fact]
    public async Task Equal_seeds_give_equal_files_apart_from_when_they_were_made()
    {
        using Hosts.Folder folder = new();
        string[] texts = new string[2];
        for (int i = 0; i < 2; i++)
        {
            await Hosts.Run(Program, ["--output", folder.Path, "--seed", "7"]);
            using JsonDocument json = JsonDocument.Parse(folder.Read("assessment.json"));
            texts[i] = json.RootElement.GetProperty("assessments").GetRawText();
        }

        Assert.Equal(texts[0], texts[1]);
    }
}
