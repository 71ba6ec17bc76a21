using Microsoft.CodeAnalysis.CSharp;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Diagnostics;

/// <summary>Problems of the model class and of its states, parameters, rates and observables.</summary>
public sealed class DeclarationProblemTests
{
    private const string Members = "[State] public partial double X { get; set; } [Rate(nameof(X))] double Rate => -X;";

    [Theory]
    [InlineData("ODE0002", "public class [|Model|]")]
    [InlineData("ODE0006", "public static partial class [|Model|]")]
    [InlineData("ODE0007", "public abstract partial class [|Model|]")]
    [InlineData("ODE0005", "file partial class [|Model|]")]
    [InlineData("ODE0011", "public partial class [|Equations|]")]
    [InlineData("ODE0011", "public partial class Model<[|Equations|]>")]
    public void A_class_that_cannot_be_a_model(string id, string declaration) =>
        Marked.ExpectOne(id, $"using OdeDsl;\n[OdeModel] {declaration} {{ {Members} }}");

    [Theory]
    [InlineData("ODE0003", "public class [|Outer|]")]
    [InlineData("ODE0003", "public struct [|Outer|]")]
    [InlineData("ODE0003", "public record [|Outer|]")]
    [InlineData("ODE0003", "public record struct [|Outer|]")]
    [InlineData("ODE0003", "public interface [|Outer|]")]
    [InlineData("ODE0003", "public partial class First { public class [|Outer|]", "}")]
    [InlineData("ODE0003", "public class [|First|] { public partial class Outer", "}")]
    [InlineData("ODE0005", "file partial class [|Outer|]")]
    [InlineData("ODE0011", "public partial class Outer<[|Equations|]>")]
    public void A_type_around_a_model_that_cannot_be_added_to(string id, string opening, string closing = "") =>
        Marked.ExpectOne(id, $"using OdeDsl;\n{opening} {{ [OdeModel] public partial class Model {{ {Members} }} }} {closing}");

    [Fact]
    public void A_member_that_takes_the_name_of_the_equations() =>
        Marked.ExpectOne("ODE0011", $"using OdeDsl;\n[OdeModel] partial class Model {{ {Members} int [|Equations|] = 1; }}");

    [Fact]
    public void A_base_class_that_takes_the_name_of_the_equations() =>
        Marked.ExpectOne("ODE0011", $"using OdeDsl;\nclass Base {{ public class [|Equations|]; }} [OdeModel] partial class Model : Base {{ {Members} }}");

    [Fact]
    public void An_attribute_on_two_parts() => Marked.ExpectOne(
        "ODE0004",
        $"using OdeDsl;\n[OdeModel] partial class Model {{ {Members} }}",
        "using OdeDsl;\n[[|OdeModel|]] partial class Model { }");

    [Theory]
    [InlineData("[State] public double X { get; set; }")]
    [InlineData("[Parameter(1)] public double X { get; set; }")]
    [InlineData("[Rate(\"Y\")] public double X => 1;")]
    [InlineData("[Observable] public double X() => 1;")]
    public void A_member_of_a_model_in_its_base_class(string member) => Marked.ExpectOne(
        "ODE0008", $"using OdeDsl;\npublic class Base {{ {member} }} [OdeModel] public partial class [|Model|] : Base {{ {Members.Replace('X', 'Z')} }}");

    [Fact]
    public void A_model_without_states() =>
        Marked.ExpectOne("ODE0009", "using OdeDsl;\n[OdeModel] partial class [|Model|] { [Parameter(1)] public partial double P { get; set; } }");

