namespace OdeDsl.Integration;

/// <summary>Searches the smallest value of a series inside its steps.</summary>
internal static class ExtremumSearch
{
    /// <summary>Places looked at inside a step: a polynomial of degree seven has no more than six extrema.</summary>
    private const int Places = 10;

    /// <summary>Golden section steps: 0.618³⁵ is below the square root of the rounding unit, beyond which values no longer differ.</summary>
    private const int Refinements = 35;

    private static readonly double Golden = (Math.Sqrt(5) - 1) / 2;

    /// <summary>Finds the smallest value of sign × series.</summary>
    public static Extremum Find(Series series, int sign)
    {
        double best = sign * series.Values[0], time = series.Times[0];
        if (sign * series.Final < best) (best, time) = (sign * series.Final, series.Times[^1]);
        for (int step = 0; step < series.StepCount; step++)
        {
            if (series.IsJump(step)) continue;
            double previous = double.PositiveInfinity, here = sign * series.Values[step];
            for (int place = 0; place <= Places; place++)
            {
                double theta = (double)place / Places;
                double next = place < Places ? sign * series.Inside(step, theta + 1.0 / Places) : double.PositiveInfinity;
                // A low among its neighbours is worth refining if it can undercut the best.
                bool isLow = here <= previous && here <= next;
                double depth = Math.Max(double.IsFinite(previous) ? previous - here : 0, double.IsFinite(next) ? next - here : 0);
                if (isLow && here - depth < best)
                {
                    (double value, double at) = Refine(series, sign, step, Math.Max(0, theta - 1.0 / Places), Math.Min(1, theta + 1.0 / Places));
                    if (here <= value) (value, at) = (here, theta);
                    if (value < best) (best, time) = (value, series.TimeAt(step, at));
                }

                previous = here;
                here = next;
            }
        }

        return new Extremum(sign * best, time);
    }

    private static (double Value, double Theta) Refine(Series series, int sign, int step, double low, double high)
    {
        double a = high - Golden * (high - low), b = low + Golden * (high - low);
        double fa = sign * series.Inside(step, a), fb = sign * series.Inside(step, b);
        for (int i = 0; i < Refinements; i++)
        {
            if (fa <= fb)
            {
                (high, b, fb) = (b, a, fa);
                a = high - Golden * (high - low);
                fa = sign * series.Inside(step, a);
            }
            else
            {
                (low, a, fa) = (a, b, fb);
                b = low + Golden * (high - low);
                fb = sign * series.Inside(step, b);
            }
        }

        return fa <= fb ? (fa, a) : (fb, b);
    }
}
