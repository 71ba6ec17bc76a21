using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>
/// A system in motion. Each step runs within one locked regime and ends where a guard of the regime is met; there the regime changes, or the
/// motion begins or ends to slide. Reusable; nothing is allocated per step once a method has been used. Callers own the loop
/// over steps.
/// </summary>
internal sealed partial class Motion
{
    /// <summary>Meetings at one time, to within rounding, after which the motion is taken to accumulate; per switch as many again.</summary>
    private const int MeetingsAtOneTime = 16;

    /// <summary>Times this many units of rounding apart count as one.</summary>
    private const double SameTime = 16;

    /// <summary>The part of the tolerances within which a state counts as lying on a surface.</summary>
    private const double OnSurface = 1e-3;

    /// <summary>Corrections of a meeting's time on the step that ends there.</summary>
    private const int LandingCorrections = 3;

    /// <summary>Growth per step after a step was too long for a guard to be followed.</summary>
    private const double GuardedGrowth = 1.2;

    private readonly DynamicSystem system;
    private readonly IntegrationOptions options;
    private readonly int tangentCount;
    private readonly double[] absolute;
    private readonly ErrorNorm norm;
    private readonly double[] regime;
    private readonly SlidingSurface sliding;
    private readonly GuardSet guards;
    private readonly CrossingSearch search;
    private readonly CrossingRules rules;
    private readonly SurfaceProjection projection;
    private readonly double[] guardValues;
    private readonly double[] rates;
    private Stepper? explicitStepper;
    private Stepper? implicitStepper;
    private bool unsettled;
    private bool isStart;
    private int released;
    private double guardedStep = double.PositiveInfinity;
    private double nextKink;
    private int lockedDirection;
    private double meetingTime;
    private int meetings;

    public Motion(DynamicSystem system, IntegrationOptions options, int tangentCount)
    {
        if (options.Method == IntegrationMethod.BackwardDifferentiation && system.Description.Events.Length > 0)
            throw new ArgumentException($"{system.Description.Name} has events, and the backward differentiation formulas do not start again reliably after them; choose another method.", nameof(options));
        options.Validate();
        this.system = system = system.ForRun();
        this.options = options;
        this.tangentCount = tangentCount;
        absolute = options.AbsoluteTolerances(system.Description);
        norm = new ErrorNorm(options.RelativeTolerance, absolute, tangentCount);
        regime = new double[system.SwitchCount];
        sliding = new SlidingSurface(system, regime, Array.ConvertAll(absolute, value => value / options.RelativeTolerance));
        events = new EventSet(system, regime, sliding);
        (initialModes, surface, rising) = (system.Modes.ToArray(), new double[system.StateCount + 1], new bool[events.Slots.Length]);
        guards = new GuardSet(system, regime, sliding, events);
        search = new CrossingSearch(guards, system.StateCount);
        rules = new CrossingRules(system, regime, sliding);
        projection = new SurfaceProjection(system, regime, absolute, options.RelativeTolerance * OnSurface, OnSurface);
        guardValues = new double[guards.Count];
        rates = new double[system.StateCount];
        Current = options.Method == IntegrationMethod.Automatic ? Explicit : MakeStepper(options.Method);
    }

    public IntegrationStatistics Statistics { get; } = new();

    /// <summary>The method at work, which holds the last step.</summary>
    public Stepper Current { get; private set; }

    /// <summary>The time reached.</summary>
    public double Time => Current.EndTime;

    /// <summary>The state reached, then the tangents one after the other.</summary>
    public ReadOnlySpan<double> Position => Current.End.AsSpan(0, Current.Dimension);

    /// <summary>The meetings with surfaces during the last step, those at its start included.</summary>
    public List<Crossing> NewCrossings { get; } = [];

    /// <summary>Whether the last step ended on the watched section.</summary>
    public bool ReachedSection { get; private set; }

    /// <summary>Whether the motion slid along a surface since it began.</summary>
    public bool Slid { get; private set; }

    /// <summary>The text of a table that does not extrapolate and whose argument is outside its knots, or <see langword="null"/>.</summary>
    public string? TableLeft
    {
        get
        {
            for (int i = 0; i < regime.Length; i++)
            {
                SwitchDescription item = system.Description.Switches[i];
                if (item.Table is { Extrapolation: Extrapolation.Fail } table && table.IsEnd(regime[i])) return item.Text;
            }

            return null;
        }
    }