    [Fact]
    public void A_language_without_partial_properties()
    {
        var compilation = Compiling.Compile(new CSharpParseOptions(LanguageVersion.CSharp12), "using OdeDsl;\n[OdeModel] partial class Model { }");
        var problem = Assert.Single(Compiling.Run(compilation).Problems);
        Assert.Equal("ODE0010", problem.Id);
        Assert.Contains("12.0", problem.GetMessage(null), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("ODE0020", "[State] public double [|Z|] { get; set; }")]
    [InlineData("ODE0020", "[Parameter(1)] public double [|Z|] { get; set; }")]
    [InlineData("ODE0020", "[State] public double [|Z|] => 1;")]
    [InlineData("ODE0021", "[State] public partial [|float|] Z { get; set; }")]
    [InlineData("ODE0021", "[Parameter(1)] public partial [|long|] Z { get; set; }")]
    [InlineData("ODE0021", "[State] public partial [|double?|] Z { get; set; }")]
    [InlineData("ODE0021", "[State] public partial [|ref double|] Z { get; }")]
    [InlineData("ODE0022", "[State] public static partial double [|Z|] { get; set; }")]
    [InlineData("ODE0023", "[State] public partial double [|Z|] { set; }")]
    [InlineData("ODE0024", "[State] public partial double [|this|][int i] { get; set; }")]
    [InlineData("ODE0025", "[State] public partial double [|Z|] { get; set; } public partial double Z { get => 1; set { } }")]
    [InlineData("ODE0025", "[Parameter(1)] public partial double [|Z|] { get; } public partial double Z => 1;")]
    [InlineData("ODE0026", "[State, [|Parameter(1)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0026", "[State] [[|Observable|]] public partial double Z { get; set; }")]
    [InlineData("ODE0026", "[Parameter(1)] [[|Rate(nameof(X))|]] public partial double Z { get; set; }")]
    [InlineData("ODE0027", "[Parameter(1), [|Angle|]] public partial double Z { get; set; }")]
    [InlineData("ODE0027", "[[|Angle|]] public double Z => 1;")]
    [InlineData("ODE0028", "[State, [|Angle(0)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0028", "[State, [|Angle(-1)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0028", "[State, [|Angle(double.NaN)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0028", "[State, [|Angle(double.PositiveInfinity)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0029", "[[|State(Initial = double.NaN)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0029", "[[|Parameter(1.0 / 0)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0030", "[[|State(Lower = double.NaN)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0030", "[[|Parameter(1, Upper = double.NaN)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0031", "[[|State(Lower = 1, Upper = 1)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0031", "[[|Parameter(1, Lower = 2, Upper = -2)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0031", "[[|State(Lower = double.PositiveInfinity)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0032", "[[|State(Initial = 3, Upper = 2)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0032", "[[|Parameter(-1, Lower = 0)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0033", "[[|State(Initial = Missing)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0033", "[[|Parameter(Missing)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0033", "[[|Parameter|]] public partial double Z { get; set; }")]
    [InlineData("ODE0033", "[State, [|Angle(Missing)|]] public partial double Z { get; set; }")]
    [InlineData("ODE0034", "[State] public virtual partial double [|Z|] { get; set; }")]
    [InlineData("ODE0034", "[Parameter(1)] public override partial double [|Z|] { get; set; }")]
    public void A_property_that_cannot_be_a_state_or_parameter(string id, string property)
    {
        // A rate for Z where it is a state, so that the missing rate is no second problem.
        bool isState = property.Contains("State", StringComparison.Ordinal) && !property.Contains("this", StringComparison.Ordinal);
        string rate = isState ? "[Rate(\"Z\")] double ZRate => 1;" : "";
        Marked.ExpectOne(id, $$"""
            using OdeDsl;
            public class Base { public virtual double Z { get; set; } }
            [OdeModel] public partial class Model : Base
            {
                {{Members}}
                {{property}}
                {{rate}}
            }
            """);
    }

    [Theory]
    [InlineData("ODE0040", "[[|Rate(\"Z\")|]] double ZRate => 1;")]
    [InlineData("ODE0041", "[[|Rate(nameof(P))|]] double PRate => 1;")]
    [InlineData("ODE0041", "[[|Rate(nameof(Helper))|]] double ZRate => 1; double Helper => 2;")]
    [InlineData("ODE0042", "[[|Rate(nameof(X))|]] double Other => 1;")]
    [InlineData("ODE0043", "[State] public partial double [|Z|] { get; set; }")]
    [InlineData("ODE0044", "[Observable] [|int|] O => 1;")]
    [InlineData("ODE0044", "[Observable] [|float|] O() => 1;")]
    [InlineData("ODE0044", "[Observable] [|void|] O() { }")]
    [InlineData("ODE0045", "[Observable] double [|O|](double time, double x) => x;")]
    [InlineData("ODE0045", "[Observable] double [|O|](int time) => time;")]
    [InlineData("ODE0045", "[Observable] double [|O|](ref double time) => time;")]
    [InlineData("ODE0045", "[Observable] double [|O|](double x) => x;")]
    [InlineData("ODE0046", "[Observable] static double [|O|] => 1;")]
    [InlineData("ODE0047", "[Observable] double [|O|]<T>() => 1;")]
    [InlineData("ODE0048", "[Observable] double [|O|] { get; set; }")]
    [InlineData("ODE0048", "[Observable] double [|O|] { set { } }")]
    [InlineData("ODE0048", "[Observable] partial double [|O|]();")]
    [InlineData("ODE0049", "[Observable] public virtual double [|O|] => 1;")]
    [InlineData("ODE0050", "[Observable] double O() => 1; [Observable] double [|O|](double time) => time;")]
    [InlineData("ODE0033", "[[|Rate(null!)|]] double O() => 1;")]
    public void A_member_that_cannot_be_a_rate_or_observable(string id, string member) => Marked.ExpectOne(id, $$"""
        using OdeDsl;
        [OdeModel] public partial class Model
        {
            {{Members}}
            [Parameter(1)] public partial double P { get; set; }
            {{member}}
        }
        """);

    [Theory]
    [InlineData("ODE0044", "[Rate(nameof(X))] [|int|] XRate => 1;")]
    [InlineData("ODE0045", "[Rate(nameof(X))] double [|XRate|](double time, double x) => 1;")]
    [InlineData("ODE0046", "[Rate(nameof(X))] static double [|XRate|] => 1;")]
    [InlineData("ODE0048", "[Rate(nameof(X))] double [|XRate|] { get; }")]
    public void A_rate_with_a_problem_is_no_missing_rate(string id, string member) => Marked.ExpectOne(id, Marked.Model(member));
}
