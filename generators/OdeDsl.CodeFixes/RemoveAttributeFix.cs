using System.Collections.Immutable;
using System.Composition;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.CodeFixes;

/// <summary>Takes an attribute away that has no effect or contradicts another.</summary>
[ExportCodeFixProvider(LanguageNames.CSharp, Name = nameof(RemoveAttributeFix)), Shared]
public sealed class RemoveAttributeFix : ModelCodeFix
{
    public override ImmutableArray<string> FixableDiagnosticIds { get; } = Ids(
        Descriptors.DuplicateModelAttribute, Descriptors.AttributeOutsideModel, Descriptors.TwoRoles, Descriptors.AngleWithoutState);

    private protected override Change? Mend(SyntaxNode place, Diagnostic diagnostic)
    {
        if (place.FirstAncestorOrSelf<AttributeSyntax>() is not { Parent: AttributeListSyntax list } attribute) return null;
        string title = $"Remove [{attribute.Name}]";
        if (list.Attributes.Count > 1) return new(title, list, list.WithAttributes(list.Attributes.Remove(attribute)));
        return list.Parent is MemberDeclarationSyntax declaration ? WithoutList(title, declaration, list) : null;
    }

    /// <summary>Takes the brackets away too, and their line if they have one of their own.</summary>
    private static Change? WithoutList(string title, MemberDeclarationSyntax declaration, AttributeListSyntax list)
    {
        int at = declaration.AttributeLists.IndexOf(list);
        SyntaxToken next = list.GetLastToken(includeZeroWidth: true).GetNextToken(includeZeroWidth: true);
        if (!declaration.FullSpan.Contains(next.Span)) return null;
        MemberDeclarationSyntax mended = declaration.ReplaceToken(next, next.WithLeadingTrivia(Trivia.Join(list.GetLeadingTrivia(), next.LeadingTrivia)));
        return new(title, declaration, mended.WithAttributeLists(mended.AttributeLists.RemoveAt(at)));
    }
}
