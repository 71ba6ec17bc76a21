using System.Text.RegularExpressions;
using OdeDsl.Generators.Tests.Harness;
using OdeDsl.Generators.Units;

namespace OdeDsl.Generators.Tests.Docs;

/// <summary>The page on units tells the truth: its code passes, and every symbol it lists is read.</summary>
public sealed partial class UnitsPageTests
{
    private static readonly string Page = File.ReadAllText(Path.Combine(Repository.Root, "docs", "units.md")).ReplaceLineEndings("\n");

    [Fact]
    public void The_code_of_the_page_has_no_problem() =>
        Compiling.Run("using System;\nusing OdeDsl;\n" + CodeBlock().Match(Page).Groups[1].Value).WithoutProblems();

    [Fact]
    public void A_slip_in_the_code_of_the_page_is_found() =>
        Assert.Equal("ODE0103", Assert.Single(Compiling.Run(
            "using System;\nusing OdeDsl;\n" + CodeBlock().Match(Page).Groups[1].Value.Replace(" / Area;", ";", StringComparison.Ordinal)).Problems).Id);

    [Fact]
    public void Every_symbol_of_the_lists_is_read()
    {
        string[] rows = ["base units", "with prefixes", "time", "angles", "shares", "temperature", "customary"];
        string[] symbols = [.. rows.SelectMany(static row => Row(row).Split(' ')).Where(static symbol => symbol.Length > 0)];
        Assert.True(symbols.Length > 60);
        Assert.All(symbols, static symbol => Assert.Null(UnitParser.Parse(symbol).Fault));
        Assert.All(Row("prefixes").Split(' '), static prefix => Assert.Null(UnitParser.Parse(prefix + "W").Fault));
    }

    [Fact]
    public void Every_symbol_that_is_read_is_on_the_page() => Assert.All(UnitTable.Symbols, static symbol =>
        Assert.Contains(symbol, Page.Split('`').SelectMany(static text => text.Split(' '))));

    /// <summary>The code spans of a row of the table, up to a remark in parentheses.</summary>
    private static string Row(string name)
    {
        string row = Page.Split('\n').Single(line => line.StartsWith($"| {name} |", StringComparison.Ordinal));
        string text = row.Split('|')[2];
        return string.Join(' ', text.Split("(")[0].Split(',')[0].Split('`').Where(static (_, i) => i % 2 == 1));
    }

    [GeneratedRegex("```csharp\n(.*?)```", RegexOptions.Singleline)]
    private static partial Regex CodeBlock();
}
