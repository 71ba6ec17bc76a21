using System.Globalization;
using System.Text;
using BenchmarkDotNet.Attributes;
using BenchmarkDotNet.Engines;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using OdeDsl.Generators;

namespace OdeDsl.Benchmarks;

/// <summary>
/// The generator on flat models of 20 to 2,000 states: a first run, a run after an edit inside the model, and one after an edit elsewhere
/// (what an editor asks for at each key). Parsing is not counted, binding the model's bodies is.
/// </summary>
[InProcess]
[MemoryDiagnoser]
[SimpleJob(RunStrategy.Monitoring, launchCount: 1, warmupCount: 2, iterationCount: 7)]
public class GeneratorBenchmarks
{
    private static readonly CSharpParseOptions Options = new(LanguageVersion.Latest);

    private static readonly MetadataReference[] References =
        [.. ((string)AppContext.GetData("TRUSTED_PLATFORM_ASSEMBLIES")!).Split(Path.PathSeparator)
            .Where(static path => Path.GetFileName(path) is var name
                && (name.StartsWith("System.", StringComparison.Ordinal) || name is "netstandard.dll" or "OdeDsl.dll"))
            .Select(static path => MetadataReference.CreateFromFile(path))];

    private CSharpCompilation compilation = null!;
    private CSharpCompilation editedInside = null!;
    private CSharpCompilation editedElsewhere = null!;
    private GeneratorDriver warm = null!;

    [Params(20, 200, 2000)]
    public int States { get; set; }

    [IterationSetup]
    public void Setup()
    {
        SyntaxTree model = Parse(Ring(States, 1.5), "Ring.cs"), other = Parse("class Other { int A => 1; }", "Other.cs");
        compilation = CSharpCompilation.Create(
            "Consumer", [model, other], References, new CSharpCompilationOptions(OutputKind.DynamicallyLinkedLibrary));
        editedInside = compilation.ReplaceSyntaxTree(model, Parse(Ring(States, 2.5), "Ring.cs"));
        editedElsewhere = compilation.ReplaceSyntaxTree(other, Parse("class Other { int A => 2; }", "Other.cs"));
        warm = Driver().RunGenerators(compilation);
    }

    [Benchmark]
    public long FirstRun() => TextLength(Driver().RunGenerators(compilation));

    [Benchmark]
    public long EditInsideTheModel() => TextLength(warm.RunGenerators(editedInside));

    [Benchmark]
    public long EditElsewhere() => TextLength(warm.RunGenerators(editedElsewhere));

    /// <summary>Prints the length of the generated text by the number of states.</summary>
    public static void WriteSizes(TextWriter output)
    {
        output.WriteLine("| states | generated text, kB | kB a state | milliseconds |");
        output.WriteLine("|---|---|---|---|");
        foreach (int states in (int[])[20, 20, 200, 2000])
        {
            GeneratorBenchmarks benchmark = new() { States = states };
            benchmark.Setup();
            long start = System.Diagnostics.Stopwatch.GetTimestamp();
            double kilobytes = benchmark.FirstRun() / 1000.0;
            double milliseconds = System.Diagnostics.Stopwatch.GetElapsedTime(start).TotalMilliseconds;
            output.WriteLine(string.Create(
                CultureInfo.InvariantCulture, $"| {states} | {kilobytes:F0} | {kilobytes / states:F2} | {milliseconds:F0} |"));
        }
    }

    private static CSharpGeneratorDriver Driver() =>
        CSharpGeneratorDriver.Create([new ModelGenerator().AsSourceGenerator()], parseOptions: Options);

    private static long TextLength(GeneratorDriver driver) =>
        driver.GetRunResult().Results.Single().GeneratedSources.Sum(static source => (long)source.SourceText.Length);

    private static SyntaxTree Parse(string text, string path) => CSharpSyntaxTree.ParseText(text, Options, path);

    /// <summary>Cells on a ring that exchange with their neighbours through a saturating flux, each with a far connection.</summary>
    private static string Ring(int count, double source)
    {
        StringBuilder text = new();
        text.Append("using System; using OdeDsl;\n[OdeModel] public sealed partial class Ring\n{\n");
        text.Append("    [Parameter(1.2)] public partial double Rate { get; set; }\n    [Parameter(0.4)] public partial double Half { get; set; }\n");
        text.Append("    private double Flux(double from, double to) => Rate * (from - to) / Math.Sqrt(Half + (from - to) * (from - to));\n");
        for (int i = 0; i < count; i++)
        {
            (int before, int after, int far) = ((i + count - 1) % count, (i + 1) % count, (7 * i + 11) % count);
            string constant = i == 0 ? source.ToString("R", CultureInfo.InvariantCulture) : "1.5";
            text.Append(CultureInfo.InvariantCulture, $"    [State(Initial = 1)] public partial double X{i} {{ get; set; }}\n");
            text.Append(CultureInfo.InvariantCulture, $"    [Rate(nameof(X{i}))] private double X{i}Rate => Flux(X{before}, X{i}) - Flux(X{i}, X{after}) - Half * X{i} * X{far} + {constant};\n");
        }

        return text.Append("}\n").ToString();
    }
}
