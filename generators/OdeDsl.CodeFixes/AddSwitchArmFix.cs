using System.Collections.Immutable;
using System.Composition;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.CodeFixes;

/// <summary>Adds an arm for all other inputs to a switch expression; not a number, until the user writes what it is.</summary>
[ExportCodeFixProvider(LanguageNames.CSharp, Name = nameof(AddSwitchArmFix)), Shared]
public sealed class AddSwitchArmFix : ModelCodeFix
{
    public override ImmutableArray<string> FixableDiagnosticIds { get; } = Ids(Descriptors.SwitchWithoutMatch);

    private protected override Change? Mend(SyntaxNode place, Diagnostic diagnostic)
    {
        if (place.FirstAncestorOrSelf<SwitchExpressionSyntax>() is not { Arms.Count: > 0 } choice) return null;
        SeparatedSyntaxList<SwitchExpressionArmSyntax> arms = choice.Arms;
        SwitchExpressionArmSyntax last = arms[arms.Count - 1];
        SwitchExpressionArmSyntax rest = SyntaxFactory.SwitchExpressionArm(SyntaxFactory.DiscardPattern(), SyntaxFactory.ParseExpression("double.NaN"))
            .NormalizeWhitespace()
            .WithLeadingTrivia(last.GetLeadingTrivia());
        if (arms.SeparatorCount == arms.Count)
        {
            // A comma after the last arm stays after the last arm.
            SyntaxToken comma = arms.GetSeparator(arms.Count - 1);
            return Changed(choice, arms.GetWithSeparators().Add(rest).Add(comma.WithoutTrivia().WithTrailingTrivia(comma.TrailingTrivia)));
        }

        SyntaxToken added = SyntaxFactory.Token(SyntaxKind.CommaToken).WithTrailingTrivia(Follows(last) ? last.GetTrailingTrivia() : [SyntaxFactory.Space]);
        SyntaxNodeOrTokenList list = arms.GetWithSeparators().Replace(last, last.WithoutTrailingTrivia());
        return Changed(choice, list.Add(added).Add(rest.WithTrailingTrivia(last.GetTrailingTrivia())));
    }

    private static bool Follows(SyntaxNode node) => node.GetTrailingTrivia().Any(SyntaxKind.EndOfLineTrivia);

    private static Change Changed(SwitchExpressionSyntax choice, SyntaxNodeOrTokenList arms) =>
        new("Add an arm for all other inputs", choice, choice.WithArms(SyntaxFactory.SeparatedList<SwitchExpressionArmSyntax>(arms)));
}
