using OdeDsl.Modeling;

namespace OdeDsl.Equilibria;

/// <summary>
/// Follows the motion roughly towards a stable rest: implicit Euler steps, one Newton step each, that grow as the rates fall
/// (C. T. Kelley and D. E. Keyes, SIAM J. Numer. Anal. 35, 1998). Linear conserved quantities are kept.
/// </summary>
internal sealed class PseudoTransient
{
    /// <summary>Enough to let the step grow from a fraction of the fastest motion to Newton's method.</summary>
    private const int MaximumSteps = 200;

    /// <summary>The first step moves the state by about this part of the region.</summary>
    private const double FirstMove = 0.05;

    /// <summary>A step may grow by this factor at most, and shrinks by it when it fails.</summary>
    private const double Growth = 4;

    /// <summary>Rates, in widths per first step, below which Newton's method takes over.</summary>
    private const double Settled = 1e-8;

    private readonly DynamicSystem system;
    private readonly SearchRegion region;
    private readonly MinimumNormSolver solver;
    private readonly double[] rates;
    private readonly double[] regime;
    private readonly double[] matrix;
    private readonly double[] trial;
    private readonly double[] step;

    public PseudoTransient(DynamicSystem system, SearchRegion region)
    {
        this.system = system;
        this.region = region;
        int n = system.StateCount;
        solver = new MinimumNormSolver(region.Width);
        (rates, trial, step) = (new double[n], new double[n], new double[n]);
        regime = new double[system.SwitchCount];
        matrix = new double[n * n];
    }

    /// <summary>Moves a state as far as the steps carry it.</summary>
    public void Advance(Span<double> state)
    {
        int n = state.Length;
        double first = FirstMove / Speed(state), tau = first;
        for (int k = 0; k < MaximumSteps; k++)
        {
            double speed = Speed(state);
            if (!(speed * first > Settled * FirstMove)) return;
            system.StateJacobian(0, state, regime, matrix);
            for (int i = 0; i < n * n; i++) matrix[i] = -matrix[i];
            for (int i = 0; i < n; i++) matrix[(i * n) + i] += 1 / tau;
            if (!solver.Factor(matrix)) return;
            solver.Solve(rates, step);
            for (int i = 0; i < n; i++) trial[i] = state[i] + step[i];
            double next = Speed(trial);
            if (!double.IsFinite(next) || region.Excess(trial) > 1)
            {
                tau /= Growth;
                continue;
            }

            trial.CopyTo(state);
            tau *= Math.Clamp(speed / next, 1 / Growth, Growth);
        }
    }

    // The rates in widths per time unit; leaves them and the regime behind.
    private double Speed(ReadOnlySpan<double> state)
    {
        system.Regime(0, state, regime);
        system.Rates(0, state, regime, rates);
        double largest = 0;
        for (int i = 0; i < rates.Length; i++)
        {
            double part = Math.Abs(rates[i]) / region.Width[i];
            if (double.IsNaN(part)) return double.NaN;
            largest = Math.Max(largest, part);
        }

        return largest;
    }
}
