using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>
/// A system in motion: steppers, the locked regime, and what happens between steps. Reusable; nothing is allocated once a method has
/// been used. Callers own the loop over steps.
/// </summary>
internal sealed class Motion
{
    private readonly DynamicSystem system;
    private readonly IntegrationOptions options;
    private readonly int tangentCount;
    private readonly ErrorNorm norm;
    private readonly double[] regime;
    private readonly SlidingSurface sliding = new();
    private Stepper? explicitStepper;
    private Stepper? implicitStepper;
    private Section? section;

    public Motion(DynamicSystem system, IntegrationOptions options, int tangentCount)
    {
        options.Validate();
        this.system = system;
        this.options = options;
        this.tangentCount = tangentCount;
        norm = new ErrorNorm(options.RelativeTolerance, options.AbsoluteTolerances(system.Description), tangentCount);
        regime = new double[system.SwitchCount];
        Current = options.Method == IntegrationMethod.RadauIIA5 ? Implicit : Explicit;
    }

    public IntegrationStatistics Statistics { get; } = new();

    /// <summary>The method at work, which holds the last step.</summary>
    public Stepper Current { get; private set; }

    /// <summary>The time reached.</summary>
    public double Time => Current.EndTime;

    /// <summary>The state reached, then the tangents one after the other.</summary>
    public ReadOnlySpan<double> Position => Current.End.AsSpan(0, Current.Dimension);

    /// <summary>Whether the last step ended on the watched section.</summary>
    public bool ReachedSection { get; private set; }

    /// <summary>Whether the motion slid along a surface since it began.</summary>
    public bool Slid { get; private set; }

    private Stepper Explicit => explicitStepper ??= MakeStepper(IntegrationMethod.DormandPrince54);

    private Stepper Implicit => implicitStepper ??= MakeStepper(IntegrationMethod.RadauIIA5);

    /// <summary>Sets the motion at a point.</summary>
    /// <param name="time">The time.</param>
    /// <param name="position">The state, then the tangents one after the other.</param>
    /// <param name="watched">A section to stop at, or <see langword="null"/>.</param>
    public void Begin(double time, ReadOnlySpan<double> position, Section? watched = null)
    {
        section = watched;
        system.Regime(time, position[..system.StateCount], regime);
        Current.Begin(time, position, options.InitialStep ?? 0);
    }

    /// <summary>Takes one step.</summary>
    /// <param name="limit">Where to stop at the latest.</param>
    public StepStatus Step(double limit)
    {
        if (options.Method == IntegrationMethod.Automatic && Current.SuggestsChange) ChangeMethod();
        return Current.Step(limit);
    }

    private void ChangeMethod()
    {
        Stepper before = Current;
        Current = before == explicitStepper ? Implicit : Explicit;
        Current.Begin(before.EndTime, before.End, Math.Abs(before.Proposed));
        Statistics.MethodChanges++;
    }

    private Stepper MakeStepper(IntegrationMethod method)
    {
        Stepper stepper = system.Apply(new StepperFactory(method, regime, sliding, tangentCount, norm, Statistics));
        stepper.MaximumStep = options.MaximumStep ?? double.PositiveInfinity;
        stepper.MaximumAttempts = options.MaximumSteps;
        return stepper;
    }
}
