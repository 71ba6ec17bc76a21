namespace OdeDsl.Integration;

/// <summary>
/// Proportional-integral step size control of an explicit method (K. Gustafsson, ACM Transactions on Mathematical Software 17, 1991;
/// in the form of Hairer and Wanner, Solving ODEs II, section IV.2, with the constants given there for Dormand and Prince's pair).
/// </summary>
internal struct StepController
{
    private const double Safety = 0.9;
    private const double SmallestFactor = 0.2;
    private const double LargestFactor = 10;

    /// <summary>The strength of the integral part.</summary>
    private const double Beta = 0.04;

    /// <summary>The smallest error remembered: a step that met no error says little about the next.</summary>
    private const double SmallestMemory = 1e-4;

    private readonly double exponent;
    private double logMemory = Math.Log(SmallestMemory);

    /// <param name="order">The order of the method; the error estimate is one order lower.</param>
    public StepController(int order) => exponent = 1.0 / order - 0.75 * Beta;

    /// <summary>The factor on an accepted step that gives the next one.</summary>
    /// <param name="error">The error norm, at most 1.</param>
    /// <param name="rejectedBefore">Whether the step was rejected before; then the next is not longer.</param>
    public double Accept(double error, bool rejectedBefore)
    {
        double logError = Math.Log(Math.Max(error, 1e-30));
        double factor = Safety * Math.Exp(Beta * logMemory - exponent * logError);
        logMemory = Math.Max(logError, Math.Log(SmallestMemory));
        return Math.Clamp(factor, SmallestFactor, rejectedBefore ? 1 : LargestFactor);
    }

    /// <summary>The factor on a rejected step.</summary>
    /// <param name="error">The error norm, above 1.</param>
    public readonly double Reject(double error) => Math.Max(SmallestFactor, Safety * Math.Pow(error, -exponent));

    /// <summary>Forgets the past.</summary>
    public void Reset() => logMemory = Math.Log(SmallestMemory);
}
