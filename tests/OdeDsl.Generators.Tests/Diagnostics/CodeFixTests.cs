using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Diagnostics;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Diagnostics;

/// <summary>Each fix gives the text expected, and the mended model compiles without problems.</summary>
public sealed class CodeFixTests
{
    private const string Opening = "using System;\nusing OdeDsl;\n\n";

    private const string Level = "    [State] public partial double Level { get; set; }\n    [Rate(nameof(Level))] private double LevelRate => -Level;\n";

    private static string Tank(string members) => $"[OdeModel]\npublic sealed partial class Tank\n{{\n{Level}{members}}}\n";

    public static TheoryData<string, string, string> Cases => new()
    {
        { "ODE0002", $"[OdeModel]\npublic sealed class Tank\n{{\n{Level}}}\n", $"[OdeModel]\npublic sealed partial class Tank\n{{\n{Level}}}\n" },
        { "ODE0002", $"[OdeModel]\n// Plain.\nclass Tank\n{{\n{Level}}}\n", $"[OdeModel]\n// Plain.\npartial class Tank\n{{\n{Level}}}\n" },
        {
            "ODE0003",
            $"public class Plant\n{{\n    [OdeModel] public sealed partial class Tank {{ {Level} }}\n}}\n",
            $"public partial class Plant\n{{\n    [OdeModel] public sealed partial class Tank {{ {Level} }}\n}}\n"
        },
        {
            "ODE0004",
            $"[OdeModel]\npartial class Tank\n{{\n{Level}}}\n\n/// <summary>More.</summary>\n[OdeModel]\npartial class Tank\n{{\n}}\n",
            $"[OdeModel]\npartial class Tank\n{{\n{Level}}}\n\n/// <summary>More.</summary>\npartial class Tank\n{{\n}}\n"
        },
        { "ODE0005", $"[OdeModel]\nfile partial class Tank\n{{\n{Level}}}\n", $"[OdeModel]\npartial class Tank\n{{\n{Level}}}\n" },
        { "ODE0006", $"[OdeModel]\npublic static partial class Tank\n{{\n}}\n", "" },
        {
            "ODE0012",
            "class Tank\n{\n    /// <summary>A.</summary>\n    [Observable]\n    public double A => 1;\n}\n",
            "class Tank\n{\n    /// <summary>A.</summary>\n    public double A => 1;\n}\n"
        },
        { "ODE0012", "class Tank\n{\n    [Obsolete, Observable] public double A => 1;\n}\n", "class Tank\n{\n    [Obsolete] public double A => 1;\n}\n" },
        {
            "ODE0020",
            Tank("    /* Volume. */ [Parameter(2)] double V { get; set; }\n    public double Use => V;\n"),
            Tank("    /* Volume. */ [Parameter(2)] partial double V { get; set; }\n    public double Use => V;\n")
        },
        {
            "ODE0021",
            Tank("    [Parameter(2)] public partial float V { get; set; }\n    public double Use => V;\n"),
            Tank("    [Parameter(2)] public partial double V { get; set; }\n    public double Use => V;\n")
        },
        {
            "ODE0022",
            Tank("    [Parameter(2)] public static partial double V { get; set; }\n    public double Use => V;\n"),
            Tank("    [Parameter(2)] public partial double V { get; set; }\n    public double Use => V;\n")
        },
        {
            "ODE0023",
            Tank("    [Parameter(2)] public partial double V { init; }\n    [Observable] public double Use => Level;\n"),
            Tank("    [Parameter(2)] public partial double V { get; init; }\n    [Observable] public double Use => Level;\n")
        },
        {
            "ODE0026",
            Tank("    [Parameter(2)]\n    [Observable]\n    public partial double V { get; set; }\n    public double Use => V;\n"),
            Tank("    [Parameter(2)]\n    public partial double V { get; set; }\n    public double Use => V;\n")
        },
        {
            "ODE0027",
            Tank("    [Parameter(2), Angle] public partial double V { get; set; }\n    public double Use => V;\n"),
            Tank("    [Parameter(2)] public partial double V { get; set; }\n    public double Use => V;\n")
        },
        {
            "ODE0034",
            Tank("    [Parameter(2)] public virtual partial double V { get; set; }\n    public double Use => V;\n"),
            Tank("    [Parameter(2)] public partial double V { get; set; }\n    public double Use => V;\n")
        },
        {
            "ODE0043",
            Tank("    [State] public partial double @new { get; set; }\n    public double Use => @new;\n"),
            Tank("    [State] public partial double @new { get; set; }\n    [Rate(nameof(@new))] private double newRate => double.NaN;\n    public double Use => @new;\n")
        },
        {
            "ODE0043",
            Tank("    [State] public partial double V { get; set; } // Volume.\n    private double VRate => 2 * V;\n    public double Use => VRate;\n"),
            Tank("    [State] public partial double V { get; set; } // Volume.\n    [Rate(nameof(V))] private double VRate2 => double.NaN;\n    private double VRate => 2 * V;\n    public double Use => VRate;\n")
        },
        {
            "ODE0043",
            Tank("    [State(Length = 3)] public partial double[] T { get; set; }\n"),
            Tank("    [State(Length = 3)] public partial double[] T { get; set; }\n    [Rate(nameof(T))] private double TRate(int i) => double.NaN;\n")
        },
        {
            "ODE0043",
            Tank("    [State(Rows = 3, Columns = 4)] public partial double[,] T { get; set; }\n"),
            Tank("    [State(Rows = 3, Columns = 4)] public partial double[,] T { get; set; }\n    [Rate(nameof(T))] private double TRate(int row, int column) => double.NaN;\n")
        },
        {
            "ODE0044",
            Tank("    [Observable] public int Twice() => 2;\n"),
            Tank("    [Observable] public double Twice() => 2;\n")
        },
        {
            "ODE0046",
            Tank("    [Observable] public static double Two => 2;\n"),
            Tank("    [Observable] public double Two => 2;\n")
        },
        {
            "ODE0049",
            $"public class Base\n{{\n    protected virtual double Two => 2;\n}}\n\n[OdeModel]\npublic partial class Tank : Base\n{{\n{Level}    [Observable] public double Use => Two;\n}}\n",
            $"public class Base\n{{\n    protected virtual double Two => 2;\n}}\n\n[OdeModel]\npublic sealed partial class Tank : Base\n{{\n{Level}    [Observable] public double Use => Two;\n}}\n"
        },
        {
            "ODE0070",
            Tank("    [Observable] public double Use => 2 * (float)Level;\n"),
            Tank("    [Observable] public double Use => 2 * Level;\n")
        },
        {
            "ODE0070",
            Tank("    [Observable] public double Use => MathF.Sqrt(2);\n"),
            Tank("    [Observable] public double Use => Math.Sqrt(2);\n")
        },
        {
            "ODE0080",
            Tank("    [Observable] public double Use => Level switch\n    {\n        < 0 => 1,\n        > 0 => 2\n    };\n"),
            Tank("    [Observable] public double Use => Level switch\n    {\n        < 0 => 1,\n        > 0 => 2,\n        _ => double.NaN\n    };\n")
        },
        {
            "ODE0080",
            Tank("    [Observable] public double Use => Level switch { < 0 => 1, > 0 => 2, };\n"),
            Tank("    [Observable] public double Use => Level switch { < 0 => 1, > 0 => 2, _ => double.NaN, };\n")
        },
        {
            "ODE0123",
            Tank("    [Observable] public double Use => 1 / 2 * Level;\n"),
            Tank("    [Observable] public double Use => 1.0 / 2 * Level;\n")
        },
        {
            "ODE0123",
            Tank("    private const int N = 1;\n    [Observable] public double Use => (N + 1) / 3 * Level;\n"),
            Tank("    private const int N = 1;\n    [Observable] public double Use => (double)(N + 1) / 3 * Level;\n")
        },
        {
            "ODE0126",
            Tank("    /// <summary>Half.</summary>\n    double Half(double x) => x / 2;\n    [Observable] public double Use => Half(Level);\n"),
            Tank("    /// <summary>Half.</summary>\n    static double Half(double x) => x / 2;\n    [Observable] public double Use => Half(Level);\n")
        },
    };

