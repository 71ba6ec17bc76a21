using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>
/// The surface g = 0 that a motion slides along, if it does. The rates are the combination of those on both sides that is tangent to the
/// surface: f = (1 − α) f₋ + α f₊ with ∇g·f + ∂g/∂t = 0 (A. F. Filippov, Differential Equations with Discontinuous Righthand Sides, 1988,
/// section 4). α leaves [0, 1] where one side no longer points at the surface.
/// </summary>
internal sealed class SlidingSurface
{
    /// <summary>The relative increment of central differences: the cube root of the rounding unit.</summary>
    private const double Increment = 6e-6;

    private readonly DynamicSystem system;
    private readonly double[] regime;
    private readonly double[] extents;
    private readonly double[] below, above;
    private readonly double[] gradients, timeDerivatives;
    private readonly double[] shifted, plus, minus;

    /// <param name="system">The system.</param>
    /// <param name="regime">The locked regime; the entry of the surface is changed during an evaluation and put back.</param>
    /// <param name="extents">Sizes of the states that make them comparable.</param>
    public SlidingSurface(DynamicSystem system, double[] regime, double[] extents)
    {
        this.system = system;
        this.regime = regime;
        this.extents = extents;
        int n = system.StateCount, s = system.SwitchCount;
        (below, above) = (new double[n], new double[n]);
        (gradients, timeDerivatives) = (new double[s * n], new double[s]);
        (shifted, plus, minus) = (new double[n], new double[n], new double[n]);
    }

    /// <summary>Whether the motion slides.</summary>
    public bool IsActive { get; private set; }

    /// <summary>The switch whose surface it is.</summary>
    public int Switch { get; private set; }

    /// <summary>The value of the switching function on it.</summary>
    public double Surface { get; private set; }

    /// <summary>The regime entry of the side where the switching function is below the surface's value.</summary>
    public double EntryBelow { get; private set; }

    /// <summary>The regime entry of the other side.</summary>
    public double EntryAbove { get; private set; }

    /// <summary>Begins to slide.</summary>
    public void Begin(int index, double surface, double entryBelow, double entryAbove)
    {
        IsActive = true;
        Switch = index;
        Surface = surface;
        EntryBelow = entryBelow;
        EntryAbove = entryAbove;
    }

    /// <summary>Stops sliding.</summary>
    public void End() => IsActive = false;

    /// <summary>The rates along the surface.</summary>
    public void Rates(double time, ReadOnlySpan<double> y, Span<double> rates)
    {
        (double approachBelow, double approachAbove) = Approaches(time, y);
        double alpha = approachBelow / (approachBelow - approachAbove);
        for (int i = 0; i < below.Length; i++) rates[i] = below[i] + alpha * (above[i] - below[i]);
    }

    /// <summary>dg/dt along the rates below and above: positive and negative while the surface attracts.</summary>
    public (double Below, double Above) Approaches(double time, ReadOnlySpan<double> y)
    {
        int n = below.Length;
        double entry = regime[Switch];
        regime[Switch] = EntryBelow;
        system.Rates(time, y, regime, below);
        regime[Switch] = EntryAbove;
        system.Rates(time, y, regime, above);
        regime[Switch] = entry;
        system.SwitchingJacobian(time, y, regime, gradients);
        system.SwitchingTimeDerivative(time, y, regime, timeDerivatives);
        double first = timeDerivatives[Switch], second = first;
        for (int i = 0; i < n; i++)
        {
            first += gradients[Switch * n + i] * below[i];
            second += gradients[Switch * n + i] * above[i];
        }

        return (first, second);
    }

    /// <summary>The Jacobian of <see cref="Rates"/>, by central differences: the second derivatives of the model are not needed.</summary>
    public void Jacobian(double time, ReadOnlySpan<double> y, Span<double> jacobian)
    {
        int n = below.Length;
        for (int j = 0; j < n; j++)
        {
            double h = Increment * Math.Max(extents[j], Math.Abs(y[j]));
            y[..n].CopyTo(shifted);
            shifted[j] = y[j] + h;
            Rates(time, shifted, plus);
            shifted[j] = y[j] - h;
            Rates(time, shifted, minus);
            for (int i = 0; i < n; i++) jacobian[i * n + j] = (plus[i] - minus[i]) / (2 * h);
        }
    }

    /// <summary>The derivative of <see cref="Rates"/> by time, by a central difference.</summary>
    public void TimeDerivative(double time, ReadOnlySpan<double> y, double scale, Span<double> derivative)
    {
        double later = time + Increment * scale, earlier = time - Increment * scale;
        Rates(later, y, plus);
        Rates(earlier, y, minus);
        // Where the time is too large for the increment, the motion does not feel the derivative either.
        for (int i = 0; i < plus.Length; i++) derivative[i] = later == earlier ? 0 : (plus[i] - minus[i]) / (later - earlier);
    }

    /// <summary>The product of the Jacobian with a direction, by one central difference.</summary>
    public void DirectionalDerivative(double time, ReadOnlySpan<double> y, ReadOnlySpan<double> direction, Span<double> product)
    {
        int n = below.Length;
        double length = 0;
        for (int i = 0; i < n; i++) length = Math.Max(length, Math.Abs(direction[i]) / Math.Max(extents[i], Math.Abs(y[i])));
        if (length == 0)
        {
            product[..n].Clear();
            return;
        }

        double h = Increment / length;
        for (int i = 0; i < n; i++) shifted[i] = y[i] + h * direction[i];
        Rates(time, shifted, plus);
        for (int i = 0; i < n; i++) shifted[i] = y[i] - h * direction[i];
        Rates(time, shifted, minus);
        for (int i = 0; i < n; i++) product[i] = (plus[i] - minus[i]) / (2 * h);
    }
}
