using System.Globalization;
using OdeDsl.Workbench.Wording;

namespace OdeDsl.Workbench.Figures;

/// <summary>One tick of an axis.</summary>
/// <param name="Value">Where it stands.</param>
/// <param name="Label">What it says; empty for a tick without a label.</param>
internal readonly record struct Tick(double Value, string Label);

/// <summary>Ticks at round numbers.</summary>
internal static class Ticks
{
    // Within these all ticks of an axis are plain decimals, beyond them all have powers of ten: never a mixture.
    private const double SmallestPositionalStep = 1e-4, LargestPositional = 1e5;

    /// <summary>Ticks at multiples of 1, 2 or 5 times a power of ten.</summary>
    /// <param name="lower">The lower end.</param>
    /// <param name="upper">The upper end, above the lower.</param>
    /// <param name="most">About how many at most.</param>
    public static IReadOnlyList<Tick> Linear(double lower, double upper, int most)
    {
        double rough = (upper - lower) / most;
        double power = Math.Pow(10, Math.Floor(Math.Log10(rough)));
        double step = (rough / power) switch { <= 1 => power, <= 2 => 2 * power, <= 5 => 5 * power, _ => 10 * power };
        bool positional = step >= SmallestPositionalStep && Math.Max(Math.Abs(lower), Math.Abs(upper)) < LargestPositional;
        int decimals = Math.Max(0, (int)-Math.Floor(Math.Log10(step) + 1e-9));
        return Multiples(lower, upper, step, value => value == 0 ? "0" : positional ? Decimal(value, decimals) : NumberText.Format(value, 6));
    }

    /// <summary>Ticks at quarters or halves of the period where that is one turn in radians, otherwise at round numbers.</summary>
    public static IReadOnlyList<Tick> Angle(double lower, double upper, double period, int most)
    {
        bool isTurnInRadians = Math.Abs(period - Math.Tau) <= 1e-9 * Math.Tau;
        if (!isTurnInRadians) return Linear(lower, upper, most);
        double step = (upper - lower) / (Math.PI / 2) <= most ? Math.PI / 2 : Math.PI;
        return Multiples(lower, upper, step, static value => InPi(value));
    }

    /// <summary>Ticks at powers of ten, for a logarithmic axis.</summary>
    public static IReadOnlyList<Tick> Logarithmic(double lower, double upper, int most)
    {
        int first = (int)Math.Ceiling(Math.Log10(lower) - 1e-9);
        int last = (int)Math.Floor(Math.Log10(upper) + 1e-9);
        int stride = Math.Max(1, (int)Math.Ceiling((last - first + 1) / (double)most));
        List<Tick> ticks = [];
        for (int exponent = first; exponent <= last; exponent += stride)
            ticks.Add(new Tick(Math.Pow(10, exponent), exponent is 0 ? "1" : exponent is 1 ? "10" : "10" + NumberText.Superscript(exponent)));
        return ticks;
    }

    private static List<Tick> Multiples(double lower, double upper, double step, Func<double, string> label)
    {
        List<Tick> ticks = [];
        double slack = 1e-9 * step;
        long last = (long)Math.Floor((upper + slack) / step);
        for (long k = (long)Math.Ceiling((lower - slack) / step); k <= last; k++) ticks.Add(new Tick(k * step, label(k * step)));
        return ticks;
    }

    private static string Decimal(double value, int decimals) =>
        value.ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture).Replace('-', '−');

    private static string InPi(double value)
    {
        int halves = (int)Math.Round(value / (Math.PI / 2));
        string sign = halves < 0 ? "−" : "";
        return Math.Abs(halves) switch
        {
            0 => "0",
            1 => sign + "π/2",
            2 => sign + "π",
            int count when count % 2 == 0 => $"{sign}{count / 2}π",
            int count => $"{sign}{count}π/2",
        };
    }
}
