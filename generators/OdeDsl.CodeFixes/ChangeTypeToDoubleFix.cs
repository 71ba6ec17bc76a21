using System.Collections.Immutable;
using System.Composition;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.CodeFixes;

/// <summary>Makes a state, parameter, rate or observable of another type a <c>double</c>.</summary>
[ExportCodeFixProvider(LanguageNames.CSharp, Name = nameof(ChangeTypeToDoubleFix)), Shared]
public sealed class ChangeTypeToDoubleFix : ModelCodeFix
{
    public override ImmutableArray<string> FixableDiagnosticIds { get; } = Ids(Descriptors.PropertyNotDouble, Descriptors.EquationNotDouble);

    private protected override Change? Mend(SyntaxNode place, Diagnostic diagnostic)
    {
        TypeSyntax? type = place.FirstAncestorOrSelf<MemberDeclarationSyntax>() switch
        {
            BasePropertyDeclarationSyntax property => property.Type,
            MethodDeclarationSyntax method => method.ReturnType,
            _ => null,
        };
        if (type is null || type.IsMissing || type.Span != diagnostic.Location.SourceSpan) return null;
        TypeSyntax number = SyntaxFactory.PredefinedType(SyntaxFactory.Token(SyntaxKind.DoubleKeyword)).WithTriviaFrom(type);
        return new("Change the type to 'double'", type, number);
    }
}
