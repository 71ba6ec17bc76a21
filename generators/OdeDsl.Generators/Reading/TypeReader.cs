using System.Collections.Generic;
using System.Linq;
using System.Threading;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <summary>Reads where the model class stands, and whether generated code can be added there.</summary>
internal sealed class TypeReader(INamedTypeSymbol model, Location place, Problems problems, CancellationToken cancellation)
{
    /// <summary>The name of the struct that is generated into the model.</summary>
    public const string EquationsName = "Equations";

    /// <summary>C# 13 in the compiler's own counting.</summary>
    private const int LanguageWithPartialProperties = 1300;

    /// <returns>The chain of types, or null if nothing can be generated for this class.</returns>
    public TypeChain? Read(LanguageVersion language)
    {
        bool ok = CheckLanguage(language) & CheckModel() & CheckName();
        List<TypeLink> links = [];
        for (INamedTypeSymbol? type = model; type is not null; type = type.ContainingType)
        {
            ok &= CheckOpen(type);
            links.Insert(0, Link(type));
        }

        return ok ? new(Namespace(model.ContainingNamespace), new(links.ToArray()), MetadataName()) : null;
    }

    /// <summary>Names that generated members of the model must not have.</summary>
    public EquatableArray<string> TakenNames()
    {
        SortedSet<string> names = new(System.StringComparer.Ordinal);
        names.UnionWith(TypeParameters().Select(static parameter => parameter.Name));
        for (INamedTypeSymbol? type = model; type is not null; type = type.BaseType) names.UnionWith(type.MemberNames);
        names.UnionWith(model.GetTypeMembers().Select(static type => type.Name));
        names.Add(model.Name);
        return new(names.ToArray());
    }

    /// <summary>The type parameters of the model and of the types around it.</summary>
    private IEnumerable<ITypeParameterSymbol> TypeParameters()
    {
        for (INamedTypeSymbol? type = model; type is not null; type = type.ContainingType)
        {
            foreach (ITypeParameterSymbol parameter in type.TypeParameters) yield return parameter;
        }
    }

    private bool CheckLanguage(LanguageVersion language)
    {
        if ((int)language >= LanguageWithPartialProperties) return true;
        problems.Report(Descriptors.LanguageTooOld, place, model.Name, language.ToDisplayString());
        return false;
    }

    private bool CheckModel()
    {
        if (model.IsStatic) problems.Report(Descriptors.StaticModel, place, model.Name);
        else if (model.IsAbstract) problems.Report(Descriptors.AbstractModel, place, model.Name);
        else return true;
        return false;
    }

    private bool CheckName()
    {
        ISymbol? taker = model.Name == EquationsName ? model : null;
        for (INamedTypeSymbol? type = model; type is not null; type = type.BaseType) taker ??= type.GetMembers(EquationsName).FirstOrDefault();
        taker ??= TypeParameters().FirstOrDefault(static parameter => parameter.Name == EquationsName);
        if (taker is null) return true;
        Location found = taker.Locations[0].IsInSource ? taker.Locations[0] : place;
        problems.Report(Descriptors.ReservedName, found, taker.ToDisplayString(), model.Name);
        return false;
    }

    private bool CheckOpen(INamedTypeSymbol type)
    {
        bool isModel = SymbolEqualityComparer.Default.Equals(type, model);
        Location named = isModel ? place : type.Locations[0];
        if (!Declarations(type).Any(static declaration => declaration.Modifiers.Any(SyntaxKind.PartialKeyword)))
        {
            if (isModel) problems.Report(Descriptors.ModelNotPartial, place, model.Name);
            else problems.Report(Descriptors.ContainerNotPartial, named, type.Name, model.Name);
            return false;
        }

        if (!type.IsFileLocal) return true;
        problems.Report(Descriptors.FileLocalModel, named, type.Name);
        return false;
    }

    private IEnumerable<TypeDeclarationSyntax> Declarations(INamedTypeSymbol type) =>
        type.DeclaringSyntaxReferences.Select(reference => reference.GetSyntax(cancellation)).OfType<TypeDeclarationSyntax>();

    private static TypeLink Link(INamedTypeSymbol type)
    {
        string keyword = type.TypeKind switch
        {
            TypeKind.Interface => "interface",
            TypeKind.Struct => type.IsRecord ? "record struct" : "struct",
            _ => type.IsRecord ? "record" : "class",
        };
        string parameters = type.TypeParameters.IsEmpty
            ? ""
            : "<" + string.Join(", ", type.TypeParameters.Select(static parameter => UserText.Escaped(parameter.Name))) + ">";
        return new(keyword, UserText.Escaped(type.Name), parameters);
    }

    private static string Namespace(INamespaceSymbol space) => space.IsGlobalNamespace
        ? ""
        : space.ContainingNamespace.IsGlobalNamespace
            ? UserText.Escaped(space.Name)
            : Namespace(space.ContainingNamespace) + "." + UserText.Escaped(space.Name);

    private string MetadataName()
    {
        string name = model.MetadataName;
        for (INamedTypeSymbol? type = model.ContainingType; type is not null; type = type.ContainingType)
            name = type.MetadataName + "+" + name;
        return model.ContainingNamespace.IsGlobalNamespace ? name : model.ContainingNamespace.ToDisplayString(PlainNames) + "." + name;
    }

    private static readonly SymbolDisplayFormat PlainNames = new(
        typeQualificationStyle: SymbolDisplayTypeQualificationStyle.NameAndContainingTypesAndNamespaces);
}
