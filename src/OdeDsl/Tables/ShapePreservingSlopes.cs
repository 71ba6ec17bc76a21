namespace OdeDsl;

/// <summary>
/// Slopes at the knots that make the piecewise cubic rise and fall only where the values do. Inside: the weighted harmonic mean of the
/// neighbouring chords, which lies in the region of monotony of F. N. Fritsch and R. E. Carlson (SIAM Journal on Numerical Analysis 17,
/// 1980) and was given by F. N. Fritsch and J. Butland (SIAM Journal on Scientific and Statistical Computing 5, 1984). At the ends: the
/// three-point formula, kept within that region (C. B. Moler, Numerical Computing with MATLAB, 2004, section 3.6).
/// </summary>
internal static class ShapePreservingSlopes
{
    public static double[] Of(ReadOnlySpan<double> knots, ReadOnlySpan<double> values)
    {
        int last = knots.Length - 1;
        var lengths = new double[last];
        var chords = new double[last];
        for (int i = 0; i < last; i++)
        {
            lengths[i] = knots[i + 1] - knots[i];
            chords[i] = (values[i + 1] - values[i]) / lengths[i];
        }

        var slopes = new double[last + 1];
        if (last == 1)
        {
            slopes.AsSpan().Fill(chords[0]);
            return slopes;
        }

        for (int i = 1; i < last; i++) slopes[i] = Inner(lengths[i - 1], lengths[i], chords[i - 1], chords[i]);
        slopes[0] = End(lengths[0], lengths[1], chords[0], chords[1]);
        slopes[last] = End(lengths[last - 1], lengths[last - 2], chords[last - 1], chords[last - 2]);
        return slopes;
    }

    private static double Inner(double h0, double h1, double chord0, double chord1)
    {
        if (Math.Sign(chord0) != Math.Sign(chord1) || chord0 == 0) return 0;
        double w0 = 2 * h1 + h0, w1 = h1 + 2 * h0;
        return (w0 + w1) / (w0 / chord0 + w1 / chord1);
    }

    /// <summary>The slope at an end, from its own chord and length and those of the next segment.</summary>
    private static double End(double h0, double h1, double chord0, double chord1)
    {
        double slope = ((2 * h0 + h1) * chord0 - h0 * chord1) / (h0 + h1);
        if (Math.Sign(slope) != Math.Sign(chord0)) return 0;
        bool turns = Math.Sign(chord0) != Math.Sign(chord1) && Math.Abs(slope) > 3 * Math.Abs(chord0);
        return turns ? 3 * chord0 : slope;
    }
}
