using System.Collections.Immutable;
using System.Composition;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.CodeFixes;

/// <summary>Takes a modifier away that a model, a state, a parameter, a rate or an observable must not have.</summary>
[ExportCodeFixProvider(LanguageNames.CSharp, Name = nameof(RemoveModifierFix)), Shared]
public sealed class RemoveModifierFix : ModelCodeFix
{
    public override ImmutableArray<string> FixableDiagnosticIds { get; } = Ids(
        Descriptors.FileLocalModel, Descriptors.StaticModel, Descriptors.PropertyStatic, Descriptors.PropertyOverridable, Descriptors.EquationStatic);

    private protected override Change? Mend(SyntaxNode place, Diagnostic diagnostic)
    {
        SyntaxKind[] unwanted = diagnostic.Id == Descriptors.FileLocalModel.Id ? [SyntaxKind.FileKeyword]
            : diagnostic.Id == Descriptors.PropertyOverridable.Id ? [SyntaxKind.VirtualKeyword, SyntaxKind.OverrideKeyword, SyntaxKind.AbstractKeyword]
            : [SyntaxKind.StaticKeyword];
        if (place.FirstAncestorOrSelf<MemberDeclarationSyntax>() is not { } declaration) return null;
        return Modifiers.Remove(declaration, unwanted) is (var mended, var word) ? new($"Remove '{word}'", declaration, mended) : null;
    }
}
