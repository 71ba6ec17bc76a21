namespace OdeDsl;

/// <summary>
/// Marks a static read-only field, or a static property with <c>get</c> only, of type <see cref="Table"/> that equations read by
/// <see cref="Table.At(double)"/>. It may stand in the model or in any other class that the model can reach.
/// </summary>
[AttributeUsage(AttributeTargets.Field | AttributeTargets.Property)]
public sealed class TableAttribute : Attribute
{
    /// <summary>The unit of the table's values, for example <c>m</c>.</summary>
    public string Unit { get; set; } = "";

    /// <summary>The unit of the table's argument, for example <c>m3/s</c>.</summary>
    public string ArgumentUnit { get; set; } = "";
}
