namespace OdeDsl;

/// <summary>
/// Marks a partial class as a differential-equation model. The generator adds property storage and a nested struct
/// <c>Equations</c> with allocation-free rates, analytic derivatives and a description.
/// </summary>
[AttributeUsage(AttributeTargets.Class, Inherited = false)]
public sealed class OdeModelAttribute : Attribute;
