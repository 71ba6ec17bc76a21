namespace OdeDsl;

/// <summary>
/// Marks a method as the action of an event: it runs where a guard crosses zero (a number) or changes (a condition), sets states and
/// modes, and the motion goes on from there. The method returns nothing and takes nothing, or <c>double time</c>.
/// </summary>
/// <param name="guard">The name of the guard, by <see langword="nameof"/>: a property or method of type double or bool.</param>
[AttributeUsage(AttributeTargets.Method)]
public sealed class EventAttribute(string guard) : Attribute
{
    /// <summary>The name of the guard.</summary>
    public string Guard { get; } = guard;

    /// <summary>Which crossings count.</summary>
    public GuardDirection Direction { get; set; } = GuardDirection.Rising;

    /// <summary>Whether the run ends here, after the action.</summary>
    public bool Terminal { get; set; }
}
