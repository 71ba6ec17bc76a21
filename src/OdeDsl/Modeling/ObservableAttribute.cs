namespace OdeDsl;

/// <summary>
/// Marks a property or method whose value is worth watching along a run. A method may take one argument <c>double time</c>.
/// </summary>
[AttributeUsage(AttributeTargets.Property | AttributeTargets.Method)]
public sealed class ObservableAttribute : Attribute
{
    /// <summary>The unit, shown beside every value of this observable.</summary>
    public string Unit { get; set; } = "";
}
