using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>How accurately and by which method to integrate.</summary>
/// <remarks>
/// A step is accepted when the root mean square over the states of error<sub>i</sub> / (a<sub>i</sub> + RelativeTolerance |x<sub>i</sub>|)
/// is at most one. The absolute tolerance a<sub>i</sub> is <see cref="AbsoluteTolerance"/> for every state if given. Otherwise it is
/// RelativeTolerance × 10⁻³ × the extent of the state: upper minus lower bound if both are finite, the period of an angle
/// without bounds, else 1.
/// </remarks>
public abstract record IntegrationOptions
{
    /// <summary>The smallest relative tolerance that double precision can serve: 100 units of rounding.</summary>
    public const double SmallestRelativeTolerance = 100 * 2.220446049250313e-16;

    /// <summary>The extent of a state assumed where no bounds are given, and the part of an extent that counts as negligible.</summary>
    private const double DefaultExtent = 1;
    private const double NegligiblePart = 1e-3;

    /// <summary>The relative tolerance of a step.</summary>
    public virtual double RelativeTolerance { get; init; } = 1e-6;

    /// <summary>The absolute tolerance of a step, in the unit of each state; <see langword="null"/>: from the states' bounds.</summary>
    public double? AbsoluteTolerance { get; init; }

    /// <summary>The method.</summary>
    public IntegrationMethod Method { get; init; } = IntegrationMethod.Automatic;

    /// <summary>The size of the first step tried, in units of time; <see langword="null"/>: estimated from the rates.</summary>
    public double? InitialStep { get; init; }

    /// <summary>The largest step, in units of time; <see langword="null"/>: the whole run.</summary>
    public double? MaximumStep { get; init; }

    /// <summary>The number of steps, rejected ones included, after which to give up.</summary>
    public long MaximumSteps { get; init; } = 10_000_000;

    /// <summary>
    /// Whether the automatic choice keeps to methods of order 5: for analyses that look at a run through the ends of its steps, which methods
    /// of high order place far apart.
    /// </summary>
    internal bool ManyNodes { get; init; }

    /// <summary>The absolute tolerances, state by state.</summary>
    internal double[] AbsoluteTolerances(ModelDescription description)
    {
        var tolerances = new double[description.States.Length];
        for (int i = 0; i < tolerances.Length; i++)
        {
            StateDescription state = description.States[i];
            double extent = state.Upper - state.Lower;
            if (!(double.IsFinite(extent) && extent > 0)) extent = state.AnglePeriod ?? DefaultExtent;
            tolerances[i] = AbsoluteTolerance ?? RelativeTolerance * NegligiblePart * extent;
        }

        return tolerances;
    }

    /// <summary>Throws if an option has no meaning.</summary>
    internal void Validate()
    {
        RequirePositive(RelativeTolerance, nameof(RelativeTolerance));
        if (RelativeTolerance < SmallestRelativeTolerance)
        {
            throw new ArgumentOutOfRangeException(
                nameof(RelativeTolerance),
                RelativeTolerance,
                $"Double precision cannot serve a relative tolerance below {SmallestRelativeTolerance:g3}; choose a larger one.");
        }

        if (RelativeTolerance >= 1)
        {
            throw new ArgumentOutOfRangeException(
                nameof(RelativeTolerance), RelativeTolerance, "A relative tolerance of one or more permits errors as large as the state; choose a smaller one.");
        }

        if (AbsoluteTolerance is { } absolute) RequirePositive(absolute, nameof(AbsoluteTolerance));
        if (InitialStep is { } initial) RequirePositive(initial, nameof(InitialStep));
        if (MaximumStep is { } maximum) RequirePositive(maximum, nameof(MaximumStep));
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(MaximumSteps);
        if (!Enum.IsDefined(Method)) throw new ArgumentOutOfRangeException(nameof(Method), Method, "There is no such integration method.");
    }

    private static void RequirePositive(double value, string name)
    {
        if (!(double.IsFinite(value) && value > 0))
            throw new ArgumentOutOfRangeException(name, value, $"{name} must be a finite number above zero.");
    }
}
