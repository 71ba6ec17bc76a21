using OdeDsl.Equilibria;
using OdeDsl.Integration;
using OdeDsl.Modeling;

namespace OdeDsl.Cycles;

/// <summary>
/// Closes orbits: Newton's method on state and period for φ(x, T) - x - (whole turns) = 0, with the monodromy matrix from the variational
/// equations and corrections orthogonal to the motion, which makes it Newton's method on the return map of a local section
/// (R. Seydel, "Practical Bifurcation and Stability Analysis", 3rd edition 2010, sections 7.1-7.3). Corrections have minimum norm where the
/// equations are singular, as on a family of closed orbits. Not thread-safe.
/// </summary>
internal sealed class OrbitShooter(DynamicSystem system, SearchRegion region, double tolerance, CancellationToken cancellation)
{
    /// <summary>Quadratic convergence needs about five; a double cycle quarters its residual each time.</summary>
    private const int MaximumIterations = 20;

    /// <summary>Corrections that leave more than this part of the residual are slow; few of them are made.</summary>
    private const double SlowCorrection = 0.5;
    private const int MaximumSlowCorrections = 3;

    /// <summary>Halvings of a correction before it is given up.</summary>
    private const int MaximumHalvings = 5;

    /// <summary>The largest single correction, in scales of the orbit and parts of the period.</summary>
    private const double LongestStep = 0.3;

    /// <summary>Orbits that close to this many integration tolerances are closed.</summary>
    private const double ClosingMargin = 100;

    /// <summary>
    /// The accuracy of the monodromy matrix in integration tolerances, with a margin: smaller singular values mean nothing.
    /// </summary>
    private const double RankMargin = 1e4;

    /// <summary>Periods further than this factor from the guess belong to something else.</summary>
    private const double PeriodFactor = 4;

    /// <summary>Newton steps that bring the end of the orbit onto the section: quadratic convergence.</summary>
    private const int SectionSteps = 4;

    /// <summary>The cosine between the motions at both ends of the orbit above which the section is met by adjusting the time.</summary>
    private const double Aligned = 0.3;

    /// <summary>The largest such adjustment, in parts of the period.</summary>
    private const double LargestTimeChange = 0.1;

    /// <summary>
    /// The displacement for differences of the flow, in scales: the cube root of the integration's accuracy would do as well.
    /// </summary>
    private const double Displacement = 1e-4;

    /// <summary>Steps once round at most: many for any smooth orbit, few enough to give up soon where a guess hits a singularity.</summary>
    private const int MaximumSteps = 20_000;

    private readonly int n = system.StateCount;
    private readonly Flow flow = new(system, new FlowOptions { RelativeTolerance = tolerance, MaximumSteps = MaximumSteps });

    /// <summary>The number of orbits that were tried.</summary>
    public int Attempts { get; private set; }

    /// <summary>Closes an orbit near a guess.</summary>
    /// <param name="guess">A state near the orbit.</param>
    /// <param name="signedPeriod">The time once round; negative: backwards.</param>
    /// <param name="scale">The scale of each state.</param>
    /// <returns>The orbit, or <see langword="null"/> if the iteration did not close one.</returns>
    public ShotOrbit? Close(ReadOnlySpan<double> guess, double signedPeriod, double[] scale)
    {
        Attempts++;
        ShotOrbit? orbit = Shoot(guess.ToArray(), signedPeriod, scale);
        int slow = 0;
        for (int iteration = 0; iteration < MaximumIterations && slow <= MaximumSlowCorrections && orbit is not null; iteration++)
        {
            bool closed = orbit.Residual <= ClosingMargin * tolerance;
            ShotOrbit? next = Correct(orbit, signedPeriod);
            if (closed) return next is not null && next.Residual < orbit.Residual ? next : orbit;
            if (next?.Residual > SlowCorrection * orbit.Residual) slow++;
            orbit = next;
        }

        return null;
    }

