namespace OdeDsl.Modeling;

/// <summary>A table that a model's equations read.</summary>
/// <param name="Name">The member's name.</param>
/// <param name="Unit">The unit of its values, or the empty string.</param>
/// <param name="ArgumentUnit">The unit of its argument, or the empty string.</param>
/// <param name="Table">The table itself.</param>
public sealed record TableDescription(string Name, string Unit, string ArgumentUnit, Table Table);
