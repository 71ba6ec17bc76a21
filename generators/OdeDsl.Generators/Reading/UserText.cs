using System;
using System.Text;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace OdeDsl.Generators.Reading;

/// <summary>The user's own text, to be shown to people: comments dropped, white space folded.</summary>
internal static class UserText
{
    public static string Of(SyntaxNode node)
    {
        StringBuilder text = new();
        bool apart = false;
        foreach (SyntaxToken token in node.DescendantTokens())
        {
            if (token.Text.Length == 0) continue;
            if (text.Length > 0 && (apart || token.HasLeadingTrivia)) text.Append(' ');
            text.Append(Folded(token.Text));
            apart = token.HasTrailingTrivia;
        }

        return text.ToString();
    }

    /// <summary>The text of a member's equation: the expression where there is one, otherwise the statements.</summary>
    /// <param name="body">As <see cref="Bodies.Find"/> gives it.</param>
    public static string OfBody(SyntaxNode body)
    {
        (ArrowExpressionClauseSyntax? arrow, BlockSyntax? block) = body switch
        {
            ArrowExpressionClauseSyntax clause => (clause, null),
            AccessorDeclarationSyntax accessor => (accessor.ExpressionBody, accessor.Body),
            BaseMethodDeclarationSyntax method => (method.ExpressionBody, method.Body),
            _ => ((ArrowExpressionClauseSyntax?)null, (BlockSyntax?)null),
        };
        if (arrow is not null) return Of(arrow.Expression);
        if (block is { Statements: [ReturnStatementSyntax { Expression: { } expression }] }) return Of(expression);
        return Of((SyntaxNode?)block ?? body);
    }

    /// <summary>A text on one line.</summary>
    public static string Folded(string text)
    {
        if (text.IndexOfAny(LineEnds) < 0) return text;
        return string.Join(" ", text.Split(LineEnds, StringSplitOptions.RemoveEmptyEntries));
    }

    /// <summary>An identifier as it must be written in code.</summary>
    public static string Escaped(string name) =>
        SyntaxFacts.GetKeywordKind(name) != SyntaxKind.None || SyntaxFacts.GetContextualKeywordKind(name) != SyntaxKind.None
            ? "@" + name
            : name;

    private static readonly char[] LineEnds = ['\r', '\n', '\u0085', '\u2028', '\u2029'];
}
