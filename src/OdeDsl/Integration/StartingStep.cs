namespace OdeDsl.Integration;

/// <summary>The size of a first step (Hairer, Norsett and Wanner, Solving ODEs I, section II.4, "Starting step size").</summary>
internal static class StartingStep
{
    /// <summary>Below this size a norm says nothing about the scale of the problem.</summary>
    private const double Negligible = 1e-5;

    /// <summary>The step used where a norm says nothing, in units of time.</summary>
    private const double Fallback = 1e-6;

    /// <summary>The part of the tolerance, or of the state, that the first step may use up.</summary>
    private const double Caution = 0.01;

    /// <summary>Estimates the signed first step.</summary>
    /// <param name="stepper">The stepper that asks; computes rates.</param>
    /// <param name="time">The start time.</param>
    /// <param name="longest">The signed longest permitted step.</param>
    /// <param name="y">The start state.</param>
    /// <param name="rates">The rates there.</param>
    /// <param name="state">Workspace.</param>
    /// <param name="change">Workspace.</param>
    /// <param name="norm">The error norm.</param>
    /// <param name="order">The order of the method.</param>
    public static double Estimate(
        Stepper stepper,
        double time,
        double longest,
        double[] y,
        double[] rates,
        double[] state,
        double[] change,
        ErrorNorm norm,
        int order)
    {
        double limit = Math.Abs(longest);
        double d0 = norm.Measure(y, y, y);
        double d1 = norm.Measure(rates, y, y);
        double h0 = d0 < Negligible || d1 < Negligible ? Fallback : Caution * d0 / d1;
        // At a state of exactly zero rates the fallback may be below the resolution of the time.
        h0 = Math.Max(h0, 16 * (Math.BitIncrement(Math.Abs(time)) - Math.Abs(time)));
        h0 = Math.Min(h0, limit);
        double signed = Math.CopySign(h0, longest);
        StageSums.Combine(state, y, signed, rates);
        stepper.Rates(time + signed, state, change);
        for (int i = 0; i < change.Length; i++) change[i] -= rates[i];
        double d2 = norm.Measure(change, y, y) / h0;
        double largest = Math.Max(d1, d2);
        // Rates that are not finite a small step ahead: begin with that step and let rejections find the right one.
        if (!double.IsFinite(largest)) return signed;
        double h1 = largest <= 1e-15 ? Math.Max(Fallback, h0 * 1e-3) : Math.Pow(Caution / largest, 1.0 / (order + 1));
        return Math.CopySign(Math.Min(Math.Min(100 * h0, h1), limit), longest);
    }
}
