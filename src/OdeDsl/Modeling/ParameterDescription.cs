namespace OdeDsl.Modeling;

/// <summary>A parameter of a model.</summary>
/// <param name="Name">The property's name.</param>
/// <param name="Unit">The unit, or the empty string.</param>
/// <param name="Default">The value of a new model.</param>
/// <param name="Lower">The lower bound of the explored range; may be -∞.</param>
/// <param name="Upper">The upper bound of the explored range; may be +∞.</param>
/// <param name="Summary">The property's documentation summary, or the empty string.</param>
public sealed record ParameterDescription(string Name, string Unit, double Default, double Lower, double Upper, string Summary = "")
{
    /// <summary>Whether the value is fixed when a model is made, as the length of a vector is: no analysis changes it.</summary>
    public bool IsFixed { get; init; }
}
