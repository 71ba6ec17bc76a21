namespace OdeDsl;

/// <summary>
/// States the unit of a constant, a helper member, an argument or a result, so that units are checked through it. A member without a stated unit
/// gets the one that its formula gives; a bare number in a formula has none.
/// </summary>
/// <param name="unit">The unit, in the notation that <c>docs/units.md</c> describes, for example <c>m/s2</c>.</param>
[AttributeUsage(AttributeTargets.Field | AttributeTargets.Property | AttributeTargets.Method | AttributeTargets.Parameter)]
public sealed class UnitAttribute(string unit) : Attribute
{
    /// <summary>The unit.</summary>
    public string Unit { get; } = unit;
}
