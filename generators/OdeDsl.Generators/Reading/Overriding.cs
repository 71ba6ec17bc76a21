using Microsoft.CodeAnalysis;

namespace OdeDsl.Generators.Reading;

/// <summary>Which implementation a call of a virtual member reaches.</summary>
internal static class Overriding
{
    /// <summary>Whether a class derived from the model may replace the member.</summary>
    public static bool CanBeOverridden(ISymbol member, INamedTypeSymbol model) =>
        (member.IsVirtual || member.IsAbstract || member.IsOverride) && !member.IsSealed && !model.IsSealed;

    /// <summary>The member that a call on a model reaches: the last override between the model and the class that declares it.</summary>
    public static ISymbol Reached(ISymbol member, INamedTypeSymbol model)
    {
        for (INamedTypeSymbol? type = model; type is not null; type = type.BaseType)
        {
            foreach (ISymbol candidate in type.GetMembers(member.Name))
            {
                for (ISymbol? step = candidate; step is not null; step = Overridden(step))
                {
                    if (SymbolEqualityComparer.Default.Equals(step.OriginalDefinition, member.OriginalDefinition)) return candidate;
                }
            }
        }

        return member;
    }

    private static ISymbol? Overridden(ISymbol member) => member switch
    {
        IMethodSymbol method => method.OverriddenMethod,
        IPropertySymbol property => property.OverriddenProperty,
        _ => null,
    };
}
