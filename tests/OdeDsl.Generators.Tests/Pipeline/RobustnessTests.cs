using System.Globalization;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Reading;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Pipeline;

public sealed class RobustnessTests
{
    private const string Valid = """
        using System;
        using OdeDsl;
        namespace Works.Inner;
        public partial struct Outer<T>
        {
            /// <summary>A model.</summary>
            [OdeModel]
            public sealed partial class Model
            {
                [State(Initial = -1.5, Lower = -10, Upper = 10, Unit = "1"), Angle] public partial double X { get; set; }
                [State] public partial double Y { get; private set; }
                [Parameter(2.5, Lower = 0)] public partial double P { get; init; }
                private static readonly double Root = Math.Sqrt(2);
                private double Flow(double level, double factor = 2) { double a = level; if (a < 0) return -a; a *= factor; return a; }
                [Rate(nameof(X))] private double XRate => X > 0 && Y < P ? Flow(X) : Y switch { < 0 => 1, >= 1 and < 2 => Math.Max(X, 2), _ => Root };
                [Rate(nameof(Y))] private double YRate(double time)
                {
                    int n = Math.Sign(X);
                    switch (n) { case 1: return time; case 0: break; default: n += 2; break; }
                    return n / 2 * Math.Abs(Y) + (double)(3 % 2) - Flow(factor: X, level: Y);
                }
                [Observable(Unit = "1")] public double Volume => P * X;
            }
        }
        """;

    private static readonly string[] Fragments =
    [
        "(", ")", "{", "}", "[", "]", ";", ",", ".", "=>", "?", ":", "1", "0.5", "\"a\"", "null", "int", "double", "static", "partial",
        "X", "this", "=", "++", "switch", "return", "new", "=> 1", "??", "await", "ref", "<T>",
    ];

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    public void No_mutation_of_a_model_makes_the_generator_fail(int seed)
    {
        Random random = new(seed);
        SyntaxNode root = CSharpSyntaxTree.ParseText(Valid, Compiling.ParseOptions).GetRoot();
        string[] tokens = [.. root.DescendantTokens().Select(static token => token.ToFullString())];
        for (int i = 0; i < 150; i++)
        {
            List<string> mutated = [.. tokens];
            int edits = random.Next(1, 4);
            for (int edit = 0; edit < edits; edit++)
            {
                int at = random.Next(mutated.Count);
                switch (random.Next(4))
                {
                    case 0: mutated.RemoveAt(at); break;
                    case 1: mutated.Insert(at, " " + Fragments[random.Next(Fragments.Length)] + " "); break;
                    case 2: mutated[at] = mutated[random.Next(mutated.Count)]; break;
                    default: mutated[at] = " " + Fragments[random.Next(Fragments.Length)] + " "; break;
                }
            }

            string source = string.Concat(mutated);
            GeneratorRunResult result = Compiling.Driver().RunGenerators(Compiling.Compile(source)).GetRunResult().Results.Single();
            Assert.True(result.Exception is null, $"{result.Exception}\n{source}");
            Assert.DoesNotContain(result.Diagnostics, static problem => problem.Id is "ODE0001" or "CS8785");
        }
    }

    [Theory]
    [InlineData("fi-FI", "\u2212", ",", "\u00a0")]
    [InlineData("de-DE", "-", ",", ".")]
    public void The_culture_changes_nothing(string name, string negative, string point, string group)
    {
        // The number format of that culture, also where the system has no culture data.
        CultureInfo culture = (CultureInfo)CultureInfo.InvariantCulture.Clone();
        culture.NumberFormat.NegativeSign = negative;
        culture.NumberFormat.NumberDecimalSeparator = point;
        culture.NumberFormat.NumberGroupSeparator = group;
        Assert.NotEqual("-1.5", (-1.5).ToString(culture));
        string faulty = Valid.Replace("Lower = -10", "Lower = 10.5", StringComparison.Ordinal);
        (string Text, string Problem) plain = Outcome();
        CultureInfo before = CultureInfo.CurrentCulture;
        try
        {
            CultureInfo.CurrentCulture = culture;
            Assert.True(plain == Outcome(), name);
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }

        (string, string) Outcome() => (
            Compiling.Run(Valid).WithoutProblems().Result.GeneratedSources.Single().SourceText.ToString(),
            Assert.Single(Compiling.Run(faulty).Problems).GetMessage(null));
    }

