namespace OdeDsl.Modeling;

/// <summary>A switching function: where it changes side, the rates change their formula.</summary>
/// <param name="Text">The condition or function as the user wrote it, for example <c>Level &lt; LowContact</c>.</param>
/// <param name="Kind">How the function's value decides the regime entry.</param>
/// <param name="DependsOnState">Whether the function depends on a state.</param>
/// <param name="DependsOnTime">Whether the function depends on time explicitly.</param>
public sealed record SwitchDescription(string Text, SwitchKind Kind, bool DependsOnState, bool DependsOnTime)
{
    /// <summary>The regime entry that belongs to a value of the switching function.</summary>
    /// <param name="value">The value g.</param>
    /// <returns>1 or 0 for a relation, ⌊g⌋ for <see cref="SwitchKind.WholeNumber"/>; NaN gives 0 or NaN.</returns>
    public double SideOf(double value) => Kind switch
    {
        SwitchKind.Below => value < 0 ? 1 : 0,
        SwitchKind.NotAbove => value <= 0 ? 1 : 0,
        SwitchKind.Above => value > 0 ? 1 : 0,
        SwitchKind.NotBelow => value >= 0 ? 1 : 0,
        _ => Math.Floor(value),
    };
}
