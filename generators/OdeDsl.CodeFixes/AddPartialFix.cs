using System.Collections.Immutable;
using System.Composition;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.CodeFixes;

/// <summary>Writes <c>partial</c> into the declaration of a model, of a type around it, or of a state or parameter.</summary>
[ExportCodeFixProvider(LanguageNames.CSharp, Name = nameof(AddPartialFix)), Shared]
public sealed class AddPartialFix : ModelCodeFix
{
    public override ImmutableArray<string> FixableDiagnosticIds { get; } =
        Ids(Descriptors.ModelNotPartial, Descriptors.ContainerNotPartial, Descriptors.PropertyNotPartial);

    private protected override Change? Mend(SyntaxNode place, Diagnostic diagnostic)
    {
        MemberDeclarationSyntax? declaration = diagnostic.Id == Descriptors.PropertyNotPartial.Id
            ? place.FirstAncestorOrSelf<PropertyDeclarationSyntax>()
            : place.FirstAncestorOrSelf<TypeDeclarationSyntax>();
        if (declaration is null || declaration.Modifiers.Any(SyntaxKind.PartialKeyword)) return null;
        // With a body or a value of its own the property would be a second problem, of another kind.
        if (declaration is PropertyDeclarationSyntax property && !IsBare(property)) return null;
        return new("Add 'partial'", declaration, Modifiers.Add(declaration, SyntaxKind.PartialKeyword));
    }

    private static bool IsBare(PropertyDeclarationSyntax property) =>
        property is { Initializer: null, AccessorList: { } list }
        && list.Accessors.All(static accessor => accessor is { Body: null, ExpressionBody: null });
}
