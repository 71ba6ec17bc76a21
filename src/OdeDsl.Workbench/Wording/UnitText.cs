using System.Globalization;
using System.Text;

namespace OdeDsl.Workbench.Wording;

/// <summary>Units as models write them (the Unified Code for Units of Measure: <c>m3/s</c>, <c>kg.m2</c>, <c>s-1</c>) for people.</summary>
internal static class UnitText
{
    private static readonly Dictionary<string, string> Symbols = new(StringComparer.Ordinal)
    {
        ["Cel"] = "°C", ["deg"] = "°", ["Ohm"] = "Ω", ["um"] = "µm", ["us"] = "µs",
    };

    /// <summary>Exponents raised, products with a middle dot: m³/s, kg·m², s⁻¹. The number 1 stays 1.</summary>
    public static string Pretty(string unit)
    {
        StringBuilder text = new();
        int position = 0;
        while (position < unit.Length)
        {
            char letter = unit[position];
            if (char.IsLetter(letter) || letter == '%')
            {
                int end = position;
                while (end < unit.Length && (char.IsLetter(unit[end]) || unit[end] == '%')) end++;
                string symbol = unit[position..end];
                text.Append(Symbols.GetValueOrDefault(symbol, symbol));
                position = end;
                position = AppendExponent(unit, position, text);
            }
            else
            {
                text.Append(letter == '.' ? '·' : letter);
                position++;
            }
        }

        return text.ToString();
    }

    /// <summary>The unit of a rate of growth: d gives 1/d.</summary>
    public static string Reciprocal(string timeUnit) => timeUnit.Length == 0 ? "" : "1/" + timeUnit;

    /// <summary>A name with its unit as on an axis: "Level (m)". A quantity without unit gets (1).</summary>
    public static string Labelled(string name, string unit) => $"{name} ({(unit.Length == 0 ? "1" : Pretty(unit))})";

    private static int AppendExponent(string unit, int position, StringBuilder text)
    {
        int end = position;
        if (end < unit.Length && unit[end] is '-' or '+') end++;
        int firstDigit = end;
        while (end < unit.Length && char.IsAsciiDigit(unit[end])) end++;
        if (end == firstDigit || !int.TryParse(unit[position..end], NumberStyles.Integer, CultureInfo.InvariantCulture, out int exponent)) return position;
        text.Append(NumberText.Superscript(exponent));
        return end;
    }
}
