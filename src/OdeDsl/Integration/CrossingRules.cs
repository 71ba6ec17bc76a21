using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>
/// What happens where a motion meets a surface, decided by the rates on both sides (A. F. Filippov, Differential Equations with Discontinuous
/// Righthand Sides, 1988, section 4): it passes through if the far side leads away, slides if both sides point at the surface.
/// Tangents are carried across by the saltation matrix I + (f₊ − f₋) ∇gᵀ / (∇g·f₋ + ∂g/∂t) (M. A. Aizerman, F. R. Gantmacher, Quarterly
/// Journal of Mechanics and Applied Mathematics 11, 1958; R. I. Leine, H. Nijmeijer, Dynamics and Bifurcations of Non-Smooth
/// Mechanical Systems, 2004, section 7).
/// </summary>
internal sealed class CrossingRules
{
    private readonly DynamicSystem system;
    private readonly double[] regime;
    private readonly SlidingSurface sliding;
    private readonly double[] before, after;
    private readonly double[] gradients, timeDerivatives;
    private readonly double[] functions, functionsAfter;

    public CrossingRules(DynamicSystem system, double[] regime, SlidingSurface sliding)
    {
        this.system = system;
        this.regime = regime;
        this.sliding = sliding;
        int n = system.StateCount, s = system.SwitchCount;
        (before, after) = (new double[n], new double[n]);
        (gradients, timeDerivatives) = (new double[s * n], new double[s]);
        (functions, functionsAfter) = (new double[s], new double[s]);
    }

    /// <summary>How fast a surface's guard grows along the motion: negative if the motion runs at the surface.</summary>
    public double GuardRate(Guard guard, double time, ReadOnlySpan<double> state, int direction)
    {
        CurrentRates(time, state, before);
        Differentiate(time, state);
        return guard.Sign * direction * Along(guard.Switch, before);
    }

    /// <summary>The gradient of a switching function, and behind it how fast it grows along the motion.</summary>
    public void Describe(int index, double time, ReadOnlySpan<double> state, Span<double> surface)
    {
        CurrentRates(time, state, before);
        Differentiate(time, state);
        gradients.AsSpan(index * state.Length, state.Length).CopyTo(surface);
        surface[state.Length] = Along(index, before);
    }

    /// <summary>Lets the motion meet a guard of a switching function or of a sliding surface; changes the regime or the sliding.</summary>
    /// <param name="guard">The guard.</param>
    /// <param name="time">The time.</param>
    /// <param name="position">The state, then the tangents one after the other; these are changed.</param>
    /// <param name="direction">1 if time runs forwards, otherwise -1.</param>
    /// <param name="forced">Whether the motion cannot stay on its side, whatever the rates say: they have no value beyond the surface.</param>
    /// <param name="crossing">What happened; <see langword="null"/> if the motion turns out not to leave its side.</param>
    /// <returns>Accepted, or why the motion cannot go on.</returns>
    public StepStatus Meet(Guard guard, double time, Span<double> position, int direction, bool forced, out Crossing? crossing)
    {
        crossing = null;
        if (guard.Kind != GuardKind.Surface)
        {
            crossing = EndSliding(guard, time, position[..system.StateCount]);
            return StepStatus.Accepted;
        }

        ReadOnlySpan<double> state = position[..system.StateCount];
        int index = guard.Switch;
        SwitchKind kind = system.Description.Switches[index].Kind;
        double from = regime[index], to = SwitchSide.Entry(kind, guard.Surface, above: guard.Sign < 0);
        CurrentRates(time, state, before);
        Differentiate(time, state);
        system.SwitchingFunctions(time, state, regime, functions);
        double speed = Along(index, before);
        regime[index] = to;
        CurrentRates(time, state, after);
        double leaving = guard.Sign * direction * speed, beyond = guard.Sign * direction * Along(index, after);
        // On the surface the rates of the near side may have no value: the motion that came here cannot go back.
        bool leaves = leaving < 0 || forced || double.IsNaN(leaving);
        if (!leaves)
        {
            regime[index] = from;
            return StepStatus.Accepted;
        }

        var what = CrossingKind.Passed;
        if (leaving < 0 && beyond > 0)
        {
            regime[index] = from;
            if (sliding.IsActive) return StepStatus.SlidingOnSeveralSurfaces;
            double below = SwitchSide.Entry(kind, guard.Surface, above: false), above = SwitchSide.Entry(kind, guard.Surface, above: true);
            sliding.Begin(index, guard.Surface, below, above);
            sliding.Rates(time, state, after);
            what = CrossingKind.SlidingBegan;
        }
        else
        {
            DecideLaterEntries(index, time, state);
            if (sliding.IsActive) LeaveSlidingIfReleased(time, state, direction);
        }

        Carry(index, speed, position);
        crossing = new Crossing(time, index, from, to, what);
        return StepStatus.Accepted;
    }

