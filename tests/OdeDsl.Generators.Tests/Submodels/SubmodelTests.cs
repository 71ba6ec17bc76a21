using System.Collections.Immutable;
using System.Globalization;
using System.Reflection;
using System.Runtime.Loader;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using OdeDsl.Generators.Tests.Emitted;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Submodels;

/// <summary>Models made of models: their equations are those of the model that would be written in one piece.</summary>
public sealed class SubmodelTests
{
    internal const string Tank = """
        using System;
        using OdeDsl;
        [OdeModel]
        public sealed partial class Tank
        {
            public const double Gravity = 9.81;
            [State(Initial = 1, Lower = 0, Upper = 9)] public partial double Level { get; internal set; }
            [Parameter(2, Lower = 0.1)] public partial double Area { get; set; }
            [Parameter(0.3)] public partial double Outlet { get; private set; }
            [Parameter(0.5)] public partial double Inflow { get; set; }
            private double Head => Math.Max(Level, 0);
            [Observable] public double Outflow => Outlet * Math.Sqrt(2 * Gravity * Head);
            public double Scaled(double by) => by * Outflow;
            [Rate(nameof(Level))] private double LevelRate => (Inflow - Outflow) / Area;
        }
        """;

    internal const string Cascade = """
        using System;
        using OdeDsl;
        [OdeModel]
        public sealed partial class Cascade
        {
            [State(Initial = 0.25)] public partial double Gate { get; set; }
            [Parameter(4)] public partial double Source { get; set; }
            [Submodel] public Tank Upper { get; } = new() { Area = 3, Level = 2 };
            [Submodel] public partial Tank Lower { get; private set; }
            [Input(nameof(Upper), nameof(Tank.Inflow))] private double UpperInflow(double time) => Source * Gate + Math.Sin(time) - Lower.Scaled(0.125);
            [Input(nameof(Lower), nameof(Tank.Inflow))] private double LowerInflow => Upper.Outflow;
            [Observable] public double Difference => Upper.Level - Lower.Level;
            [Rate(nameof(Gate))] private double GateRate => Lower.Level < 1.5 ? Lower.Area - Gate : -Gate;
        }
        """;

    /// <summary>The same by hand.</summary>
    private const string Flat = """
        using System;
        using OdeDsl;
        [OdeModel]
        public sealed partial class Flat
        {
            [State(Initial = 0.25)] public partial double Gate { get; set; }
            [State(Initial = 2)] public partial double UpperLevel { get; set; }
            [State(Initial = 1)] public partial double LowerLevel { get; set; }
            [Parameter(4)] public partial double Source { get; set; }
            [Parameter(3)] public partial double UpperArea { get; set; }
            [Parameter(0.3)] public partial double UpperOutlet { get; set; }
            [Parameter(2)] public partial double LowerArea { get; set; }
            [Parameter(0.3)] public partial double LowerOutlet { get; set; }
            private double UpperOutflow => UpperOutlet * Math.Sqrt(2 * 9.81 * Math.Max(UpperLevel, 0));
            private double LowerOutflow => LowerOutlet * Math.Sqrt(2 * 9.81 * Math.Max(LowerLevel, 0));
            private double UpperInflow(double time) => Source * Gate + Math.Sin(time) - 0.125 * LowerOutflow;
            [Rate(nameof(Gate))] private double GateRate => LowerLevel < 1.5 ? LowerArea - Gate : -Gate;
            [Rate(nameof(UpperLevel))] private double UpperRate(double time) => (UpperInflow(time) - UpperOutflow) / UpperArea;
            [Rate(nameof(LowerLevel))] private double LowerRate => (UpperOutflow - LowerOutflow) / LowerArea;
            [Observable] public double Difference => UpperLevel - LowerLevel;
            [Observable] public double OneOut => UpperOutflow;
            [Observable] public double TwoOut => LowerOutflow;
        }
        """;

    [Fact]
    public void The_numbers_of_submodels_stand_behind_the_models_own_under_names_with_dots()
    {
        var description = Load(Tank, Cascade)("Cascade").Description;
        Assert.Equal(["Gate", "Upper.Level", "Lower.Level"], description.States.Select(static state => state.Name));
        Assert.Equal([0.25, 2, 1], description.States.Select(static state => state.Initial));
        Assert.Equal([double.PositiveInfinity, 9, 9], description.States.Select(static state => state.Upper));
        Assert.Equal(
            ["Source", "Upper.Area", "Upper.Outlet", "Lower.Area", "Lower.Outlet"],
            description.Parameters.Select(static parameter => parameter.Name));
        Assert.Equal([4, 3, 0.3, 2, 0.3], description.Parameters.Select(static parameter => parameter.Default));
        Assert.Equal(["Difference", "Upper.Outflow", "Lower.Outflow"], description.Observables.Select(static observable => observable.Name));
        Assert.Equal(
            ["Lower.Level < 1.5", "Lower: Math.Max(Level, 0)", "Upper: Math.Max(Level, 0)"],
            description.Switches.Select(static item => item.Text).Order(StringComparer.Ordinal));
    }

