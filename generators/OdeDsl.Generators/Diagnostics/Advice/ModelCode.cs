using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Diagnostics.Advice;

/// <summary>What the advice asks of code: does it stand in a model, and what of the model does it mention?</summary>
internal static class ModelCode
{
    public static bool IsModel(INamedTypeSymbol? type) =>
        type is not null && type.GetAttributes().Any(static attribute => Attributes.Is(attribute, Attributes.Model));

    public static bool IsState(ISymbol member) => Attributes.Find(member, Attributes.State) is not null;

    public static bool IsParameter(ISymbol member) => Attributes.Find(member, Attributes.Parameter) is not null;

    /// <summary>Whether a member carries any of our attributes, those that are yet to be invented included.</summary>
    public static bool IsMarked(ISymbol member) => member.GetAttributes().Any(static attribute =>
        attribute.AttributeClass?.ContainingNamespace is { Name: Attributes.Namespace, ContainingNamespace.IsGlobalNamespace: true });

    /// <summary>The member that holds an operation: for an accessor, its property.</summary>
    public static ISymbol Member(ISymbol containing) =>
        containing is IMethodSymbol { AssociatedSymbol: IPropertySymbol property } ? property : containing;

    /// <summary>Whether the value of an expression is seen to depend on a state or on the time, without looking into helpers.</summary>
    public static bool MentionsMotion(IOperation operation) => operation.DescendantsAndSelf().Any(static part => part switch
    {
        IPropertyReferenceOperation reference => IsState(reference.Property),
        IParameterReferenceOperation { Parameter: { Name: "time" or "t", ContainingSymbol: IMethodSymbol method } } => IsMarked(method),
        _ => false,
    });

    public static bool IsDouble(IOperation operation) => operation.Type?.SpecialType == SpecialType.System_Double;
}