    // Beyond another surface the one slid along may no longer attract: the rates that follow are then those of the side it lets go to,
    // and the tangents jump to these. The end of the sliding, met next, adds nothing.
    private void LeaveSlidingIfReleased(double time, ReadOnlySpan<double> state, int direction)
    {
        (double approachBelow, double approachAbove) = sliding.Approaches(time, state);
        if (direction * approachBelow > 0 && direction * approachAbove < 0) return;
        double entry = regime[sliding.Switch];
        regime[sliding.Switch] = direction * approachBelow > 0 ? sliding.EntryAbove : sliding.EntryBelow;
        system.Rates(time, state, regime, after);
        regime[sliding.Switch] = entry;
    }

    private Crossing EndSliding(Guard guard, double time, ReadOnlySpan<double> state)
    {
        int index = sliding.Switch;
        bool below = guard.Kind == GuardKind.SlidingEndsBelow;
        (double from, double to) = below ? (sliding.EntryAbove, sliding.EntryBelow) : (sliding.EntryBelow, sliding.EntryAbove);
        system.SwitchingFunctions(time, state, regime, functions);
        regime[index] = to;
        sliding.End();
        DecideLaterEntries(index, time, state);
        return new Crossing(time, index, from, to, CrossingKind.SlidingEnded);
    }

    // Later switching functions may have changed their formula, and with it their side, together with this entry.
    private void DecideLaterEntries(int index, double time, ReadOnlySpan<double> state)
    {
        bool changed = false;
        for (int later = index + 1; later < regime.Length; later++)
        {
            // Each decision may change the functions after it: evaluated one by one.
            system.SwitchingFunctions(time, state, regime, functionsAfter);
            if (functionsAfter[later] == functions[later]) continue;
            double side = system.Description.Switches[later].SideOf(functionsAfter[later], regime[later]);
            changed |= side != regime[later];
            regime[later] = side;
        }

        if (changed) CurrentRates(time, state, after);
    }

    private void Carry(int index, double speed, Span<double> position)
    {
        // Without speed through the surface there is no saltation matrix.
        if (speed == 0 || !double.IsFinite(speed)) return;
        int n = system.StateCount;
        ReadOnlySpan<double> gradient = gradients.AsSpan(index * n, n);
        for (int start = n; start < position.Length; start += n)
        {
            Span<double> tangent = position.Slice(start, n);
            double across = 0;
            for (int i = 0; i < n; i++) across += gradient[i] * tangent[i];
            double share = across / speed;
            for (int i = 0; i < n; i++) tangent[i] += (after[i] - before[i]) * share;
        }
    }

    private void CurrentRates(double time, ReadOnlySpan<double> state, double[] rates)
    {
        if (sliding.IsActive) sliding.Rates(time, state, rates);
        else system.Rates(time, state, regime, rates);
    }

    private void Differentiate(double time, ReadOnlySpan<double> state)
    {
        system.SwitchingJacobian(time, state, regime, gradients);
        system.SwitchingTimeDerivative(time, state, regime, timeDerivatives);
    }

    // dg/dt along rates.
    private double Along(int index, double[] rates)
    {
        int n = rates.Length;
        double sum = timeDerivatives[index];
        for (int i = 0; i < n; i++) sum += gradients[index * n + i] * rates[i];
        return sum;
    }
}
