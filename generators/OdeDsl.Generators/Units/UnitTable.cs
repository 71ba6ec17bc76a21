using System;
using System.Collections.Generic;
using System.Linq;

namespace OdeDsl.Generators.Units;

/// <summary>
/// The unit symbols that are read, with the case-sensitive codes of the Unified Code for Units of Measure (G. Schadow and
/// C. McDonald, UCUM specification 2.1, tables 1 to 4 and following). docs/units.md lists them.
/// </summary>
/// <remarks>
/// Two departures, both those of the SI: the mole is a base unit (UCUM counts particles), and the radian is 1 (UCUM keeps it as a base),
/// so that moles never cancel against nothing, and angles do.
/// </remarks>
internal static class UnitTable
{
    private static readonly Dictionary<string, double> Prefixes = new()
    {
        ["Y"] = 1e24, ["Z"] = 1e21, ["E"] = 1e18, ["P"] = 1e15, ["T"] = 1e12, ["G"] = 1e9, ["M"] = 1e6, ["k"] = 1e3, ["h"] = 1e2, ["da"] = 1e1,
        ["d"] = 1e-1, ["c"] = 1e-2, ["m"] = 1e-3, ["u"] = 1e-6, ["n"] = 1e-9, ["p"] = 1e-12, ["f"] = 1e-15, ["a"] = 1e-18, ["z"] = 1e-21,
        ["y"] = 1e-24,
    };

    private static readonly Dictionary<string, Unit> Metric = Table(
        [],
        [
            ("m", "L", 1), ("g", "M", 1e-3), ("s", "T", 1), ("A", "I", 1), ("K", "Θ", 1), ("mol", "N", 1), ("cd", "J", 1),
        ],
        [
            ("rad", "1", 1), ("sr", "1", 1), ("Hz", "1/s", 1), ("N", "kg.m/s2", 1), ("Pa", "N/m2", 1), ("J", "N.m", 1), ("W", "J/s", 1),
            ("C", "A.s", 1), ("V", "J/C", 1), ("F", "C/V", 1), ("Ohm", "V/A", 1), ("S", "A/V", 1), ("Wb", "V.s", 1), ("T", "Wb/m2", 1),
            ("H", "Wb/A", 1), ("lm", "cd", 1), ("lx", "lm/m2", 1), ("Bq", "1/s", 1), ("Gy", "J/kg", 1), ("Sv", "J/kg", 1), ("kat", "mol/s", 1),
            ("l", "m3", 1e-3), ("L", "m3", 1e-3), ("ar", "m2", 100), ("t", "kg", 1e3), ("bar", "Pa", 1e5), ("eV", "J", 1.602176634e-19),
            ("cal", "J", 4.184), ("P", "Pa.s", 0.1), ("St", "m2/s", 1e-4), ("dyn", "N", 1e-5), ("erg", "J", 1e-7), ("U", "mol/s", 1e-6 / 60),
            ("m[H2O]", "kPa", 9.80665), ("m[Hg]", "kPa", 133.322),
        ]);

    private static readonly Dictionary<string, Unit> Other = Table(
        Metric,
        [],
        [
            ("min", "s", 60), ("h", "s", 3600), ("d", "s", 86400), ("wk", "s", 604800), ("a", "s", 31557600),
            ("deg", "rad", Math.PI / 180), ("'", "rad", Math.PI / 10800), ("''", "rad", Math.PI / 648000), ("gon", "rad", Math.PI / 200),
            ("circ", "rad", 2 * Math.PI), ("%", "1", 1e-2), ("[ppth]", "1", 1e-3), ("[ppm]", "1", 1e-6), ("[ppb]", "1", 1e-9),
            ("[pi]", "1", Math.PI), ("[g]", "m/s2", 9.80665), ("atm", "Pa", 101325),
            ("[in_i]", "m", 0.0254), ("[ft_i]", "m", 0.3048), ("[yd_i]", "m", 0.9144), ("[mi_i]", "m", 1609.344), ("[lb_av]", "kg", 0.45359237),
            ("[lbf_av]", "N", 4.4482216152605), ("[psi]", "Pa", 4.4482216152605 / 6.4516e-4), ("[gal_us]", "m3", 231 * 1.6387064e-5),
            ("[HP]", "W", 550 * 0.3048 * 4.4482216152605), ("[Btu_IT]", "J", 1055.05585262), ("[degR]", "K", 5.0 / 9),
        ]);

