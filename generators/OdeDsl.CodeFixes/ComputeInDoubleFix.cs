using System.Collections.Immutable;
using System.Composition;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.CodeFixes;

/// <summary>Takes a cast to <c>float</c> or <c>decimal</c> away, and calls <c>Math</c> instead of <c>MathF</c>.</summary>
[ExportCodeFixProvider(LanguageNames.CSharp, Name = nameof(ComputeInDoubleFix)), Shared]
public sealed class ComputeInDoubleFix : ModelCodeFix
{
    public override ImmutableArray<string> FixableDiagnosticIds { get; } = Ids(Descriptors.NotDoublePrecision);

    private protected override Change? Mend(SyntaxNode place, Diagnostic diagnostic) => place switch
    {
        CastExpressionSyntax { Type: PredefinedTypeSyntax type } cast when type.Keyword.IsKind(SyntaxKind.FloatKeyword) || type.Keyword.IsKind(SyntaxKind.DecimalKeyword) =>
            new($"Remove the cast to '{type}'", cast, cast.Expression.WithTriviaFrom(cast)),
        InvocationExpressionSyntax { Expression: MemberAccessExpressionSyntax { Expression: IdentifierNameSyntax { Identifier.ValueText: "MathF" } name } } =>
            new("Use 'Math'", name, SyntaxFactory.IdentifierName("Math").WithTriviaFrom(name)),
        _ => null,
    };
}
