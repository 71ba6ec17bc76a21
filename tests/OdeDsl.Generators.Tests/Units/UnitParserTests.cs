using OdeDsl.Generators.Units;

namespace OdeDsl.Generators.Tests.Units;

/// <summary>
/// The notation and the sizes of units against the Unified Code for Units of Measure (G. Schadow and C. McDonald, UCUM specification 2.1,
/// from memory), the SI (BIPM, The International System of Units, 9th edition 2019) and the exact definitions of customary units of
/// 1959 (international yard and pound agreement).
/// </summary>
public sealed class UnitParserTests
{
    [Theory]
    [InlineData("1", "no dimension", 1)]
    [InlineData("m", "L", 1)]
    [InlineData("m2", "L^2", 1)]
    [InlineData("m.s-2", "L T^-2", 1)]
    [InlineData("m/s2", "L T^-2", 1)]
    [InlineData("/m", "L^-1", 1)]
    [InlineData("/s.m", "L T^-1", 1)] // a stroke binds the next factor only
    [InlineData("m/s/s", "L T^-2", 1)]
    [InlineData("J/(mol.K)", "L^2 M T^-2 Θ^-1 N^-1", 1)]
    [InlineData("J/mol.K", "L^2 M T^-2 Θ N^-1", 1)]
    [InlineData("s2/m", "L^-1 T^2", 1)]
    [InlineData("kg.m2", "L^2 M", 1)]
    [InlineData("g/m3", "L^-3 M", 1e-3)]
    [InlineData("10*3", "no dimension", 1e3)]
    [InlineData("10*-6", "no dimension", 1e-6)]
    [InlineData("10^6/L", "L^-3", 1e9)]
    [InlineData("100.m", "L", 100)]
    [InlineData("{vehicles}/h", "T^-1", 1.0 / 3600)]
    [InlineData("kg{wet}", "M", 1)]
    [InlineData("m+2", "L^2", 1)]
    [InlineData("(m)", "L", 1)]
    [InlineData("%", "no dimension", 0.01)]
    [InlineData("Cel", "Θ", 1)]
    public void A_unit_is_read_by_the_grammar_of_the_unified_code(string text, string dimension, double size)
    {
        Unit unit = Read(text);
        Assert.Equal(dimension, unit.Dimension.ToString());
        Assert.True(Math.Abs(unit.Size - size) <= 1e-14 * size, $"{text} has the size {unit.Size:R}");
    }

    [Theory]
    [InlineData("km/h", "m/s", 1 / 3.6)]
    [InlineData("kW.h", "J", 3.6e6)]
    [InlineData("bar", "Pa", 1e5)]
    [InlineData("atm", "Pa", 101325)]
    [InlineData("mm[Hg]", "Pa", 133.322)]
    [InlineData("m[H2O]", "Pa", 9806.65)]
    [InlineData("d", "s", 86400)]
    [InlineData("a", "d", 365.25)]
    [InlineData("wk", "d", 7)]
    [InlineData("L/min", "m3/s", 1e-3 / 60)]
    [InlineData("t", "kg", 1000)]
    [InlineData("har", "m2", 1e4)]
    [InlineData("dar", "m2", 10)]
    [InlineData("deg", "rad", Math.PI / 180)]
    [InlineData("circ/min", "rad/s", Math.PI / 30)]
    [InlineData("cP", "mPa.s", 1)]
    [InlineData("cSt", "mm2/s", 1)]
    [InlineData("cal", "J", 4.184)]
    [InlineData("[in_i]", "mm", 25.4)]
    [InlineData("[mi_i]", "[ft_i]", 5280)]
    [InlineData("[lb_av]", "g", 453.59237)]
    [InlineData("[psi]", "kPa", 6.894757293168361)]
    [InlineData("[gal_us]", "L", 3.785411784)]
    [InlineData("[HP]", "W", 745.69987158227022)]
    [InlineData("[Btu_IT]", "kJ", 1.05505585262)]
    [InlineData("V.A", "W", 1)]
    [InlineData("Ohm.S", "1", 1)]
    [InlineData("Wb/s", "V", 1)]
    [InlineData("T.m2", "Wb", 1)]
    [InlineData("H.A/s", "V", 1)]
    [InlineData("F.V", "C", 1)]
    [InlineData("lx.m2", "lm", 1)]
    [InlineData("eV", "J", 1.602176634e-19)]
    public void Sizes_are_those_of_the_definitions(string text, string other, double factor)
    {
        (Unit unit, Unit wanted) = (Read(text), Read(other));
        Assert.True(unit.Dimension.Equals(wanted.Dimension), $"{unit.Dimension} and {wanted.Dimension}");
        Assert.True(Math.Abs((unit.Size / wanted.Size / factor) - 1) <= 1e-12, $"1 {text} is {unit.Size / wanted.Size:R} {other}");
    }

    [Theory]
    [InlineData("min", "T")] // not a thousandth of an inch
    [InlineData("cd", "J")] // not a hundredth of a day
    [InlineData("Pa", "L^-1 M T^-2")] // not 10^15 years
    [InlineData("mol", "N")]
    [InlineData("dam", "L")]
    [InlineData("mm", "L")]
    [InlineData("kat", "T^-1 N")]
    public void A_whole_symbol_goes_before_a_prefix(string text, string dimension) => Assert.Equal(dimension, Read(text).Dimension.ToString());

    [Theory]
    [InlineData("", "expected a unit, a number or '('")]
    [InlineData("m.", "expected a unit, a number or '('")]
    [InlineData("m)", "expected '.', '/' or the end")]
    [InlineData("(m", "expected ')'")]
    [InlineData("m{wet", "expected '}'")]
    [InlineData("m s", "'m s' is no unit")]
    [InlineData("Nm", "write 'N.m'")]
    [InlineData("m^2", "write 'm2'")]
    [InlineData("kg*m", "write 'kg.m'")]
    [InlineData("m³", "write 'm3'")]
    [InlineData("°C", "write 'Cel'")]
    [InlineData("rpm", "write 'circ/min'")]
    [InlineData("m0", "other than 0")]
    [InlineData("0", "cannot be 0")]
    [InlineData("W/Cel", "write 'K'")]
    [InlineData("Cel2", "write 'K'")]
    [InlineData("kmin", "no unit")] // minutes take no prefix
    [InlineData("M", "no unit")]
    public void What_is_wrong_is_told_with_what_was_expected(string text, string expected)
    {
        (Unit? unit, string? fault) = UnitParser.Parse(text);
        Assert.Null(unit);
        Assert.Contains(expected, fault, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("kg.m2/s3", "kg.m2/s3")]
    [InlineData("J/(mol.K)", "J/(mol.K)")]
    [InlineData("1/s", "1/s")]
    [InlineData("m.s-2", "m/s2")]
    public void A_unit_is_shown_in_the_notation_that_is_read(string text, string shown)
    {
        Assert.Equal(shown, Read(text).ToString());
        Assert.True(Read(Read(text).ToString()).Agrees(Read(text)));
    }

    private static Unit Read(string text)
    {
        (Unit? unit, string? fault) = UnitParser.Parse(text);
        Assert.Null(fault);
        return unit!;
    }
}
