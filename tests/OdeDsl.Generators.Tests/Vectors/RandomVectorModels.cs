using System.Globalization;
using System.Text;

namespace OdeDsl.Generators.Tests.Vectors;

/// <summary>Makes models with vectors from a grammar: neighbours, ends, rings, conditions on indices and states, sums, two dimensions.</summary>
internal sealed class RandomVectorModels(int seed)
{
    private readonly Random _random = new(seed);
    private readonly StringBuilder _helpers = new();
    private int _helperCount;

    public static string Make(int seed) => new RandomVectorModels(seed).Model("Random" + seed.ToString(CultureInfo.InvariantCulture));

    private string Model(string name)
    {
        string rates = $$"""
                [Rate(nameof(S))] private double SRate(double time) => {{Scalar(3)}};
                [Rate(nameof(U))] private double URate(int i, double time) => {{Element(4)}};
                [Rate(nameof(V))] private double VRate(int i) => {{Element(3).Replace("time", "0.5", StringComparison.Ordinal)}};
                [Rate(nameof(M))] private double MRate(int i, int j) => {{Square(3)}};
                [Observable] private double Watched => {{Scalar(3).Replace("time", "0.5", StringComparison.Ordinal)}};
            """;
        return $$"""
            [OdeModel] public sealed partial class {{name}}
            {
                [Parameter(9)] public partial int N { get; init; }
                [Parameter(5)] public partial int R { get; init; }
                [State] public partial double S { get; set; }
                [State(Length = nameof(N))] public partial double[] U { get; set; }
                [State(Length = nameof(N))] public partial double[] V { get; set; }
                [State(Rows = nameof(R), Columns = 4)] public partial double[,] M { get; set; }
                [Parameter(1.1)] public partial double P { get; set; }
                [Parameter(0.8, Length = nameof(N))] public partial double[] W { get; set; }
            {{rates}}
            {{_helpers}}
                private static double Mean(double[] x)
                {
                    double sum = 0;
                    for (int k = 0; k < x.Length; k++) sum += x[k];
                    return sum / x.Length;
                }
            }

            """;
    }

    /// <summary>An expression without an index.</summary>
    private string Scalar(int depth) => Tree(depth, ScalarLeaf, Scalar, ScalarCondition);

    /// <summary>An expression with an index i of a vector.</summary>
    private string Element(int depth) => Tree(depth, ElementLeaf, Element, () => Pick("i == 0", "i < N - 1", "i >= 2", "i != 1", "i == N - 1", "i > N - 3") + "", StateCondition);

    /// <summary>An expression with indices i and j of the matrix.</summary>
    private string Square(int depth) => Tree(depth, SquareLeaf, Square, () => Pick("i == 0", "j < 3", "i == R - 1 && j == 0", "i > 0 || j > 1"), () => "M[i, j] > 1");

    private string Tree(int depth, Func<string> leaf, Func<int, string> inner, params Func<string>[] conditions)
    {
        if (depth == 0 || _random.Next(6) == 0) return leaf();
        string a = inner(depth - 1);
        switch (_random.Next(10))
        {
            case 0 or 1: return $"({a} + {inner(depth - 1)})";
            case 2: return $"({a} - {inner(depth - 1)})";
            case 3 or 4: return $"({a} * {inner(depth - 1)})";
            case 5: return $"({a} / (1.5 + {inner(depth - 1)} * {leaf()}))";
            case 6: return $"Math.{Pick("Sin", "Cos", "Tanh", "Atan", "Abs")}({a})";
            case 7: return $"Math.{Pick("Max", "Min")}({a}, {inner(depth - 1)})";
            default: return $"({conditions[_random.Next(conditions.Length)]()} ? {a} : {inner(depth - 1)})";
        }
    }

    private string ScalarLeaf() => _random.Next(9) switch
    {
        0 => "S",
        1 => "P",
        2 => "time",
        3 => "0.75",
        4 => Pick("U[0]", "V[^1]", "U[N - 2]", "W[1]", "M[R - 1, 2]"),
        5 => "N",
        6 => "Mean(U)",
        7 => "Mean(V)",
        _ => SumOver("", "0", "N"),
    };

    private string ElementLeaf() => _random.Next(10) switch
    {
        0 or 1 => Pick("U[i]", "V[i]", "W[i]"),
        2 => Pick("(i == 0 ? P : U[i - 1])", "(i > 0 ? V[i - 1] : V[i])"),
        3 => Pick("U[Math.Min(i + 1, N - 1)]", "V[Math.Max(i - 2, 0)]"),
        4 => Pick("U[(i + 1) % N]", "V[i == 0 ? N - 1 : i - 1]"),
        5 => "((i + 0.5) / N)",
        6 => Pick("W[i]", "P", "time"),
        7 => Pick("U[0]", "V[^1]", "S"),
        8 => Pick("Mean(U)", "0.4"),
        _ => SumOver("int i", Pick("0", "1"), Pick("N", "N - 1", "i")),
    };

    private string SquareLeaf() => _random.Next(8) switch
    {
        0 or 1 => "M[i, j]",
        2 => Pick("(i == 0 ? P : M[i - 1, j])", "(i < R - 1 ? M[i + 1, j] : S)"),
        3 => Pick("(j == 0 ? 0.5 : M[i, j - 1])", "M[i, (j + 1) % 4]"),
        4 => "M[Math.Max(i - 1, 0), Math.Min(j + 1, 3)]",
        5 => Pick("S", "P", "U[0]"),
        6 => "(0.1 * i + j)",
        _ => "Mean(V)",
    };

    /// <summary>A call of a new helper that adds up over an index k.</summary>
    private string SumOver(string argument, string first, string end)
    {
        string name = "Sum" + (++_helperCount).ToString(CultureInfo.InvariantCulture);
        string own = argument.Length > 0 ? Pick("U[i]", "1.0", "S") : Pick("S", "1.0");
        bool isOpen = end == "i"; // Conditions on elements would then be open in number.
        string term = isOpen ? Pick("U[k] * W[k]", $"{own} * U[k]") : Pick("U[k] * W[k]", "Math.Sin(V[k])", $"{own} * U[k]", "Math.Abs(U[k] - 0.7)", "(k == 0 ? V[0] : U[k - 1])", "V[k] / (k + 1)");
        string step = _random.Next(isOpen ? 1 : 0, 4) switch
        {
            0 => $"if (U[k] > 0.8) sum += {term}; else sum -= 0.25;",
            1 => $"sum -= 0.5 * {term};",
            2 => $"double t = {term}; sum += t * t;",
            _ => $"sum += {term};",
        };
        _helpers.Append(CultureInfo.InvariantCulture, $$"""
                private double {{name}}({{argument}})
                {
                    double sum = {{own}};
                    for (int k = {{first}}; k < {{end}}; k++) { {{step}} }
                    return sum / (2.0 + N);
                }

            """);
        return argument.Length > 0 ? name + "(i)" : name + "()";
    }

    private string StateCondition() => Pick("U[i] > 0.9", "V[i] <= U[i]", "S > 1", "U[i] * P < W[i]");

    private string ScalarCondition() => Pick("S > 1", "U[0] < V[^1]", "P > 1", "time < 0.5");

    private string Pick(params string[] options) => options[_random.Next(options.Length)];
}
