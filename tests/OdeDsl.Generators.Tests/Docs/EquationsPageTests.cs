using System.Reflection;
using System.Runtime.Loader;
using System.Text.RegularExpressions;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Docs;

/// <summary>The code that the page on equations shows compiles, and the analyses take it as the page says.</summary>
public sealed partial class EquationsPageTests
{
    private const string Use = """
        using OdeDsl;
        public static class Use
        {
            public static double[] Run()
            {
                var cascade = new Cascade();
                cascade.Upper.Level = 3;
                var run = cascade.Simulate(until: 2000);
                var curve = cascade.Follow(p => p.Upper.Area, from: 4, to: 6);
                return [run[cascade.Upper.Level].At(0), run["Lower.Level"].At(2000), run[cascade.Lower.Outflow].At(2000), curve.Points[0].State[0], cascade.Lower.Inflow];
            }
        }
        """;

    [Fact]
    public void The_model_of_models_simulates_and_is_followed_by_its_longer_names()
    {
        string page = File.ReadAllText(Path.Combine(Repository.Root, "docs", "equations.md")).ReplaceLineEndings("\n");
        string block = CodeBlock().Match(page).Groups[1].Value;
        GeneratorRun run = Compiling.Run("global using System;", "using OdeDsl;\n" + block, Use).WithoutProblems();
        Assert.DoesNotContain(run.Output.GetDiagnostics(), static diagnostic => diagnostic.Severity >= DiagnosticSeverity.Warning);
        using MemoryStream image = new();
        Assert.True(run.Output.Emit(image).Success);
        image.Position = 0;
        Assembly assembly = new AssemblyLoadContext(null, isCollectible: true).LoadFromStream(image);
        double[] found = (double[])assembly.GetType("Use")!.GetMethod("Run")!.Invoke(null, [])!;
        // At rest the upper tank passes its inflow 0.1 on, the lower one half of it: 0.2 √h = 0.1 and 0.05.
        double[] expected = [3, 0.0625, 0.05, 0.25, 0.1];
        Assert.All(expected.Zip(found), static pair => Assert.True(Math.Abs(pair.First - pair.Second) <= 1e-4, $"{pair.Second:R}, not {pair.First}"));
    }

    [GeneratedRegex("```csharp\n(.*?)```", RegexOptions.Singleline)]
    private static partial Regex CodeBlock();
}
