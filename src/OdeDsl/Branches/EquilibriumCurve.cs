using MathNet.Numerics.LinearAlgebra;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;

namespace OdeDsl.Branches;

/// <summary>
/// The equations f(x, p) = 0 of a branch in scaled variables u = (x / state scales, p / parameter scale), within one locked regime:
/// Newton's corrections, tangents and eigenvalues.
/// </summary>
/// <remarks>
/// Pseudo-arclength (H. B. Keller, in P. Rabinowitz (ed.), Applications of Bifurcation Theory, 1977): the n equations are completed by
/// c · (u - predicted) = 0 with c the tangent at the last point. The bordered matrix is regular at folds too.
/// </remarks>
internal sealed class EquilibriumCurve
{
    // Newton's method converges quadratically: once a correction is below this share of the position, the next is rounding.
    private const double ConvergedShare = 1e-9;
    private const int MaximumIterations = 12;

    // A few units of double rounding (1.1e-16) for sums of terms of the position's size.
    private const double RoundingShare = 1e-15;

    private readonly DynamicSystem system;
    private readonly int parameter;
    private readonly int n;
    private readonly double[] state;
    private readonly double[] rates;
    private readonly double[] jacobian;
    private readonly double[] parameterJacobian;
    private readonly double[] equations;
    private readonly double[] weights;
    private readonly double[] bordered;
    private readonly double[] correction;
    private readonly MinimumNormSolver solver;

    public EquilibriumCurve(DynamicSystem system, int parameter, double[] scales)
    {
        this.system = system;
        this.parameter = parameter;
        n = system.StateCount;
        Scales = scales;
        Regime = new double[system.SwitchCount];
        state = new double[n];
        rates = new double[n];
        jacobian = new double[n * n];
        parameterJacobian = new double[n * system.ParameterCount];
        equations = new double[n * (n + 1)];
        weights = new double[n];
        bordered = new double[(n + 1) * (n + 1)];
        correction = new double[n + 1];
        double[] unit = new double[n + 1];
        Array.Fill(unit, 1);
        solver = new MinimumNormSolver(unit);
    }

    /// <summary>The sizes that count as 1: one for each state and one for the parameter.</summary>
    public double[] Scales { get; }

    /// <summary>The locked regime.</summary>
    public double[] Regime { get; }

    /// <summary>How many times the state Jacobian was evaluated.</summary>
    public long JacobianEvaluations { get; private set; }

    /// <summary>Whether the last failure was due to rates or derivatives that are not finite.</summary>
    public bool LastWasNotFinite { get; private set; }

    /// <summary>The system with the parameter value of a position.</summary>
    public DynamicSystem SystemAt(ReadOnlySpan<double> position) => system.WithParameter(parameter, position[n] * Scales[n]);

    /// <summary>The state of a position in the model's units.</summary>
    public double[] StateOf(ReadOnlySpan<double> position)
    {
        double[] state = new double[n];
        for (int i = 0; i < n; i++) state[i] = position[i] * Scales[i];
        return state;
    }

    /// <summary>Corrects a predicted position onto the curve within the plane through it normal to <paramref name="normal"/>.</summary>
    /// <param name="predicted">The n + 1 scaled values predicted.</param>
    /// <param name="normal">The plane's normal: the tangent, or an axis to hold one variable fixed.</param>
    /// <param name="onward">The direction in which the new tangent is to point.</param>
    /// <returns>The corrected point, or <see langword="null"/> if Newton's method does not converge.</returns>
    public CurvePoint? Correct(ReadOnlySpan<double> predicted, ReadOnlySpan<double> normal, ReadOnlySpan<double> onward)
    {
        LastWasNotFinite = false;
        double[] position = predicted.ToArray();
        double last = double.PositiveInfinity;
        for (int iteration = 1; iteration <= MaximumIterations; iteration++)
        {
            if (!TryEvaluate(position, out double residual)) return null;
            if (!TryNewtonStep(position, predicted, normal, residual, out double size)) return null;
            double magnitude = 1 + Largest(position);
            if (size <= ConvergedShare * magnitude) return Finish(position, onward, iteration);
            if (iteration > 2 && size > 0.9 * last) return null;
            last = size;
        }

        return null;
    }

    /// <summary>
    /// The smallest singular value of the n × (n + 1) matrix of the equations at a position, relative to that at a reference nearby and
    /// with the same weights of rows: zero where branches cross, near 1 at a fold.
    /// </summary>
    public double RankMeasure(ReadOnlySpan<double> position, ReadOnlySpan<double> reference)
    {
        if (!TryEvaluate(reference, out _)) return double.NaN;
        double[] referenceWeights = [.. weights];
        double regular = SmallestSingularValue();
        if (!TryEvaluate(position, out _)) return double.NaN;
        for (int i = 0; i < n; i++)
        {
            foreach (ref double entry in equations.AsSpan(i * (n + 1), n + 1)) entry *= referenceWeights[i] / weights[i];
        }

        return SmallestSingularValue() / regular;
    }

