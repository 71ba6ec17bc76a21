namespace OdeDsl;

/// <summary>
/// Marks a partial property of type <see langword="bool"/>, <see langword="int"/>, <see langword="double"/> or of an enumeration as a mode: a
/// discrete state that keeps its value until the action of an event sets another.
/// </summary>
/// <param name="initial">The value a new model starts with, of the property's type.</param>
[AttributeUsage(AttributeTargets.Property)]
public sealed class ModeAttribute(object initial) : Attribute
{
    /// <summary>The value a new model starts with.</summary>
    public object Initial { get; } = initial;

    /// <summary>The smallest value of a mode of type <see langword="int"/>.</summary>
    public int Lower { get; set; }

    /// <summary>The largest value of a mode of type <see langword="int"/>: at most 63 more than the smallest.</summary>
    public int Upper { get; set; } = 1;
}
