using System.Reflection;
using System.Runtime.Loader;
using System.Text.RegularExpressions;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Docs;

/// <summary>The code that the README shows compiles as it stands, and runs.</summary>
public sealed partial class ReadmeTests
{
    [Fact]
    public void The_code_of_the_readme_compiles_without_a_warning_and_runs()
    {
        string[] blocks = Blocks("README.md");
        Assert.Equal(2, blocks.Length);
        CompilesAndRuns(blocks[0], "using OdeDsl;\n" + blocks[1]);
    }

    [Fact]
    public void The_code_of_the_package_readme_compiles_without_a_warning_and_runs() =>
        CompilesAndRuns(Assert.Single(Blocks(Path.Combine("src", "OdeDsl", "PACKAGE.md"))));

    [Fact]
    public void The_surge_tank_of_the_readme_has_the_numbers_of_the_sample_whose_picture_stands_beside_it()
    {
        Dictionary<string, string> shown = Numbers(Blocks("README.md")[0]);
        Assert.Equal(Numbers(File.ReadAllText(Path.Combine(Repository.Root, "samples", "Tarnwater", "SurgeTank.cs"))), shown);
        Assert.Equal(8, shown.Count);
    }

    private static Dictionary<string, string> Numbers(string model) =>
        Declaration().Matches(model).ToDictionary(static match => match.Groups[2].Value, static match => match.Groups[1].Value);

    [GeneratedRegex(@"\[((?:State|Parameter)\([^)]*\))\]\s+public partial double (\w+)")]
    private static partial Regex Declaration();

    private static string[] Blocks(string page) =>
        [.. CodeBlock().Matches(File.ReadAllText(Path.Combine(Repository.Root, page)).ReplaceLineEndings("\n")).Select(static match => match.Groups[1].Value)];

    private static void CompilesAndRuns(params string[] files)
    {
        // A new console project brings System along.
        CSharpCompilation program = Compiling.Compile(["global using System;", .. files])
            .WithOptions(new(OutputKind.ConsoleApplication, nullableContextOptions: NullableContextOptions.Enable));
        GeneratorRun run = Compiling.Run(program).WithoutProblems();
        Assert.DoesNotContain(run.Output.GetDiagnostics(), static diagnostic => diagnostic.Severity >= DiagnosticSeverity.Warning);

        using MemoryStream image = new();
        Assert.True(run.Output.Emit(image).Success);
        image.Position = 0;
        Assembly assembly = new AssemblyLoadContext(null, isCollectible: true).LoadFromStream(image);
        assembly.EntryPoint!.Invoke(null, [Array.Empty<string>()]);
    }

    [GeneratedRegex("```csharp\n(.*?)```", RegexOptions.Singleline)]
    private static partial Regex CodeBlock();
}
