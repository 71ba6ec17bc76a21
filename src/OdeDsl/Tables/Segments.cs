namespace OdeDsl;

/// <summary>The polynomials of a table, those outside the knots included.</summary>
internal readonly struct Segments
{
    private readonly Cubic[] cubics;

    /// <param name="knots">The knots.</param>
    /// <param name="values">The values there.</param>
    /// <param name="slopes">The slopes there; none: straight lines.</param>
    /// <param name="continued">Whether the ends continue as lines; otherwise they are level.</param>
    public Segments(double[] knots, double[] values, double[] slopes, bool continued)
    {
        int last = knots.Length - 1;
        cubics = new Cubic[last + 2];
        for (int i = 0; i < last; i++)
        {
            double h = knots[i + 1] - knots[i], chord = (values[i + 1] - values[i]) / h;
            if (slopes.Length == 0)
            {
                cubics[i + 1] = new Cubic(i, knots[i], h, values[i], chord, 0, 0);
                continue;
            }

            // Hermite's cubic in powers of the distance from the first knot.
            double c2 = (3 * chord - 2 * slopes[i] - slopes[i + 1]) / h, c3 = (slopes[i] + slopes[i + 1] - 2 * chord) / h / h;
            cubics[i + 1] = new Cubic(i, knots[i], h, values[i], slopes[i], c2, c3);
        }

        double first = slopes.Length > 0 ? slopes[0] : cubics[1].C1, final = slopes.Length > 0 ? slopes[last] : cubics[last].C1;
        cubics[0] = new Cubic(0, knots[0], cubics[1].Spacing, values[0], continued ? first : 0, 0, 0);
        cubics[last + 1] = new Cubic(last, knots[last], cubics[last].Spacing, values[last], continued ? final : 0, 0, 0);
    }

    /// <summary>The polynomial of a segment; -1 and the number of the last knot are those outside the knots, and so is all beyond.</summary>
    public ref readonly Cubic this[double segment] => ref cubics[(int)Math.Clamp(segment + 1, 0, cubics.Length - 1)];

    /// <summary>Number + (x − Origin) / Spacing is the position; C0 + C1 s + C2 s² + C3 s³ with s = x − Origin the value.</summary>
    public readonly record struct Cubic(double Number, double Origin, double Spacing, double C0, double C1, double C2, double C3);
}