    [Fact]
    public void The_equations_of_the_whole_are_those_of_the_model_written_in_one_piece_bit_for_bit()
    {
        var load = Load(Tank, Cascade, Flat);
        Composed.AssertSame(load("Flat"), load("Cascade"), seed: 1, points: 200);
    }

    [Fact]
    public void Numbers_pass_through_the_objects_and_copies_have_submodels_of_their_own()
    {
        double[] state = [1.5, 2.5, 3.5], parameters = [5, 6, 7, 8, 9];
        Assert.Equal([.. state, .. parameters], Load(Tank, Cascade)("Cascade").ThroughCopy(state, parameters));
    }

    [Fact]
    public void A_call_of_every_member_allocates_nothing() =>
        Assert.Equal(0, Load(Tank, Cascade)("Cascade").AllocatedByEveryMember(0.5, [1, 2, 3], [4, 3, 0.3, 2, 0.3]));

    [Fact]
    public void Submodels_may_have_submodels()
    {
        const string Nest = """
            using OdeDsl;
            namespace @namespace;
            [OdeModel]
            public partial class Nest
            {
                [Submodel] public Cascade Left { get; init; } = new() { Source = 7, Upper = { Area = 11 } };
                [Submodel] internal Cascade @event { get; set; } = new Cascade();
                [Input(nameof(Left), nameof(Cascade.Source))] double LeftSource => @event.Lower.Outflow + Left.Difference;
            }
            """;
        var calls = Load(Tank, Cascade, Nest)("namespace.Nest");
        Assert.Equal(
            ["Left.Gate", "Left.Upper.Level", "Left.Lower.Level", "event.Gate", "event.Upper.Level", "event.Lower.Level"],
            calls.Description.States.Select(static state => state.Name));
        Assert.Equal(
            ["Left.Upper.Area", "Left.Upper.Outlet", "Left.Lower.Area", "Left.Lower.Outlet", "event.Source", "event.Upper.Area", "event.Upper.Outlet", "event.Lower.Area", "event.Lower.Outlet"],
            calls.Description.Parameters.Select(static parameter => parameter.Name));
        Assert.Equal(11, calls.Description.Parameters[0].Default);
        double[] state = [1, 2, 3, 4, 5, 6], parameters = [11, 12, 13, 14, 15, 16, 17, 18, 19];
        Assert.Equal([.. state, .. parameters], calls.ThroughCopy(state, parameters));
        // Left.Upper: (Source·Gate + sin 0 - outflow/8 of Left.Lower - own outflow) / Area, with Source = outflow of event.Lower + 2 - 3.
        double Out(double outlet, double level) => outlet * Math.Sqrt(2 * 9.81 * level);
        double expected = ((((Out(19, 6) + (2.0 - 3)) * 1) - (0.125 * Out(14, 3))) - Out(12, 2)) / 11;
        double actual = calls.Rates(0, state, parameters)[1];
        Assert.True(Math.Abs(actual - expected) <= 1e-12 * Math.Abs(expected), $"{actual:R}, not {expected:R}");
    }

    [Fact]
    public void A_problem_in_a_submodel_is_told_once()
    {
        Diagnostic problem = Assert.Single(Compiling.Run(Tank.Replace("/ Area", "/ Missing", StringComparison.Ordinal), Cascade).Problems);
        Assert.Equal("ODE0074", problem.Id);
    }

    [Fact]
    public void Connections_that_go_round_in_a_circle_are_told()
    {
        string loop = Cascade
            .Replace("=> Upper.Outflow;", "=> Upper.Inflow;", StringComparison.Ordinal)
            .Replace("Source * Gate", "Source * Lower.Inflow", StringComparison.Ordinal);
        Diagnostic problem = Assert.Single(Compiling.Run(Tank, loop).Problems);
        Assert.Equal("ODE0067", problem.Id);
        Assert.Contains("UpperInflow → LowerInflow → UpperInflow", problem.GetMessage(CultureInfo.InvariantCulture), StringComparison.Ordinal);
    }

