namespace OdeDsl.Integration;

/// <summary>
/// Predictive step size control of an implicit method whose error estimate is of known order (K. Gustafsson, ACM Transactions on Mathematical
/// Software 20, 1994; E. Hairer, G. Wanner, Solving ODEs II, equations IV.8.25 to 8.28, with the constants given there).
/// </summary>
internal struct PredictiveController
{
    /// <summary>Newton's iterations contract so well that the Jacobian may be kept.</summary>
    public const double NegligibleContraction = 1e-3;

    /// <summary>Growth of the step up to this factor is not worth a factorisation.</summary>
    public const double LargestIgnoredGrowth = 1.2;

    private const double Safety = 0.9;
    private const double SmallestFactor = 1.0 / 5;
    private const double LargestFactor = 8;
    private const double FirstFactor = 0.1;
    private const double SmallestMemory = 1e-2;

    private double exponent;
    private int maximumIterations;
    private double sizeBefore;
    private double errorBefore;
    private bool hasStepped;

    /// <summary>Whether no step was accepted yet.</summary>
    public readonly bool IsFirst => !hasStepped;

    /// <summary>Takes a method's data.</summary>
    /// <param name="estimateOrder">The order of the error estimate.</param>
    /// <param name="mostIterations">Newton's iterations at most.</param>
    public void Use(int estimateOrder, int mostIterations)
    {
        exponent = 1.0 / (estimateOrder + 1);
        maximumIterations = mostIterations;
    }

    /// <summary>The factor on an accepted step that gives the next one.</summary>
    public double Accept(double h, double error, int iterations, bool rejectedBefore)
    {
        double factor = Factor(error, iterations);
        if (hasStepped)
        {
            double predicted = h / sizeBefore * Safety * Math.Pow(errorBefore / (error * error), exponent);
            factor = Math.Min(factor, Math.Clamp(predicted, SmallestFactor, LargestFactor));
        }

        hasStepped = true;
        sizeBefore = h;
        errorBefore = Math.Max(SmallestMemory, error);
        return rejectedBefore ? Math.Min(factor, 1) : factor;
    }

    /// <summary>The factor on a rejected step.</summary>
    public readonly double Reject(double error, int iterations) => IsFirst ? FirstFactor : Factor(error, iterations);

    /// <summary>Forgets the past.</summary>
    public void Reset() => hasStepped = false;

    // Steps that needed many iterations are made smaller than the error alone asks for.
    private readonly double Factor(double error, int iterations)
    {
        double safety = Safety * (1 + 2 * maximumIterations) / (iterations + 2 * maximumIterations);
        return Math.Clamp(Math.Min(Safety, safety) * Math.Pow(error, -exponent), SmallestFactor, LargestFactor);
    }
}
