using System.Collections.Immutable;
using System.Composition;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.CodeFixes;

/// <summary>
/// Adds the rate that a state lacks. Its formula is left to the user: until it is written the rate is not a number, so that nobody can
/// take it for a result.
/// </summary>
[ExportCodeFixProvider(LanguageNames.CSharp, Name = nameof(AddRateFix)), Shared]
public sealed class AddRateFix : ModelCodeFix
{
    public override ImmutableArray<string> FixableDiagnosticIds { get; } = Ids(Descriptors.MissingRate);

    private protected override Change? Mend(SyntaxNode place, Diagnostic diagnostic)
    {
        if (place.FirstAncestorOrSelf<PropertyDeclarationSyntax>() is not { Parent: TypeDeclarationSyntax type } state || state.Identifier.IsMissing) return null;
        string rate = FreeName(type, state.Identifier.ValueText + "Rate");
        string arguments = Arguments(state.Type);
        string text = $"[Rate(nameof({state.Identifier.Text}))] private double {rate}{arguments} => double.NaN;";
        if (SyntaxFactory.ParseMemberDeclaration(text) is not { } member) return null;
        SyntaxTrivia lineEnd = Trivia.LineEnd(type);
        member = member.WithLeadingTrivia(Trivia.Indentation(state)).WithTrailingTrivia(lineEnd);

        // The rate needs a line of its own even where the state shares its line with what follows.
        bool endsLine = state.GetTrailingTrivia().Any(SyntaxKind.EndOfLineTrivia);
        PropertyDeclarationSyntax before = endsLine ? state : state.WithTrailingTrivia(lineEnd);
        SyntaxList<MemberDeclarationSyntax> members = type.Members.ReplaceRange(state, [before, member]);
        return new($"Add the rate '{rate}'", type, type.WithMembers(members));
    }

    /// <summary>The rate of a vector is computed element by element.</summary>
    private static string Arguments(TypeSyntax type) => type is not ArrayTypeSyntax { RankSpecifiers: [{ Rank: var rank }, ..] } ? ""
        : rank == 1 ? "(int i)" : "(int row, int column)";

    private static string FreeName(TypeDeclarationSyntax type, string wanted)
    {
        string[] taken = type.Members.SelectMany(static member => member.DescendantTokens())
            .Where(static token => token.IsKind(SyntaxKind.IdentifierToken))
            .Select(static token => token.ValueText)
            .ToArray();
        string name = wanted;
        for (int number = 2; taken.Contains(name); number++) name = wanted + number;
        return name;
    }
}