    private Stepper Explicit => explicitStepper ??= MakeStepper(AutomaticChoice.Explicit(options));

    private Stepper Implicit => implicitStepper ??= MakeStepper(AutomaticChoice.Implicit(options));

    private ReadOnlySpan<double> State => Current.End.AsSpan(0, system.StateCount);

    /// <summary>Sets the motion at a point.</summary>
    /// <param name="time">The time.</param>
    /// <param name="position">The state, then the tangents one after the other.</param>
    /// <param name="section">A section to stop at, or <see langword="null"/>.</param>
    public void Begin(double time, ReadOnlySpan<double> position, Section? section = null)
    {
        LockInputs(time, direction: 1);
        if (initialModes.Length > 0) system.SetModes(initialModes);
        system.Regime(time, position[..system.StateCount], regime);
        BeginEvents(time, position[..system.StateCount]);
        sliding.End();
        released = -1;
        meetings = 0;
        unsettled = guards.Any;
        isStart = true;
        guardedStep = double.PositiveInfinity;
        (Slid, ReachedSection) = (false, false);
        guards.Section = section;
        if (section is { } watched) PlaceSection(watched, time, position[..system.StateCount]);
        Current.MaximumStep = options.MaximumStep ?? double.PositiveInfinity;
        // Counters run on from one run to the next; the permission is for this run.
        Current.MaximumAttempts = Statistics.AcceptedSteps + Statistics.RejectedSteps + options.MaximumSteps;
        Current.Begin(time, position, options.InitialStep ?? 0);
    }

    /// <summary>Takes one step.</summary>
    /// <param name="limit">Where to stop at the latest; not the present time.</param>
    public StepStatus Step(double limit)
    {
        NewCrossings.Clear();
        guards.Direction = limit < Time ? -1 : 1;
        if (guards.Direction < 0 && events.Any) return StepStatus.EventsInReverse;
        if (guards.Direction != lockedDirection)
        {
            LockInputs(Time, guards.Direction);
            if (isStart) system.Regime(Time, State, regime);
        }

        while (true)
        {
            if (unsettled)
            {
                StepStatus settled = Settle();
                if (settled != StepStatus.Accepted || EventsDue) return settled;
            }

            if (options.Method == IntegrationMethod.Automatic && Current.SuggestsChange) ChangeMethod();
            StepStatus status = Current.Step(guards.Direction > 0 ? Math.Min(limit, nextKink) : Math.Max(limit, nextKink));
            if (status is StepStatus.NotFinite or StepStatus.StepTooSmall && TableLeft is null && MeetSurfaceAhead()) continue;
            if (status != StepStatus.Accepted) return status;
            if (!guards.Any) break;
            released = -1;
            SearchOutcome outcome = search.Search(Current);
            if (outcome == SearchOutcome.Nothing) break;
            if (outcome == SearchOutcome.Unresolved)
            {
                LimitSteps(Math.Abs(Current.EndTime - Current.StartTime) / 2);
                Current.Undo(shorten: true);
                continue;
            }

            if (!TryLand()) continue;

            Guard guard = guards[search.Found];
            if (guard.Kind == GuardKind.Section)
            {
                ReachedSection = true;
                break;
            }

            if (guard.Kind == GuardKind.Event)
            {
                if (!MeetEvents(search.Found)) return StepStatus.EventsAccumulate;
                break;
            }

            // A guard that vanishes where a condition changes is met here: beyond, it would be taken for one that was passed before.
            if (events.Any && !MeetEvents(search.Found)) return StepStatus.EventsAccumulate;
            status = Meet(guard);
            if (status != StepStatus.Accepted) return status;
            if (Current.EndTime != Current.StartTime || EventsDue) break;
        }

        if (HasFallenBack(search.Found)) return StepStatus.EventsAccumulate;
        Finish();
        return StepStatus.Accepted;
    }

    // A start within a small part of the tolerances, or within rounding of the time, of a section lies on it.
    private void PlaceSection(Section section, double time, ReadOnlySpan<double> state)
    {
        system.Rates(time, state, regime, rates);
        double value = section.Value(state), near = 0, speed = 0;
        for (int i = 0; i < state.Length; i++)
        {
            near += Math.Abs(section.Normal[i]) * (absolute[i] + options.RelativeTolerance * Math.Abs(state[i]));
            speed += section.Normal[i] * rates[i];
        }

        guards.StartsOnSection = Math.Abs(value) <= OnSurface * near + SameTime * Ulp(time) * Math.Abs(speed);
        guards.SectionSide = section.Direction != 0 ? -Math.Sign(section.Direction) : guards.StartsOnSection ? 0 : Math.Sign(value);
    }

