namespace OdeDsl.Assessment;

/// <summary>The confidence interval of a share.</summary>
internal static class WilsonInterval
{
    // The 97.5 % point of the normal distribution.
    private const double Quantile = 1.959963984540054;

    /// <summary>
    /// The 95 % interval of a share seen as a count in a sample: (p + z²/2n ± z √(p(1-p)/n + z²/4n²)) / (1 + z²/n) (E. B. Wilson, J. Am.
    /// Stat. Assoc. 22, 1927, 209). It is meant for random samples; evenly spread ones scatter less, so it is on the safe side.
    /// </summary>
    public static (double Lower, double Upper) Of(int count, int sample)
    {
        double share = (double)count / sample;
        double spread = Quantile * Quantile / sample;
        double centre = share + spread / 2;
        double half = Quantile * Math.Sqrt(share * (1 - share) / sample + spread / (4 * sample));
        return (Math.Max(0, (centre - half) / (1 + spread)), Math.Min(1, (centre + half) / (1 + spread)));
    }
}
