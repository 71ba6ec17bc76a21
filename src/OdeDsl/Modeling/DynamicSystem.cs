namespace OdeDsl.Modeling;

/// <summary>
/// A model's equations with one parameter vector and one initial state: what every analysis works on. Immutable and safe to
/// use from several threads at once.
/// </summary>
/// <remarks>
/// Evaluations forward to <see cref="IOdeSystem"/> with this instance's parameters; see there for sizes, overlap and what may throw.
/// The forms with a regime take every condition on the side that the regime names.
/// </remarks>
public abstract partial class DynamicSystem
{
    private readonly double[] initialState;

    private protected DynamicSystem(ModelDescription description, double[] constants, double[] initialState, InputSignals? signals, bool isOfRun)
    {
        RequireFinite(constants, description);
        RequireFinite(initialState, description.States.Length, "initial state", index => description.States[index].Name);
        Description = description;
        Constants = constants;
        this.initialState = initialState;
        Signals = signals;
        this.isOfRun = isOfRun;
    }

    /// <summary>Names, units, bounds, defaults and structure.</summary>
    public ModelDescription Description { get; }

    /// <summary>The number of states, n.</summary>
    public int StateCount => initialState.Length;

    /// <summary>The number of parameters, m.</summary>
    public int ParameterCount => Description.Parameters.Length;

    /// <summary>The number of switching functions, s.</summary>
    public int SwitchCount => Description.Switches.Length;

    /// <summary>The parameters, in the order of <see cref="ModelDescription.Parameters"/>.</summary>
    public ReadOnlySpan<double> Parameters => Constants.AsSpan(0, ParameterCount);

    /// <summary>The state that runs start from, in the order of <see cref="ModelDescription.States"/>.</summary>
    public ReadOnlySpan<double> InitialState => initialState;

    /// <summary>Binds a model's equations to the numbers the model holds now. Later changes to the model have no effect on the result.</summary>
    /// <typeparam name="TModel">The model class.</typeparam>
    /// <typeparam name="TSystem">Its equations.</typeparam>
    /// <param name="model">The model.</param>
    /// <returns>The system.</returns>
    /// <exception cref="ArgumentException">A state or parameter of the model is not finite.</exception>
    public static DynamicSystem Of<TModel, TSystem>(IOdeModel<TModel, TSystem> model)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem
    {
        ArgumentNullException.ThrowIfNull(model);
        int m = model.ParameterCount;
        var parameters = new double[m];
        model.ReadParameters(parameters);
        ModelDescription description = TSystem.DescriptionFor(parameters) ?? TSystem.Description;
        int k = description.Modes.Length, u = description.Inputs.Length;
        double[] constants = [.. parameters, .. new double[k + 2 * u]];
        var state = new double[model.StateCount];
        model.ReadModes(constants.AsSpan(m, k));
        model.ReadInputs(constants.AsSpan(m + k, u));
        model.ReadState(state);
        return new BoundSystem<TSystem>(description, constants, state);
    }

    /// <summary>Binds equations to the defaults in their description.</summary>
    /// <typeparam name="TSystem">The equations.</typeparam>
    /// <returns>The system.</returns>
    public static DynamicSystem Of<TSystem>()
        where TSystem : struct, IOdeSystem =>
        new BoundSystem<TSystem>(
            TSystem.Description,
            [
                .. TSystem.Description.Parameters.Select(static parameter => parameter.Default),
                .. TSystem.Description.Modes.Select(static mode => mode.Initial),
                .. TSystem.Description.Inputs.Select(static input => input.Default),
                .. TSystem.Description.Inputs.Select(static _ => 0.0),
            ],
            [.. TSystem.Description.States.Select(state => state.Initial)]);

