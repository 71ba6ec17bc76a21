using System;
using System.Globalization;
using System.Linq;
using System.Text;

namespace OdeDsl.Generators.Units;

/// <summary>
/// The dimension of a quantity as exponents of the base quantities of the SI (ISO 80000-1; BIPM, The International System of Units,
/// 9th edition 2019, section 2.3.3). An angle has none, as there.
/// </summary>
/// <remarks>Exponents are numbers, not whole ones: roots halve them, and empirical laws have powers such as 1.852.</remarks>
internal sealed class Dimension
{
    private static readonly string[] Symbols = ["L", "M", "T", "I", "Θ", "N", "J"];

    /// <summary>Exponents closer than this are the same: far above the rounding of products, far below any difference that is meant.</summary>
    private const double Same = 1e-9;

    private readonly double[] _exponents;

    private Dimension(double[] exponents) => _exponents = exponents;

    public static Dimension None { get; } = new(new double[Symbols.Length]);

    /// <summary>A base dimension, by its symbol.</summary>
    public static Dimension Of(string symbol) =>
        new(Symbols.Select(other => other == symbol ? 1.0 : 0.0).ToArray());

    public bool IsNone => _exponents.All(static exponent => Math.Abs(exponent) <= Same);

    public bool Equals(Dimension other) => _exponents.Zip(other._exponents, static (a, b) => Math.Abs(a - b) <= Same).All(static same => same);

    /// <summary>The dimension of a product with a power of another quantity.</summary>
    public Dimension Times(Dimension other, double power) =>
        new(_exponents.Zip(other._exponents, (a, b) => a + (power * b)).ToArray());

    public override string ToString()
    {
        if (IsNone) return "no dimension";
        StringBuilder text = new();
        for (int i = 0; i < Symbols.Length; i++)
        {
            if (Math.Abs(_exponents[i]) <= Same) continue;
            if (text.Length > 0) text.Append(' ');
            text.Append(Symbols[i]);
            if (Math.Abs(_exponents[i] - 1) > Same) text.Append('^').Append(Shown(_exponents[i]));
        }

        return text.ToString();
    }

    /// <summary>An exponent as people write it: rounding of sums is left out.</summary>
    public static string Shown(double exponent) => Math.Round(exponent, 6).ToString("0.######", CultureInfo.InvariantCulture);
}
