namespace OdeDsl.LinearAlgebra;

/// <summary>Finds a root of a continuous function between two points where it has opposite signs.</summary>
internal static class BracketedRoot
{
    // Each halving gains a bit and Brent's method needs at most the square of their number; smooth functions take about ten.
    private const int MaximumIterations = 200;

    /// <summary>
    /// Brent's method: inverse quadratic interpolation and secant steps, with bisection where they do not shrink the bracket (R. P. Brent,
    /// Algorithms for Minimization without Derivatives, 1973, chapter 4).
    /// </summary>
    /// <param name="function">The function. A value of NaN ends the search there.</param>
    /// <param name="a">One end.</param>
    /// <param name="valueAtA">The function's value there.</param>
    /// <param name="b">The other end.</param>
    /// <param name="valueAtB">The function's value there; zero or of the other sign.</param>
    /// <param name="tolerance">How accurately the root is wanted, absolute; the argument's rounding is added.</param>
    /// <returns>The root, or the last point tried if the function was NaN there.</returns>
    public static double Find(
        Func<double, double> function, double a, double valueAtA, double b, double valueAtB, double tolerance = 0)
    {
        if (valueAtA == 0) return a;
        (double c, double valueAtC) = (a, valueAtA); // the end of the bracket opposite to b
        double step = b - a, stepBefore = step;
        for (int iteration = 0; iteration < MaximumIterations; iteration++)
        {
            if (Math.Abs(valueAtC) < Math.Abs(valueAtB))
            {
                (a, b, c) = (b, c, b);
                (valueAtA, valueAtB, valueAtC) = (valueAtB, valueAtC, valueAtB);
            }

            double resolution = Math.Max(tolerance / 2, Math.BitIncrement(Math.Abs(b)) - Math.Abs(b));
            double half = (c - b) / 2;
            if (valueAtB == 0 || double.IsNaN(valueAtB) || Math.Abs(half) <= resolution) return b;
            if (Math.Abs(stepBefore) < resolution || Math.Abs(valueAtA) <= Math.Abs(valueAtB)
                || !TryInterpolate(a, b, c, valueAtA, valueAtB, valueAtC, half, stepBefore, resolution, out double interpolated))
            {
                step = half;
                stepBefore = half;
            }
            else
            {
                stepBefore = step;
                step = interpolated;
            }

            (a, valueAtA) = (b, valueAtB);
            b += Math.Abs(step) > resolution ? step : Math.CopySign(resolution, half);
            valueAtB = function(b);
            if (valueAtB > 0 != valueAtC > 0) continue;
            (c, valueAtC) = (a, valueAtA);
            step = b - a;
            stepBefore = step;
        }

        return b;
    }

    /// <summary>Brent's interpolation; refused where it leaves the bracket or shrinks too slowly.</summary>
    private static bool TryInterpolate(
        double a, double b, double c, double valueAtA, double valueAtB, double valueAtC, double half, double stepBefore, double resolution,
        out double step)
    {
        double s = valueAtB / valueAtA, p, q;
        if (a == c)
        {
            p = 2 * half * s;
            q = 1 - s;
        }
        else
        {
            double t = valueAtA / valueAtC, r = valueAtB / valueAtC;
            p = s * (2 * half * t * (t - r) - (b - a) * (r - 1));
            q = (t - 1) * (r - 1) * (s - 1);
        }

        if (p > 0) q = -q;
        else p = -p;
        step = p / q;
        return 2 * p < Math.Min(3 * half * q - Math.Abs(resolution * q), Math.Abs(stepBefore * q));
    }
}
