using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>
/// Brings a state that slides along a surface back to it: one Newton step along the gradient, lengths measured in
/// tolerances.
/// </summary>
/// <param name="system">The system.</param>
/// <param name="regime">The locked regime.</param>
/// <param name="absolute">The absolute tolerance of each state.</param>
/// <param name="relativeDrift">The drift that is left alone, relative to the states.</param>
/// <param name="absoluteDrift">The drift that is left alone, in absolute tolerances.</param>
internal sealed class SurfaceProjection(
    DynamicSystem system, double[] regime, double[] absolute, double relativeDrift, double absoluteDrift)
{
    private readonly double[] functions = new double[system.SwitchCount];
    private readonly double[] gradients = new double[system.SwitchCount * system.StateCount];

    /// <summary>Moves a state onto a surface.</summary>
    /// <returns>Whether it had drifted far enough to be moved.</returns>
    public bool Apply(int index, double surface, double time, Span<double> state)
    {
        int n = state.Length;
        system.SwitchingFunctions(time, state, regime, functions);
        system.SwitchingJacobian(time, state, regime, gradients);
        ReadOnlySpan<double> gradient = gradients.AsSpan(index * n, n);
        double drift = functions[index] - surface, harmless = 0, square = 0;
        for (int i = 0; i < n; i++)
        {
            harmless += Math.Abs(gradient[i]) * (absoluteDrift * absolute[i] + relativeDrift * Math.Abs(state[i]));
            square += gradient[i] * absolute[i] * gradient[i] * absolute[i];
        }

        if (Math.Abs(drift) <= harmless || !(square > 0)) return false;
        for (int i = 0; i < n; i++) state[i] -= gradient[i] * absolute[i] * absolute[i] * (drift / square);
        return true;
    }
}
