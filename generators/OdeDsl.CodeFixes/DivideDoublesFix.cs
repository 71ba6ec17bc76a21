using System.Collections.Immutable;
using System.Composition;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.CodeFixes;

/// <summary>Makes <c>1 / 2</c> the half that is meant: <c>1.0 / 2</c>.</summary>
[ExportCodeFixProvider(LanguageNames.CSharp, Name = nameof(DivideDoublesFix)), Shared]
public sealed class DivideDoublesFix : ModelCodeFix
{
    public override ImmutableArray<string> FixableDiagnosticIds { get; } = Ids(Descriptors.InexactDivision);

    private protected override Change? Mend(SyntaxNode place, Diagnostic diagnostic)
    {
        BinaryExpressionSyntax? division = place.FirstAncestorOrSelf<BinaryExpressionSyntax>(node =>
            node.IsKind(SyntaxKind.DivideExpression) && node.Span == diagnostic.Location.SourceSpan);
        if (division is null) return null;
        ExpressionSyntax dividend = division.Left;
        return new("Divide doubles", dividend, AsDouble(dividend));
    }

    private static ExpressionSyntax AsDouble(ExpressionSyntax number)
    {
        if (number is LiteralExpressionSyntax literal && literal.Token.Text.All(static character => character is >= '0' and <= '9'))
            return SyntaxFactory.ParseExpression(literal.Token.Text + ".0").WithTriviaFrom(number);
        ExpressionSyntax operand = number.WithoutTrivia();
        if (number is not (IdentifierNameSyntax or LiteralExpressionSyntax or ParenthesizedExpressionSyntax or MemberAccessExpressionSyntax))
            operand = SyntaxFactory.ParenthesizedExpression(operand);
        return SyntaxFactory.CastExpression(SyntaxFactory.PredefinedType(SyntaxFactory.Token(SyntaxKind.DoubleKeyword)), operand).WithTriviaFrom(number);
    }
}
