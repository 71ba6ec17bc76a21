using System;
using System.Globalization;
using System.Text;

namespace OdeDsl.Generators.Writing;

/// <summary>The one place that turns numbers and texts into C# source, whatever the culture or host of the compiler.</summary>
internal static class Literals
{
    /// <summary>A double literal that reads back as the same bits: the fewest digits that do, and always a double.</summary>
    public static string Number(double value)
    {
        if (double.IsNaN(value)) return "double.NaN";
        if (double.IsInfinity(value)) return value > 0 ? "double.PositiveInfinity" : "double.NegativeInfinity";
        if (value == 0) return BitConverter.DoubleToInt64Bits(value) < 0 ? "-0d" : "0d";

        string sign = value < 0 ? "-" : "";
        (string digits, int exponent) = ShortestDigits(Math.Abs(value));
        return sign + Notation(digits, exponent) + "d";
    }

    public static string Integer(int value) => value.ToString(CultureInfo.InvariantCulture);

    /// <summary>
    /// The fewest significant digits that read back as the same number, and the power of ten of the first. Found by halving the range
    /// of counts (more digits never read back worse) because the round-trip format differs between hosts.
    /// </summary>
    private static (string Digits, int Exponent) ShortestDigits(double value)
    {
        (int least, int most) = (1, 17);
        while (least < most)
        {
            int middle = (least + most) / 2;
            if (double.Parse(Scientific(value, middle), NumberStyles.Float, CultureInfo.InvariantCulture) == value) most = middle;
            else least = middle + 1;
        }

        string text = Scientific(value, least);
        int mark = text.IndexOf('E');
        return (text.Substring(0, mark).Replace(".", ""), int.Parse(text.Substring(mark + 1), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture));
    }

    private static string Scientific(double value, int digits) =>
        value.ToString("E" + Integer(digits - 1), CultureInfo.InvariantCulture);

    /// <summary>The digits as people write them: with a power of ten only where many zeros would be needed.</summary>
    private static string Notation(string digits, int exponent)
    {
        if (exponent is < -5 or > 15)
        {
            string fraction = digits.Length > 1 ? "." + digits.Substring(1) : "";
            return digits.Substring(0, 1) + fraction + "E" + Integer(exponent);
        }

        if (exponent < 0) return "0." + new string('0', -exponent - 1) + digits;
        if (digits.Length <= exponent + 1) return digits.PadRight(exponent + 1, '0');
        return digits.Substring(0, exponent + 1) + "." + digits.Substring(exponent + 1);
    }

    /// <summary>A string literal.</summary>
    public static string Text(string value)
    {
        StringBuilder literal = new("\"");
        foreach (char character in value)
        {
            if (character is '"' or '\\') literal.Append('\\').Append(character);
            else if (NeedsEscape(character)) literal.Append("\\u").Append(((int)character).ToString("X4", CultureInfo.InvariantCulture));
            else literal.Append(character);
        }

        return literal.Append('"').ToString();
    }

    /// <summary>Text for one line of a comment: nothing in it can end the line or hide what follows.</summary>
    public static string Comment(string text)
    {
        StringBuilder line = new();
        foreach (char character in text) line.Append(NeedsEscape(character) ? ' ' : character);
        return line.ToString();
    }

    /// <summary>Text inside an XML documentation comment.</summary>
    public static string Documentation(string text) =>
        Comment(text).Replace("&", "&amp;").Replace("<", "&lt;").Replace(">", "&gt;");

    /// <summary>
    /// Control characters, line separators, halves of surrogate pairs and invisible format characters (they can reorder or hide
    /// text on the screen).
    /// </summary>
    private static bool NeedsEscape(char character) => char.GetUnicodeCategory(character)
        is UnicodeCategory.Control
        or UnicodeCategory.LineSeparator
        or UnicodeCategory.ParagraphSeparator
        or UnicodeCategory.Surrogate
        or UnicodeCategory.Format
        or UnicodeCategory.OtherNotAssigned;
}
