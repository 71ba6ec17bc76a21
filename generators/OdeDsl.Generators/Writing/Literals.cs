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

        // Whole numbers as people write them: 60d rather than 6E+01d. All of them below 1E+15 print exactly.
        if (Math.Abs(value) < 1e15 && Math.Floor(value) == value) return value.ToString("F0", CultureInfo.InvariantCulture) + "d";

        // Counting the digits up, instead of the round-trip format, gives the same text on every host.
        for (int digits = 1; digits < 17; digits++)
        {
            string text = value.ToString("G" + digits.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
            if (double.Parse(text, NumberStyles.Float, CultureInfo.InvariantCulture) == value) return text + "d";
        }

        return value.ToString("G17", CultureInfo.InvariantCulture) + "d";
    }

    public static string Integer(int value) => value.ToString(CultureInfo.InvariantCulture);

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
