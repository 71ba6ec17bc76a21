namespace OdeDsl.Modeling;

/// <summary>A state of a model.</summary>
/// <param name="Name">The property's name.</param>
/// <param name="Unit">The unit, or the empty string.</param>
/// <param name="Initial">The initial value of a new model.</param>
/// <param name="Lower">The lower bound of the searched region; may be -∞.</param>
/// <param name="Upper">The upper bound of the searched region; may be +∞.</param>
/// <param name="AnglePeriod">The period if the state lives on a circle, otherwise <see langword="null"/>.</param>
/// <param name="RateText">The rate as the user wrote it.</param>
/// <param name="Summary">The property's documentation summary, or the empty string.</param>
public sealed record StateDescription(
    string Name, string Unit, double Initial, double Lower, double Upper, double? AnglePeriod, string RateText, string Summary = "");