    private static readonly Unit Celsius = Unit.Named("Cel", Dimension.Of("Θ"), 1, isShifted: true);

    /// <summary>What people write out of habit, and the code for it.</summary>
    private static readonly Dictionary<string, string> Habits = new()
    {
        ["sec"] = "s", ["hr"] = "h", ["hour"] = "h", ["day"] = "d", ["days"] = "d", ["°C"] = "Cel", ["degC"] = "Cel", ["ohm"] = "Ohm",
        ["Ω"] = "Ohm", ["rpm"] = "circ/min", ["µm"] = "um", ["°"] = "deg", ["kWh"] = "kW.h", ["Nm"] = "N.m", ["psi"] = "[psi]", ["ft"] = "[ft_i]",
        ["in"] = "[in_i]", ["inch"] = "[in_i]", ["lb"] = "[lb_av]", ["lbf"] = "[lbf_av]", ["hp"] = "[HP]", ["ppm"] = "[ppm]", ["ppb"] = "[ppb]",
        ["pi"] = "[pi]", ["year"] = "a", ["percent"] = "%", ["pu"] = "1", ["m²"] = "m2", ["m³"] = "m3", ["mmHg"] = "mm[Hg]", ["tonne"] = "t",
    };

    /// <summary>All symbols, without prefixes.</summary>
    public static IEnumerable<string> Symbols => [.. Metric.Keys, .. Other.Keys, "Cel"];

    /// <summary>The unit of a symbol with or without a prefix, or null.</summary>
    public static Unit? Find(string symbol)
    {
        if (symbol == "Cel") return Celsius;
        if (Metric.TryGetValue(symbol, out Unit? unit) || Other.TryGetValue(symbol, out unit)) return unit;
        return WithPrefix(symbol, Metric);
    }

    /// <summary>What may have been meant by a symbol that does not exist, or null.</summary>
    public static string? Meant(string symbol)
    {
        if (Habits.TryGetValue(symbol, out string? code)) return code;
        for (int i = 1; i < symbol.Length; i++)
        {
            string first = symbol.Substring(0, i);
            string second = symbol.Substring(i);
            if (Find(first) is not null && Find(second) is not null) return first + "." + second;
        }

        return null;
    }

    private static Unit? WithPrefix(string symbol, Dictionary<string, Unit> metric)
    {
        foreach (int length in new[] { 2, 1 })
        {
            if (symbol.Length <= length || !Prefixes.TryGetValue(symbol.Substring(0, length), out double factor)) continue;
            if (metric.TryGetValue(symbol.Substring(length), out Unit? unit)) return Unit.Named(symbol, unit.Dimension, factor * unit.Size);
        }

        return null;
    }

    /// <summary>Makes a table from base units and from units defined, in order, by those before them.</summary>
    private static Dictionary<string, Unit> Table(
        Dictionary<string, Unit> earlier,
        (string Symbol, string Dimension, double Size)[] bases,
        (string Symbol, string Of, double Size)[] derived)
    {
        Dictionary<string, Unit> table = bases.ToDictionary(
            static item => item.Symbol, static item => Unit.Named(item.Symbol, Dimension.Of(item.Dimension), item.Size));
        foreach ((string symbol, string of, double size) in derived)
        {
            Unit unit = UnitParser.Parse(of, Known).Unit ?? throw new InvalidOperationException($"The definition of the unit '{symbol}' is wrong.");
            table.Add(symbol, Unit.Named(symbol, unit.Dimension, size * unit.Size));
        }

        return table;

        Unit? Known(string name) =>
            table.TryGetValue(name, out Unit? unit) || earlier.TryGetValue(name, out unit)
                ? unit
                : WithPrefix(name, table) ?? WithPrefix(name, earlier);
    }
}
