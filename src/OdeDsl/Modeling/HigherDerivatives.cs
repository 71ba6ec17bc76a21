using OdeDsl.Scalars;

namespace OdeDsl.Modeling;

/// <summary>
/// Second and third derivatives of the locked rates, from Taylor series along a few lines: a form that is linear in each of its directions
/// is put together from its values on sums and differences of them (polarisation).
/// </summary>
/// <remarks>
/// The forms are B and C of Yu. A. Kuznetsov, Elements of Applied Bifurcation Theory, 3rd edition 2004, section 5.4, equations (5.12) and (5.13)
/// (numbers from memory).
/// </remarks>
internal static class HigherDerivatives<TSystem>
    where TSystem : struct, IOdeSystem
{
    /// <summary>Series up to which the stack holds them: 24 kB.</summary>
    private const int LargestOnStack = 768;

    /// <summary>B(u, v) = (B(u + v, u + v) − B(u − v, u − v)) / 4.</summary>
    public static void Second(in Place at, ReadOnlySpan<double> u, ReadOnlySpan<double> v, Span<double> result)
    {
        result.Clear();
        if (!TryBalance(u, v, out double scale)) return;
        Line lines = new(u, v, default, default);
        Add(at, lines with { B = scale }, 2, 0.25 / scale, result);
        Add(at, lines with { B = -scale }, 2, -0.25 / scale, result);
    }

    /// <summary>24 C(u, v, w) = C(u + v + w) − C(u + v − w) − C(u − v + w) + C(u − v − w), with C of one argument taken three times.</summary>
    public static void Third(in Place at, ReadOnlySpan<double> u, ReadOnlySpan<double> v, ReadOnlySpan<double> w, Span<double> result)
    {
        result.Clear();
        if (!TryBalance(u, v, out double b) || !TryBalance(u, w, out double c)) return;
        Line lines = new(u, v, w, default);
        double weight = 1 / (24 * b * c);
        Add(at, lines with { B = b, C = c }, 3, weight, result);
        Add(at, lines with { B = b, C = -c }, 3, -weight, result);
        Add(at, lines with { B = -b, C = c }, 3, -weight, result);
        Add(at, lines with { B = -b, C = -c }, 3, weight, result);
    }

    /// <summary>The mixed second derivative along u in the states and q in the parameters, by the rule for B on both together.</summary>
    public static void Mixed(in Place at, ReadOnlySpan<double> u, ReadOnlySpan<double> q, Span<double> result)
    {
        result.Clear();
        if (!TryBalance(u, q, out double scale)) return;
        Line lines = new(u, default, default, q);
        Add(at, lines with { Q = scale }, 2, 0.25 / scale, result);
        Add(at, lines with { Q = -scale }, 2, -0.25 / scale, result);
    }

    /// <summary>Adds a multiple of the derivative of some order along one line.</summary>
    private static void Add(in Place at, in Line line, int order, double weight, Span<double> sum)
    {
        int n = at.State.Length, m = at.Parameters.Length, count = (2 * n) + m;
        Span<Jet<Order3>> all = count <= LargestOnStack ? stackalloc Jet<Order3>[count] : new Jet<Order3>[count];
        Span<Jet<Order3>> state = all[..n], parameters = all.Slice(n, m), rates = all[(n + m)..];
        for (int i = 0; i < n; i++) state[i] = Jet<Order3>.Variable(at.State[i], line.StateAt(i));
        for (int i = 0; i < m; i++) parameters[i] = Jet<Order3>.Variable(at.Parameters[i], line.ParameterAt(i));
        TSystem.RatesOver<Jet<Order3>>(Jet<Order3>.Constant(at.Time), state, parameters, at.Regime, rates);
        for (int i = 0; i < n; i++) sum[i] += weight * rates[i].Derivative(order);
    }

    /// <summary>
    /// The power of two that brings a second direction to the size of the first, as differences of unequal sums would lose digits.
    /// </summary>
    private static bool TryBalance(ReadOnlySpan<double> first, ReadOnlySpan<double> second, out double scale)
    {
        double a = SizeOf(first), b = SizeOf(second);
        scale = 1;
        if (a == 0 || b == 0) return false;
        if (double.IsFinite(a) && double.IsFinite(b)) scale = Math.ScaleB(1, Math.Clamp(Math.ILogB(a) - Math.ILogB(b), -500, 500));
        return true;
    }

    private static double SizeOf(ReadOnlySpan<double> direction)
    {
        double size = 0;
        foreach (double component in direction) size = Math.Max(size, Math.Abs(component));
        return size;
    }

    /// <summary>Where derivatives are taken.</summary>
    public readonly ref struct Place(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime)
    {
        public double Time { get; } = time;

        public ReadOnlySpan<double> State { get; } = state;

        public ReadOnlySpan<double> Parameters { get; } = parameters;

        public ReadOnlySpan<double> Regime { get; } = regime;
    }

    /// <summary>The direction u + B v + C w in the states, Q q in the parameters.</summary>
    private ref struct Line(ReadOnlySpan<double> u, ReadOnlySpan<double> v, ReadOnlySpan<double> w, ReadOnlySpan<double> q)
    {
        private readonly ReadOnlySpan<double> u = u, v = v, w = w, q = q;

        public double B { get; init; }

        public double C { get; init; }

        public double Q { get; init; }

        public readonly double StateAt(int i) => u[i] + (v.IsEmpty ? 0 : B * v[i]) + (w.IsEmpty ? 0 : C * w[i]);

        public readonly double ParameterAt(int i) => i < q.Length ? Q * q[i] : 0;
    }
}
