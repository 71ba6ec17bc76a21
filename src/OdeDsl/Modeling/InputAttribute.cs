namespace OdeDsl;

/// <summary>
/// On a partial property of type <see langword="double"/>: an input, a number that comes from outside the model. The value the property
/// holds is a constant input; for a run a <see cref="Signal"/> can be bound instead (<see cref="InputExtensions"/>).
/// On another property or a method, with the names of a submodel and a number of it: where the submodel's equations read that number, they
/// get this value instead. Such a method may take one argument <c>double time</c>.
/// </summary>
[AttributeUsage(AttributeTargets.Property | AttributeTargets.Method)]
public sealed class InputAttribute : Attribute
{
    /// <summary>Declares an input.</summary>
    /// <param name="value">The value a new model starts with, in the input's unit.</param>
    public InputAttribute(double value = 0) => Value = value;

    /// <summary>Gives a number of a submodel.</summary>
    /// <param name="submodel">The name of the submodel, by <see langword="nameof"/>.</param>
    /// <param name="input">The name of its input or parameter, by <see langword="nameof"/>.</param>
    public InputAttribute(string submodel, string input) => (Submodel, Input) = (submodel, input);

    /// <summary>The value a new model starts with, in the input's unit.</summary>
    public double Value { get; }

    /// <summary>The name of the submodel; <see langword="null"/> for a declared input.</summary>
    public string? Submodel { get; }

    /// <summary>The name of the submodel's input or parameter; <see langword="null"/> for a declared input.</summary>
    public string? Input { get; }

    /// <summary>The unit; if empty, that of the formula which gives a number of a submodel.</summary>
    public string Unit { get; set; } = "";
}
