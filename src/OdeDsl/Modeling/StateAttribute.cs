namespace OdeDsl;

/// <summary>Marks a partial property of type <see langword="double"/> as a state of the model.</summary>
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
}
