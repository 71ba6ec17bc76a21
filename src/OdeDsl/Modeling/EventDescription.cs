namespace OdeDsl.Modeling;

/// <summary>An event of a model.</summary>
/// <param name="Name">The name of the action.</param>
/// <param name="Guard">The name of the guard.</param>
/// <param name="Direction">Which crossings count.</param>
/// <param name="IsTerminal">Whether a run ends here.</param>
/// <param name="IsCondition">Whether the guard is a condition: it then changes where a switching function does.</param>
/// <param name="Text">The action as the user wrote it.</param>
/// <param name="Summary">The action's documentation summary, or the empty string.</param>
public sealed record EventDescription(
    string Name, string Guard, GuardDirection Direction, bool IsTerminal, bool IsCondition, string Text, string Summary = "");
