using OdeDsl.Cycles;
using OdeDsl.Equilibria;
using OdeDsl.Integration;
using OdeDsl.Modeling;

namespace OdeDsl.Assessment;

/// <summary>A limit cycle at one parameter value.</summary>
/// <param name="Value">The parameter's value.</param>
/// <param name="Orbit">The closed orbit.</param>
/// <param name="Extents">How far each state moves, at least a trace of its size.</param>
/// <param name="LargestMultiplier">The largest modulus of a multiplier other than the trivial one.</param>
/// <param name="Stability">What the multipliers say.</param>
internal sealed record TrackedCycle(double Value, ShotOrbit Orbit, double[] Extents, double LargestMultiplier, Stability Stability)
{
    /// <summary>The period.</summary>
    public double Period => Math.Abs(Orbit.SignedPeriod);

    /// <summary>The largest extent in parts of another cycle's.</summary>
    public double SizeRelativeTo(TrackedCycle other) => Extents.Zip(other.Extents, static (own, others) => own / others).Max();
}

/// <summary>Carries limit cycles from one parameter value to a neighbouring one by closing them again.</summary>
internal sealed class CycleFollower(DynamicSystem system, int parameter, CancellationToken cancellation)
{
    // Closing tolerance: far below what multipliers and margins are reported with, and cheap.
    private const double Tolerance = 1e-9;

    // A neighbour whose period or size differs by more is another motion, or too long a step.
    private const double LargestRatio = 2;

    // Multipliers below this modulus are far from leaving the unit circle.
    private const double FarInside = 0.5;

    private readonly SearchRegion region = SearchRegion.Of(system);

    /// <summary>The cycle found by the search, closed at the present value; <see langword="null"/> if it does not close.</summary>
    public TrackedCycle? Begin(LimitCycle cycle)
    {
        double[] scale = new double[system.StateCount];
        for (int i = 0; i < scale.Length; i++) scale[i] = OrbitTrace.ScaleOf(region, i, cycle.Minimum[i], cycle.Maximum[i]);
        return Close(system, system.Parameters[parameter], [.. cycle.State], cycle.Period, scale, [.. cycle.Winding]);
    }

    /// <summary>The cycle at a neighbouring value; <see langword="null"/> if it does not close there or has become another motion.</summary>
    /// <param name="from">The cycle to start from.</param>
    /// <param name="before">An earlier one, to extrapolate from; <see langword="null"/> if there is none.</param>
    /// <param name="value">The parameter's value.</param>
    public TrackedCycle? Move(TrackedCycle from, TrackedCycle? before, double value)
    {
        double[] guess = [.. from.Orbit.State];
        double period = from.Period;
        if (before is not null && before.Value != from.Value)
        {
            // Corrections are orthogonal to the motion, so that neighbouring orbits are held at neighbouring states.
            double ratio = (value - from.Value) / (from.Value - before.Value);
            for (int i = 0; i < guess.Length; i++) guess[i] += ratio * region.Difference(i, from.Orbit.State[i], before.Orbit.State[i]);
            period = Math.Max(period / LargestRatio, period + ratio * (from.Period - before.Period));
        }

        TrackedCycle? next = Close(system.WithParameter(parameter, value), value, guess, period, from.Extents, from.Orbit.Winding);
        return next is not null && IsNeighbour(next, from) ? next : null;
    }

    /// <summary>The motion that starts on a cycle and goes on at another value, for where <see cref="Move"/> finds nothing.</summary>
    public SettledMotion Settle(TrackedCycle from, double value) =>
        SettledMotion.Of(system.WithParameter(parameter, value), region, from, cancellation);

    /// <summary>The cycle that a settled motion is on; <see langword="null"/> if it does not close.</summary>
    public TrackedCycle? On(SettledMotion settled, TrackedCycle from, double value)
    {
        if (settled.Returns is not { } returns) return null;
        double[] state = [.. settled.State];
        region.Wrap(state);
        DynamicSystem at = system.WithParameter(parameter, value);
        // Once settled to rounding, several turns may repeat better than one by chance.
        return Close(at, value, state, returns.SignedPeriod, returns.Scale, from.Orbit.Winding)
            ?? (returns.Lag > 1 ? Close(at, value, state, returns.Times[^1] - returns.Times[^2], returns.Scale, from.Orbit.Winding) : null);
    }

    /// <summary>Whether a cycle can be another one carried on.</summary>
    public static bool IsNeighbour(TrackedCycle next, TrackedCycle from) =>
        next.SizeRelativeTo(from) is > 1 / LargestRatio and < LargestRatio && next.Period / from.Period is > 1 / LargestRatio and < LargestRatio;

    /// <summary>
    /// Whether a cycle that the motion from another one settled on is that one carried on. Its period may have grown without bound; but where
    /// a multiplier came near the unit circle a longer period may be a doubled one.
    /// </summary>
    public static bool IsContinued(TrackedCycle next, TrackedCycle from) =>
        IsNeighbour(next, from)
        || (from.LargestMultiplier < FarInside && next.Period > from.Period && next.SizeRelativeTo(from) is > 1 / LargestRatio and < LargestRatio);

    private TrackedCycle? Close(DynamicSystem at, double value, double[] state, double period, double[] scale, int[] winding)
    {
        cancellation.ThrowIfCancellationRequested();
        try
        {
            var shooter = new OrbitShooter(at, region, Tolerance, cancellation);
            if (shooter.Close(state, period, scale) is not { } orbit || !orbit.Winding.AsSpan().SequenceEqual(winding)) return null;
            Trajectory run = at.WithInitialState(orbit.State).Simulate(
                orbit.SignedPeriod, new SimulationOptions { RelativeTolerance = Tolerance, ManyNodes = true }, null, cancellation);
            var multipliers = new OrbitMultipliers(orbit);
            double largest = multipliers.All.Skip(1).Select(static value => value.Magnitude).DefaultIfEmpty(0).Max();
            return new TrackedCycle(value, orbit, new OrbitTrace(run, region).Scale, largest, multipliers.Stability);
        }
        catch (Exception exception) when (exception is IntegrationException or ArgumentException or ArithmeticException)
        {
            // The model does not work at this parameter value: no cycle there.
            return null;
        }
    }
}
