using System.Reflection;
using System.Text.RegularExpressions;
using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Diagnostics;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Diagnostics;

/// <summary>Each problem has a page whose wrong code causes just that problem and whose right code causes none.</summary>
public sealed partial class DiagnosticPageTests
{
    /// <summary>Problems that no model's code causes by itself; each is tested elsewhere.</summary>
    private static readonly string[] WithoutCode =
    [
        "ODE0001", // a fault of the generator: RobustnessTests
        "ODE0010", // a setting of the project: DeclarationProblemTests
        "ODE0109", // needs another assembly: SubmodelTests
        "ODE0075", // needs thousands of members: BodyProblemTests
    ];

    private static readonly DiagnosticDescriptor[] All =
        [.. typeof(Descriptors).GetFields(BindingFlags.Static | BindingFlags.Public | BindingFlags.NonPublic)
            .Select(static field => field.GetValue(null)).OfType<DiagnosticDescriptor>().OrderBy(static descriptor => descriptor.Id, StringComparer.Ordinal)];

    public static TheoryData<string> Ids => [.. All.Select(static descriptor => descriptor.Id)];

    [Fact]
    public void Numbers_are_unique() => Assert.True(All.Select(static descriptor => descriptor.Id).Distinct().Count() == All.Length);

    [Theory]
    [MemberData(nameof(Ids))]
    public void A_problem_has_a_page_a_release_note_and_a_link(string id)
    {
        DiagnosticDescriptor descriptor = Find(id);
        string severity = descriptor.DefaultSeverity.ToString();
        string title = descriptor.Title.ToString(null);
        string page = Page(id);
        Assert.StartsWith($"# {id}: {title}\n\nSeverity: {severity.ToLowerInvariant()}\n\n", page, StringComparison.Ordinal);
        Assert.Matches($@"(?m)^{id} \| OdeDsl \| {severity} \| \w+$", Releases);
        Assert.EndsWith("/" + id, descriptor.HelpLinkUri, StringComparison.Ordinal);
        Assert.Equal(WithoutCode.Contains(id), Code(page, "Wrong") is null);
    }

    [Theory]
    [MemberData(nameof(Ids))]
    public async Task The_wrong_code_of_a_page_causes_this_problem_and_the_right_code_none(string id)
    {
        if (Code(Page(id), "Wrong") is not { } wrong) return; // The test above allows it for a list of problems only.
        GeneratorRun wrongRun = Compiling.Run(Whole(wrong));
        GeneratorRun rightRun = Compiling.Run(Whole(Code(Page(id), "Right")!)).WithoutProblems();
        Diagnostic[] told = [.. wrongRun.Problems, .. IsAdvice(id) ? await Advising.Advice(wrongRun.Output) : []];
        Assert.Equal(id, Assert.Single(told).Id);
        if (IsAdvice(id)) Assert.Empty(await Advising.Advice(rightRun.Output));
    }

    /// <summary>To write the index anew: run this test with UPDATE_INDEX=1 in the environment.</summary>
    [Fact]
    public void The_index_is_up_to_date()
    {
        string file = Path.Combine(Pages, "README.md");
        string index = File.ReadAllText(file).ReplaceLineEndings("\n");
        const string Head = "| id | severity | problem |\n|---|---|---|\n";
        int at = index.IndexOf(Head, StringComparison.Ordinal) + Head.Length;
        IEnumerable<string> rows = All.Select(static descriptor =>
            $"| [{descriptor.Id}]({descriptor.Id}.md) | {descriptor.DefaultSeverity.ToString().ToLowerInvariant()} | {descriptor.Title.ToString(null)} |\n");
        string expected = index[..at] + string.Concat(rows);
        if (Environment.GetEnvironmentVariable("UPDATE_INDEX") == "1") File.WriteAllText(file, expected);
        Assert.Equal(expected, File.ReadAllText(file).ReplaceLineEndings("\n"));
    }

    [Fact]
    public void There_is_no_page_without_a_problem() =>
        Assert.Equal(All.Length + 1, Directory.GetFiles(Pages, "*.md").Length);

    /// <summary>Whether an analyzer tells of it. (Analyzers look at the snippets of other pages too, whose frame is not worth their advice.)</summary>
    private static bool IsAdvice(string id) =>
        Advising.Analyzers.Any(analyzer => analyzer.SupportedDiagnostics.Any(descriptor => descriptor.Id == id));

    /// <summary>A snippet without a class stands inside a model.</summary>
    private static string Whole(string code)
    {
        if (code.Contains(" class ", StringComparison.Ordinal)) return "using System;\nusing OdeDsl;\n" + code;
        bool hasRate = code.Contains("[Rate(nameof(X))]", StringComparison.Ordinal);
        return Marked.Model(code + (hasRate ? "" : "\n[Rate(nameof(X))] double XRate => -X;"));
    }

    private static string? Code(string page, string heading) =>
        CodeBlock().Matches(page).FirstOrDefault(match => match.Groups[1].Value == heading)?.Groups[2].Value;

    [GeneratedRegex("## (Wrong|Right)\n\n```csharp\n(.*?)\n```", RegexOptions.Singleline)]
    private static partial Regex CodeBlock();

    private static DiagnosticDescriptor Find(string id) => All.Single(descriptor => descriptor.Id == id);

    private static string Page(string id) => File.ReadAllText(Path.Combine(Pages, id + ".md")).ReplaceLineEndings("\n");

    private static string Pages => Path.Combine(Repository.Root, "docs", "diagnostics");

    private static string Releases => string.Concat(
        Directory.GetFiles(Path.Combine(Repository.Root, "generators", "OdeDsl.Generators"), "AnalyzerReleases.*.md").Select(File.ReadAllText)).ReplaceLineEndings("\n");
}
