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
        if (modifiers.Count == 0)
        {
            SyntaxToken next = FirstAfterModifiers(declaration);
            declaration = declaration.ReplaceToken(next, next.WithLeadingTrivia());
            return declaration.WithModifiers(SyntaxFactory.TokenList(added.WithLeadingTrivia(next.LeadingTrivia)));
        }

        int at = modifiers.IndexOf(SyntaxKind.PartialKeyword);
        if (at != 0) return declaration.WithModifiers(modifiers.Insert(at < 0 ? modifiers.Count : at, added));
        SyntaxToken first = modifiers[0];
        return declaration.WithModifiers(
            modifiers.Replace(first, first.WithLeadingTrivia()).Insert(0, added.WithLeadingTrivia(first.LeadingTrivia)));
    }

    /// <returns>The declaration without the modifier, or null if it has none of that kind.</returns>
    public static MemberDeclarationSyntax? Remove(MemberDeclarationSyntax declaration, params SyntaxKind[] kinds)
    {
        SyntaxToken gone = declaration.Modifiers.FirstOrDefault(modifier => kinds.Contains(modifier.Kind()));
        if (gone.IsKind(SyntaxKind.None)) return null;
        SyntaxToken next = gone.GetNextToken();
        if (!declaration.FullSpan.Contains(next.Span)) return null;
        // What stood before the modifier, such as a comment or the line's indentation, now stands before what followed it.
        MemberDeclarationSyntax moved = declaration.ReplaceToken(next, next.WithLeadingTrivia(gone.LeadingTrivia.AddRange(Telling(next.LeadingTrivia))));
        int at = declaration.Modifiers.IndexOf(gone);
        return moved.WithModifiers(moved.Modifiers.RemoveAt(at));
    }

    private static SyntaxTriviaList Telling(SyntaxTriviaList trivia) =>
        trivia.All(static part => part.IsKind(SyntaxKind.WhitespaceTrivia)) ? default : trivia;

    private static SyntaxToken FirstAfterModifiers(MemberDeclarationSyntax declaration)
    {
        int attributes = declaration.AttributeLists.Count;
        return attributes == 0 ? declaration.GetFirstToken() : declaration.AttributeLists[attributes - 1].GetLastToken().GetNextToken();
    }
}
