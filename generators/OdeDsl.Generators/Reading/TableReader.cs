using System.Linq;
using System.Threading;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <summary>Reads the declarations of tables.</summary>
internal static class TableReader
{
    private static readonly SymbolDisplayFormat Reached = SymbolDisplayFormat.FullyQualifiedFormat
        .AddMiscellaneousOptions(SymbolDisplayMiscellaneousOptions.EscapeKeywordIdentifiers)
        .WithMemberOptions(SymbolDisplayMemberOptions.IncludeContainingType);

    public static bool IsTable(ITypeSymbol? type) =>
        type is { Name: "Table", ContainingType: null, ContainingNamespace: { Name: Attributes.Namespace, ContainingNamespace.IsGlobalNamespace: true } };

    /// <summary>Reports marked members of the model that cannot be tables.</summary>
    public static void Check(INamedTypeSymbol model, Compilation compilation, Problems problems, CancellationToken cancellation)
    {
        foreach (ISymbol member in model.GetMembers())
        {
            if (Attributes.Find(member, Attributes.Table) is not null && !IsFixed(member, compilation, cancellation))
                problems.Report(Descriptors.TableNotFixed, member.Locations[0], member.Name);
        }
    }

    /// <summary>Whether a member is one table for all models and all times: static, and set by nothing but its initializer.</summary>
    public static bool IsFixed(ISymbol member, Compilation compilation, CancellationToken cancellation) => member.IsStatic && member switch
    {
        IFieldSymbol field => IsTable(field.Type) && field.IsReadOnly,
        IPropertySymbol property => IsTable(property.Type) && property is { SetMethod: null, RefKind: RefKind.None }
            && Bodies.Find(property, compilation, cancellation) is null
            && property.DeclaringSyntaxReferences.All(reference => reference.GetSyntax(cancellation) is PropertyDeclarationSyntax { Initializer: not null }),
        _ => false,
    };

    public static TableDefinition Define(ISymbol member, AttributeData mark) => new(
        member.Name,
        Attributes.Named(mark, "Unit", "") ?? "",
        Attributes.Named(mark, "ArgumentUnit", "") ?? "",
        member.ToDisplayString(Reached));
}
