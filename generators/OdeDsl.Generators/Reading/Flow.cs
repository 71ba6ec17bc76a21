using System.Collections.Immutable;
using Microsoft.CodeAnalysis;

namespace OdeDsl.Generators.Reading;

/// <summary>
/// What is known at a point of a body: the values of its variables, and what happened to the executions that left the way to this
/// point earlier. The variables are those of the executions that are still on the way.
/// </summary>
/// <param name="Variables">Locals and arguments.</param>
/// <param name="Returned">The executions that have returned.</param>
/// <param name="Result">What those returned.</param>
/// <param name="Broken">The executions that have left the innermost switch.</param>
/// <param name="AfterBreak">The variables of those.</param>
/// <param name="Outside">The executions that had left a switch around the innermost one when that was entered.</param>
internal sealed record Flow(
    ImmutableDictionary<ISymbol, Value> Variables,
    int Returned,
    Value? Result,
    int Broken,
    ImmutableDictionary<ISymbol, Value> AfterBreak,
    int Outside)
{
    /// <summary>The variables of the executions that returned from an action.</summary>
    public ImmutableDictionary<ISymbol, Value> AfterReturn { get; init; } = ImmutableDictionary<ISymbol, Value>.Empty;
}
