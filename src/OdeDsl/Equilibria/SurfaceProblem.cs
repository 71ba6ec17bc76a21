using OdeDsl.Modeling;

namespace OdeDsl.Equilibria;

/// <summary>
/// A rest by sliding: (1 - α) f_below + α f_above = 0 on the surface g = level (A. F. Filippov, "Differential equations with
/// discontinuous righthand sides", 1988, §4: the convex combination tangent to the surface vanishes). Unknowns: the states and α.
/// </summary>
internal sealed class SurfaceProblem : RootProblem
{
    /// <summary>How far from the surface, in local sizes, the regimes on both sides are looked up.</summary>
    private const double Aside = 1e-6;

    /// <summary>How far α may lie outside (0, 1): rounding only.</summary>
    private const double WeightSlack = 1e-12;

    private readonly SwitchingFace face;
    private readonly double[] scale;
    private readonly double[] ratesBelow;
    private readonly double[] ratesAbove;
    private readonly double[] jacobianBelow;
    private readonly double[] jacobianAbove;
    private readonly double[] switching;
    private readonly double[] gradients;
    private readonly double[] regime;
    private readonly double[] aside;

    public SurfaceProblem(DynamicSystem system, SearchRegion region, SwitchingFace face)
        : base(system, region)
    {
        this.face = face;
        int n = system.StateCount;
        scale = [.. region.Width, 1];
        (ratesBelow, ratesAbove, aside) = (new double[n], new double[n], new double[n]);
        (jacobianBelow, jacobianAbove) = (new double[n * n], new double[n * n]);
        (switching, regime) = (new double[system.SwitchCount], new double[system.SwitchCount]);
        gradients = new double[system.SwitchCount * n];
    }

    public override int Size => StateCount + 1;

    public override ReadOnlySpan<double> Scale => scale;

    private ReadOnlySpan<double> Gradient => gradients.AsSpan(face.Switch * StateCount, StateCount);

    public override void Begin(Span<double> point) => point[StateCount] = 0.5;

    public override void Evaluate(ReadOnlySpan<double> point, Span<double> values)
    {
        int n = StateCount;
        ReadOnlySpan<double> state = point[..n];
        double alpha = point[n];
        EvaluateSides(state);
        for (int i = 0; i < n; i++) values[i] = ((1 - alpha) * ratesBelow[i]) + (alpha * ratesAbove[i]);
        System.SwitchingFunctions(0, state, face.Below, switching);
        values[n] = switching[face.Switch] - face.Level;
    }

    public override void Differentiate(ReadOnlySpan<double> point, Span<double> jacobian)
    {
        int n = StateCount;
        ReadOnlySpan<double> state = point[..n];
        EvaluateSides(state);
        Span<double> mean = new double[n * n];
        MeanJacobian(point, mean);
        for (int i = 0; i < n; i++)
        {
            mean.Slice(i * n, n).CopyTo(jacobian.Slice(i * (n + 1), n));
            jacobian[(i * (n + 1)) + n] = ratesAbove[i] - ratesBelow[i];
        }

        Gradient.CopyTo(jacobian.Slice(n * (n + 1), n));
        jacobian[(n * (n + 1)) + n] = 0;
    }

    public override bool Accepts(ReadOnlySpan<double> point)
    {
        int n = StateCount;
        ReadOnlySpan<double> state = point[..n];
        if (!(point[n] >= -WeightSlack && point[n] <= 1 + WeightSlack) || !Region.Contains(state)) return false;
        EvaluateSides(state);
        System.SwitchingJacobian(0, state, face.Below, gradients);
        return Slope(ratesAbove) != Slope(ratesBelow) && face.RatesJump(System, Region, state)
            && RegimeAside(state, -1, face.Below) && RegimeAside(state, 1, face.Above);
    }

    public override Equilibrium Describe(ReadOnlySpan<double> point, int nullity, EquilibriumSet? set)
    {
        int n = StateCount;
        var values = new double[n + 1];
        var mean = new double[n * n];
        Evaluate(point, values);
        MeanJacobian(point, mean);
        double[] sliding = SlidingJacobian(mean);
        Spectrum spectrum = Spectrum.OnSurface(sliding, Gradient, Region.Width);
        LinearVerdict verdict = spectrum.Judge(nullity, set);
        // Both sides must point at the surface; otherwise it repels and the rest is unstable whatever happens within the surface.
        if (!(Slope(ratesBelow) >= 0 && Slope(ratesAbove) <= 0)) verdict = verdict.WithRepellingSurface(n - 1);
        return new Equilibrium
        {
            State = [.. point[..n]],
            Residual = values.Take(n).Max(Math.Abs),
            Regime = [.. face.Below],
            Jacobian = [.. sliding],
            Eigenvalues = spectrum.Eigenvalues,
            Modes = spectrum.Modes,
            Kind = verdict.Kind,
            Stability = verdict.Stability,
            UnstableCount = verdict.UnstableCount,
            Surface = face.Switch,
            Set = set,
        };
    }

    private double Slope(ReadOnlySpan<double> rates)
    {
        double sum = 0;
        for (int i = 0; i < StateCount; i++) sum += Gradient[i] * rates[i];
        return sum;
    }

    // J_α at the point, and the surface's gradient beside it.
    private void MeanJacobian(ReadOnlySpan<double> point, Span<double> mean)
    {
        int n = StateCount;
        ReadOnlySpan<double> state = point[..n];
        double alpha = point[n];
        System.StateJacobian(0, state, face.Below, jacobianBelow);
        System.StateJacobian(0, state, face.Above, jacobianAbove);
        System.SwitchingJacobian(0, state, face.Below, gradients);
        for (int i = 0; i < n * n; i++) mean[i] = ((1 - alpha) * jacobianBelow[i]) + (alpha * jacobianAbove[i]);
    }

    // Where the sliding rates vanish, the derivative of α follows from ∇g · f = 0 and the curvature of the surface drops out:
    // J_sliding = (I - d ∇gᵀ / (∇g · d)) J_α with d = f_above - f_below.
    private double[] SlidingJacobian(double[] mean)
    {
        int n = StateCount;
        var sliding = new double[n * n];
        double across = Slope(ratesAbove) - Slope(ratesBelow);
        for (int j = 0; j < n; j++)
        {
            double row = 0;
            for (int i = 0; i < n; i++) row += Gradient[i] * mean[(i * n) + j];
            for (int i = 0; i < n; i++) sliding[(i * n) + j] = mean[(i * n) + j] - ((ratesAbove[i] - ratesBelow[i]) * row / across);
        }

        return sliding;
    }

    private bool RegimeAside(ReadOnlySpan<double> state, double direction, double[] expected)
    {
        double change = 0;
        for (int i = 0; i < StateCount; i++) change += Math.Abs(Gradient[i]) * Region.LocalScale(i, state[i]);
        if (!(change > 0)) return false;
        for (int i = 0; i < StateCount; i++)
        {
            double local = Region.LocalScale(i, state[i]);
            aside[i] = state[i] + (direction * Aside * local * (Gradient[i] * local / change));
        }

        System.Regime(0, aside, regime);
        return regime.AsSpan().SequenceEqual(expected);
    }

    private void EvaluateSides(ReadOnlySpan<double> state)
    {
        System.Rates(0, state, face.Below, ratesBelow);
        System.Rates(0, state, face.Above, ratesAbove);
    }
}