    /// <summary>The same equations with one parameter changed.</summary>
    /// <param name="index">The parameter's position.</param>
    /// <param name="value">Its new value.</param>
    /// <returns>A new system.</returns>
    /// <exception cref="ArgumentOutOfRangeException">There is no such parameter.</exception>
    /// <exception cref="ArgumentException">The value is not finite, or the parameter is the length of a vector.</exception>
    public DynamicSystem WithParameter(int index, double value)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(index);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(index, ParameterCount);
        double[] changed = [.. Constants];
        changed[index] = value;
        RequireSameLengths(changed);
        return Rebind(changed, initialState, Signals, ofRun: false);
    }

    /// <summary>The same equations with other parameters.</summary>
    /// <param name="values">All m parameters.</param>
    /// <returns>A new system.</returns>
    /// <exception cref="ArgumentException">The number of values is not m, a value is not finite, or the length of a vector differs.</exception>
    public DynamicSystem WithParameters(ReadOnlySpan<double> values)
    {
        RequireSameLengths(values);
        return Rebind([.. values, .. Constants.AsSpan(ParameterCount)], initialState, Signals, ofRun: false);
    }

    /// <summary>The same equations starting elsewhere.</summary>
    /// <param name="values">All n states.</param>
    /// <returns>A new system.</returns>
    /// <exception cref="ArgumentException">The number of values is not n, or a value is not finite.</exception>
    public DynamicSystem WithInitialState(ReadOnlySpan<double> values) =>
        Rebind(Constants, values.ToArray(), Signals, ofRun: false);

    /// <summary>Hands the equations' type to work that needs it for speed.</summary>
    /// <typeparam name="TResult">What the work yields.</typeparam>
    /// <param name="operation">The work.</param>
    /// <returns>Its result.</returns>
    public abstract TResult Apply<TResult>(ISystemOperation<TResult> operation);

    /// <inheritdoc cref="IOdeSystem.Rates(double, ReadOnlySpan{double}, ReadOnlySpan{double}, Span{double})"/>
    public abstract void Rates(double time, ReadOnlySpan<double> state, Span<double> rates);

    /// <inheritdoc cref="IOdeSystem.Rates(double, ReadOnlySpan{double}, ReadOnlySpan{double}, ReadOnlySpan{double}, Span{double})"/>
    public abstract void Rates(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> rates);

    /// <inheritdoc cref="IOdeSystem.Regime"/>
    public abstract void Regime(double time, ReadOnlySpan<double> state, Span<double> regime);

    /// <inheritdoc cref="IOdeSystem.StateJacobian"/>
    public abstract void StateJacobian(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> jacobian);

    /// <inheritdoc cref="IOdeSystem.ParameterJacobian"/>
    public abstract void ParameterJacobian(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> jacobian);

    /// <inheritdoc cref="IOdeSystem.TimeDerivative"/>
    public abstract void TimeDerivative(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> derivative);

    /// <inheritdoc cref="IOdeSystem.Observables"/>
    public abstract void Observables(double time, ReadOnlySpan<double> state, Span<double> values);

    /// <inheritdoc cref="IOdeSystem.SwitchingFunctions"/>
    public abstract void SwitchingFunctions(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> values);

    /// <inheritdoc cref="IOdeSystem.SwitchingJacobian"/>
    public abstract void SwitchingJacobian(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> jacobian);

    /// <inheritdoc cref="IOdeSystem.SwitchingTimeDerivative"/>
    public abstract void SwitchingTimeDerivative(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> derivative);

    private protected abstract DynamicSystem Rebind(double[] constants, double[] state, InputSignals? signals, bool ofRun);

    private static void RequireFinite(double[] constants, ModelDescription description)
    {
        int m = description.Parameters.Length, k = description.Modes.Length, u = description.Inputs.Length;
        if (constants.Length != description.ConstantCount)
            throw new ArgumentException($"This model has {m} parameter values, but {constants.Length - description.ConstantCount + m} were given.");
        RequireFinite(constants[..m], m, "parameter", index => description.Parameters[index].Name);
        RequireFinite(constants[m..(m + k)], k, "mode", index => description.Modes[index].Name);
        RequireFinite(constants[(m + k)..(m + k + u)], u, "input", index => description.Inputs[index].Name);
    }

    private void RequireSameLengths(ReadOnlySpan<double> values)
    {
        int count = Math.Min(values.Length, Description.Parameters.ScalarCount);
        for (int i = 0; i < count; i++)
        {
            if (values[i] == Constants[i] || !Description.Parameters[i].IsFixed) continue;
            throw new ArgumentException(
                $"{Description.Parameters[i].Name} is fixed at {Constants[i]} when the model is made, because lengths of vectors depend on it; make another model instead.");
        }
    }

    private static void RequireFinite(double[] values, int count, string what, Func<int, string> nameOf)
    {
        if (values.Length != count) throw new ArgumentException($"This model has {count} {what} values, but {values.Length} were given.");
        int bad = Array.FindIndex(values, static value => !double.IsFinite(value));
        if (bad >= 0) throw new ArgumentException($"The {what} {nameOf(bad)} is {values[bad]}; it must be a finite number.");
    }
}
