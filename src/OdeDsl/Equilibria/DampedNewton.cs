namespace OdeDsl.Equilibria;

/// <summary>
/// Newton's method damped by the natural monotonicity test, which does not depend on how the equations are scaled (P. Deuflhard,
/// "Newton Methods for Nonlinear Problems", 2004, section 3.3), optionally on deflated equations. Not thread-safe.
/// </summary>
internal sealed class DampedNewton
{
    /// <summary>Quadratic convergence needs about ten; a double root halves its error each time and needs about forty.</summary>
    private const int MaximumIterations = 80;

    /// <summary>A step shortened further than this makes no progress worth its cost.</summary>
    private const double SmallestDamping = 1.0 / 1024;

    /// <summary>The longest single step, in scales of the unknowns.</summary>
    private const double LongestStep = 1;

    /// <summary>Outside the region by more than this many widths the iteration has left for good.</summary>
    private const double FarAway = 1e3;

    /// <summary>A correction this small relative to the unknown's local size means convergence, also at a double root.</summary>
    private const double Converged = 1e-9;

    /// <summary>Corrections of this size are rounding.</summary>
    private const double Rounding = 4e-15;

    /// <summary>The number of undamped steps taken after convergence to reach rounding.</summary>
    private const int PolishingSteps = 4;

    private readonly RootProblem problem;
    private readonly SearchRegion region;
    private readonly MinimumNormSolver solver;
    private readonly double[] values;
    private readonly double[] jacobian;
    private readonly double[] step;
    private readonly double[] deflatedStep;
    private readonly double[] trial;
    private readonly double[] nextStep;

    public DampedNewton(RootProblem problem, SearchRegion region)
    {
        this.problem = problem;
        this.region = region;
        int n = problem.Size;
        solver = new MinimumNormSolver(problem.Scale);
        (values, step, deflatedStep) = (new double[n], new double[n], new double[n]);
        (trial, nextStep) = (new double[n], new double[n]);
        jacobian = new double[n * n];
    }

    /// <summary>Moves a point to a root.</summary>
    /// <param name="point">The start; receives the last iterate.</param>
    /// <param name="deflation">Roots to keep away from, or <see langword="null"/>.</param>
    /// <returns>Whether the iteration converged to a root of the (undeflated) equations.</returns>
    public bool Solve(Span<double> point, Deflation? deflation = null)
    {
        double damping = 1;
        for (int iteration = 0; iteration < MaximumIterations; iteration++)
        {
            if (!ComputeStep(point)) return false;
            double slope = deflation?.Derivative(point, step) ?? 0;
            // Sherman-Morrison: the deflated equations' Newton step is the plain one stretched by 1 / (1 - slope).
            double stretch = 1 / (1 - slope);
            if (!double.IsFinite(stretch)) return false;
            for (int i = 0; i < step.Length; i++) deflatedStep[i] = stretch * step[i];
            if (LocalLength(point, step) <= Converged && LocalLength(point, deflatedStep) <= Converged) return Polish(point);
            double length = Length(deflatedStep);
            if (!(length > 0)) return false; // a stationary point of the least-squares step that is no root, or NaN
            damping = Math.Min(1, Math.Min(2 * damping, LongestStep / length));
            if (!Advance(point, deflation, slope, length, ref damping)) return false;
            if (region.Excess(point) > FarAway) return false;
        }

        return false;
    }

    // Computes the plain Newton step at a point; false if there is none.
    private bool ComputeStep(ReadOnlySpan<double> point)
    {
        problem.Evaluate(point, values);
        if (!AllFinite(values)) return false;
        problem.Differentiate(point, jacobian);
        if (!solver.Factor(jacobian)) return false;
        solver.Solve(values, step);
        for (int i = 0; i < step.Length; i++) step[i] = -step[i];
        return AllFinite(step) && !IsStationary(point);
    }

    // The minimum-norm step of a singular system can vanish where the equations do not: there the equations have no solution nearby.
    private bool IsStationary(ReadOnlySpan<double> point)
    {
        if (!solver.NearlySingular) return false;
        double misfit = 0, size = 0;
        for (int i = 0; i < values.Length; i++)
        {
            double predicted = values[i], row = 0;
            for (int j = 0; j < step.Length; j++)
            {
                double entry = jacobian[(i * step.Length) + j];
                predicted += entry * step[j];
                row = Math.Max(row, Math.Abs(entry) * problem.Scale[j]);
            }

            if (row == 0) row = 1;
            misfit = Math.Max(misfit, Math.Abs(predicted) / row);
            size = Math.Max(size, Math.Abs(values[i]) / row);
        }

        return LocalLength(point, step) <= Converged && misfit > Converged && misfit > size / 2;
    }

    private bool Advance(Span<double> point, Deflation? deflation, double slope, double length, ref double damping)
    {
        int n = step.Length;
        double logarithm = deflation?.Logarithm(point) ?? 0;
        for (; damping >= SmallestDamping; damping /= 2)
        {
            for (int i = 0; i < n; i++) trial[i] = point[i] + (damping * deflatedStep[i]);
            problem.Evaluate(trial, values);
            if (!AllFinite(values)) continue;
            solver.Solve(values, nextStep);
            if (deflation is not null) DeflateSimplifiedStep(point, deflation, slope, logarithm);
            if (!(Length(nextStep) <= (1 - (damping / 4)) * length)) continue;
            trial.CopyTo(point);
            return true;
        }

        return false;
    }

    // The simplified Newton step of the deflated equations: with u = J⁻¹ F(trial), s the plain step and h = ∇m/m at the point,
    // (m(trial) / m) (u + s (h·u) / (1 - h·s)).
    private void DeflateSimplifiedStep(ReadOnlySpan<double> point, Deflation deflation, double slope, double logarithm)
    {
        double ratio = Math.Exp(deflation.Logarithm(trial) - logarithm);
        double inner = deflation.Derivative(point, nextStep) / (1 - slope);
        for (int i = 0; i < nextStep.Length; i++) nextStep[i] = ratio * (nextStep[i] + (step[i] * inner));
    }

    // A double root keeps halving its error; others reach rounding within a step or two.
    private bool Polish(Span<double> point)
    {
        double best = LocalLength(point, step);
        for (int k = 0; k < PolishingSteps && best > Rounding; k++)
        {
            for (int i = 0; i < step.Length; i++) trial[i] = point[i] + step[i];
            if (!ComputeStep(trial)) break;
            double size = LocalLength(trial, step);
            if (!(size < best)) break;
            trial.CopyTo(point);
            best = size;
        }

        return ComputeStep(point);
    }

    private double Length(ReadOnlySpan<double> vector)
    {
        ReadOnlySpan<double> scale = problem.Scale;
        double sum = 0;
        for (int i = 0; i < vector.Length; i++)
        {
            double part = vector[i] / scale[i];
            sum += part * part;
        }

        return Math.Sqrt(sum);
    }

    private double LocalLength(ReadOnlySpan<double> point, ReadOnlySpan<double> vector)
    {
        double largest = 0;
        for (int i = 0; i < vector.Length; i++)
        {
            double scale = i < problem.StateCount ? region.LocalScale(i, point[i]) : problem.Scale[i];
            largest = Math.Max(largest, Math.Abs(vector[i]) / scale);
        }

        return largest;
    }

    private static bool AllFinite(ReadOnlySpan<double> vector)
    {
        foreach (double value in vector)
        {
            if (!double.IsFinite(value)) return false;
        }

        return true;
    }
}
