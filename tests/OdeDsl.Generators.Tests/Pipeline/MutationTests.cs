using System.Text;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeActions;
using Microsoft.CodeAnalysis.CSharp;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Pipeline;

/// <summary>
/// Broken code goes through the generator, every analyzer and every fix that is offered: none of them may throw, whatever stands
/// in the file. (While somebody types, most of what they see is broken.)
/// </summary>
public sealed class MutationTests
{
    /// <summary>A file with something for each rule and each fix.</summary>
    private const string Faulty = """
        using System;
        using OdeDsl;
        namespace Works;
        public class Plant
        {
            /// <summary>A model.</summary>
            [OdeModel]
            public class Inner { [State] public partial double A { get; set; } }
        }
        [OdeModel]
        file static partial class Local { [State] public partial double A { get; set; } }
        [OdeModel]
        public partial class Model : Base
        {
            [State(Initial = -1.5, Lower = -10, Upper = 10, Unit = "m"), Angle] public partial double X { get; set; }
            [State] /* still without a rate */ public partial double Y { get; private set; }
            [Parameter(2.5, Lower = 0)] public double P { get; init; }
            [Parameter(1)] public static partial double Q { get; set; }
            [Parameter(1)] public partial float S { get; set; }
            [Parameter(1)] public partial double T { set; }
            [Parameter(1), Observable, Angle] public virtual partial double R { get; set; }
            private double Half(double level) => level / 2;
            [Rate(nameof(X))] private double XRate => X == 0 ? 1 / 2 * P : (X > 1 ? 2.0 : 0.0) / X;
            [Observable] public static double Two => 2;
            [Observable] public double Share => X switch { < 0 => 1, >= 1 and < 2 => 2 };
            [Observable] public double Lost => MathF.Abs((float)X) + Half(R) + Three;
        }
        [OdeModel] partial class Model { [Rate("Z")] double ZRate(double time) { if (time < 3) return time; return 1 / Y; } }
        public class Base { protected virtual double Three => 3; [Observable] double B => 1; }
        """;

    private static readonly string[] Fragments =
    [
        "(", ")", "{", "}", "[", "]", ";", ",", ".", "=>", "?", ":", "1", "0.5", "\"a\"", "null", "int", "double", "static", "partial", "sealed",
        "X", "this", "=", "==", "/", "++", "switch", "return", "new", "=> 1", "??", "await", "ref", "<T>", "class", "get;", "virtual", "[State]",
        "#if A\n", "\n#endif\n", "/*", "//", "[Rate(nameof(Y))]", "namespace N;", "_", "record", "file", "$\"{", "'",
    ];

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    public async Task No_mutation_makes_the_generator_an_analyzer_or_a_fix_throw(int seed)
    {
        Random random = new(seed);
        SyntaxNode root = CSharpSyntaxTree.ParseText(Faulty, Compiling.ParseOptions).GetRoot();
        string[] tokens = [.. root.DescendantTokens().Select(static token => token.ToFullString())];
        for (int i = 0; i < 25; i++)
        {
            List<string> mutated = [.. tokens];
            for (int edits = random.Next(1, 6); edits > 0; edits--)
            {
                int at = random.Next(mutated.Count);
                switch (random.Next(4))
                {
                    case 0: mutated.RemoveAt(at); break;
                    case 1: mutated.Insert(at, " " + Pick(random) + " "); break;
                    case 2: mutated[at] = mutated[random.Next(mutated.Count)]; break;
                    default: mutated[at] = " " + Pick(random) + " "; break;
                }
            }

            await Survives(string.Concat(mutated));
        }
    }

    [Fact]
    public async Task No_garbage_makes_the_generator_an_analyzer_or_a_fix_throw()
    {
        Random random = new(3);
        for (int i = 0; i < 30; i++)
        {
            // Cuts of the file in any order, words at random and characters at random.
            StringBuilder garbage = new("using OdeDsl; [OdeModel] ");
            for (int parts = random.Next(1, 12); parts > 0; parts--)
            {
                int start = random.Next(Faulty.Length), length = random.Next(Math.Min(120, Faulty.Length - start));
                garbage.Append(random.Next(3) switch
                {
                    0 => Faulty.Substring(start, length),
                    1 => string.Join(' ', Enumerable.Range(0, 8).Select(_ => Pick(random))),
                    _ => string.Concat(Enumerable.Range(0, 12).Select(_ => (char)random.Next(1, random.Next(2) == 0 ? 128 : 65536))),
                });
            }

            await Survives(garbage.ToString());
        }
    }

    [Fact]
    public async Task The_file_that_is_mutated_has_something_for_every_fix()
    {
        HashSet<string> told = [.. (await Fixing.Reports(Faulty)).Select(static report => report.Id)];
        string[] silent = [.. Fixing.Fixes.Where(fix => !fix.FixableDiagnosticIds.Any(told.Contains)).Select(static fix => fix.GetType().Name)];
        Assert.Empty(silent);
    }

    private static async Task Survives(string source)
    {
        try
        {
            Compilation compilation = Compiling.Compile(source);
            GeneratorDriver driver = Compiling.Driver().RunGeneratorsAndUpdateCompilation(compilation, out Compilation output, out _);
            GeneratorRunResult result = driver.GetRunResult().Results.Single();
            if (result.Exception is not null) throw result.Exception;
            Diagnostic[] reports = [.. result.Diagnostics, .. await Advising.Advice(output)];
            Assert.DoesNotContain(reports, static report => report.Id is "ODE0001" or "AD0001");

            using AdhocWorkspace workspace = new();
            Document document = Fixing.Open(workspace, source);
            foreach (Diagnostic report in reports.Where(static report => report.Location.SourceTree?.FilePath == "/consumer/Source0.cs"))
            {
                foreach (CodeAction offer in await Fixing.Offers(document, report)) await Fixing.After(document, offer);
            }
        }
        catch (Exception fault)
        {
            throw new InvalidOperationException($"{fault.Message}\nSource:\n{source}", fault);
        }
    }

    private static string Pick(Random random) => Fragments[random.Next(Fragments.Length)];
}
