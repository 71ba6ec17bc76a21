namespace OdeDsl.Modeling;

/// <summary>An input of a model.</summary>
/// <param name="Name">The property's name.</param>
/// <param name="Unit">The unit, or the empty string.</param>
/// <param name="Default">The constant value of a new model.</param>
/// <param name="Summary">The property's documentation summary, or the empty string.</param>
public sealed record InputDescription(string Name, string Unit, double Default, string Summary = "");
