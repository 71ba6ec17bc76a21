namespace OdeDsl.Integration;

/// <summary>A smallest or largest value and when it occurs.</summary>
/// <param name="Value">The value.</param>
/// <param name="Time">The time.</param>
public readonly record struct Extremum(double Value, double Time);
