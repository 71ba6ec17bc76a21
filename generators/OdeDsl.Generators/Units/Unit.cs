using System;
using System.Collections.Generic;
using System.Globalization;
using System.Linq;

namespace OdeDsl.Generators.Units;

/// <summary>A unit: its dimension, its size in the SI's base units, and the symbols it was made of, to show it by.</summary>
internal sealed class Unit
{
    /// <summary>Sizes that differ by less are one unit: far above the rounding of products, far below any factor between units.</summary>
    private const double SameSize = 1e-9;

    private readonly (string Symbol, double Exponent)[] _parts;

    private Unit(Dimension dimension, double size, bool isShifted, (string Symbol, double Exponent)[] parts) =>
        (Dimension, Size, IsShifted, _parts) = (dimension, size, isShifted, parts);

    /// <summary>The unit of plain numbers.</summary>
    public static Unit One { get; } = new(Dimension.None, 1, false, []);

    public Dimension Dimension { get; }

    /// <summary>How many of the coherent SI unit it is.</summary>
    public double Size { get; }

    /// <summary>Whether its zero is not the quantity's zero, as with degrees Celsius.</summary>
    public bool IsShifted { get; }

    public static Unit Named(string symbol, Dimension dimension, double size, bool isShifted = false) =>
        new(dimension, size, isShifted, [(symbol, 1)]);

    /// <summary>A number as part of a unit, as in <c>100/h</c>.</summary>
    public static Unit Number(double number, string text) => number == 1 ? One : new(Dimension.None, number, false, [(text, 1)]);

    public bool HasSizeOf(Unit other) => Math.Abs(Size - other.Size) <= SameSize * Math.Abs(other.Size);

    /// <summary>Whether values in both units can be added and compared as they stand.</summary>
    public bool Agrees(Unit other) => Dimension.Equals(other.Dimension) && HasSizeOf(other) && IsShifted == other.IsShifted;

    public Unit Times(Unit other, double power = 1)
    {
        List<(string Symbol, double Exponent)> parts = [.. _parts];
        foreach ((string symbol, double exponent) in other._parts)
        {
            int place = parts.FindIndex(part => part.Symbol == symbol);
            if (place < 0) parts.Add((symbol, power * exponent));
            else parts[place] = (symbol, parts[place].Exponent + (power * exponent));
        }

        return new(
            Dimension.Times(other.Dimension, power),
            Size * Math.Pow(other.Size, power),
            false,
            parts.Where(static part => Math.Abs(part.Exponent) > SameSize).ToArray());
    }

    public Unit Power(double exponent) => One.Times(this, exponent);

    /// <summary>The unit of differences: that of the kelvin for degrees Celsius.</summary>
    public Unit Difference() => IsShifted ? Named("K", Dimension, Size) : this;

    /// <summary>The unit in the notation that is also read.</summary>
    public override string ToString()
    {
        string[] above = Factors(1);
        string[] below = Factors(-1);
        string top = above.Length == 0 ? "1" : string.Join(".", above);
        return below.Length switch { 0 => top, 1 => top + "/" + below[0], _ => top + "/(" + string.Join(".", below) + ")" };
    }

    /// <summary>The unit with its dimension, for messages.</summary>
    public string Shown() => ToString() + " (" + Dimension + ")";

    /// <summary>By how much a number in this unit must be multiplied to be one in another.</summary>
    public string FactorTo(Unit other) => (Size / other.Size).ToString("G10", CultureInfo.InvariantCulture);

    private string[] Factors(int sign) => _parts
        .Where(part => part.Exponent * sign > 0)
        .Select(part => part.Symbol + (Math.Abs(part.Exponent * sign - 1) <= SameSize ? "" : Shown(part.Exponent * sign)))
        .ToArray();

    private static string Shown(double exponent) => Math.Round(exponent) == exponent ? Dimension.Shown(exponent) : "^" + Dimension.Shown(exponent);
}
