using System.Collections.Generic;
using System.Linq;
using System.Threading;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace OdeDsl.Generators.Reading;

/// <summary>Whether a read-only member may get a value elsewhere than in its initializer.</summary>
internal static class Constructors
{
    /// <summary>
    /// Whether a constructor or an init accessor of the declaring type mentions the member's name. Cautious: a mention need not be an
    /// assignment, but without one there is none.
    /// </summary>
    public static bool Mention(ISymbol member, CancellationToken cancellation) =>
        member.ContainingType.OriginalDefinition.DeclaringSyntaxReferences
            .Select(reference => reference.GetSyntax(cancellation))
            .OfType<TypeDeclarationSyntax>()
            .SelectMany(static type => type.Members)
            .SelectMany(Setters)
            .SelectMany(static setter => setter.DescendantNodes())
            .OfType<IdentifierNameSyntax>()
            .Any(name => name.Identifier.ValueText == member.Name);

    /// <summary>
    /// Whether static initializers of <paramref name="type"/> mention the type whose initializer reads from it. Which of the two types
    /// is set first, and what the other then finds, depends on which one the program touches first.
    /// </summary>
    public static bool InitializersMention(INamedTypeSymbol type, ISymbol reader, CancellationToken cancellation) =>
        !SymbolEqualityComparer.Default.Equals(type.OriginalDefinition, reader.ContainingType.OriginalDefinition)
        && type.GetMembers()
            .Where(static member => member is IFieldSymbol { IsStatic: true, IsConst: false } or IPropertySymbol { IsStatic: true })
            .SelectMany(static member => member.DeclaringSyntaxReferences)
            .SelectMany(reference => reference.GetSyntax(cancellation).DescendantNodes())
            .OfType<IdentifierNameSyntax>()
            .Any(name => name.Identifier.ValueText == reader.ContainingType.Name);

    private static IEnumerable<SyntaxNode> Setters(MemberDeclarationSyntax member) => member switch
    {
        ConstructorDeclarationSyntax constructor => [constructor],
        PropertyDeclarationSyntax { AccessorList: { } accessors } =>
            accessors.Accessors.Where(static accessor => accessor.IsKind(SyntaxKind.InitAccessorDeclaration)),
        _ => [],
    };
}
