using System.Collections.Generic;
using System.Linq;
using System.Threading;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace OdeDsl.Generators.Reading;

/// <summary>Finds the source of members, in whichever file and part it stands.</summary>
internal static class Bodies
{
    /// <summary>
    /// The node whose bound operation is the body of a method, local function or property getter: an accessor, a method, a local
    /// function or, for <c>Name => expression</c>, the arrow clause. Null where there is no body in this compilation.
    /// </summary>
    public static SyntaxNode? Find(ISymbol member, Compilation compilation, CancellationToken cancellation)
    {
        if (member is IMethodSymbol { PartialImplementationPart: { } implementation }) member = implementation;
        foreach (SyntaxReference reference in member.OriginalDefinition.DeclaringSyntaxReferences)
        {
            if (!compilation.ContainsSyntaxTree(reference.SyntaxTree)) continue;
            if (BodyOf(reference.GetSyntax(cancellation)) is { } body) return body;
        }

        return member is IPropertySymbol property ? ImplementingPart(property, compilation, cancellation) : null;
    }

    /// <summary>
    /// The body in the implementing part of a partial property that the user wrote. (The compiler the generator is built
    /// against has no symbol for it yet.)
    /// </summary>
    private static SyntaxNode? ImplementingPart(IPropertySymbol property, Compilation compilation, CancellationToken cancellation) =>
        PartialProperties(property.ContainingType, compilation, cancellation)
            .Where(part => part.Identifier.ValueText == property.Name)
            .Select(BodyOf)
            .FirstOrDefault(static body => body is not null);

    /// <summary>
    /// The names of the partial properties of a class that the user implements, found in one pass: to ask for each property would look
    /// through all members each time.
    /// </summary>
    public static HashSet<string> ImplementedPartialProperties(INamedTypeSymbol type, Compilation compilation, CancellationToken cancellation) =>
        [.. PartialProperties(type, compilation, cancellation)
            .Where(static part => BodyOf(part) is not null)
            .Select(static part => part.Identifier.ValueText)];

    private static IEnumerable<PropertyDeclarationSyntax> PartialProperties(INamedTypeSymbol type, Compilation compilation, CancellationToken cancellation) =>
        type.DeclaringSyntaxReferences
            .Where(reference => compilation.ContainsSyntaxTree(reference.SyntaxTree))
            .Select(reference => reference.GetSyntax(cancellation))
            .OfType<TypeDeclarationSyntax>()
            .SelectMany(static part => part.Members)
            .OfType<PropertyDeclarationSyntax>()
            .Where(static part => part.Modifiers.Any(SyntaxKind.PartialKeyword));

    public static bool IsPartial(IPropertySymbol property, CancellationToken cancellation) =>
        property.OriginalDefinition.DeclaringSyntaxReferences
            .Select(reference => reference.GetSyntax(cancellation))
            .OfType<PropertyDeclarationSyntax>()
            .Any(static declaration => declaration.Modifiers.Any(SyntaxKind.PartialKeyword));

    private static SyntaxNode? BodyOf(SyntaxNode declaration) => declaration switch
    {
        PropertyDeclarationSyntax { ExpressionBody: { } arrow } => arrow,
        PropertyDeclarationSyntax { AccessorList: { } accessors } => accessors.Accessors.FirstOrDefault(static accessor =>
            accessor.IsKind(SyntaxKind.GetAccessorDeclaration) && (accessor.Body is not null || accessor.ExpressionBody is not null)),
        MethodDeclarationSyntax method when method.Body is not null || method.ExpressionBody is not null => method,
        LocalFunctionStatementSyntax function when function.Body is not null || function.ExpressionBody is not null => function,
        _ => null,
    };
}
