using System;
using System.Globalization;

namespace OdeDsl.Generators.Units;

/// <summary>
/// Reads unit expressions by the grammar of the Unified Code for Units of Measure (G. Schadow and C. McDonald, UCUM specification 2.1,
/// sections 5 to 12): products by <c>.</c> and <c>/</c> from left to right, a leading <c>/</c>, whole exponents after a symbol, whole
/// numbers and powers of ten, parentheses, and remarks in braces that count as 1.
/// </summary>
internal sealed class UnitParser
{
    private const string Ends = "./(){}";

    private readonly string _text;
    private readonly Func<string, Unit?> _find;
    private int _place;
    private int _depth;

    private UnitParser(string text, Func<string, Unit?> find) => (_text, _find) = (text, find);

    /// <returns>The unit, or what is wrong with the text.</returns>
    public static (Unit? Unit, string? Fault) Parse(string text) => Parse(text, UnitTable.Find);

    public static (Unit? Unit, string? Fault) Parse(string text, Func<string, Unit?> find)
    {
        try
        {
            UnitParser parser = new(text, find);
            Unit unit = parser.Term();
            if (parser._place < text.Length) throw parser.Expected("'.', '/' or the end");
            return (unit, null);
        }
        catch (FormatException fault)
        {
            return (null, fault.Message);
        }
    }

    private char Next => _place < _text.Length ? _text[_place] : '\0';

    private Unit Term()
    {
        bool isBelow = Take('/');
        Unit unit = Component();
        if (isBelow) unit = Product(Unit.One, unit, -1);
        while (true)
        {
            if (Take('.')) unit = Product(unit, Component(), 1);
            else if (Take('/')) unit = Product(unit, Component(), -1);
            else return unit;
        }
    }

    private static Unit Product(Unit first, Unit second, int power) =>
        first.IsShifted || second.IsShifted
            ? throw new FormatException("'Cel' can only stand alone, because its zero lies elsewhere; write 'K', which has the same size")
            : first.Times(second, power);

    private Unit Component()
    {
        if (Take('('))
        {
            if (++_depth > 50) throw Expected("fewer parentheses");
            Unit inner = Term();
            _depth--;
            if (!Take(')')) throw Expected("')'");
            return inner;
        }

        if (Next == '{') return Remark(Unit.One);
        int start = _place;
        while (_place < _text.Length && Ends.IndexOf(Next) < 0) _place++;
        string simple = _text.Substring(start, _place - start);
        if (simple.Length == 0) throw Expected("a unit, a number or '('");
        return Remark(Simple(simple));
    }

    private Unit Remark(Unit unit)
    {
        if (!Take('{')) return unit;
        int end = _text.IndexOf('}', _place);
        if (end < 0) throw Expected("'}'");
        _place = end + 1;
        return unit;
    }

    /// <summary>A symbol with an exponent, or a number.</summary>
    private Unit Simple(string text)
    {
        if (text.StartsWith("10*", StringComparison.Ordinal) || text.StartsWith("10^", StringComparison.Ordinal))
        {
            string power = text.Substring(3);
            return Unit.Number(Math.Pow(10, power.Length == 0 ? 1 : Exponent(text, power)), text);
        }

        if (ulong.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out ulong number))
            return number == 0 ? throw new FormatException("a unit cannot be 0") : Unit.Number(number, text);
        int split = text.Length;
        while (split > 0 && text[split - 1] is >= '0' and <= '9') split--;
        if (split > 0 && split < text.Length && text[split - 1] is '+' or '-') split--;
        string symbol = text.Substring(0, split);
        Unit unit = _find(symbol) ?? _find(text) ?? throw Unknown(symbol, text);
        if (split == text.Length) return unit;
        if (unit.IsShifted) return Product(unit, unit, 1);
        return unit.Power(Exponent(text, text.Substring(split)));
    }

    private static int Exponent(string text, string exponent) =>
        int.TryParse(exponent, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out int power) && power != 0 && Math.Abs(power) < 100
            ? power
            : throw new FormatException($"'{text}' has the exponent '{exponent}'; expected a whole number other than 0, as in 'm2' or 's-1'");

    private static FormatException Unknown(string symbol, string text)
    {
        string shown = symbol.Length == 0 ? text : symbol;
        int power = shown.IndexOfAny(['^', '*']);
        string? meant = power > 0 && shown[power] == '^' && UnitTable.Find(shown.Substring(0, power)) is not null
            ? text.Replace("^", "")
            : power > 0 ? text.Replace('*', '.') : UnitTable.Meant(text) ?? UnitTable.Meant(shown);
        return new FormatException(meant is null
            ? $"'{shown}' is no unit that is known here (docs/units.md lists them); a remark in braces such as '{{{shown.Trim('{', '}')}}}' counts as 1"
            : $"'{shown}' is not a unit; write '{meant}'");
    }

    private FormatException Expected(string what) => new(_place < _text.Length
        ? $"expected {what} instead of '{_text.Substring(_place)}'"
        : $"expected {what} after '{_text}'");

    private bool Take(char character)
    {
        if (Next != character) return false;
        _place++;
        return true;
    }
}
