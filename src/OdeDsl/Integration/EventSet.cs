using System.Collections.Immutable;
using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>
/// The events of a motion: which are due, and what their actions make of the state and of tangents. A tangent v passes a reset x⁺ = R(x⁻, t)
/// at a guard h as v⁺ = DR v + (f⁺ − DR f⁻ − ∂R/∂t) (∇h·v) / (∇h·f⁻ + ∂h/∂t) (P. C. Müller, Calculation of Lyapunov exponents for dynamic systems
/// with discontinuities, Chaos, Solitons and Fractals 5, 1995; R. I. Leine, H. Nijmeijer, Dynamics and Bifurcations of Non-Smooth Mechanical
/// Systems, 2004).
/// </summary>
internal sealed class EventSet
{
    private readonly DynamicSystem system;
    private readonly double[] regime;
    private readonly ImmutableArray<EventDescription> events;
    private readonly double[] sides, values;
    private readonly double[] guardJacobian, guardByTime;
    private readonly double[] actions, actionJacobian, actionByTime;
    private readonly double[] before, after, arrived, tangentBefore;
    private readonly SlidingSurface sliding;
    private readonly bool[] due;

    public EventSet(DynamicSystem system, double[] regime, SlidingSurface sliding)
    {
        this.sliding = sliding;
        this.system = system;
        this.regime = regime;
        events = system.Description.Events;
        int e = events.Length, n = system.StateCount, k = system.Modes.Length;
        Slots = [.. Enumerable.Range(0, e).SelectMany(SlotsOf)];
        (sides, values, due) = (new double[e], new double[e], new bool[e]);
        (guardJacobian, guardByTime) = (new double[e * n], new double[e]);
        (actions, actionJacobian, actionByTime) = (new double[e * (n + k)], new double[e * n * n], new double[e * n]);
        (before, after, arrived, tangentBefore) = (new double[n], new double[n], new double[n], new double[n]);
    }

    /// <summary>The guards that are numbers: positive while the event is not yet due, once for each direction that counts.</summary>
    public ImmutableArray<Guard> Slots { get; }

    public bool Any => events.Length > 0;

    /// <summary>Whether an event is due.</summary>
    public bool IsDue { get; private set; }

    /// <summary>Whether a terminal event has happened.</summary>
    public bool IsOver { get; private set; }

    /// <summary>Notes where the conditions stand, without an event.</summary>
    public void Begin(double time, ReadOnlySpan<double> state)
    {
        if (!Any) return;
        (IsDue, IsOver) = (false, false);
        Array.Clear(due);
        system.EventGuards(time, state, regime, sides);
    }

    /// <summary>Notes that a guard was met.</summary>
    public void Meet(int index) => IsDue = due[index] = true;

    /// <summary>Looks for conditions that have changed with the regime.</summary>
    public void Look(double time, ReadOnlySpan<double> state)
    {
        if (!Any) return;
        system.EventGuards(time, state, regime, values);
        for (int i = 0; i < events.Length; i++)
        {
            if (!events[i].IsCondition || values[i] == sides[i]) continue;
            bool rises = values[i] > sides[i];
            sides[i] = values[i];
            if (events[i].Direction == GuardDirection.Both || rises == (events[i].Direction == GuardDirection.Rising)) Meet(i);
        }
    }

    /// <summary>Evaluates the guards.</summary>
    public ReadOnlySpan<double> Evaluate(double time, ReadOnlySpan<double> state)
    {
        system.EventGuards(time, state, regime, values);
        return values;
    }

    /// <summary>How fast a guard grows along the motion.</summary>
    public double GuardRate(int index, double time, ReadOnlySpan<double> state)
    {
        CurrentRates(time, state, after);
        return Along(index, time, state, after);
    }

    private double Along(int index, double time, ReadOnlySpan<double> state, ReadOnlySpan<double> rates)
    {
        system.EventGuardJacobian(time, state, regime, guardJacobian);
        system.EventGuardTimeDerivative(time, state, regime, guardByTime);
        double sum = guardByTime[index];
        for (int i = 0; i < rates.Length; i++) sum += guardJacobian[index * rates.Length + i] * rates[i];
        return sum;
    }

