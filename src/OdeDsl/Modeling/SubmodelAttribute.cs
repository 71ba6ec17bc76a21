namespace OdeDsl;

/// <summary>
/// Marks a property that holds another model as a part of this one. The states, parameters and observables of the part belong to the whole, under names
/// such as <c>Upper.Level</c>, and the equations of both may read each other's numbers.
/// </summary>
/// <remarks>
/// Write <c>[Submodel] public Tank Upper { get; } = new() { Area = 3 };</c>, or a partial property. What the whole gives to its parts is stated by
/// <see cref="InputAttribute"/>. Each property needs an object of its own: an object that is two parts at once has one set of numbers only.
/// </remarks>
[AttributeUsage(AttributeTargets.Property)]
public sealed class SubmodelAttribute : Attribute;
