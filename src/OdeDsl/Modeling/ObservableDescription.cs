namespace OdeDsl.Modeling;

/// <summary>A quantity computed from the state, worth watching.</summary>
/// <param name="Name">The member's name.</param>
/// <param name="Unit">The unit, or the empty string.</param>
/// <param name="Text">The expression as the user wrote it.</param>
/// <param name="Summary">The member's documentation summary, or the empty string.</param>
public sealed record ObservableDescription(string Name, string Unit, string Text, string Summary = "");