    /// <summary>The largest scaled rate at a position within the locked regime; NaN if it is not finite.</summary>
    public double ResidualAt(ReadOnlySpan<double> position) => TryEvaluate(position, out double residual) ? residual : double.NaN;

    /// <summary>The unit tangent of the curve at a position that points onward, or <see langword="null"/> if it is not unique.</summary>
    public double[]? TangentAt(ReadOnlySpan<double> position, ReadOnlySpan<double> onward) =>
        TryEvaluate(position, out _) ? Tangent(onward) : null;

    private CurvePoint? Finish(double[] position, ReadOnlySpan<double> onward, int iterations)
    {
        if (!TryEvaluate(position, out double residual)) return null;
        return Tangent(onward) is { } tangent ? new CurvePoint(position, tangent, [.. Spectrum.Of(jacobian, Scales.AsSpan(0, n)).Eigenvalues], residual, iterations) : null;
    }

    /// <summary>Computes scaled rates and the scaled, row-equilibrated matrix of the equations at a position.</summary>
    private bool TryEvaluate(ReadOnlySpan<double> position, out double residual)
    {
        residual = double.NaN;
        for (int i = 0; i < n; i++) state[i] = position[i] * Scales[i];
        JacobianEvaluations++;
        try
        {
            DynamicSystem here = SystemAt(position);
            here.Rates(0, state, Regime, rates);
            here.StateJacobian(0, state, Regime, jacobian);
            here.ParameterJacobian(0, state, Regime, parameterJacobian);
        }
        catch (Exception exception) when (exception is ArgumentException or ArithmeticException)
        {
            // The only exceptions the contract allows: a called function of System.Math refused its argument.
            LastWasNotFinite = true;
            return false;
        }

        residual = 0;
        for (int i = 0; i < n; i++)
        {
            Span<double> row = equations.AsSpan(i * (n + 1), n + 1);
            for (int j = 0; j < n; j++) row[j] = jacobian[i * n + j] * Scales[j];
            row[n] = parameterJacobian[i * system.ParameterCount + parameter] * Scales[n];
            double largest = Largest(row);
            double weight = largest > 0 ? 1 / largest : 1;
            foreach (ref double entry in row) entry *= weight;
            weights[i] = weight;
            rates[i] *= weight;
            residual = Math.Max(residual, Math.Abs(rates[i]));
        }

        LastWasNotFinite = !double.IsFinite(residual) || !double.IsFinite(Largest(equations));
        return !LastWasNotFinite;
    }

    private bool TryNewtonStep(
        double[] position, ReadOnlySpan<double> predicted, ReadOnlySpan<double> normal, double residual, out double size)
    {
        size = 0;
        double offset = 0;
        for (int i = 0; i <= n; i++) offset += normal[i] * (position[i] - predicted[i]);
        // Where branches cross, the bordered matrix is nearly singular and corrections are rounding magnified: a position that fulfils
        // the equations to rounding is on the curve.
        double rounding = RoundingShare * (1 + Largest(position));
        if (residual <= rounding && Math.Abs(offset) <= rounding) return true;
        if (!TryFactor(normal)) return false;
        for (int i = 0; i < n; i++) correction[i] = -rates[i];
        correction[n] = -offset;
        solver.Solve(correction, correction);
        for (int i = 0; i <= n; i++) position[i] += correction[i];
        size = Largest(correction);
        return double.IsFinite(size);
    }

    private double[]? Tangent(ReadOnlySpan<double> onward)
    {
        if (!TryFactor(onward)) return null;
        double[] tangent = new double[n + 1];
        tangent[n] = 1;
        solver.Solve(tangent, tangent);
        double length = 0;
        foreach (double entry in tangent) length += entry * entry;
        length = Math.Sqrt(length);
        if (!double.IsFinite(length)) return null;
        for (int i = 0; i <= n; i++) tangent[i] /= length;
        return tangent;
    }

    private bool TryFactor(ReadOnlySpan<double> lastRow)
    {
        equations.CopyTo(bordered, 0);
        lastRow.CopyTo(bordered.AsSpan(n * (n + 1)));
        return solver.Factor(bordered);
    }

    private double SmallestSingularValue() =>
        Matrix<double>.Build.Dense(n + 1, n, equations).Svd(computeVectors: false).S[n - 1];

    private static double Largest(ReadOnlySpan<double> values)
    {
        double largest = 0;
        foreach (double value in values) largest = Math.Max(largest, Math.Abs(value)); // Math.Max hands NaN on
        return largest;
    }
}