    [Theory]
    [MemberData(nameof(Cases))]
    public async Task A_fix_gives_the_text_expected_and_a_model_that_compiles(string id, string before, string after)
    {
        string? mended = await Fixing.Apply(Opening + before, id);
        Assert.Equal(after == "" ? Opening + before.Replace("static ", "", StringComparison.Ordinal) : Opening + after, mended);
        if (after == "") return; // The mended text shows the next problem.
        Compiling.Run(mended!).WithoutProblems();
        Assert.DoesNotContain(await Fixing.Reports(mended!), report => report.Id == id);
    }

    [Fact]
    public void Every_fix_is_tested()
    {
        string[] tested = [.. Cases.Select(static row => (string)row[0])];
        Assert.All(Fixing.Fixes.SelectMany(static fix => fix.FixableDiagnosticIds), id => Assert.Contains(id, tested));
    }

    [Theory]
    [InlineData("ODE0020", "    [State] public double Z => 1;\n")]
    [InlineData("ODE0020", "    [State] public double Z { get; set; } = 3;\n")]
    [InlineData("ODE0126", "    private double Two() => 2;\n    [Observable] public double Use => this.Two();\n")]
    public async Task No_fix_is_offered_that_would_not_compile(string id, string members) =>
        Assert.Null(await Fixing.Apply(Opening + Tank(members), id));

    [Fact]
    public async Task Many_are_fixed_at_once()
    {
        string source = Opening + Tank("    [State] public double A { get; set; }\n    [State] public double B { get; set; }\n");
        string partial = await Fixing.ApplyToAll(source, "ODE0020");
        Assert.Equal(source.Replace("public double", "public partial double", StringComparison.Ordinal), partial);
        string whole = await Fixing.ApplyToAll(partial, "ODE0043");
        Assert.Contains("ARate => double.NaN;\n    [State] public partial double B", whole, StringComparison.Ordinal);
        Compiling.Run(whole).WithoutProblems();
    }
}
