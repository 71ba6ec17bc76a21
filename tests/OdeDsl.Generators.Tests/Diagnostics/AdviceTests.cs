using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Diagnostics;

/// <summary>Where advice is given, and where it keeps silent. (The pages' own examples are tested with the pages.)</summary>
public sealed class AdviceTests
{
    /// <summary>A model with a state X in [-1, 4] and a parameter P = 2 that are both read.</summary>
    private static string Model(string members) => $$"""
        [OdeModel]
        public sealed partial class Model
        {
            [State(Initial = 1, Lower = -1, Upper = 4)] public partial double X { get; set; }
            [Parameter(2)] public partial double P { get; set; }
            [Observable] public double Both => X * P;
            {{members}}
        }
        """;

    private static string Rate(string expression) => Model($"[Rate(nameof(X))] private double XRate(double time) => {expression};");

    [Theory]
    [InlineData("1 / X", "X")]
    [InlineData("P / (X - 3)", "X - 3")]
    [InlineData("1 / (P * X)", "P * X")]
    [InlineData("1 / -X", "-X")]
    [InlineData("1 / (P - 2 + X * 3)", "P - 2 + X * 3")]
    [InlineData("P > 0 ? 1 / X : 2 - X", "X")]
    public async Task A_divisor_that_vanishes_within_the_bounds_is_told(string expression, string divisor)
    {
        Diagnostic advice = Assert.Single(await Advising.Advice(Rate(expression)));
        Assert.Equal("ODE0122", advice.Id);
        Assert.Equal(divisor, Advising.Place(advice).Trim('(', ')'));
    }

    [Theory]
    [InlineData("1 / (X + 2)")]
    [InlineData("1 / (X - 5 * P)")]
    [InlineData("1 / (X * X + 1)")] // X twice: not known.
    [InlineData("1 / P")]
    [InlineData("1 / Math.Exp(X)")]
    [InlineData("X > 0 ? P / X : 0 * P")]
    [InlineData("X switch { > 0 => P / X, _ => P }")]
    public async Task A_divisor_that_does_not_vanish_or_is_guarded_or_is_not_plain_is_not_told(string expression) =>
        Assert.Empty(await Advising.Advice(Rate(expression)));

    [Theory]
    [InlineData("1 / 2 * X", "1 / 2")]
    [InlineData("X + (3 / 2 + 1)", "3 / 2")]
    [InlineData("Math.Pow(X, -(1 / 3))", "1 / 3")]
    public async Task A_whole_number_division_with_a_remainder_is_told(string expression, string place)
    {
        Diagnostic advice = Assert.Single(await Advising.Advice(Rate(expression)));
        Assert.Equal(("ODE0123", place), (advice.Id, Advising.Place(advice)));
    }

    [Theory]
    [InlineData("4 / 2 * X")]
    [InlineData("1.0 / 2 * X")]
    [InlineData("(double)(1 / 2) * X")]
    [InlineData("1 / 2.0 * X")]
    public async Task A_division_without_a_remainder_or_with_a_cast_is_not_told(string expression) =>
        Assert.Empty(await Advising.Advice(Rate(expression)));

    [Theory]
    [InlineData("X == 1 ? P : X", "ODE0124")]
    [InlineData("time != 1 ? P : X", "ODE0124")]
    [InlineData("X > 1 ? 1 : 0", "ODE0125")]
    [InlineData("X > 1 && P > 3 ? 1.5 : 0", "ODE0125")]
    [InlineData("time < 5 ? 1 : 0", "ODE0125")]
    public async Task Comparisons_that_move_are_told(string expression, string id) =>
        Assert.Equal(id, Assert.Single(await Advising.Advice(Rate(expression))).Id);

    [Theory]
    [InlineData("P == 1 ? X : 2 * X")]
    [InlineData("P > 1 ? 1 : 0")]
    [InlineData("X > 1 ? 1 : X")]
    [InlineData("X > 1 ? 2 : 2")]
    public async Task Comparisons_that_stand_still_or_do_not_jump_for_sure_are_not_told(string expression) =>
        Assert.Empty(await Advising.Advice(Rate(expression)));

    [Theory]
    [InlineData("[Parameter(1)] public partial double Q { get; set; }", "ODE0121")]
    [InlineData("[Parameter(1)] public partial double Q { get; set; } public Model() { Q = 3; }", "ODE0121")]
    [InlineData("[Parameter(1)] public partial double Q { get; set; } private static string Name => nameof(Q);", "ODE0121")]
    [InlineData("[State] public partial double Q { get; set; } [Rate(nameof(Q))] private double QRate => X;", "ODE0120")]
    public async Task What_nothing_reads_is_told(string members, string id)
    {
        Diagnostic advice = Assert.Single(await Advising.Advice(Model(members + " [Rate(nameof(X))] private double XRate => -X;")));
        Assert.Equal((id, "Q"), (advice.Id, Advising.Place(advice)));
    }

    [Theory]
    [InlineData("[Parameter(1)] public partial double Q { get; set; } private double Helper => Q; public double Use => Helper;")]
    [InlineData("[Parameter(1)] public partial double Q { get; set; } public void Double() { Q *= 2; }")]
    [InlineData("[State] public partial double Q { get; set; } [Rate(nameof(Q))] private double QRate => -Q;")]
    public async Task What_something_reads_is_not_told(string members) =>
        Assert.Empty(await Advising.Advice(Model(members + " [Rate(nameof(X))] private double XRate => -X;")));

    [Theory]
    [InlineData("private double Half(double x) => x / 2;", "Half")]
    [InlineData("private double Root { get { return Math.Sqrt(2); } }", "Root")]
    public async Task A_helper_that_uses_nothing_of_the_model_is_told(string helper, string name)
    {
        Diagnostic advice = Assert.Single(await Advising.Advice(Model(helper + " [Rate(nameof(X))] private double XRate => -X;")));
        Assert.Equal(("ODE0126", name), (advice.Id, Advising.Place(advice)));
    }

    [Theory]
    [InlineData("private double Half => X / 2;")]
    [InlineData("private static double Half(double x) => x / 2;")]
    [InlineData("public double Half(double x) => x / 2;")]
    [InlineData("[Observable] private double Half => 0.5;")]
    public async Task A_helper_that_uses_the_model_or_is_seen_from_outside_is_not_told(string helper) =>
        Assert.Empty(await Advising.Advice(Model(helper + " [Rate(nameof(X))] private double XRate => -X;")));

    [Fact]
    public async Task Outside_models_nothing_is_told() =>
        Assert.Empty(await Advising.Advice("""
            public sealed class Plain
            {
                public double X { get; set; }
                private double Half(double x) => 1 / 2 * x;
                public double Rate => X == 1 ? 1 / X : Half(X > 1 ? 1 : 0);
            }
            """));
}
