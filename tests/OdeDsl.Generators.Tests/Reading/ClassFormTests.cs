using OdeDsl.Generators.Reading;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Reading;

/// <summary>Where and how a model class may be declared.</summary>
public sealed class ClassFormTests
{
    private const string Members = "[State] public partial double X { get; set; } [Rate(nameof(X))] double Rate => -X;";

    [Theory]
    [InlineData("[OdeModel] partial class Model")]
    [InlineData("[OdeModel] public sealed partial class Model")]
    [InlineData("[OdeModel] public partial record Model")]
    [InlineData("[OdeModel] public sealed partial record class Model")]
    [InlineData("namespace A.B; [OdeModel] internal partial class Model")]
    [InlineData("namespace A { namespace B { [OdeModel] partial class Model", "} }")]
    [InlineData("partial class Outer { [OdeModel] private partial class Model", "}")]
    [InlineData("partial struct Outer { [OdeModel] public partial class Model", "}")]
    [InlineData("readonly partial struct Outer { [OdeModel] public partial class Model", "}")]
    [InlineData("ref partial struct Outer { [OdeModel] public partial class Model", "}")]
    [InlineData("partial record Outer(int A) { [OdeModel] public partial class Model", "}")]
    [InlineData("partial record struct Outer { [OdeModel] public partial class Model", "}")]
    [InlineData("partial interface IOuter { [OdeModel] public partial class Model", "}")]
    [InlineData("static partial class Outer { [OdeModel] public partial class Model", "}")]
    [InlineData("abstract partial class Outer { partial struct Middle { [OdeModel] internal partial class Model", "} }")]
    public void A_class_form_is_supported(string declaration, string closing = "") =>
        Compiling.Run($"using OdeDsl;\n{declaration} {{ {Members} }} {closing}").WithoutProblems();

    [Fact]
    public void Generic_models_in_generic_containers_run()
    {
        GeneratorRun run = Compiling.Run("""
            using OdeDsl;
            public partial class Outer<T> where T : struct
            {
                [OdeModel]
                public partial class Model<TKind> where TKind : class
                {
                    [State] public partial double X { get; set; }
                    [Parameter(3)] public partial double P { get; set; }
                    [Rate(nameof(X))] double Rate => -P * X + Scale;
                    static double Scale => 2;
                }
            }
            """).WithoutProblems();
        RunningModel.Load(run, typeof(int), typeof(string)).AssertFaithful(0, [1.5], [2.5]);
    }

    [Fact]
    public void Keywords_are_names_like_any_other()
    {
        GeneratorRun run = Compiling.Run("""
            using OdeDsl;
            namespace @event.@namespace.@record;
            public partial class @class<@int>
            {
                [OdeModel]
                public sealed partial class @struct
                {
                    [State] public partial double @double { get; set; }
                    [State] public partial double @value { get; set; }
                    [Parameter(1)] public partial double @if { get; set; }
                    [Parameter(2)] public partial double time { get; set; }
                    [Parameter(2)] public partial double state { get; set; }
                    [Parameter(2)] public partial double @field { get; set; }
                    [Rate(nameof(@double))] double @return(double @time) => @if * @double + @time * this.time;
                    [Rate(nameof(@value))] double @base => @double - state * @field;
                    [Observable] double @switch => @double > 0 ? @if : time;
                }
            }
            """).WithoutProblems();
        RunningModel.Load(run, typeof(int)).AssertFaithful(0.5, [1.5, -2], [2.5, 3.5, 4.5, 5.5]);
    }

    [Fact]
    public void Names_that_generated_code_uses_itself_may_be_the_users()
    {
        GeneratorRun run = Compiling.Run("""
            namespace Works.System;
            using OdeDsl;
            static class Math { public static double Sin(double x) => x + 1; }
            static class Span { }
            [OdeModel]
            public sealed partial class Model
            {
                readonly int _x = 0;
                readonly int _p2 = 0;
                [State] public partial double X { get; set; }
                [Parameter(1)] public partial double P { get; set; }
                [Rate(nameof(X))] double Rates => Math.Sin(X) + global::System.Math.Sin(P);
                [Observable] double Description => _x + _p2 == 0 ? 1 : 2;
                string state = "", time = "";
                public override string ToString() => state + time;
            }
            """);
        Assert.Empty(run.Problems);
        Assert.Empty(run.InGeneratedFiles);
    }

