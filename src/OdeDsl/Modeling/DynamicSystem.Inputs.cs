namespace OdeDsl.Modeling;

/// <content>Inputs and modes: numbers that follow the parameters in the vector that the equations get, constant within a smooth piece of a run.</content>
public abstract partial class DynamicSystem
{
    [ThreadStatic]
    private static double[]? scratch;

    private readonly bool isOfRun;

    /// <summary>The modes that runs start with, in the order of <see cref="ModelDescription.Modes"/>.</summary>
    public ReadOnlySpan<double> Modes => Constants.AsSpan(ParameterCount, Description.Modes.Length);

    /// <summary>The constant values of the inputs, in the order of <see cref="ModelDescription.Inputs"/>; without meaning where a signal is bound.</summary>
    public ReadOnlySpan<double> Inputs => Constants.AsSpan(ParameterCount + Description.Modes.Length, Description.Inputs.Length);

    /// <summary>Whether the equations depend on time: explicitly, or by a signal bound to an input.</summary>
    public bool DependsOnTime => Description.DependsOnTime || Signals is not null;

    /// <summary>Parameters, modes, inputs and the inputs' slopes.</summary>
    internal double[] Constants { get; }

    /// <summary>The signals, or <see langword="null"/> if all inputs are constant.</summary>
    internal InputSignals? Signals { get; }

    /// <summary>The same equations with a signal in place of an input's constant value.</summary>
    /// <param name="input">The input's name.</param>
    /// <param name="signal">The signal.</param>
    /// <returns>A new system. Analyses that need equations without time refuse it.</returns>
    /// <exception cref="ArgumentException">There is no such input; the message lists those there are.</exception>
    public DynamicSystem WithInput(string input, Signal signal)
    {
        ArgumentNullException.ThrowIfNull(signal);
        int index = IndexOfInput(input);
        InputSignals signals = Signals ?? new InputSignals(new Signal?[Description.Inputs.Length], ParameterCount + Description.Modes.Length);
        return Rebind(Constants, initialState, signals.With(index, signal), ofRun: false);
    }

    /// <summary>The same equations with another constant value of an input.</summary>
    /// <param name="input">The input's name.</param>
    /// <param name="value">The value; it replaces a signal bound before.</param>
    /// <returns>A new system.</returns>
    /// <exception cref="ArgumentException">There is no such input, or the value is not finite.</exception>
    public DynamicSystem WithInput(string input, double value)
    {
        int index = IndexOfInput(input);
        double[] changed = [.. Constants];
        changed[ParameterCount + Description.Modes.Length + index] = value;
        InputSignals? signals = Signals?.With(index, null);
        return Rebind(changed, initialState, signals is { Any: true } ? signals : null, ofRun: false);
    }

    /// <summary>The same equations with other modes to start with.</summary>
    /// <param name="values">All modes, in the order of <see cref="ModelDescription.Modes"/>.</param>
    /// <returns>A new system.</returns>
    /// <exception cref="ArgumentException">Another number of values, or a value that is not finite.</exception>
    public DynamicSystem WithModes(ReadOnlySpan<double> values)
    {
        if (values.Length != Modes.Length) throw new ArgumentException($"This model has {Modes.Length} modes, but {values.Length} were given.", nameof(values));
        double[] changed = [.. Constants];
        values.CopyTo(changed.AsSpan(ParameterCount));
        return Rebind(changed, initialState, Signals, ofRun: false);
    }

    /// <summary>A system for one run, which may set its modes and lock its signals: itself where there is nothing to set.</summary>
    internal DynamicSystem ForRun() =>
        Signals is null && Modes.IsEmpty ? this : Rebind([.. Constants], initialState, Signals?.Copy(), ofRun: true);

    /// <summary>
    /// The vector that the equations get at a time. In a run the signals' locked pieces count; elsewhere the value after a jump, in a vector
    /// that is valid until the thread's next call.
    /// </summary>
    private protected ReadOnlySpan<double> ConstantsAt(double time, bool withSlopes = false)
    {
        if (Signals is null) return Constants;
        double[] target = Constants;
        if (!isOfRun)
        {
            // Taken away meanwhile: a signal's function may evaluate another system.
            target = scratch is { } known && known.Length >= Constants.Length ? known : new double[Constants.Length];
            scratch = null;
            Constants.CopyTo(target, 0);
            Signals.RefreshAfter(time, target);
            scratch = target;
        }
        else if (withSlopes) Signals.RefreshWithSlopes(time, target);
        else Signals.Refresh(time, target);

        return target.AsSpan(0, Constants.Length);
    }

    private int IndexOfInput(string input)
    {
        ArgumentNullException.ThrowIfNull(input);
        int index = Description.IndexOfInput(input);
        if (index >= 0) return index;
        string known = Description.Inputs.IsEmpty ? "it has none" : "it has: " + string.Join(", ", Description.Inputs.Select(static item => item.Name));
        throw new ArgumentException($"{Description.Name} has no input named '{input}'; {known}.", nameof(input));
    }
}
