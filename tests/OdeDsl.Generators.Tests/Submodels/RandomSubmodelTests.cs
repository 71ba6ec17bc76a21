using System.Globalization;
using System.Text.RegularExpressions;
using OdeDsl.Generators.Tests.Emitted;

namespace OdeDsl.Generators.Tests.Submodels;

/// <summary>
/// Random models of two connected parts against the same model written in one piece, which is made from the text of the parts by replacing
/// names: nothing of the generator's own way of composing is used for it.
/// </summary>
public sealed partial class RandomSubmodelTests
{
    private const int CaseCount = 30;

    [Fact]
    public void A_random_whole_equals_the_model_written_in_one_piece_bit_for_bit()
    {
        int seed = Environment.GetEnvironmentVariable("Submodel_Seed") is { } given ? int.Parse(given, CultureInfo.InvariantCulture) : Random.Shared.Next();
        Random random = new(seed);
        string[] sources = [.. Enumerable.Range(0, CaseCount).Select(i => Case(i, random))];
        var load = SubmodelTests.Load(sources);
        for (int i = 0; i < CaseCount; i++)
        {
            try
            {
                Composed.AssertSame(load($"Case{i}.Flat"), load($"Case{i}.Whole"), seed + i, points: 12);
            }
            catch (Exception fault)
            {
                throw new InvalidOperationException($"Submodel_Seed={seed}: {fault.Message}\n{sources[i]}", fault);
            }
        }
    }

    private static string Case(int index, Random random)
    {
        string[] own = ["A", "B", "K", "L", "In"];
        (string Helper, string RateA, string RateB)[] parts = [.. Enumerable.Range(0, 2).Select(_ =>
            (Formula(random, own, 3), Formula(random, [.. own, "H"], 4), Formula(random, [.. own, "H"], 4)))];
        string input = Formula(random, ["X", "Q", "V.A", "V.B", "V.K"], 3);
        string rate = Formula(random, ["X", "Q", "U.A", "V.B", "U.H", "V.H", "U.L"], 4);
        return $$"""
            using System;
            using OdeDsl;
            namespace Case{{index}};
            {{Part("First", parts[0])}}
            {{Part("Second", parts[1])}}
            [OdeModel]
            public partial class Whole
            {
                [State] public partial double X { get; set; }
                [Parameter(1)] public partial double Q { get; set; }
                [Submodel] public First U { get; } = new();
                [Submodel] public partial Second V { get; }
                [Input(nameof(U), nameof(First.In))] double Given => {{input}};
                [Rate(nameof(X))] double XRate => {{rate}};
            }
            [OdeModel]
            public partial class Flat
            {
                [State] public partial double X { get; set; }
                [State] public partial double U_A { get; set; }
                [State] public partial double U_B { get; set; }
                [State] public partial double V_A { get; set; }
                [State] public partial double V_B { get; set; }
                [Parameter(1)] public partial double Q { get; set; }
                [Parameter(1)] public partial double U_K { get; set; }
                [Parameter(1)] public partial double U_L { get; set; }
                [Parameter(1)] public partial double V_K { get; set; }
                [Parameter(1)] public partial double V_L { get; set; }
                [Parameter(1)] public partial double V_In { get; set; }
                double U_In => {{input.Replace("V.", "V_", StringComparison.Ordinal)}};
                double U_H => {{Prefixed(parts[0].Helper, "U_")}};
                double V_H => {{Prefixed(parts[1].Helper, "V_")}};
                [Rate(nameof(X))] double XRate => {{rate.Replace("U.", "U_", StringComparison.Ordinal).Replace("V.", "V_", StringComparison.Ordinal)}};
                [Rate(nameof(U_A))] double UARate => {{Prefixed(parts[0].RateA, "U_")}};
                [Rate(nameof(U_B))] double UBRate => {{Prefixed(parts[0].RateB, "U_")}};
                [Rate(nameof(V_A))] double VARate => {{Prefixed(parts[1].RateA, "V_")}};
                [Rate(nameof(V_B))] double VBRate => {{Prefixed(parts[1].RateB, "V_")}};
                [Observable] double UH => U_H;
                [Observable] double VH => V_H;
            }
            """;
    }

    private static string Part(string name, (string Helper, string RateA, string RateB) part) => $$"""
        [OdeModel]
        public partial class {{name}}
        {
            [State] public partial double A { get; set; }
            [State] public partial double B { get; set; }
            [Parameter(1)] public partial double K { get; set; }
            [Parameter(1)] public partial double L { get; set; }
            [Parameter(1)] public partial double In { get; set; }
            [Observable] public double H => {{part.Helper}};
            [Rate(nameof(A))] private double ARate => {{part.RateA}};
            [Rate(nameof(B))] private double BRate => {{part.RateB}};
        }
        """;

    private static string Formula(Random random, string[] names, int depth)
    {
        if (depth == 0 || random.Next(8) == 0)
            return random.Next(5) == 0 ? (random.Next(-300, 300) / 64.0).ToString("0.0###", CultureInfo.InvariantCulture) : names[random.Next(names.Length)];
        string a = Formula(random, names, depth - 1), b = Formula(random, names, depth - 1);
        return random.Next(10) switch
        {
            0 or 1 => $"({a} + {b})",
            2 or 3 => $"({a} - {b})",
            4 or 5 => $"({a} * {b})",
            6 => $"({a} / (1.5 + ({b}) * ({b})))",
            7 => $"Math.Sin({a})",
            8 => $"Math.Max({a}, {b})",
            _ => $"({a} < {b} ? {a} : 0.5 * {b})",
        };
    }

    private static string Prefixed(string formula, string prefix) => OwnName().Replace(formula, prefix + "$0");

    [GeneratedRegex(@"\b(A|B|K|L|In|H)\b")]
    private static partial Regex OwnName();
}
