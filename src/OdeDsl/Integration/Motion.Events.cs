namespace OdeDsl.Integration;

/// <content>Events: when they are due, and how a motion goes on from their actions.</content>
internal sealed partial class Motion
{
    /// <summary>A guard this many units of rounding from zero counts as met.</summary>
    private const double GuardRounding = 64 * 2.220446049250313e-16;

    /// <summary>A step of no more than so many units of rounding of the time says nothing about a guard that has to rise.</summary>
    private const double TooShortToRise = 1024;

    /// <summary>So many events within so many units of rounding of the time accumulate: no model means them to be told apart.</summary>
    private const int CrowdedEvents = 24;
    private const double CrowdedTime = 65536;

    private readonly double[] lastEvents = new double[CrowdedEvents];
    private int eventCount;
    private readonly EventSet events;
    private readonly double[] initialModes;
    private readonly double[] surface;
    private readonly bool[] rising;
    private bool surfaceMet;

    /// <summary>Whether the motion has arrived at events whose actions are yet to run: the state is that before them.</summary>
    public bool EventsDue => events.IsDue;

    /// <summary>Whether a terminal event has happened.</summary>
    public bool IsOver => events.IsOver;

    /// <summary>What the last actions did.</summary>
    public List<EventOccurrence> NewEvents { get; } = [];

    /// <summary>Runs the actions that are due; the state is then that after them.</summary>
    public StepStatus Fire()
    {
        NewEvents.Clear();
        if (!CountMeeting() || IsCrowded()) return StepStatus.EventsAccumulate;
        KeepContinuation();
        events.Fire(Time, Current.End.AsSpan(0, Current.Dimension), surfaceMet ? surface : [], DecideAnew, NewEvents);
        surfaceMet = false;
        foreach (double value in State)
        {
            if (!double.IsFinite(value)) return StepStatus.NotFinite;
        }

        Current.FieldChanged();
        if (guards.Section is { Direction: 0 } section) guards.SectionSide = Math.Sign(section.Value(State));
        for (int i = 0; i < rising.Length; i++) (guards.Leaves[i], rising[i]) = StandsOnGuard(i);
        return StepStatus.Accepted;
    }

    private bool IsCrowded()
    {
        int place = eventCount++ % CrowdedEvents;
        double earlier = lastEvents[place];
        lastEvents[place] = Time;
        return eventCount > CrowdedEvents && Math.Abs(Time - earlier) <= CrowdedTime * Ulp(Time);
    }

    private void BeginEvents(double time, ReadOnlySpan<double> state)
    {
        events.Begin(time, state);
        eventCount = 0;
        NewEvents.Clear();
        Array.Clear(rising);
        Array.Clear(guards.Leaves);
        surfaceMet = false;
    }

    // Whether an action left the motion on a guard, and whether it runs from there to the guard's own side or stands still. If it is then found
    // beyond, the way there and back was too short to be seen: events accumulate (Zeno), as the impacts of a ball that comes to rest.
    private (bool Stands, bool Rises) StandsOnGuard(int slot)
    {
        Guard guard = events.Slots[slot];
        double value = guard.Sign * events.Evaluate(Time, State)[guard.Switch];
        double rate = guard.Sign * events.GuardRate(guard.Switch, Time, State);
        bool stands = Math.Abs(value) <= GuardUncertainty(guard, rate);
        return (stands, stands && rate >= 0);
    }

    // How far rounding of the state, and of the time at the speed the guard has, may move its value.
    private double GuardUncertainty(Guard guard, double rate) =>
        GuardRounding * events.Sensitivity(guard.Switch, Time, State) + SameTime * Ulp(Time) * Math.Abs(rate);

    private bool HasFallenBack(int landed)
    {
        bool isShort = Math.Abs(Current.EndTime - Current.StartTime) <= TooShortToRise * Ulp(Current.EndTime);
        if (!isShort) Array.Clear(guards.Leaves);
        if (!Array.Exists(rising, static waits => waits)) return false;
        guards.Evaluate(Time, State, guardValues);
        for (int i = 0; i < rising.Length; i++)
        {
            int index = guards.SectionIndex + 1 + i;
            if (!rising[i] || (isShort && index != landed)) continue;
            rising[i] = false;
            if (index != landed && guardValues[index] <= 0) return true;
        }

        return false;
    }

    // The event found, and those whose guards vanish at the same moment. False where a motion that has no room left to move meets a guard
    // that it does not run at: rounding moves it to and fro.
    private bool MeetEvents(int found)
    {
        bool isShort = Math.Abs(Current.EndTime - Current.StartTime) <= TooShortToRise * Ulp(Current.EndTime);
        guards.Evaluate(Time, State, guardValues);
        for (int i = 0; i < events.Slots.Length; i++)
        {
            int index = guards.SectionIndex + 1 + i;
            if (index != found && !search.StartsArmed(index)) continue;
            Guard guard = events.Slots[i];
            double rate = guard.Sign * events.GuardRate(guard.Switch, Time, State);
            if (index != found && !(guardValues[index] <= GuardUncertainty(guard, rate))) continue;
            if (isShort && rate >= 0) return false;
            events.Meet(guard.Switch);
        }

        return true;
    }
}
