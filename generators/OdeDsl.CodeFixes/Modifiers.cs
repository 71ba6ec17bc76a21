using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace OdeDsl.CodeFixes;

/// <summary>Modifiers of declarations, added and taken away without moving comments.</summary>
internal static class Modifiers
{
    /// <summary>Adds a modifier after the others; <c>partial</c>, which must be the last, stays there.</summary>
    public static MemberDeclarationSyntax Add(MemberDeclarationSyntax declaration, SyntaxKind modifier)
    {
        SyntaxTokenList modifiers = declaration.Modifiers;
        SyntaxToken added = SyntaxFactory.Token(modifier).WithTrailingTrivia(SyntaxFactory.Space);
        int partial = modifiers.IndexOf(SyntaxKind.PartialKeyword);
        int at = partial < 0 ? modifiers.Count : partial;
        if (at > 0) return declaration.WithModifiers(modifiers.Insert(at, added));

        // Before the first word: what stood before that word, such as the line's indentation, now stands before this one.
        SyntaxToken next = partial < 0 ? FirstAfterAttributes(declaration) : modifiers[0];
        declaration = declaration.ReplaceToken(next, next.WithLeadingTrivia());
        return declaration.WithModifiers(declaration.Modifiers.Insert(0, added.WithLeadingTrivia(next.LeadingTrivia)));
    }

    /// <returns>The declaration without the first modifier of these kinds, and that word; null if it has none.</returns>
    public static (MemberDeclarationSyntax Declaration, string Word)? Remove(MemberDeclarationSyntax declaration, params SyntaxKind[] kinds)
    {
        SyntaxToken gone = declaration.Modifiers.FirstOrDefault(modifier => kinds.Contains(modifier.Kind()));
        if (gone.IsKind(SyntaxKind.None)) return null;
        int at = declaration.Modifiers.IndexOf(gone);
        SyntaxToken next = gone.GetNextToken();
        if (!declaration.FullSpan.Contains(next.Span)) return null;
        declaration = declaration.ReplaceToken(next, next.WithLeadingTrivia(Trivia.Join(gone.LeadingTrivia, next.LeadingTrivia)));
        return (declaration.WithModifiers(declaration.Modifiers.RemoveAt(at)), gone.Text);
    }

    private static SyntaxToken FirstAfterAttributes(MemberDeclarationSyntax declaration) =>
        declaration.AttributeLists.Count == 0
            ? declaration.GetFirstToken(includeZeroWidth: true)
            : declaration.AttributeLists[declaration.AttributeLists.Count - 1].GetLastToken(includeZeroWidth: true).GetNextToken(includeZeroWidth: true);
}