    private void Finish()
    {
        if (Time == nextKink) PassKink();
        if (!guards.Any) return;
        unsettled |= search.EndsOnSurface;
        if (double.IsFinite(guardedStep)) LimitSteps(guardedStep * GuardedGrowth);
        guards.StartsOnSection = false;
        if (guards.Section is { } section && guards.SectionSide == 0) guards.SectionSide = Math.Sign(section.Value(State));
        Slid |= sliding.IsActive;
        if (sliding.IsActive && projection.Apply(sliding.Switch, sliding.Surface, Time, Current.End.AsSpan(0, system.StateCount))) Current.EndMoved();
    }

    private void LockInputs(double time, int direction)
    {
        lockedDirection = direction;
        nextKink = system.Signals?.Lock(time, direction) ?? direction * double.PositiveInfinity;
    }

    // The inputs have another formula beyond a kink. Where they jump, conditions may find themselves on the other side without a crossing.
    private void PassKink()
    {
        KeepContinuation();
        LockInputs(Time, guards.Direction);
        if (!system.Signals!.CanJump)
        {
            Current.EndMoved();
            return;
        }

        Current.FieldChanged();
        DecideAnew();
        surfaceMet = false;
        events.Look(Time, State);
    }

    // After a jump of the inputs or of the state, every condition is decided as at a start.
    private void DecideAnew()
    {
        if (system.SwitchCount == 0) return;
        if (sliding.IsActive)
        {
            NewCrossings.Add(new Crossing(Time, sliding.Switch, sliding.EntryBelow, sliding.EntryAbove, CrossingKind.SlidingEnded));
            sliding.End();
        }

        double[] before = [.. regime];
        system.Regime(Time, State, regime);
        for (int i = 0; i < before.Length; i++)
        {
            if (before[i] == regime[i] || (double.IsNaN(before[i]) && double.IsNaN(regime[i]))) continue;
            if (Math.Abs(before[i] - regime[i]) == 1 && guards.IsOnSurface(i, Time, State))
            {
                // To within rounding either side is right, and the motion may just have come to this one.
                regime[i] = before[i];
                continue;
            }

            NewCrossings.Add(new Crossing(Time, i, before[i], regime[i], CrossingKind.Passed));
            Statistics.Crossings++;
        }

        unsettled = true;
    }

    // Lets the motion meet every surface it stands on and runs at, until it can leave.
    private StepStatus Settle()
    {
        unsettled = false;
        if (system.SwitchCount == 0) return StepStatus.Accepted;
        while (true)
        {
            int index = StandsOn();
            if (index < 0) break;
            StepStatus status = Meet(guards[index]);
            if (status != StepStatus.Accepted) return status;
        }

        if (isStart) events.Begin(Time, State);
        // A start on a surface is put on the side it moves to: not a crossing, unless it slides.
        if (isStart) NewCrossings.RemoveAll(static crossing => crossing.Kind == CrossingKind.Passed);
        isStart = false;
        return StepStatus.Accepted;
    }

    private int StandsOn()
    {
        guards.Evaluate(Time, State, guardValues);
        for (int i = 0; i < guards.SectionIndex; i++)
        {
            if (!(guardValues[i] <= 0)) continue;
            Guard guard = guards[i];
            if (guard.Kind != GuardKind.Surface) return i;
            if (guard.Switch != released && rules.GuardRate(guard, Time, State, guards.Direction) < 0) return i;
        }

        return -1;
    }

    private StepStatus Meet(Guard guard, bool forced = false)
    {
        if (!CountMeeting()) return StepStatus.CrossingsAccumulate;
        KeepContinuation();
        surfaceMet = events.Any && guard.Kind == GuardKind.Surface;
        if (surfaceMet) rules.Describe(guard.Switch, Time, State, surface);
        StepStatus status = rules.Meet(guard, Time, Current.End.AsSpan(0, Current.Dimension), guards.Direction, forced, out Crossing? crossing);
        if (crossing is not { } what) return status;
        NewCrossings.Add(what);
        Statistics.Crossings++;
        if (what.Kind == CrossingKind.SlidingEnded) released = what.Switch;
        Slid |= what.Kind == CrossingKind.SlidingBegan;
        Current.FieldChanged();
        unsettled = true;
        events.Look(Time, State);
        return status;
    }

