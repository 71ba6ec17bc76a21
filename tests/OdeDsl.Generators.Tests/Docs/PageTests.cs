using System.Text.RegularExpressions;
using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Docs;

/// <summary>The code on the pages of the documentation compiles as it stands, all blocks of a page together.</summary>
public sealed partial class PageTests
{
    [Theory]
    [InlineData("tables-inputs-events.md")]
    [InlineData("vectors.md")]
    public void The_code_of_a_page_compiles_without_a_warning(string page)
    {
        string text = File.ReadAllText(Path.Combine(Docs(), page)).ReplaceLineEndings("\n");
        string[] blocks = [.. CodeBlock().Matches(text).Select(static match => match.Groups[1].Value)];
        Assert.NotEmpty(blocks);
        GeneratorRun run = Compiling.Run(Compiling.Compile(["global using System;", .. blocks])).WithoutProblems();
        Assert.DoesNotContain(run.Output.GetDiagnostics(), static diagnostic => diagnostic.Severity >= DiagnosticSeverity.Warning);
    }

    [GeneratedRegex("```csharp\n(.*?)```", RegexOptions.Singleline)]
    private static partial Regex CodeBlock();

    private static string Docs()
    {
        string? folder = AppContext.BaseDirectory;
        while (folder is not null && !File.Exists(Path.Combine(folder, "OdeDsl.sln"))) folder = Path.GetDirectoryName(folder);
        return Path.Combine(folder ?? throw new InvalidOperationException("The repository is not found above the tests."), "docs");
    }
}