    [Fact]
    public void A_submodel_from_another_assembly_is_refused()
    {
        CSharpCompilation library = Compiling.Compile(Tank).WithAssemblyName("Library");
        Compiling.Driver().RunGeneratorsAndUpdateCompilation(library, out Compilation output, out _);
        using MemoryStream image = new();
        Assert.True(output.Emit(image).Success);
        CSharpCompilation consumer = Compiling.Compile(Cascade).AddReferences(MetadataReference.CreateFromImage(image.ToArray()));
        GeneratorRun run = Compiling.Run(consumer);
        Assert.All(run.Problems, static problem => Assert.Equal("ODE0109", problem.Id));
        Assert.Equal(2, run.Problems.Length);
        Assert.Contains("assembly 'Library'", run.Problems[0].GetMessage(CultureInfo.InvariantCulture), StringComparison.Ordinal);
    }

    [Fact]
    public void Units_are_checked_through_submodels()
    {
        const string Pond = """
            using OdeDsl;
            [OdeModel(TimeUnit = "s")]
            public partial class Basin
            {
                [State(Unit = "m")] public partial double Level { get; set; }
                [Parameter(1, Unit = "m3/s")] public partial double Inflow { get; set; }
                [Parameter(1, Unit = "m2")] public partial double Area { get; set; }
                [Rate(nameof(Level))] double LevelRate => Inflow / Area;
            }
            [OdeModel(TimeUnit = "s")]
            public partial class Works
            {
                [Submodel] public Basin Settler { get; } = new();
                [Parameter(1, Unit = "m/s")] public partial double Rain { get; set; }
                [Input(nameof(Settler), nameof(Basin.Inflow))] double Caught => Rain * Settler.Area;
            }
            """;
        Compiling.Run(Pond).WithoutProblems();
        Marked.ExpectOne("ODE0103", Pond.Replace("Rain * Settler.Area", "[|Rain * Settler.Level|]", StringComparison.Ordinal));
        // Told in the submodel, not again in the model around it.
        Marked.ExpectOne("ODE0103", Pond.Replace("=> Inflow / Area", "=> [|Inflow * Area|]", StringComparison.Ordinal));
    }

    [Theory]
    [InlineData("a formula of the submodel", 0, "/ Area", "/ (Area + 1)", IncrementalStepRunReason.Modified)]
    [InlineData("a starting value of the submodel", 0, "[Parameter(2,", "[Parameter(2.5,", IncrementalStepRunReason.Modified)]
    [InlineData("a comment in the submodel", 0, "using OdeDsl;", "using OdeDsl; // more\n// text\n", IncrementalStepRunReason.Cached)]
    [InlineData("a comment in the whole", 1, "using OdeDsl;", "using OdeDsl; // more\n// text\n", IncrementalStepRunReason.Cached)]
    public void An_edit_of_a_submodel_writes_the_whole_anew(string edit, int file, string before, string after, IncrementalStepRunReason reason)
    {
        string[] sources = [Tank, Cascade];
        CSharpCompilation compilation = Compiling.Compile(sources);
        GeneratorDriver driver = Compiling.Driver(trackSteps: true).RunGenerators(compilation);
        SyntaxTree old = compilation.SyntaxTrees[file];
        SyntaxTree edited = CSharpSyntaxTree.ParseText(sources[file].Replace(before, after, StringComparison.Ordinal), Compiling.ParseOptions, old.FilePath);
        GeneratorRunResult result = driver.RunGenerators(compilation.ReplaceSyntaxTree(old, edited)).GetRunResult().Results.Single();
        IncrementalStepRunReason[] reasons = [.. result.TrackedOutputSteps.SelectMany(static step => step.Value)
            .SelectMany(static step => step.Outputs).Select(static output => output.Reason)];
        Assert.True(reasons.Length == 2 && reasons.All(found => found == reason), $"{edit}: {string.Join(", ", reasons)}");
    }

    /// <summary>Compiles sources with their generated halves, and gives the equations of a class.</summary>
    internal static Func<string, IEmittedCalls> Load(params string[] sources)
    {
        using MemoryStream image = new();
        var emitted = Compiling.Run(sources).WithoutProblems().Output.Emit(image);
        Assert.True(emitted.Success, string.Join("\n", emitted.Diagnostics));
        image.Position = 0;
        Assembly assembly = new AssemblyLoadContext(null, isCollectible: true).LoadFromStream(image);
        return name => EmittedModel.CallsOf(assembly.GetType(name)!);
    }
}
