namespace OdeDsl;

/// <summary>
/// Marks a partial class as a differential-equation model. The generator adds property storage and a nested struct
/// <c>Equations</c> with allocation-free rates, analytic derivatives and a description.
/// </summary>
[AttributeUsage(AttributeTargets.Class, Inherited = false)]
public sealed class OdeModelAttribute : Attribute
{
    /// <summary>The unit of time, for example <c>s</c> or <c>d</c>, shown beside every duration and rate; empty if the model names none.</summary>
    public string TimeUnit { get; set; } = "";
}
