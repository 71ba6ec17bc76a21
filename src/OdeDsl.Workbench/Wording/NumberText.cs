using System.Globalization;
using System.Text.RegularExpressions;

namespace OdeDsl.Workbench.Wording;

/// <summary>Numbers for people: one way for the whole report.</summary>
internal static partial class NumberText
{
    /// <summary>Significant digits of computed numbers in tables, figures and captions.</summary>
    public const int Digits = 4;

    // Outside this range powers of ten read better than rows of zeros.
    private const double SmallestPositional = 1e-3;
    private const double LargestPositional = 1e5;

    // Ends of ranges come from integration: below this part of the range they tell nothing.
    private const double NoisePart = 1e-9;

    private const string Superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹";

    /// <summary>A number with a true minus sign and powers of ten, for HTML and figures.</summary>
    /// <param name="value">The number.</param>
    /// <param name="digits">Significant digits; trailing zeros are left out.</param>
    public static string Format(double value, int digits = Digits)
    {
        if (double.IsNaN(value)) return "not a number";
        if (double.IsInfinity(value)) return value > 0 ? "∞" : "−∞";
        if (value == 0) return "0";
        string[] parts = value.ToString("E" + (digits - 1).ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture).Split('E');
        int exponent = int.Parse(parts[1], CultureInfo.InvariantCulture);
        double rounded = double.Parse(parts[0] + "E" + parts[1], CultureInfo.InvariantCulture);
        bool positional = Math.Abs(rounded) is >= SmallestPositional and < LargestPositional;
        string text = positional
            ? rounded.ToString("F" + Math.Max(0, digits - 1 - exponent).ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture)
            : parts[0];
        if (text.Contains('.', StringComparison.Ordinal)) text = text.TrimEnd('0').TrimEnd('.');
        text = text.Replace('-', '−');
        if (positional) return text;
        return text is "1" or "−1" ? text[..^1] + "10" + Superscript(exponent) : text + "×10" + Superscript(exponent);
    }

    /// <summary>A number with its unit.</summary>
    public static string With(double value, string unit, int digits = Digits)
    {
        string shown = UnitText.Pretty(unit);
        return shown is "" or "1" ? Format(value, digits) : Format(value, digits) + "\u00A0" + shown;
    }

    /// <summary>A number in plain letters, for the console.</summary>
    public static string Plain(double value, int digits = Digits) =>
        value.ToString("G" + digits.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);

    /// <summary>A number with its unit in plain letters, for the console.</summary>
    public static string PlainWith(double value, string unit, int digits = Digits) =>
        unit is "" or "1" ? Plain(value, digits) : Plain(value, digits) + " " + unit;

    /// <summary>The ends of a range, without the rounding noise of an end that is zero beside the other.</summary>
    public static (double Minimum, double Maximum) WithoutNoise(double minimum, double maximum)
    {
        double noise = NoisePart * (maximum - minimum);
        return (Math.Abs(minimum) <= noise ? 0 : minimum, Math.Abs(maximum) <= noise ? 0 : maximum);
    }

    /// <summary>A sentence with the numbers in it set as <see cref="Format"/> sets them: true minus signs, powers of ten.</summary>
    public static string Typeset(string sentence)
    {
        string powers = PowerOfTen().Replace(sentence, static match =>
        {
            string exponent = Superscript(int.Parse(match.Groups["exponent"].ValueSpan, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture));
            string mantissa = match.Groups["mantissa"].Value;
            return (mantissa == "1" ? "" : mantissa + "×") + "10" + exponent;
        });
        return MinusSign().Replace(powers, "−");
    }

    [GeneratedRegex(@"(?<![\w.])(?<mantissa>\d+(\.\d+)?)[eE](?<exponent>[+-]?\d{1,4})(?![\w.]\w)")]
    private static partial Regex PowerOfTen();

    [GeneratedRegex(@"(?<![\w.)\]])-(?=\d)")]
    private static partial Regex MinusSign();

    /// <summary>A whole number raised, for exponents.</summary>
    public static string Superscript(int value)
    {
        string digits = Math.Abs((long)value).ToString(CultureInfo.InvariantCulture);
        string raised = string.Concat(digits.Select(static digit => Superscripts[digit - '0']));
        return value < 0 ? "⁻" + raised : raised;
    }
}
