namespace OdeDsl;

/// <summary>
/// Marks the property or method that computes the time derivative of a state. A method may take one argument
/// <c>double time</c>. The rate of a vector takes the index of an element, <c>int i</c>, or its row and column.
/// </summary>
/// <param name="state">The name of the state, by <see langword="nameof"/>.</param>
[AttributeUsage(AttributeTargets.Property | AttributeTargets.Method)]
public sealed class RateAttribute(string state) : Attribute
{
    /// <summary>The name of the state this member is the rate of.</summary>
    public string State { get; } = state;
}