    // Follows a state once round, to the plane through it across its motion, and says how far it then is from closing.
    private ShotOrbit? Shoot(double[] state, double signedPeriod, double[] scale)
    {
        double[] end = [.. state];
        var (monodromy, velocity) = (new double[n * n], new double[n]);
        for (int i = 0; i < n; i++) monodromy[(i * n) + i] = scale[i];
        ScaledRates(state, scale, velocity);
        double time = signedPeriod;
        bool slides;
        try
        {
            flow.Advance(end, monodromy, n, 0, time, cancellation);
            slides = flow.Slid;
            time = MeetSection(state, end, monodromy, velocity, scale, time);
            if (slides) Differences(state, time, scale, monodromy);
        }
        catch (IntegrationException)
        {
            return null;
        }

        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++) monodromy[(i * n) + j] /= scale[i];
        }

        (double[] gap, int[] winding) = GapOf(state, end, scale);
        if (!gap.All(double.IsFinite) || !monodromy.All(double.IsFinite)) return null;
        return new ShotOrbit
        {
            State = state,
            SignedPeriod = time,
            Scale = scale,
            Winding = winding,
            Monodromy = monodromy,
            Velocity = velocity,
            Gap = gap,
            Slides = slides,
        };
    }

    // Newton's method on the time until the gap has no part along the motion; large changes are left to the corrections of all unknowns.
    private double MeetSection(double[] state, double[] end, double[] monodromy, double[] velocity, double[] scale, double time)
    {
        var endVelocity = new double[n];
        for (int k = 0; k < SectionSteps; k++)
        {
            (double[] gap, _) = GapOf(state, end, scale);
            ScaledRates(end, scale, endVelocity);
            double along = Dot(velocity, gap), slope = Dot(velocity, endVelocity);
            double aligned = slope / Math.Sqrt(Dot(velocity, velocity) * Dot(endVelocity, endVelocity));
            double change = -along / slope;
            if (!(aligned >= Aligned) || !(Math.Abs(change) <= LargestTimeChange * Math.Abs(time)) || time + change == time) return time;
            flow.Advance(end, monodromy, n, time, time + change, cancellation);
            time += change;
        }

        return time;
    }

    private (double[] Gap, int[] Winding) GapOf(double[] state, double[] end, double[] scale)
    {
        var (gap, winding) = (new double[n], new int[n]);
        for (int i = 0; i < n; i++)
        {
            gap[i] = end[i] - state[i];
            if (region.Periods[i] > 0) winding[i] = (int)Math.Round(gap[i] / region.Periods[i]);
            gap[i] = (gap[i] - (winding[i] * region.Periods[i])) / scale[i];
        }

        return (gap, winding);
    }

    private void ScaledRates(double[] state, double[] scale, double[] velocity)
    {
        system.Rates(0, state, velocity);
        for (int i = 0; i < n; i++) velocity[i] /= scale[i];
    }

    private static double Dot(double[] a, double[] b) => a.Zip(b, static (x, y) => x * y).Sum();

    // One damped Newton correction; null if no shortening of it brings the ends closer together.
    private ShotOrbit? Correct(ShotOrbit orbit, double guessedPeriod)
    {
        var correction = new double[n + 1];
        if (!NewtonStep(orbit, correction)) return null;
        double length = Math.Abs(correction[n] / orbit.SignedPeriod);
        for (int i = 0; i < n; i++) length = Math.Max(length, Math.Abs(correction[i]));
        if (!double.IsFinite(length)) return null;
        double damping = Math.Min(1, LongestStep / Math.Max(length, double.Epsilon));
        for (int halving = 0; halving <= MaximumHalvings; halving++, damping /= 2)
        {
            double period = orbit.SignedPeriod + (damping * correction[n]);
            double ratio = period / guessedPeriod;
            if (!(ratio > 1 / PeriodFactor && ratio < PeriodFactor)) continue;
            double[] state = [.. orbit.State];
            for (int i = 0; i < n; i++) state[i] += damping * correction[i] * orbit.Scale[i];
            ShotOrbit? next = Shoot(state, period, orbit.Scale);
            if (next is not null && next.Residual <= (1 - (damping / 4)) * orbit.Residual) return next;
        }

        return null;
    }

    // (M - I) dz + v(T) dT = -(gap), v(0) · dz = 0, in scaled states.
    private bool NewtonStep(ShotOrbit orbit, double[] correction)
    {
        int m = n + 1;
        var (matrix, right, columns) = (new double[m * m], new double[m], new double[m]);
        var endVelocity = new double[n];
        ScaledRates(End(orbit), orbit.Scale, endVelocity);
        Array.Fill(columns, 1);
        columns[n] = Math.Abs(orbit.SignedPeriod);
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++) matrix[(i * m) + j] = orbit.Monodromy[(i * n) + j] - (i == j ? 1 : 0);
            matrix[(i * m) + n] = endVelocity[i];
            matrix[(n * m) + i] = orbit.Velocity[i];
            right[i] = -orbit.Gap[i];
        }

        var solver = new MinimumNormSolver(columns, Math.Min(1e-3, RankMargin * tolerance));
        if (!solver.Factor(matrix)) return false;
        solver.Solve(right, correction);
        return true;
    }

    private double[] End(ShotOrbit orbit)
    {
        double[] end = [.. orbit.State];
        for (int i = 0; i < n; i++) end[i] += orbit.Gap[i] * orbit.Scale[i];
        return end;
    }

    // Central differences of the flow over one period, where sliding makes tangents lose their meaning.
    private void Differences(double[] state, double signedPeriod, double[] scale, double[] columns)
    {
        var (ahead, behind) = (new double[n], new double[n]);
        for (int j = 0; j < n; j++)
        {
            state.CopyTo(ahead, 0);
            state.CopyTo(behind, 0);
            ahead[j] += Displacement * scale[j];
            behind[j] -= Displacement * scale[j];
            flow.Advance(ahead, 0, signedPeriod, cancellation);
            flow.Advance(behind, 0, signedPeriod, cancellation);
            for (int i = 0; i < n; i++) columns[(i * n) + j] = (ahead[i] - behind[i]) / (2 * Displacement);
        }
    }
}