    /// <summary>How far rounding of the state may move a guard's value, in units of rounding.</summary>
    public double Sensitivity(int index, double time, ReadOnlySpan<double> state)
    {
        system.EventGuardJacobian(time, state, regime, guardJacobian);
        double sum = 0;
        for (int i = 0; i < state.Length; i++) sum += Math.Abs(guardJacobian[index * state.Length + i] * state[i]);
        return sum;
    }

    /// <summary>Runs the actions that are due, in the order of declaration.</summary>
    /// <param name="time">The time.</param>
    /// <param name="position">The state, then the tangents one after the other; changed.</param>
    /// <param name="surface">The gradient and the speed of the switching function that a condition changed with; empty: it changed with time.</param>
    /// <param name="decide">Decides the regime anew.</param>
    /// <param name="happened">Receives what happened.</param>
    public void Fire(double time, Span<double> position, ReadOnlySpan<double> surface, Action decide, List<EventOccurrence> happened)
    {
        int n = system.StateCount, k = system.Modes.Length;
        Span<double> state = position[..n];
        for (int index = 0; index < events.Length; index++)
        {
            if (!due[index]) continue;
            due[index] = false;
            state.CopyTo(arrived);
            CurrentRates(time, state, before);
            double speed = 0;
            ReadOnlySpan<double> gradient = surface.IsEmpty ? [] : surface[..n];
            if (!events[index].IsCondition)
            {
                speed = Along(index, time, state, before);
                gradient = guardJacobian.AsSpan(index * n, n);
            }
            else if (!surface.IsEmpty)
            {
                speed = surface[n];
            }

            system.EventActions(time, state, actions);
            system.EventActionJacobian(time, state, actionJacobian);
            system.EventActionTimeDerivative(time, state, actionByTime);
            ReadOnlySpan<double> made = actions.AsSpan(index * (n + k), n + k);
            made[..n].CopyTo(state);
            system.SetModes(made[n..]);
            decide();
            CurrentRates(time, state, after);
            Carry(index, gradient, speed, position);
            happened.Add(new EventOccurrence(time, index, [.. arrived], [.. made[..n]], [.. made[n..]]));
            IsOver |= events[index].IsTerminal;
        }

        IsDue = false;
        system.EventGuards(time, state, regime, sides);
    }

    private void Carry(int index, ReadOnlySpan<double> gradient, double speed, Span<double> position)
    {
        int n = before.Length;
        ReadOnlySpan<double> reset = actionJacobian.AsSpan(index * n * n, n * n);
        for (int start = n; start < position.Length; start += n)
        {
            Span<double> tangent = position.Slice(start, n);
            double across = 0;
            for (int i = 0; i < gradient.Length; i++) across += gradient[i] * tangent[i];
            // Without speed through the guard, or an event that comes with time, the moment does not depend on the state.
            double share = speed == 0 || !double.IsFinite(speed) ? 0 : across / speed;
            tangent.CopyTo(tangentBefore);
            for (int i = 0; i < n; i++)
            {
                double carried = 0, rate = actionByTime[index * n + i];
                for (int j = 0; j < n; j++)
                {
                    carried += reset[i * n + j] * tangentBefore[j];
                    rate += reset[i * n + j] * before[j];
                }

                tangent[i] = carried + (after[i] - rate) * share;
            }
        }
    }

    private void CurrentRates(double time, ReadOnlySpan<double> state, double[] rates)
    {
        if (sliding.IsActive) sliding.Rates(time, state, rates);
        else system.Rates(time, state, regime, rates);
    }

    private IEnumerable<Guard> SlotsOf(int index)
    {
        EventDescription item = events[index];
        if (item.IsCondition) yield break;
        if (item.Direction != GuardDirection.Rising) yield return new Guard(GuardKind.Event, index, 1, 0);
        if (item.Direction != GuardDirection.Falling) yield return new Guard(GuardKind.Event, index, -1, 0);
    }
}
