namespace OdeDsl;

/// <summary>Marks a partial property of type <see langword="double"/> as a parameter: constant during a run, free between runs.</summary>
/// <param name="value">The value a new model starts with, in the parameter's unit.</param>
[AttributeUsage(AttributeTargets.Property)]
public sealed class ParameterAttribute(double value) : Attribute
{
    /// <summary>The value a new model starts with, in the parameter's unit.</summary>
    public double Value { get; } = value;

    /// <summary>The lower bound of the range that analyses explore.</summary>
    public double Lower { get; set; } = double.NegativeInfinity;

    /// <summary>The upper bound of the range that analyses explore.</summary>
    public double Upper { get; set; } = double.PositiveInfinity;

    /// <summary>The unit, shown beside every value of this parameter.</summary>
    public string Unit { get; set; } = "";
}
