namespace OdeDsl.Integration;

/// <summary>
/// The polynomial that continues a step to all times inside it, in the nested form
/// y(θ) = y₀ + θ (d₁ + (1 − θ) (d₂ + θ (d₃ + (1 − θ) d₄))), θ = (t − t₀) / h (the form of Hairer, Norsett and Wanner, Solving ODEs I,
/// section II.6, for Dormand and Prince's pair; every polynomial of degree four or less has it). d₁ = y₁ − y₀.
/// </summary>
internal static class DenseStep
{
    /// <summary>The number of coefficient vectors beyond the two end states.</summary>
    public const int CoefficientCount = 3;

    /// <summary>Evaluates one component.</summary>
    public static double Value(double theta, double y0, double y1, double d2, double d3, double d4)
    {
        double rest = 1 - theta;
        return y0 + theta * (y1 - y0 + rest * (d2 + theta * (d3 + rest * d4)));
    }

    /// <summary>Differentiates one component by θ.</summary>
    public static double Slope(double theta, double y0, double y1, double d2, double d3, double d4)
    {
        double rest = 1 - theta;
        return y1 - y0 + (rest - theta) * d2 + theta * (2 - 3 * theta) * d3 + 2 * theta * rest * (rest - theta) * d4;
    }

    /// <summary>Evaluates all components.</summary>
    public static void Evaluate(
        double theta,
        ReadOnlySpan<double> y0,
        ReadOnlySpan<double> y1,
        ReadOnlySpan<double> d2,
        ReadOnlySpan<double> d3,
        ReadOnlySpan<double> d4,
        Span<double> y)
    {
        for (int i = 0; i < y.Length; i++) y[i] = Value(theta, y0[i], y1[i], d2[i], d3[i], d4[i]);
    }
}
