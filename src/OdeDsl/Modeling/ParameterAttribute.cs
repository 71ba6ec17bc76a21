namespace OdeDsl;

/// <summary>
/// Marks a partial property of type <see langword="double"/> as a parameter: constant during a run, free between runs. One of type
/// <c>double[]</c> or <c>double[,]</c> is a vector of parameters; one of type <see langword="int"/> is fixed when the model is made and can
/// be the length of vectors.
/// </summary>
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

    /// <summary>
    /// The length of a <c>double[]</c>: a whole number, or the name of a parameter of type <see langword="int"/> by <see langword="nameof"/>.
    /// </summary>
    public object? Length { get; set; }

    /// <summary>The number of rows of a <c>double[,]</c>, likewise.</summary>
    public object? Rows { get; set; }

    /// <summary>The number of columns of a <c>double[,]</c>, likewise.</summary>
    public object? Columns { get; set; }
}
