using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;

namespace OdeDsl.CodeFixes;

/// <summary>White space and comments around what a fix moves.</summary>
internal static class Trivia
{
    /// <summary>What stands before a word once the word before it is gone: comments of both stay, indentation does not double.</summary>
    public static SyntaxTriviaList Join(SyntaxTriviaList gone, SyntaxTriviaList next) =>
        next.All(static part => part.IsKind(SyntaxKind.WhitespaceTrivia)) ? gone : gone.AddRange(next);

    /// <summary>The white space at the start of a node's line, as far as it stands before the node.</summary>
    public static SyntaxTriviaList Indentation(SyntaxNode node) =>
        SyntaxFactory.TriviaList(node.GetLeadingTrivia().Reverse().TakeWhile(static part => part.IsKind(SyntaxKind.WhitespaceTrivia)).Reverse());

    /// <summary>The line end that a file uses.</summary>
    public static SyntaxTrivia LineEnd(SyntaxNode node) =>
        node.SyntaxTree.GetRoot().DescendantTrivia().FirstOrDefault(static part => part.IsKind(SyntaxKind.EndOfLineTrivia)) is var found
        && found.IsKind(SyntaxKind.EndOfLineTrivia) ? found : SyntaxFactory.LineFeed;
}
