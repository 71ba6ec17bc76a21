namespace OdeDsl.Modeling;

/// <summary>A switching function: where it changes side, the rates change their formula.</summary>
/// <param name="Text">The condition or function as the user wrote it, for example <c>Level &lt; LowContact</c>.</param>
/// <param name="Kind">How the function's value decides the regime entry.</param>
/// <param name="DependsOnState">Whether the function depends on a state.</param>
/// <param name="DependsOnTime">Whether the function depends on time explicitly.</param>
public sealed record SwitchDescription(string Text, SwitchKind Kind, bool DependsOnState, bool DependsOnTime)
{
    /// <summary>The table whose segment the regime entry numbers, or <see langword="null"/>.</summary>
    public Table? Table { get; init; }

    /// <summary>
    /// The regime entry that belongs to a value of the switching function evaluated with another entry. Only the function of a table
    /// depends on its own entry: it counts positions on that segment's scale.
    /// </summary>
    /// <param name="value">The value g.</param>
    /// <param name="entry">The regime entry with which it was evaluated.</param>
    /// <returns>As <see cref="SideOf(double)"/>.</returns>
    public double SideOf(double value, double entry) => Table is null ? SideOf(value) : Table.Segment(Table.ArgumentAt(value, entry));

    /// <summary>The regime entry that belongs to a value of the switching function.</summary>
    /// <param name="value">The value g; of a table's function evaluated with the entry of the point itself.</param>
    /// <returns>1 or 0 for a relation, ⌊g⌋ for <see cref="SwitchKind.WholeNumber"/>; NaN gives 0 or NaN.</returns>
    public double SideOf(double value) => Kind switch
    {
        SwitchKind.Below => value < 0 ? 1 : 0,
        SwitchKind.NotAbove => value <= 0 ? 1 : 0,
        SwitchKind.Above => value > 0 ? 1 : 0,
        SwitchKind.NotBelow => value >= 0 ? 1 : 0,
        _ when Table is not null => Math.Clamp(Math.Floor(value), -1, Table.Knots.Length - 1),
        _ => Math.Floor(value),
    };

    /// <summary>Whether the regime entry has no surface below it (or above it): outside the knots of a table.</summary>
    internal bool IsOpen(double entry, bool above) => Table is not null && (above ? entry >= Table.Knots.Length - 1 : entry < 0);
}
