using System.Collections.Immutable;
using OdeDsl.Modeling;

namespace OdeDsl.Equilibria;

/// <summary>
/// Rates = 0 with the regime locked, or, without a fixed regime, in the regime of each point (a semismooth Newton iteration:
/// L. Qi and J. Sun, Math. Programming 58, 1993).
/// </summary>
internal sealed class RegimeProblem : RootProblem
{
    /// <summary>
    /// With more switches than this on their surfaces at once, sides are changed one at a time instead of in all combinations.
    /// </summary>
    private const int MaximumCombined = 4;

    /// <summary>Rates or derivatives that differ by less than this part of their size are equal on both sides.</summary>
    private const double SameOnBothSides = 1e-7;

    private readonly double[]? fixedRegime;
    private readonly double[] regime;
    private readonly double[] actual;
    private readonly double[] switching;
    private readonly double[] gradients;

    public RegimeProblem(DynamicSystem system, SearchRegion region, double[]? fixedRegime)
        : base(system, region)
    {
        this.fixedRegime = fixedRegime;
        regime = fixedRegime ?? new double[system.SwitchCount];
        actual = new double[system.SwitchCount];
        switching = new double[system.SwitchCount];
        gradients = new double[system.SwitchCount * system.StateCount];
    }

    public override int Size => StateCount;

    public override ReadOnlySpan<double> Scale => Region.Width;

    public override void Evaluate(ReadOnlySpan<double> point, Span<double> values)
    {
        Update(point);
        System.Rates(0, point, regime, values);
    }

    public override void Differentiate(ReadOnlySpan<double> point, Span<double> jacobian)
    {
        Update(point);
        System.StateJacobian(0, point, regime, jacobian);
    }

    public override bool Accepts(ReadOnlySpan<double> point) => Region.Contains(point) && FormulasHoldAt(point);

    /// <summary>Whether the locked formulas hold at a point: its own regime is the locked one, or it lies on the edge to it.</summary>
    public bool FormulasHoldAt(ReadOnlySpan<double> point)
    {
        if (fixedRegime is null || fixedRegime.Length == 0) return true;
        System.Regime(0, point, actual);
        if (actual.AsSpan().SequenceEqual(regime)) return true;
        List<int> touching = SwitchesOnSurface(point);
        for (int k = 0; k < regime.Length; k++)
        {
            if (actual[k] != regime[k] && !touching.Contains(k)) return false;
        }

        return true;
    }

    public override Equilibrium Describe(ReadOnlySpan<double> point, int nullity, EquilibriumSet? set)
    {
        int n = StateCount;
        var rates = new double[n];
        var jacobian = new double[n * n];
        Evaluate(point, rates);
        Differentiate(point, jacobian);
        Spectrum spectrum = Spectrum.Of(jacobian, Region.Width);
        LinearVerdict verdict = spectrum.Judge(nullity, set);
        if (set is null && JacobianJumps(point, jacobian)) verdict = verdict.WithoutLinearisation();
        return new Equilibrium
        {
            State = [.. point],
            Residual = rates.Max(Math.Abs),
            Regime = [.. regime],
            Jacobian = [.. jacobian],
            Eigenvalues = spectrum.Eigenvalues,
            Modes = spectrum.Modes,
            Kind = verdict.Kind,
            Stability = verdict.Stability,
            UnstableCount = verdict.UnstableCount,
            Set = set,
        };
    }

    private void Update(ReadOnlySpan<double> point)
    {
        if (fixedRegime is null) System.Regime(0, point, regime);
    }

    private List<int> SwitchesOnSurface(ReadOnlySpan<double> point)
    {
        var touching = new List<int>();
        if (regime.Length == 0) return touching;
        System.SwitchingFunctions(0, point, regime, switching);
        System.SwitchingJacobian(0, point, regime, gradients);
        for (int k = 0; k < regime.Length; k++)
        {
            double level = System.Description.Switches[k].Kind == SwitchKind.WholeNumber ? Math.Round(switching[k]) : 0;
            double change = 0;
            for (int j = 0; j < StateCount; j++) change += Math.Abs(gradients[(k * StateCount) + j]) * Region.LocalScale(j, point[j]);
            if (Math.Abs(switching[k] - level) <= OnSurface * change) touching.Add(k);
        }

        return touching;
    }

    // Whether the rates or their derivatives differ on the other sides of the surfaces the point lies on.
    private bool JacobianJumps(ReadOnlySpan<double> point, double[] jacobian)
    {
        int n = StateCount;
        List<int> touching = SwitchesOnSurface(point);
        if (touching.Count == 0) return false;
        var (other, rates, derivatives) = (new double[regime.Length], new double[n], new double[n * n]);
        int combinations = touching.Count <= MaximumCombined ? 1 << touching.Count : touching.Count + 1;
        for (int c = 1; c < combinations; c++)
        {
            regime.CopyTo(other, 0);
            for (int t = 0; t < touching.Count; t++)
            {
                bool change = touching.Count <= MaximumCombined ? (c >> t & 1) != 0 : t == c - 1;
                if (change) other[touching[t]] = OtherSide(touching[t]);
            }

            System.Rates(0, point, other, rates);
            System.StateJacobian(0, point, other, derivatives);
            for (int i = 0; i < n; i++)
            {
                double size = 0, rowChange = 0;
                for (int j = 0; j < n; j++)
                {
                    double scale = Region.Width[j];
                    size = Math.Max(size, Math.Max(Math.Abs(jacobian[(i * n) + j]), Math.Abs(derivatives[(i * n) + j])) * scale);
                    rowChange = Math.Max(rowChange, Math.Abs(jacobian[(i * n) + j] - derivatives[(i * n) + j]) * scale);
                }

                if (!(rowChange <= SameOnBothSides * size && Math.Abs(rates[i]) <= SameOnBothSides * size)) return true;
            }
        }

        return false;
    }

    private double OtherSide(int k)
    {
        if (System.Description.Switches[k].Kind != SwitchKind.WholeNumber) return 1 - regime[k];
        // ⌊g⌋ on the two sides of a whole number m is m - 1 and m.
        double level = Math.Round(switching[k]);
        return regime[k] < level ? level : level - 1;
    }
}
