using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Diagnostics;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Tests.Harness;

/// <summary>Runs every analyzer of the generator's assembly, as a build does.</summary>
internal static class Advising
{
    public static readonly ImmutableArray<DiagnosticAnalyzer> Analyzers =
        [.. typeof(Descriptors).Assembly.GetTypes()
            .Where(static type => type.IsSubclassOf(typeof(DiagnosticAnalyzer)))
            .Select(static type => (DiagnosticAnalyzer)Activator.CreateInstance(type)!)];

    /// <summary>What the analyzers tell, in the order of the source. An analyzer that throws is among it, as AD0001.</summary>
    public static async Task<Diagnostic[]> Advice(Compilation compilation) =>
        [.. (await compilation.WithAnalyzers(Analyzers).GetAnalyzerDiagnosticsAsync())
            .OrderBy(static diagnostic => diagnostic.Location.SourceSpan.Start)];

    /// <summary>The advice on a model's source that the generator has completed.</summary>
    public static Task<Diagnostic[]> Advice(string source) => Advice(Compiling.Run("using System;\nusing OdeDsl;\n" + source).Output);

    /// <summary>The text at which a diagnostic points.</summary>
    public static string Place(Diagnostic diagnostic) => diagnostic.Location.SourceTree!.GetText().ToString(diagnostic.Location.SourceSpan);
}
