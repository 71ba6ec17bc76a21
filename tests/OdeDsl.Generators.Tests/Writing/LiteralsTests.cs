using System.Globalization;
using CsCheck;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Writing;

namespace OdeDsl.Generators.Tests.Writing;

public sealed class LiteralsTests
{
    [Theory]
    [InlineData("")]
    [InlineData("fi-FI")]
    [InlineData("de-DE")]
    [InlineData("fa-IR")]
    public void Every_bit_pattern_reads_back_as_itself_under_every_culture(string culture)
    {
        CultureInfo before = CultureInfo.CurrentCulture;
        CultureInfo.CurrentCulture = Culture(culture);
        try
        {
            Gen.ULong.Sample(static bits => ReadsBack(BitConverter.UInt64BitsToDouble(bits)), iter: 3000);
            foreach (double value in new[]
                { 0.0, -0.0, double.Epsilon, -double.Epsilon, double.MaxValue, double.MinValue, 2.2250738585072014E-308, 1e15, 1e16, 1e-5, 1e-6, 0.1 + 0.2, 5e-324, 9007199254740993.0 })
                ReadsBack(value);
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    [Theory]
    [InlineData(60.0, "60d")]
    [InlineData(-0.5, "-0.5d")]
    [InlineData(0.001, "0.001d")]
    [InlineData(1234.5, "1234.5d")]
    [InlineData(1e15, "1000000000000000d")]
    [InlineData(1e16, "1E16d")]
    [InlineData(-2.5e-7, "-2.5E-7d")]
    [InlineData(Math.PI, "3.141592653589793d")]
    [InlineData(-0.0, "-0d")]
    [InlineData(double.NaN, "double.NaN")]
    [InlineData(double.NegativeInfinity, "double.NegativeInfinity")]
    public void Numbers_look_as_people_write_them_and_are_always_doubles(double value, string expected) =>
        Assert.Equal(expected, Literals.Number(value));

    [Theory]
    [InlineData("a */ b")]
    [InlineData("a\n#error b")]
    [InlineData("a\r\nb \u2028 c \u2029 d \u0085 e")]
    [InlineData("\u202e tsixe \0 \ud800")]
    public void Comments_and_texts_cannot_be_broken_out_of(string text)
    {
        string source = $"// {Literals.Comment(text)}\n/// <summary>{Literals.Documentation(text + "</summary><x>")}</summary>\nclass C {{ string Text = {Literals.Text(text)}; }}";
        CompilationUnitSyntax root = CSharpSyntaxTree.ParseText(source).GetCompilationUnitRoot();
        Assert.Empty(root.GetDiagnostics());
        Assert.Single(root.Members);
        Assert.Equal(text, root.DescendantNodes().OfType<LiteralExpressionSyntax>().Single().Token.ValueText);
    }

    private static void ReadsBack(double value)
    {
        string text = Literals.Number(value);
        if (double.IsNaN(value)) Assert.Equal("double.NaN", text);
        if (!double.IsFinite(value)) return;
        ExpressionSyntax expression = SyntaxFactory.ParseExpression(text);
        Assert.False(expression.ContainsDiagnostics, text);
        bool negative = expression is PrefixUnaryExpressionSyntax;
        LiteralExpressionSyntax literal = (LiteralExpressionSyntax)(negative ? ((PrefixUnaryExpressionSyntax)expression).Operand : expression);
        double magnitude = Assert.IsType<double>(literal.Token.Value);
        Assert.Equal(BitConverter.DoubleToInt64Bits(value), BitConverter.DoubleToInt64Bits(negative ? -magnitude : magnitude));
    }

    /// <summary>The test host may run without culture data, so the marks that matter are set by hand.</summary>
    private static CultureInfo Culture(string name)
    {
        CultureInfo culture = (CultureInfo)CultureInfo.InvariantCulture.Clone();
        culture.NumberFormat.NegativeSign = name is "fi-FI" ? "\u2212" : "-";
        culture.NumberFormat.NumberDecimalSeparator = name is "fi-FI" or "de-DE" ? "," : name is "fa-IR" ? "\u066b" : ".";
        return culture;
    }
}
