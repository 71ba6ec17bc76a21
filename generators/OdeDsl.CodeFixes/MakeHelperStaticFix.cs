using System.Collections.Immutable;
using System.Composition;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.CodeFixes;

/// <summary>Makes a helper static that uses nothing of the model.</summary>
[ExportCodeFixProvider(LanguageNames.CSharp, Name = nameof(MakeHelperStaticFix)), Shared]
public sealed class MakeHelperStaticFix : ModelCodeFix
{
    public override ImmutableArray<string> FixableDiagnosticIds { get; } = Ids(Descriptors.HelperNotStatic);

    private protected override Change? Mend(SyntaxNode place, Diagnostic diagnostic)
    {
        if (place.FirstAncestorOrSelf<MemberDeclarationSyntax>() is not { Parent: TypeDeclarationSyntax type } helper) return null;
        string? name = helper switch
        {
            MethodDeclarationSyntax method => method.Identifier.ValueText,
            PropertyDeclarationSyntax property => property.Identifier.ValueText,
            _ => null,
        };
        if (name is null || helper.Modifiers.Any(SyntaxKind.StaticKeyword)) return null;
        // Called as 'this.Name' or 'other.Name' it would no longer compile.
        bool isCalledOnObject = type.DescendantNodes().OfType<MemberAccessExpressionSyntax>().Any(access => access.Name.Identifier.ValueText == name);
        return isCalledOnObject ? null : new($"Make '{name}' static", helper, Modifiers.Add(helper, SyntaxKind.StaticKeyword));
    }
}
