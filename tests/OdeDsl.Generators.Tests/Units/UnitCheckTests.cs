using System.Globalization;
using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Units;

/// <summary>Where units do not fit, it is told at the smallest node; where they fit or are not stated, nothing is told.</summary>
public sealed class UnitCheckTests
{
    /// <summary>A tank with a jet: lengths, areas, flows, times, powers, an angle, temperatures, and members without a unit.</summary>
    private static string Tank(string members) => $$"""
        using System;
        using OdeDsl;
        [OdeModel(TimeUnit = "s")]
        public sealed partial class Tank
        {
            [State(Initial = 1, Unit = "m")] public partial double Level { get; set; }
            [Parameter(2, Unit = "m")] public partial double Top { get; set; }
            [Parameter(2, Unit = "m2")] public partial double Area { get; set; }
            [Parameter(0.1, Unit = "m3/s")] public partial double Inflow { get; set; }
            [Parameter(3, Unit = "s")] public partial double Delay { get; set; }
            [Parameter(3, Unit = "h")] public partial double Shift { get; set; }
            [Parameter(3, Unit = "km")] public partial double Reach { get; set; }
            [Parameter(3, Unit = "kW")] public partial double Power { get; set; }
            [Parameter(30, Unit = "deg")] public partial double Slope { get; set; }
            [Parameter(1, Unit = "rad")] public partial double Angle { get; set; }
            [Parameter(10, Unit = "%")] public partial double Share { get; set; }
            [Parameter(20, Unit = "Cel")] public partial double Warm { get; set; }
            [Parameter(5, Unit = "Cel")] public partial double Cold { get; set; }
            [Parameter(290, Unit = "K")] public partial double Kelvin { get; set; }
            [Parameter(1)] public partial double Free { get; set; }
            [Unit("m/s2")] private const double Gravity = 9.81;
            private const double Plain = 3;
            [Rate(nameof(Level))] private double LevelRate => Inflow / Area;
            {{members}}
        }
        """;

    private static string Observable(string expression) => Tank($"[Observable] private double Y => {expression};");

    [Theory]
    [InlineData("Level + Top")]
    [InlineData("Level + 0")]
    [InlineData("Level > 0 ? Level : 0.0")]
    [InlineData("Level + Free")]
    [InlineData("Level + Plain")]
    [InlineData("Math.Sqrt(2 * Gravity * Level) * Area + Inflow")]
    [InlineData("Math.Pow(Level, 1.5) / Math.Sqrt(Level) - Level")]
    [InlineData("Math.Cbrt(Level * Area) - Top")]
    [InlineData("Math.Sin(Angle) + Math.Exp(-Level / Top) + 1")]
    [InlineData("Math.Sin(2 * Math.PI * Level / Top)")]
    [InlineData("Math.Min(Level, Top) + Math.Clamp(Level, 0, Top) + Math.Max(Top, double.NegativeInfinity)")]
    [InlineData("Math.Atan2(Level, Top) + Angle")]
    [InlineData("Math.FusedMultiplyAdd(Inflow, Delay, Area * Level)")]
    [InlineData("Level % Top + Math.Abs(Top) + Math.Floor(Level) + Math.CopySign(Level, Inflow)")]
    [InlineData("Level switch { > 0 => Level, _ => Top } - Top")]
    [InlineData("(Warm - Cold) + Kelvin")]
    [InlineData("Warm + Kelvin - Cold + Kelvin")]
    [InlineData("Warm > Cold ? 1 : 2")]
    [InlineData("Math.Pow(Free, Free) + Math.Pow(Level / Top, Free)")]
    [InlineData("Square(Level) + Area; double Square(double x) => x * x")]
    [InlineData("Square(Level) / Area + Square(Inflow) / (Inflow * Inflow); double Square(double x) => x * x")]
    [InlineData("Helper + Area; double Helper => Level * Top")]
    [InlineData("Hours + Delay; [Unit(\"s\")] double Hours => 3600")]
    [InlineData("Fall + Level; [Unit(\"m\")] double Fall => Level > 0 ? 2 : 0")]
    [InlineData("(double)(2 * 3) * Level + Top")]
    public void What_fits_passes_without_a_message(string expression) => Compiling.Run(Observable(expression)).WithoutProblems();

