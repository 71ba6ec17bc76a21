using System.Diagnostics;
using System.Text;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using OdeDsl.Generators.Reading;
using OdeDsl.Generators.Tests.Harness;
using OdeDsl.Generators.Writing;

namespace OdeDsl.Generators.Tests.Emitted;

public sealed class JitTests
{
    /// <summary>
    /// Beyond its limits the JIT compiles a method without optimising it and says so only in its own summary. A child process
    /// compiles every method of a large model; the summary must not name one with minimal optimisation.
    /// </summary>
    [Fact]
    public void Every_method_of_a_large_model_is_optimised()
    {
        string folder = Directory.CreateTempSubdirectory("odedsl-jit-").FullName;
        try
        {
            WriteProgram(folder, Network.Of(120));
            string summary = Run(folder);
            string[] methods = [.. summary.Split('\n').Where(static line => line.Contains("Equations:", StringComparison.Ordinal))];
            Assert.True(methods.Length >= 20, summary);
            Assert.All(methods, static line => Assert.DoesNotContain("MinOpts", line, StringComparison.Ordinal));
            Assert.All(methods, static line => Assert.Contains("FullOpts", line, StringComparison.Ordinal));
        }
        finally
        {
            Directory.Delete(folder, recursive: true);
        }
    }

    private static void WriteProgram(string folder, ModelDefinition model)
    {
        string main = $$"""
            using System;
            using System.Reflection;
            using System.Runtime.CompilerServices;
            using OdeDsl.Scalars;
            RuntimeTypeHandle[] kinds = [typeof(ScalarDouble).TypeHandle, typeof(Lanes8).TypeHandle, typeof(Interval).TypeHandle, typeof(Jet<Order3>).TypeHandle];
            foreach (MethodInfo method in typeof(Models.{{model.Type.Types[0].Name}}.Equations).GetMethods(BindingFlags.Static | BindingFlags.Public | BindingFlags.NonPublic | BindingFlags.DeclaredOnly))
            {
                if (!method.IsGenericMethodDefinition) RuntimeHelpers.PrepareMethod(method.MethodHandle);
                else foreach (RuntimeTypeHandle kind in kinds) RuntimeHelpers.PrepareMethod(method.MethodHandle, [kind]);
            }
            """;
        CSharpParseOptions parse = new(LanguageVersion.CSharp13);
        string[] sources = [main, ModelWriter.Write(model, CancellationToken.None), EmittedModel.UserHalf(model)];
        CSharpCompilation compilation = CSharpCompilation.Create(
            "Program", [.. sources.Select(source => CSharpSyntaxTree.ParseText(source, parse, encoding: Encoding.UTF8))], Compiling.References,
            new CSharpCompilationOptions(OutputKind.ConsoleApplication, optimizationLevel: OptimizationLevel.Release));
        var result = compilation.Emit(Path.Combine(folder, "program.dll"));
        Assert.True(result.Success, string.Join("\n", result.Diagnostics.Take(3)));
        string runtime = Path.Combine(AppContext.BaseDirectory, "OdeDsl.dll");
        File.Copy(runtime, Path.Combine(folder, "OdeDsl.dll"));
        File.WriteAllText(
            Path.Combine(folder, "program.runtimeconfig.json"),
            $$"""{ "runtimeOptions": { "framework": { "name": "Microsoft.NETCore.App", "version": "{{Environment.Version}}" } } }""");
    }

    private static string Run(string folder)
    {
        string summary = Path.Combine(folder, "summary.txt");
        ProcessStartInfo start = new(Environment.ProcessPath!, ["exec", Path.Combine(folder, "program.dll")]) { RedirectStandardError = true };
        start.Environment["DOTNET_JitStdOutFile"] = summary;
        start.Environment["DOTNET_JitDisasmSummary"] = "1";
        start.Environment["DOTNET_TieredCompilation"] = "0";
        using Process process = Process.Start(start)!;
        string errors = process.StandardError.ReadToEnd();
        process.WaitForExit();
        Assert.True(process.ExitCode == 0, errors);
        return File.ReadAllText(summary);
    }
}
