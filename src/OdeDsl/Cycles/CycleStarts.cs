using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.LinearAlgebra.Factorization;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;

namespace OdeDsl.Cycles;

/// <summary>Where long runs start.</summary>
internal static class CycleStarts
{
    /// <summary>
    /// The distance from an equilibrium at which runs leave it, in widths: small against the region, large against tolerances.
    /// </summary>
    private const double Departure = 0.01;

    /// <summary>Starts beside equilibria at most.</summary>
    private const int MostBesideEquilibria = 16;

    /// <summary>Components of an eigenvector this small beside its largest are rounding.</summary>
    private const double NegligibleComponent = 1e-12;

    /// <summary>Starts further outside the region than this part of it are none: a negative concentration leads nowhere.</summary>
    private const double Outside = 1e-12;

    /// <summary>The distance of starts beside a cycle, in parts of its extents.</summary>
    private const double BesideCycle = 0.05;

    /// <summary>Starts spread evenly over the region.</summary>
    public static IEnumerable<double[]> Spread(SearchRegion region, int count, int seed)
    {
        var sequence = new LowDiscrepancySequence(region.Count, seed);
        var unit = new double[region.Count];
        for (int k = 1; k <= count; k++)
        {
            var state = new double[region.Count];
            sequence.Point(k, unit);
            region.Spread(unit, state);
            yield return state;
        }
    }

    /// <summary>
    /// Starts beside the isolated equilibria that do not attract in the given direction of time: both ways along the eigenvector that
    /// repels most; for a complex pair along the real part of its vector.
    /// </summary>
    public static IEnumerable<double[]> BesideEquilibria(SearchRegion region, IEnumerable<Equilibrium> equilibria, int direction) =>
        equilibria.Where(equilibrium => equilibrium.Set is null && !equilibrium.IsSliding && Repels(equilibrium, direction))
            .SelectMany(equilibrium => Beside(region, equilibrium, direction))
            .Where(start => region.Excess(start) <= Outside)
            .Take(MostBesideEquilibria);

    /// <summary>Starts on both sides of a cycle in the plane.</summary>
    public static IEnumerable<double[]> BesideCycles(DynamicSystem system, IEnumerable<FoundCycle> cycles)
    {
        foreach ((LimitCycle cycle, _, OrbitTrace trace) in cycles)
        {
            var rates = new double[2];
            system.Rates(0, cycle.State.AsSpan(), rates);
            (double along, double up) = (rates[0] / trace.Scale[0], rates[1] / trace.Scale[1]);
            double length = Math.Sqrt((along * along) + (up * up));
            foreach (double side in (double[])[-BesideCycle, BesideCycle])
            {
                yield return
                [
                    cycle.State[0] - (side * up / length * trace.Scale[0]),
                    cycle.State[1] + (side * along / length * trace.Scale[1]),
                ];
            }
        }
    }

    private static bool Repels(Equilibrium equilibrium, int direction) =>
        direction > 0 ? !equilibrium.IsStable : equilibrium.Eigenvalues.Length > 0 && equilibrium.Eigenvalues[^1].Real <= 0;

    private static IEnumerable<double[]> Beside(SearchRegion region, Equilibrium equilibrium, int direction)
    {
        int n = region.Count;
        var scaled = Matrix<double>.Build.Dense(
            n, n, (i, j) => direction * equilibrium.Jacobian[(i * n) + j] * region.Width[j] / region.Width[i]);
        Evd<double> modes = scaled.Evd(Symmetricity.Asymmetric);
        int strongest = 0;
        for (int k = 1; k < n; k++)
        {
            if (modes.EigenValues[k].Real > modes.EigenValues[strongest].Real) strongest = k;
        }

        // MathNet keeps real and imaginary part of a pair's vector in the pair's two columns: either spans the plane with its image.
        Vector<double> vector = modes.EigenVectors.Column(strongest);
        double size = vector.InfinityNorm();
        bool turns = modes.EigenValues[strongest].Imaginary != 0;
        foreach (double side in turns ? (double[])[Departure] : [-Departure, Departure])
            yield return [.. equilibrium.State.Select((value, i) => value + (side * Clean(vector[i] / size) * region.Width[i]))];
    }

    // Components that are zero up to rounding would push a start off an invariant plane, to the wrong side as likely as not.
    private static double Clean(double component) => Math.Abs(component) <= NegligibleComponent ? 0 : component;
}
