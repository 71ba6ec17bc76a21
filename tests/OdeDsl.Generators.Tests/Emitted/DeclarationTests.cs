using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Emitted;

/// <summary>Where a model class may stand, from source to compiled code without a warning.</summary>
public sealed class DeclarationTests
{
    private static readonly string[] Namespaces = ["A", "a", "B.A"];

    [Theory]
    [InlineData("namespace A.@event; public partial class @class { ", "}")]
    [InlineData("public static partial class Outer<T> where T : new() { public partial struct Middle { public partial interface IInner { ", "} } }")]
    [InlineData("namespace A { namespace B { internal partial record R { ", "} } }")]
    [InlineData("", "")]
    public void Models_may_be_nested_generic_and_named_with_keywords(string before, string after)
    {
        string source = $$"""
            using OdeDsl;
            {{before}}
            [OdeModel]
            sealed partial class @double<@params_> where @params_ : struct
            {
                [State(Initial = -0.0)] internal partial double @params { get; private set; }
                [State] private protected partial double Global { get; init; }
                [Parameter(-1e300)] public partial double @this { get; set; }
                [Rate(nameof(@params))] double First => @params < @this ? Global : 1;
                [Rate(nameof(Global))] double Second() => System.Math.Abs(@params);
            }
            {{after}}
            """;
        Compiling.Run(source).WithoutProblems();
    }

    [Fact]
    public void Several_models_in_one_compilation_do_not_meet()
    {
        string[] sources = [.. Namespaces.Select(static name => $$"""
            namespace N.{{name}} { [OdeDsl.OdeModel] public partial class Model { [OdeDsl.State] public partial double X { get; set; } [OdeDsl.Rate("X")] double R => -X; } }
            """)];
        Assert.Equal(3, Compiling.Run(sources).WithoutProblems().Result.GeneratedSources.Length);
    }
}
