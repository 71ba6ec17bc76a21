using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Diagnostics;
using OdeDsl.Generators.Diagnostics;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Diagnostics;

public sealed class AttributeOutsideModelTests
{
    [Theory]
    [InlineData("class Tank { [State] public double Level { get; set; } }", "State")]
    [InlineData("struct Tank { [Observable(Unit = \"m\")] public double Level() => 1; }", "Observable(Unit = \"m\")")]
    [InlineData("class Tank { [Rate(\"Level\")] public double Level() => 1; }", "Rate(\"Level\")")]
    [InlineData("[OdeModel] partial class Tank { class Inner { [Parameter(1)] public double Level { get; set; } } }", "Parameter(1)")]
    public async Task A_mark_outside_a_model_is_told_where_it_stands(string code, string place)
    {
        Diagnostic problem = Assert.Single(await Problems(code));
        Assert.Equal("ODE0012", problem.Id);
        Assert.Equal(place, problem.Location.SourceTree!.GetText().ToString(problem.Location.SourceSpan));
    }

    [Fact]
    public async Task Marks_inside_a_model_and_other_attributes_are_not_told_of() =>
        Assert.Empty(await Problems("""
            [OdeModel] partial class Tank { [State] public partial double Level { get; set; } }
            class Other { [System.Obsolete] int A => 1; }
            """));

    private static Task<System.Collections.Immutable.ImmutableArray<Diagnostic>> Problems(string code) =>
        Compiling.Compile("using OdeDsl;\n" + code).WithAnalyzers([new AttributeOutsideModelAnalyzer()]).GetAnalyzerDiagnosticsAsync();
}