    [Fact]
    public void A_problem_can_be_suppressed_by_a_pragma_by_options_and_in_the_project()
    {
        const string Source = """
            using OdeDsl;
            [OdeModel]
            partial class Model
            {
                [State] public partial double X { get; set; }
                double gain;
            #pragma warning disable ODE0065
                [Rate(nameof(X))] double XRate => gain;
            #pragma warning restore ODE0065
            }
            """;
        string open = Source.Replace("#pragma warning disable ODE0065", "", StringComparison.Ordinal);
        Assert.DoesNotContain(Compiling.Run(Source).Problems, static problem => !problem.IsSuppressed);
        Assert.Equal("ODE0065", Assert.Single(Compiling.Run(open).Problems).Id);

        CSharpCompilation quiet = Compiling.Compile(open);
        quiet = quiet.WithOptions(quiet.Options.WithSpecificDiagnosticOptions([new("ODE0065", ReportDiagnostic.Suppress)]));
        Assert.DoesNotContain(Compiling.Run(quiet).Problems, static problem => !problem.IsSuppressed);
    }

    [Fact]
    public void A_model_whose_error_is_suppressed_gives_no_numbers_rather_than_wrong_ones()
    {
        string source = Marked.Model("""
            double gain = 3;
            #pragma warning disable ODE0065
            [Rate(nameof(X))] double XRate => gain * X;
            #pragma warning restore ODE0065
            """);
        RunningModel model = RunningModel.Load(Compiling.Run(source));
        Assert.All(model.Generated(0, [1, 2], [3]), static rate => Assert.True(double.IsNaN(rate)));
    }

    [Fact]
    public void A_fault_of_the_generator_is_told_as_such_and_cancellation_passes()
    {
        var type = (TypeDeclarationSyntax)CSharpSyntaxTree.ParseText("class Model { }").GetRoot().DescendantNodes().First();
        Diagnostic problem = Assert.Single(ModelGenerator.Guarded(type, static () => throw new InvalidOperationException("no such node")).Problems);
        Assert.Equal("ODE0001", problem.Id);
        Assert.Contains("no such node", problem.GetMessage(null), StringComparison.Ordinal);
        Assert.Equal("Model", problem.Location.SourceTree!.GetText().ToString(problem.Location.SourceSpan));
        Assert.Throws<OperationCanceledException>(() => ModelGenerator.Guarded(type, static () => throw new OperationCanceledException()));
    }

    [Fact]
    public void Reading_stops_when_it_is_cancelled()
    {
        CSharpCompilation compilation = Compiling.Compile(Valid);
        var type = compilation.SyntaxTrees[0].GetRoot().DescendantNodes().OfType<ClassDeclarationSyntax>().Single();
        INamedTypeSymbol model = compilation.GetSemanticModel(type.SyntaxTree).GetDeclaredSymbol(type)!;
        Assert.ThrowsAny<OperationCanceledException>(new ModelReader(model, type, compilation, new CancellationToken(canceled: true)).Read);
    }

    [Fact]
    public void An_error_in_an_equation_is_the_only_message_of_the_build()
    {
        const string Use = """
            class Use
            {
                double A(Model m) => m.X + m.P;
                void B(OdeDsl.Modeling.IOdeModel<Model, Model.Equations> m) { }
                void C(Model m) => B(m);
            }
            """;
        GeneratorRun run = Compiling.Run(Marked.Equation("Math.Round(X, 2)"), Use);
        Assert.Single(run.Problems);
        Assert.Empty(run.Errors);
        Assert.Empty(run.InGeneratedFiles);
    }
}