    // Some continuations need more rates: those of the regime, modes and inputs in which the step was taken.
    private void KeepContinuation()
    {
        if (Current.EndTime != Current.StartTime) Current.EnsureDense();
    }

    private bool CountMeeting()
    {
        bool sameTime = meetings > 0 && Math.Abs(Time - meetingTime) <= SameTime * Ulp(Time);
        if (!sameTime) (meetingTime, meetings) = (Time, 0);
        return ++meetings <= MeetingsAtOneTime * (1 + system.SwitchCount + events.Slots.Length);
    }

    // Ends the step at the guard found: the step is taken again to end there, and its end corrected until the guard vanishes to rounding.
    private bool TryLand()
    {
        double end = Current.EndTime, time = search.Time;
        if (Math.Abs(time - Current.StartTime) <= 2 * Ulp(time))
        {
            Current.Undo(shorten: false);
            return true;
        }

        double lastTime = Current.StartTime, lastValue = 0;
        for (int correction = 0; ; correction++)
        {
            if (time != Current.EndTime && !Current.Retake(time)) return false;
            guards.Evaluate(time, State, guardValues);
            double value = guardValues[search.Found];
            // The secant through the last two ends; the first slope comes from the continuation's root: zero there.
            double slope = correction == 0 ? GuardSlope() : (value - lastValue) / (time - lastTime);
            double next = time - value / slope;
            bool inside = (next - Current.StartTime) * guards.Direction > 0 && (end - next) * guards.Direction >= 0;
            if (value == 0 || correction >= LandingCorrections || !inside || Math.Abs(next - time) <= 2 * Ulp(time)) return true;
            (lastTime, lastValue, time) = (time, value, next);
        }
    }

    // The slope of the found guard at the end of the step held.
    private double GuardSlope()
    {
        Guard guard = guards[search.Found];
        if (guard.Kind == GuardKind.Surface) return guards.Direction * rules.GuardRate(guard, Time, State, guards.Direction);
        double value = guardValues[search.Found], inner = Current.EndTime - (Current.EndTime - Current.StartTime) * 1e-3;
        return (value - search.ValueAt(inner)) / (Current.EndTime - inner);
    }

    // Rates that have no value beyond a surface (a root of a quantity that becomes negative) stop every step short of it. Once the surface is
    // no more than rounding ahead, it is met.
    private bool MeetSurfaceAhead()
    {
        if (system.SwitchCount == 0) return false;
        guards.Evaluate(Time, State, guardValues);
        for (int i = 0; i < guards.SectionIndex; i++)
        {
            Guard guard = guards[i];
            if (guard.Kind != GuardKind.Surface || (sliding.IsActive && guard.Switch == sliding.Switch)) continue;
            double rate = rules.GuardRate(guard, Time, State, guards.Direction);
            bool isAhead = rate < 0 && guardValues[i] <= -rate * MeetingsAtOneTime * Ulp(Time);
            bool isBehind = guardValues[i] <= 0 && !(rate > 0);
            if (isAhead || isBehind) return Meet(guard, forced: true) == StepStatus.Accepted;
        }

        return false;
    }

    // Steps too long for a guard to be followed are shortened, and grow again slowly.
    private void LimitSteps(double longest)
    {
        guardedStep = longest;
        Current.MaximumStep = Math.Min(options.MaximumStep ?? double.PositiveInfinity, guardedStep);
    }

    private void ChangeMethod()
    {
        Stepper before = Current;
        Current = before == explicitStepper ? Implicit : Explicit;
        Current.Begin(before.EndTime, before.End, Math.Abs(before.Proposed));
        (Current.MaximumStep, Current.MaximumAttempts) = (before.MaximumStep, before.MaximumAttempts);
        Statistics.MethodChanges++;
    }

    private Stepper MakeStepper(IntegrationMethod method) =>
        system.Apply(new StepperFactory(method, regime, sliding, tangentCount, norm, Statistics));

    private static double Ulp(double value) => Math.BitIncrement(Math.Abs(value)) - Math.Abs(value);
}
