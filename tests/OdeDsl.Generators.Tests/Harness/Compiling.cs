using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;

namespace OdeDsl.Generators.Tests.Harness;

/// <summary>
/// Compilations as a project would make them. The references are the framework that runs the tests (its list of trusted assemblies,
/// which does not depend on what happens to be loaded) and the runtime library.
/// </summary>
internal static class Compiling
{
    public static readonly MetadataReference[] References =
        [.. ((string)AppContext.GetData("TRUSTED_PLATFORM_ASSEMBLIES")!)
            .Split(Path.PathSeparator)
            .Where(static path => Path.GetFileName(path) is var name
                && (name.StartsWith("System.", StringComparison.Ordinal) || name is "netstandard.dll" or "mscorlib.dll" or "OdeDsl.dll"))
            .Select(static path => MetadataReference.CreateFromFile(path))];

    public static readonly CSharpParseOptions ParseOptions = new(LanguageVersion.Latest, DocumentationMode.Parse);

    public static CSharpCompilation Compile(params string[] sources) => Compile(ParseOptions, sources);

    public static CSharpCompilation Compile(CSharpParseOptions options, params string[] sources) => CSharpCompilation.Create(
        "Consumer",
        sources.Select((source, i) => CSharpSyntaxTree.ParseText(source, options, $"/consumer/Source{i}.cs")),
        References,
        new(OutputKind.DynamicallyLinkedLibrary, nullableContextOptions: NullableContextOptions.Enable, allowUnsafe: true));

    public static GeneratorDriver Driver(CSharpParseOptions? options = null, bool trackSteps = false) => CSharpGeneratorDriver.Create(
        [new ModelGenerator().AsSourceGenerator()],
        parseOptions: options ?? ParseOptions,
        driverOptions: new(IncrementalGeneratorOutputKind.None, trackSteps));

    /// <summary>Runs the generator; fails if it throws or if the generated text has errors or warnings.</summary>
    public static GeneratorRun Run(params string[] sources) => Run(Compile(sources));

    public static GeneratorRun Run(CSharpCompilation compilation)
    {
        GeneratorDriver driver = Driver().RunGeneratorsAndUpdateCompilation(compilation, out Compilation output, out _);
        GeneratorRunResult result = driver.GetRunResult().Results.Single();
        Assert.Null(result.Exception);
        return new((CSharpCompilation)output, result);
    }
}

/// <summary>What one run of the generator gave.</summary>
internal sealed record GeneratorRun(CSharpCompilation Output, GeneratorRunResult Result)
{
    public Diagnostic[] Problems => [.. Result.Diagnostics];

    /// <summary>Errors and warnings of the compiler in generated files.</summary>
    public Diagnostic[] InGeneratedFiles => [.. Output.GetDiagnostics().Where(diagnostic =>
        diagnostic.Severity >= DiagnosticSeverity.Warning
        && Result.GeneratedSources.Any(source => source.SyntaxTree == diagnostic.Location.SourceTree))];

    public Diagnostic[] Errors => [.. Output.GetDiagnostics().Where(static diagnostic => diagnostic.Severity == DiagnosticSeverity.Error)];

    public GeneratorRun WithoutProblems()
    {
        Assert.Empty(Problems);
        Assert.Empty(InGeneratedFiles);
        Assert.Empty(Errors);
        return this;
    }
}
