using System.Collections.Immutable;
using System.Composition;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.CodeFixes;

/// <summary>Adds <c>get;</c> to a state or parameter.</summary>
[ExportCodeFixProvider(LanguageNames.CSharp, Name = nameof(AddGetterFix)), Shared]
public sealed class AddGetterFix : ModelCodeFix
{
    public override ImmutableArray<string> FixableDiagnosticIds { get; } = Ids(Descriptors.PropertyWithoutGetter);

    private protected override Change? Mend(SyntaxNode place, Diagnostic diagnostic)
    {
        if (place.FirstAncestorOrSelf<PropertyDeclarationSyntax>() is not { AccessorList: { } list }) return null;
        if (list.Accessors.Any(SyntaxKind.GetAccessorDeclaration)) return null;
        AccessorDeclarationSyntax getter = SyntaxFactory.AccessorDeclaration(SyntaxKind.GetAccessorDeclaration)
            .WithSemicolonToken(SyntaxFactory.Token(SyntaxKind.SemicolonToken))
            .WithTrailingTrivia(SyntaxFactory.Space);
        if (list.Accessors.Count > 0) getter = getter.WithLeadingTrivia(list.Accessors[0].GetLeadingTrivia());
        return new("Add 'get;'", list, list.WithAccessors(list.Accessors.Insert(0, getter)));
    }
}