    [Theory]
    [InlineData("ODE0101", "Level + [|Area|]")]
    [InlineData("ODE0101", "Level + Top - [|Inflow * 1|] + Level")]
    [InlineData("ODE0101", "Level + [|1.0|]")]
    [InlineData("ODE0101", "Level > [|Inflow|] ? 1 : 2")]
    [InlineData("ODE0101", "Level > 0 ? Level : [|Area|]")]
    [InlineData("ODE0101", "Math.Min(Level, [|Inflow|])")]
    [InlineData("ODE0101", "Math.Clamp(Level, 0, [|Area|])")]
    [InlineData("ODE0101", "Level is > 0 and < [|2.0|] ? 1 : 2")]
    [InlineData("ODE0101", "Level switch { > 0 => Level, _ => [|Inflow|] }")]
    [InlineData("ODE0101", "Math.Sqrt(Level) + [|Level|]")]
    [InlineData("ODE0101", "Helper + [|Inflow|]; double Helper => Level * Top")]
    [InlineData("ODE0101", "Sum(Level) + Sum(Top); double Sum(double x) => x + [|Area|]")]
    [InlineData("ODE0102", "Level + [|Reach|]")]
    [InlineData("ODE0102", "Delay + [|Shift|]")]
    [InlineData("ODE0102", "Share + [|1|]")]
    [InlineData("ODE0102", "Angle + [|Slope|]")]
    [InlineData("ODE0102", "Math.Sin([|Slope|])")]
    [InlineData("ODE0103", "Fall + Level; [Unit(\"m\")] double Fall => [|Level * Top|]")]
    [InlineData("ODE0103", "1; [Observable(Unit = \"W\")] double Heat => [|Level * Top|]")]
    [InlineData("ODE0102", "1; [Observable(Unit = \"W\")] double Heat => [|Power|]")]
    [InlineData("ODE0103", "Ratio([|Level|]); double Ratio([Unit(\"m2\")] double area) => area / Area")]
    [InlineData("ODE0104", "Math.Exp([|Level|])")]
    [InlineData("ODE0104", "Math.Sin([|Level|])")]
    [InlineData("ODE0104", "Math.Pow(2, [|Delay|])")]
    [InlineData("ODE0105", "Math.Pow(Level, [|Free|])")]
    [InlineData("ODE0106", "[|Warm|] * 2")]
    [InlineData("ODE0106", "Math.Sqrt([|Warm|])")]
    [InlineData("ODE0106", "Warm + [|Cold|]")]
    [InlineData("ODE0106", "Kelvin - [|Warm|]")]
    [InlineData("ODE0106", "Kelvin > [|Warm|] ? 1 : 2")]
    [InlineData("ODE0100", "Odd; [Unit([|\"furlong\"|])] double Odd => 1")]
    public void What_does_not_fit_is_told_at_the_smallest_node(string id, string expression) =>
        Assert.Equal(DiagnosticSeverity.Warning, Marked.ExpectOne(id, Observable(expression)).Severity);

    [Theory]
    [InlineData("double h = Level; if (h > 0) h = h * h; else h = Area; return h + Area;", null)]
    [InlineData("double h = Level; h *= Top; h += Area; h++; return h;", null)]
    [InlineData("double h = 0; h += Level; return h + [|Area|];", "ODE0101")]
    [InlineData("double h = Level; h += [|Area|]; return h;", "ODE0101")]
    [InlineData("if (Level > 0) return Level; return [|Area|];", "ODE0101")]
    [InlineData("switch (Level) { case > 0: { double w = Level; return w + [|Area|]; } default: return Area; }", "ODE0101")]
    [InlineData("return Local(Level); double Local(double x) => x + Level + [|Area|];", "ODE0101")]
    public void Statements_carry_units(string statements, string? id)
    {
        string source = Tank($$"""[Observable] private double Y { get { {{statements}} } }""");
        if (id is null) Compiling.Run(source).WithoutProblems();
        else Marked.ExpectOne(id, source);
    }

    [Fact]
    public void A_rate_must_give_the_unit_of_its_state_per_unit_of_time()
    {
        Diagnostic dimension = Marked.ExpectOne("ODE0103", Rate("s", "m", "[|Flow * 2|]"));
        Assert.Equal(
            "'Flow * 2' is in m2/s (L^2 T^-1), but the rate of 'Level' must be in m/s (L T^-1); correct the formula or the stated units",
            dimension.GetMessage(CultureInfo.InvariantCulture));
        Diagnostic size = Marked.ExpectOne("ODE0102", Rate("min", "m2", "[|Flow|]"));
        Assert.Equal(
            "'Flow' is in m2/s, but the rate of 'Level' is in m2/min; multiply it by 60, because factors between units are not applied silently",
            size.GetMessage(CultureInfo.InvariantCulture));
        Compiling.Run(Rate("s", "m2", "Flow")).WithoutProblems();
        Compiling.Run(Rate("", "m", "Flow")).WithoutProblems();
        Marked.ExpectOne("ODE0100", Rate("s", "m2", "Flow").Replace("\"s\")", "[|\"m\"|])", StringComparison.Ordinal));

        static string Rate(string time, string unit, string rate) => $$"""
            using OdeDsl;
            [OdeModel(TimeUnit = "{{time}}")]
            partial class Tank
            {
                [State(Initial = 1, Unit = "{{unit}}")] public partial double Level { get; set; }
                [Parameter(1, Unit = "m2/s")] public partial double Flow { get; set; }
                [Rate(nameof(Level))] double LevelRate => {{rate}};
            }
            """;
    }

    [Fact]
    public void A_message_names_both_units_and_their_dimensions() => Assert.Equal(
        "'Inflow / Area' is in m/s (L T^-1), but 'Level' is in m (L); only quantities of one dimension can be added, compared or chosen between",
        Marked.ExpectOne("ODE0101", Observable("Level + [|Inflow / Area|]")).GetMessage(CultureInfo.InvariantCulture));

    [Fact]
    public void A_model_without_units_is_not_looked_at() =>
        Compiling.Run(Marked.Equation("Math.Exp(X) + P * Y + 3").Replace("[OdeModel]", "[OdeModel(TimeUnit = \"parsec\")]", StringComparison.Ordinal))
            .WithoutProblems();

    [Fact]
    public void A_message_can_be_suppressed_by_a_pragma_and_leaves_the_code_alone()
    {
        string source = Observable("Level + Area");
        GeneratorRun told = Compiling.Run(source);
        Assert.Equal("ODE0101", Assert.Single(told.Problems).Id);
        string suppressed = source.Replace("[Observable]", "\n#pragma warning disable ODE0101\n[Observable]", StringComparison.Ordinal);
        GeneratorRun quiet = Compiling.Run(suppressed);
        Assert.DoesNotContain(quiet.Problems, static problem => !problem.IsSuppressed);
        Assert.Equal(told.Result.GeneratedSources.Single().SourceText.ToString(), quiet.Result.GeneratedSources.Single().SourceText.ToString());
        Assert.DoesNotContain("NaN", told.Result.GeneratedSources.Single().SourceText.ToString(), StringComparison.Ordinal);
    }
}
