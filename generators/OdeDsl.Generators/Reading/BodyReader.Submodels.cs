using System;
using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Reading;

/// <content>Submodels: members of other objects that are parts of the model run in place, each with its own numbers.</content>
internal sealed partial class BodyReader
{
    private static ModelScope Outermost(ModelScope scope) => scope.Parent is null ? scope : Outermost(scope.Parent);

    private static bool IsSubmodel(ISymbol member) => Attributes.Find(member, Attributes.Submodel) is not null;

    /// <summary>Reads something as a member of a model or submodel.</summary>
    private T At<T>(ModelScope scope, Func<T> read)
    {
        ModelScope before = _scope;
        _scope = scope;
        try
        {
            return read();
        }
        finally
        {
            _scope = before;
        }
    }

    /// <summary>A submodel, or a number that the model around this one gives; null if the property is neither.</summary>
    private Value? Part(IPropertySymbol property)
    {
        if (_scope.Connections.TryGetValue(property.OriginalDefinition, out ISymbol? giver))
            return At(_scope.Parent!, () => Call(giver, TimeFor(giver)));
        if (!IsSubmodel(property)) return null;
        return _scope.Find(property) is { } part ? new ModelValue(part) : UnknownValue.Instance; // Its problem is told where it is declared.
    }

    private Value[] TimeFor(ISymbol member) => member is IMethodSymbol { Parameters.Length: 1 } ? [new NumberValue(_graph.Leaf(Operator.Time))] : [];
}
