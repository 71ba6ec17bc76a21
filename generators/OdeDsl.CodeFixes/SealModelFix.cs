using System.Collections.Immutable;
using System.Composition;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.CodeFixes;

/// <summary>Seals a model whose equations depend on members that a derived class could replace.</summary>
[ExportCodeFixProvider(LanguageNames.CSharp, Name = nameof(SealModelFix)), Shared]
public sealed class SealModelFix : ModelCodeFix
{
    public override ImmutableArray<string> FixableDiagnosticIds { get; } = Ids(Descriptors.MemberOverridable);

    private protected override Change? Mend(SyntaxNode place, Diagnostic diagnostic)
    {
        if (place.FirstAncestorOrSelf<TypeDeclarationSyntax>(IsMarked) is not { } model) return null;
        bool isFixed = model.Modifiers.Any(SyntaxKind.SealedKeyword) || model.Modifiers.Any(SyntaxKind.AbstractKeyword) || model.Modifiers.Any(SyntaxKind.StaticKeyword);
        // A sealed class must not declare virtual members of its own.
        bool declares = model.Members.Any(static member => member.Modifiers.Any(SyntaxKind.VirtualKeyword));
        return isFixed || declares ? null : new($"Seal '{model.Identifier.ValueText}'", model, Modifiers.Add(model, SyntaxKind.SealedKeyword));
    }

    private static bool IsMarked(TypeDeclarationSyntax type) => type.AttributeLists.SelectMany(static list => list.Attributes)
        .Any(static attribute => attribute.Name.ToString().Split('.').Last() is "OdeModel" or "OdeModelAttribute");
}