    [Fact]
    public void Parts_in_several_files_are_one_model()
    {
        RunningModel model = RunningModel.Load(
            "using OdeDsl;\npublic partial class Model { [State] public partial double X { get; set; } double Help(double v) => v * P; }",
            "using OdeDsl;\n[OdeModel] public partial class Model { [Rate(nameof(X))] double XRate => Help(X) + Y; }",
            "using OdeDsl;\npublic partial class Model { [State] public partial double Y { get; set; } [Parameter(1)] public partial double P { get; set; } [Rate(nameof(Y))] double YRate => -X; }");
        Assert.Equal(["X", "Y"], model.Description.States.Select(static state => state.Name));
        model.AssertFaithful(0, [1.5, 2.5], [3.5]);
    }

    [Theory]
    [InlineData("public partial double X { get; set; }")]
    [InlineData("public partial double X { get; private set; }")]
    [InlineData("public partial double X { get; init; }")]
    [InlineData("public partial double X { get; }")]
    [InlineData("public required partial double X { get; set; }")]
    [InlineData("internal partial double X { private get; set; }")]
    [InlineData("protected internal partial double X { get; private protected set; }")]
    [InlineData("partial double X { get; set; }")]
    [InlineData("private partial double X { get; set; }")]
    [InlineData("public new partial double X { get; set; }")]
    [InlineData("public unsafe partial double X { get; set; }")]
    [InlineData("[System.Obsolete] public partial double X { get; set; }")]
    [InlineData("/** <summary> Several\n * lines. </summary> */ public partial double X { get; set; }")]
    public void A_property_form_is_supported(string property) => Compiling.Run($$"""
        using OdeDsl;
        public class Base { public double X { get; set; } }
        [OdeModel]
        public partial class Model{{(property.Contains("new", StringComparison.Ordinal) ? " : Base" : "")}}
        {
            [State] {{property}}
            [Rate("X")] double XRate => 1;
        }
        """).WithoutProblems();

    [Fact]
    public void Two_models_that_differ_by_case_or_place_or_arity_have_files_of_their_own()
    {
        string body = $"{{ {Members} }}";
        GeneratorRun run = Compiling.Run($$"""
            using OdeDsl;
            [OdeModel] partial class Tank {{body}}
            [OdeModel] partial class TANK {{body}}
            [OdeModel] partial class Tank<T> {{body}}
            namespace A { [OdeModel] partial class Tank {{body}} }
            partial class B { [OdeModel] partial class Tank {{body}} }
            namespace B_ { [OdeModel] partial class Tänk {{body}} }
            """).WithoutProblems();
        Assert.Equal(6, run.Result.GeneratedSources.Length);
    }

    [Theory]
    [InlineData("/// <summary>\n/// A level <paramref name=\"x\"/> of <see cref=\"Model\"/>,\n/// in <b>metres</b>.\n/// </summary>\n/// <remarks>More.</remarks>", "A level x of Model, in metres.")]
    [InlineData("/** <summary> Several\n     * lines. </summary> */", "Several lines.")]
    [InlineData("// no documentation", "")]
    [InlineData("/// <summary>Broken", "")]
    [InlineData("/// <remarks>No summary.</remarks>", "")]
    public void Summaries_are_read_as_plain_text(string comment, string expected)
    {
        ModelDefinition model = ModelText.Read($"using OdeDsl;\n[OdeModel] partial class Model {{\n{comment}\n{Members} }}").Model!;
        Assert.Equal(expected, model.States[0].Property.Summary);
    }

    [Theory]
    [InlineData("double R => X /* level */ +\n    Y; // sum", "X + Y")]
    [InlineData("double R { get { return X+Y; } }", "X+Y")]
    [InlineData("double R() { double a = X; // level\n return a; }", "{ double a = X; return a; }")]
    [InlineData("double R { get => @\"\n a\".Length * X; }", "@\"  a\".Length * X")]
    public void The_text_of_an_equation_is_the_users_on_one_line(string member, string expected)
    {
        ModelDefinition model = ModelText.Read(Marked.Model("[Rate(nameof(X))] " + member)).Model!;
        Assert.Equal(expected, model.States[0].RateText);
    }

    [Fact]
    public void Conditions_and_kinks_keep_the_users_text()
    {
        ModelDefinition model = ModelText.Read(Marked.Equation(
            "(X  <  P ? 1.0 : 2) + Math.Abs( Y ) + (Y is > 3 ? 1.0 : 2) + (P > 0 ? 1.0 : 2) + X % 2 + (X == 1 ? 1.0 : 2)")).Model!;
        Assert.Equal(["X < P", "Math.Abs( Y )", "Y > 3", "P > 0", "X % 2"], model.ConditionTexts.Select(static text => text.Text));
    }
}
