namespace OdeDsl.Generators.Units;

/// <summary>What is known of the unit of an expression.</summary>
/// <param name="Unit">The unit; null where none is stated, and for zero, which fits every unit.</param>
/// <param name="IsBare">Whether it is made of bare numbers only.</param>
internal readonly record struct Measure(Unit? Unit, bool IsBare = false)
{
    public static Measure Unknown => default;

    /// <summary>The number zero.</summary>
    public static Measure Zero => new(null, true);

    public static Measure Bare => new(Unit.One, true);

    public static Measure Plain => new(Unit.One);
}
