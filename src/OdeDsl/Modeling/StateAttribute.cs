namespace OdeDsl;

/// <summary>
/// Marks a partial property of type <see langword="double"/> as a state of the model; or one of type <c>double[]</c> or <c>double[,]</c> as
/// a vector of states with the length, or the rows and columns, given here.
/// </summary>
[AttributeUsage(AttributeTargets.Property)]
public sealed class StateAttribute : Attribute
{
    /// <summary>The value a new model starts from, in the state's unit.</summary>
    public double Initial { get; set; }

    /// <summary>The lower bound of the region that analyses search, in the state's unit. Simulation does not enforce it.</summary>
    public double Lower { get; set; } = double.NegativeInfinity;

    /// <summary>The upper bound of the region that analyses search, in the state's unit. Simulation does not enforce it.</summary>
    public double Upper { get; set; } = double.PositiveInfinity;

    /// <summary>The unit, shown beside every value of this state.</summary>
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
