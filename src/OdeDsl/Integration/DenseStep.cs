namespace OdeDsl.Integration;

/// <summary>
/// The polynomial that continues a step to all times inside it, in the nested form
/// y(θ) = y₀ + θ (d₁ + (1 − θ) (d₂ + θ (d₃ + (1 − θ) (d₄ + ...)))), θ = (t − t₀) / h (the form of Hairer, Norsett and Wanner, Solving
/// ODEs I, section II.6, for Dormand and Prince's pairs; every polynomial with y(0) = y₀ has it). d₁ = y₁ − y₀; the others are held
/// one vector after the other.
/// </summary>
internal static class DenseStep
{
    /// <summary>Evaluates one component.</summary>
    /// <param name="theta">The place inside the step.</param>
    /// <param name="y0">The component at the start.</param>
    /// <param name="y1">The component at the end.</param>
    /// <param name="coefficients">d₂, d₃, ..., vectors of a length each.</param>
    /// <param name="length">The length of a vector.</param>
    /// <param name="index">The component.</param>
    public static double Value(double theta, double y0, double y1, ReadOnlySpan<double> coefficients, int length, int index)
    {
        double rest = 1 - theta, sum = 0;
        for (int at = coefficients.Length - length + index, k = coefficients.Length / length - 1; k >= 0; k--, at -= length)
            sum = coefficients[at] + (k % 2 == 0 ? theta : rest) * sum;
        return y0 + theta * (y1 - y0 + rest * sum);
    }

    /// <summary>Evaluates the leading components, as many as fit.</summary>
    public static void Evaluate(
        double theta, ReadOnlySpan<double> y0, ReadOnlySpan<double> y1, ReadOnlySpan<double> coefficients, int length, Span<double> y)
    {
        for (int i = 0; i < y.Length; i++) y[i] = Value(theta, y0[i], y1[i], coefficients, length, i);
    }
}
