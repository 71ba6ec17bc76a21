using OdeDsl.Workbench.Figures;
using OdeDsl.Workbench.Wording;

namespace WorkbenchTests;

public class WordingTests
{
    [Theory]
    [InlineData(0, "0")]
    [InlineData(45, "45")]
    [InlineData(40.9876543, "40.99")]
    [InlineData(-8.59857, "−8.599")]
    [InlineData(0.00123456, "0.001235")]
    [InlineData(0.000123456, "1.235×10⁻⁴")]
    [InlineData(20e6, "2×10⁷")]
    [InlineData(1e-12, "10⁻¹²")]
    [InlineData(-1e8, "−10⁸")]
    [InlineData(99999.9, "10⁵")]
    [InlineData(99994, "99990")]
    [InlineData(double.PositiveInfinity, "∞")]
    [InlineData(double.NegativeInfinity, "−∞")]
    [InlineData(double.NaN, "not a number")]
    public void Numbers_have_four_significant_digits_and_powers_of_ten(double value, string expected) =>
        Assert.Equal(expected, NumberText.Format(value));

    [Theory]
    [InlineData("m2", "m²")]
    [InlineData("m3/s", "m³/s")]
    [InlineData("kg.m2", "kg·m²")]
    [InlineData("s-1", "s⁻¹")]
    [InlineData("J/(m3.K)", "J/(m³·K)")]
    [InlineData("1", "1")]
    [InlineData("1/d", "1/d")]
    [InlineData("Cel", "°C")]
    [InlineData("%", "%")]
    [InlineData("", "")]
    public void Units_are_written_as_people_write_them(string unit, string expected) => Assert.Equal(expected, UnitText.Pretty(unit));

    [Theory]
    [InlineData("error 8.2E-006 at 1E-06, slip -1.2925E-26 (-4.89 %)", "error 8.2×10⁻⁶ at 10⁻⁶, slip −1.2925×10⁻²⁶ (−4.89 %)")]
    [InlineData("from -5 to -0.5; a-1, 2026-12-01, rest 2, E5, x1e5y", "from −5 to −0.5; a-1, 2026-12-01, rest 2, E5, x1e5y")]
    public void Numbers_in_sentences_are_set_like_all_others(string sentence, string expected) => Assert.Equal(expected, NumberText.Typeset(sentence));

    [Fact]
    public void A_quantity_without_unit_is_labelled_as_a_pure_number() => Assert.Equal("Conversion (1)", UnitText.Labelled("Conversion", ""));

    [Fact]
    public void Markup_is_escaped_in_texts_and_attributes()
    {
        string markup = new Markup().Element("p", "<b>&\"'\u202E\u0001\uD800", ("title", "\"><x y='1'>")).ToString();

        Assert.Equal("<p title=\"&quot;&gt;&lt;x y=&#39;1&#39;&gt;\">&lt;b&gt;&amp;&quot;&#39;\uFFFD\uFFFD\uFFFD</p>", markup);
    }

    [Fact]
    public void Markup_with_an_open_element_is_not_given_out() => Assert.Throws<InvalidOperationException>(() => new Markup().Open("p").ToString());
}
