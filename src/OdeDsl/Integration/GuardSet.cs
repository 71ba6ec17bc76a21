using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>
/// All guards of a motion in its locked regime: one per relation, two per whole-number switch, two while sliding, one for a section.
/// </summary>
internal sealed class GuardSet
{
    /// <summary>The value of a guard that is off: far from zero.</summary>
    private const double Off = 1;

    private readonly DynamicSystem system;
    private readonly double[] regime;
    private readonly SlidingSurface sliding;
    private readonly EventSet events;
    private readonly DescriptionList<SwitchDescription> switches;
    private readonly SwitchKind[] kinds;
    private readonly int[] wholeNumbers;
    private readonly double[] functions;
    private readonly double[] gradients;
    private readonly int slidingStart;

    public GuardSet(DynamicSystem system, double[] regime, SlidingSurface sliding, EventSet events)
    {
        this.events = events;
        Leaves = new bool[events.Slots.Length];
        this.system = system;
        this.regime = regime;
        this.sliding = sliding;
        switches = system.Description.Switches;
        kinds = [.. switches.Select(static item => item.Kind)];
        wholeNumbers = [.. Enumerable.Range(0, kinds.Length).Where(index => kinds[index] == SwitchKind.WholeNumber)];
        functions = new double[kinds.Length];
        gradients = new double[kinds.Length * system.StateCount];
        slidingStart = kinds.Length + wholeNumbers.Length;
    }

    /// <summary>The number of guards, those that are off included.</summary>
    public int Count => slidingStart + 3 + events.Slots.Length;

    /// <summary>Whether there is anything to watch.</summary>
    public bool Any => kinds.Length > 0 || Section is not null || events.Any;

    /// <summary>A section to watch.</summary>
    public Section? Section { get; set; }

    /// <summary>The side from which the section is to be met: -1: its value is negative before; 1: positive; 0: either, not yet known.</summary>
    public int SectionSide { get; set; }

    /// <summary>Whether the motion starts on the section, to within the tolerances: it must leave it first.</summary>
    public bool StartsOnSection { get; set; }

    /// <summary>Whether the motion stands on the guard of an event that has just happened, for each of the events' guards: it must leave it first.</summary>
    public bool[] Leaves { get; }

    /// <summary>Whether a guard does not count at the start of a step because the motion stands on it.</summary>
    public bool IsLeft(int index) => index == SectionIndex ? StartsOnSection : index > SectionIndex && Leaves[index - SectionIndex - 1];

    /// <summary>The position of the section's guard.</summary>
    public int SectionIndex => slidingStart + 2;

    /// <summary>1 if time runs forwards, otherwise -1.</summary>
    public int Direction { get; set; } = 1;

    /// <summary>Evaluates all guards at a point.</summary>
    public void Evaluate(double time, ReadOnlySpan<double> state, Span<double> values)
    {
        if (kinds.Length > 0) system.SwitchingFunctions(time, state, regime, functions);
        for (int i = 0; i < slidingStart; i++)
        {
            Guard guard = this[i];
            bool off = (sliding.IsActive && guard.Switch == sliding.Switch) || switches[guard.Switch].IsOpen(regime[guard.Switch], guard.Sign < 0);
            values[i] = off ? Off : guard.Sign * (functions[guard.Switch] - guard.Surface);
        }

        (values[slidingStart], values[slidingStart + 1], values[slidingStart + 2]) = (Off, Off, Off);
        if (sliding.IsActive)
        {
            (double below, double above) = sliding.Approaches(time, state);
            values[slidingStart] = Direction * below;
            values[slidingStart + 1] = -Direction * above;
        }

        if (Section is { } section) values[slidingStart + 2] = SectionSide * section.Value(state);
        if (events.Slots.Length == 0) return;
        ReadOnlySpan<double> guarded = events.Evaluate(time, state);
        for (int i = 0; i < events.Slots.Length; i++) values[SectionIndex + 1 + i] = events.Slots[i].Sign * guarded[events.Slots[i].Switch];
    }

    /// <summary>Whether a point lies on a surface of a switching function, to within rounding.</summary>
    public bool IsOnSurface(int index, double time, ReadOnlySpan<double> state)
    {
        const double SameTime = 16; // units of rounding of the time within which the motion came to the surface
        system.SwitchingFunctions(time, state, regime, functions);
        double level = kinds[index] == SwitchKind.WholeNumber ? Math.Round(functions[index]) : 0;
        double near = Rounding(index, time, state);
        double[] rates = new double[state.Length], byTime = new double[functions.Length];
        system.Rates(time, state, regime, rates);
        system.SwitchingTimeDerivative(time, state, regime, byTime);
        double speed = byTime[index];
        for (int i = 0; i < rates.Length; i++) speed += gradients[index * rates.Length + i] * rates[i];
        if (double.IsFinite(speed)) near += SameTime * (Math.BitIncrement(Math.Abs(time)) - Math.Abs(time)) * Math.Abs(speed);
        return Math.Abs(functions[index] - level) <= near;
    }

    /// <summary>How far rounding of the state may move a guard's value.</summary>
    public double Rounding(int index, double time, ReadOnlySpan<double> state)
    {
        const double Units = 64 * 2.220446049250313e-16;
        Guard guard = this[index];
        if (guard.Kind == GuardKind.Event) return Units * events.Sensitivity(guard.Switch, time, state);
        double sum = 0;
        if (guard.Kind == GuardKind.Section)
        {
            for (int i = 0; i < state.Length; i++) sum += Math.Abs(Section!.Value.Normal[i] * state[i]);
        }
        else if (guard.Kind == GuardKind.Surface)
        {
            system.SwitchingJacobian(time, state, regime, gradients);
            for (int i = 0; i < state.Length; i++) sum += Math.Abs(gradients[guard.Switch * state.Length + i] * state[i]);
        }

        return Units * sum;
    }

    /// <summary>A guard in the present regime.</summary>
    public Guard this[int index]
    {
        get
        {
            if (index == slidingStart) return new Guard(GuardKind.SlidingEndsBelow, sliding.Switch, 0, 0);
            if (index == slidingStart + 1) return new Guard(GuardKind.SlidingEndsAbove, sliding.Switch, 0, 0);
            if (index > SectionIndex) return events.Slots[index - SectionIndex - 1];
            if (index > slidingStart) return new Guard(GuardKind.Section, -1, SectionSide, 0);
            if (index >= kinds.Length)
            {
                int whole = wholeNumbers[index - kinds.Length];
                return new Guard(GuardKind.Surface, whole, -1, regime[whole] + 1);
            }

            if (kinds[index] == SwitchKind.WholeNumber) return new Guard(GuardKind.Surface, index, 1, regime[index]);
            return new Guard(GuardKind.Surface, index, SwitchSide.IsAbove(kinds[index], regime[index]) ? 1 : -1, 0);
        }
    }
}
