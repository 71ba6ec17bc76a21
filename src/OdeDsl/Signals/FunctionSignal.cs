namespace OdeDsl;

/// <summary>A signal computed by a function. A piece ends just before its kink, where the function still has the piece's own value.</summary>
internal sealed class FunctionSignal(Func<double, double> value, Func<double, double>? slope, double[] kinks) : Signal(kinks)
{
    /// <summary>The relative increment of central differences: the cube root of the rounding unit.</summary>
    private const double Increment = 6e-6;

    private readonly double[] bounds = kinks;

    internal override bool IsContinuous => false;

    internal override double At(double time, int piece) => value(Inside(time, piece));

    internal override double SlopeAt(double time, int piece)
    {
        if (slope is not null) return slope(Inside(time, piece));
        double h = Increment * Math.Max(1, Math.Abs(time));
        double before = Inside(time - h, piece), after = Inside(time + h, piece);
        return (value(after) - value(before)) / (after - before);
    }

    private double Inside(double time, int piece)
    {
        if (piece < bounds.Length) time = Math.Min(time, Math.BitDecrement(bounds[piece]));
        return piece > 0 ? Math.Max(time, bounds[piece - 1]) : time;
    }
}
