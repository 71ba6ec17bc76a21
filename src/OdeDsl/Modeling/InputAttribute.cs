namespace OdeDsl;

/// <summary>
/// Marks a partial property of type <see langword="double"/> as an input: a number that comes from outside the model. The value the
/// property holds is a constant input; for a run a <see cref="Signal"/> can be bound instead (<see cref="InputExtensions"/>).
/// </summary>
/// <param name="value">The value a new model starts with, in the input's unit.</param>
[AttributeUsage(AttributeTargets.Property)]
public sealed class InputAttribute(double value = 0) : Attribute
{
    /// <summary>The value a new model starts with, in the input's unit.</summary>
    public double Value { get; } = value;

    /// <summary>The unit, shown beside every value of this input.</summary>
    public string Unit { get; set; } = "";
}
