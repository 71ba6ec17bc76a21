namespace OdeDsl;

/// <summary>
/// Declares that a state lives on a circle: values that differ by a whole number of periods are the same position.
/// The rates must have this period in the state.
/// </summary>
/// <param name="period">The period, in the state's unit; one turn in radians by default.</param>
[AttributeUsage(AttributeTargets.Property)]
public sealed class AngleAttribute(double period = Math.Tau) : Attribute
{
    /// <summary>The period, in the state's unit.</summary>
    public double Period { get; } = period;
}
