namespace OdeDsl.Modeling;

/// <summary>A mode of a model. Its values are numbers here: <see langword="true"/> is 1, members of an enumeration are their numbers.</summary>
/// <param name="Name">The property's name.</param>
/// <param name="Initial">The value of a new model.</param>
/// <param name="Summary">The property's documentation summary, or the empty string.</param>
public sealed record ModeDescription(string Name, double Initial, string Summary = "");
