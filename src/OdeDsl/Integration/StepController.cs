namespace OdeDsl.Integration;

/// <summary>
/// Proportional-integral step size control of an explicit method (K. Gustafsson, ACM Transactions on Mathematical Software 17, 1991;
/// in the form of Hairer and Wanner, Solving ODEs II, section IV.2).
/// </summary>
internal struct StepController
{
    private const double Safety = 0.9;

    /// <summary>The smallest error remembered: a step that met no error says little about the next.</summary>
    private const double SmallestMemory = 1e-4;

    private readonly double exponent, integral;
    private readonly double smallestFactor, largestFactor;
    private double logMemory = Math.Log(SmallestMemory);

    /// <param name="order">The order of the method; the error estimate behaves as if of one order lower.</param>
    /// <param name="integral">The strength of the integral part.</param>
    /// <param name="factors">The smallest and largest factor on a step.</param>
    public StepController(int order, double integral, (double Smallest, double Largest) factors)
    {
        this.integral = integral;
        exponent = 1.0 / order - 0.75 * integral;
        (smallestFactor, largestFactor) = factors;
    }

    /// <summary>The factor on an accepted step that gives the next one.</summary>
    /// <param name="error">The error norm, at most 1.</param>
    /// <param name="rejectedBefore">Whether the step was rejected before; then the next is not longer.</param>
    public double Accept(double error, bool rejectedBefore)
    {
        double logError = Math.Log(Math.Max(error, 1e-30));
        double factor = Safety * Math.Exp(integral * logMemory - exponent * logError);
        logMemory = Math.Max(logError, Math.Log(SmallestMemory));
        return Math.Clamp(factor, smallestFactor, rejectedBefore ? 1 : largestFactor);
    }

    /// <summary>The factor on a rejected step.</summary>
    /// <param name="error">The error norm, above 1.</param>
    public readonly double Reject(double error) => Math.Max(smallestFactor, Safety * Math.Pow(error, -exponent));

    /// <summary>Forgets the past.</summary>
    public void Reset() => logMemory = Math.Log(SmallestMemory);
}
