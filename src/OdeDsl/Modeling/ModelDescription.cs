using System.Collections.Immutable;

namespace OdeDsl.Modeling;

/// <summary>What is known about a model apart from its numbers: names, units, bounds, defaults, structure.</summary>
public sealed record ModelDescription
{
    /// <summary>The name of the model class.</summary>
    public required string Name { get; init; }

    /// <summary>The model's documentation summary, or the empty string.</summary>
    public string Summary { get; init; } = "";

    /// <summary>The unit of time, or the empty string.</summary>
    public string TimeUnit { get; init; } = "";

    /// <summary>The states, in the order of the state vector.</summary>
    public required DescriptionList<StateDescription> States { get; init; }

    /// <summary>The parameters, in the order of the parameter vector.</summary>
    public required DescriptionList<ParameterDescription> Parameters { get; init; }

    /// <summary>The modes, in their order behind the parameters in the vector that the equations get.</summary>
    public ImmutableArray<ModeDescription> Modes { get; init; } = [];

    /// <summary>The inputs, in their order behind the modes.</summary>
    public ImmutableArray<InputDescription> Inputs { get; init; } = [];

    /// <summary>The length of that vector: parameters, modes, inputs, and the inputs' slopes.</summary>
    public int ConstantCount => Parameters.Length + Modes.Length + 2 * Inputs.Length;

    /// <summary>The observables, in the order of the observable vector.</summary>
    public ImmutableArray<ObservableDescription> Observables { get; init; } = [];

    /// <summary>The tables that the equations read.</summary>
    public ImmutableArray<TableDescription> Tables { get; init; } = [];

    /// <summary>The events, in the order of declaration.</summary>
    public ImmutableArray<EventDescription> Events { get; init; } = [];

    /// <summary>The switching functions, in the order of the regime vector.</summary>
    public DescriptionList<SwitchDescription> Switches { get; init; } = [];

    /// <summary>The vector-valued states; their elements come behind the other states.</summary>
    public ImmutableArray<VectorDescription> StateVectors { get; init; } = [];

    /// <summary>The vector-valued parameters; their elements come behind the other parameters.</summary>
    public ImmutableArray<VectorDescription> ParameterVectors { get; init; } = [];

    /// <summary>The entries of the state Jacobian that are not identically zero.</summary>
    public required SparsityPattern StateSparsity { get; init; }

    /// <summary>The entries of the parameter Jacobian that are not identically zero.</summary>
    public required SparsityPattern ParameterSparsity { get; init; }

    /// <summary>Whether a rate or a switching function depends on time explicitly.</summary>
    public bool DependsOnTime { get; init; }

    /// <summary>The position of a state in the state vector.</summary>
    /// <param name="name">The state's name; for an element of a vector as in <c>Temperature[3]</c>.</param>
    /// <returns>The index, or -1 if there is no such state.</returns>
    public int IndexOfState(string name) => IndexOf(States, States.ScalarCount, StateVectors, name, static state => state.Name);

    /// <summary>The position of a parameter in the parameter vector.</summary>
    /// <param name="name">The parameter's name; for an element of a vector as in <c>Weight[3]</c>.</param>
    /// <returns>The index, or -1 if there is no such parameter.</returns>
    public int IndexOfParameter(string name) => IndexOf(Parameters, Parameters.ScalarCount, ParameterVectors, name, static parameter => parameter.Name);

    /// <summary>The position of an input among the inputs.</summary>
    /// <param name="name">The input's name.</param>
    /// <returns>The index, or -1 if there is no such input.</returns>
    public int IndexOfInput(string name) => IndexOf(Inputs, Inputs.Length, [], name, static input => input.Name);

    /// <summary>The position of an observable in the observable vector.</summary>
    /// <param name="name">The observable's name.</param>
    /// <returns>The index, or -1 if there is no such observable.</returns>
    public int IndexOfObservable(string name) => IndexOf(Observables, Observables.Length, [], name, static observable => observable.Name);

    private static int IndexOf<T>(
        IReadOnlyList<T> items, int scalarCount, ImmutableArray<VectorDescription> vectors, string name, Func<T, string> nameOf)
    {
        for (int i = 0; i < scalarCount; i++)
        {
            if (string.Equals(nameOf(items[i]), name, StringComparison.Ordinal)) return i;
        }

        foreach (VectorDescription vector in vectors)
        {
            if (vector.IndexOf(name) is >= 0 and int index) return index;
        }

        return -1;
    }
}
