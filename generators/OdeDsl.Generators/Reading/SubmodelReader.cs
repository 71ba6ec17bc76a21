using System.Collections.Generic;
using System.Linq;
using System.Threading;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <summary>Reads the submodels of a model, what they are made of, and what the model gives them.</summary>
/// <param name="problems">Receives the problems of the model itself; those of submodels are told where these are read on their own.</param>
internal sealed class SubmodelReader(Compilation compilation, Problems problems, CancellationToken cancellation)
{
    /// <summary>Whether all submodels can be read.</summary>
    public bool IsSound { get; private set; } = true;

    /// <summary>Reads what a model is made of.</summary>
    public ModelScope Read(INamedTypeSymbol model, PropertyReader properties, EquationReader equations)
    {
        ModelScope root = new(model, "", null, properties, equations);
        ReadSubmodels(root, problems);
        return root;
    }

    private void ReadSubmodels(ModelScope scope, Problems told)
    {
        foreach (ISymbol member in scope.Type.GetMembers())
        {
            cancellation.ThrowIfCancellationRequested();
            if (member is IPropertySymbol property && Attributes.Find(property, Attributes.Submodel) is not null) ReadSubmodel(scope, property, told);
        }

        foreach (ISymbol member in scope.Type.GetMembers())
        {
            if (Attributes.Find(member, Attributes.Input) is { } mark && Attributes.IsConnection(mark)) ReadConnection(scope, member, mark, told);
        }

        foreach (DeclaredSubmodel submodel in scope.Submodels) RequireInputs(submodel, told);
    }

    private void ReadSubmodel(ModelScope scope, IPropertySymbol property, Problems told)
    {
        Location place = property.Locations[0];
        string type = property.Type.ToDisplayString();
        bool isPartial = Bodies.IsPartial(property, cancellation) && Bodies.Find(property, compilation, cancellation) is null;
        bool isHeld = isPartial || scope.Type.GetMembers().OfType<IFieldSymbol>()
            .Any(field => SymbolEqualityComparer.Default.Equals(field.AssociatedSymbol, property));
        if (property.Type is not INamedTypeSymbol { TypeKind: TypeKind.Class, TypeArguments.IsEmpty: true } model
            || Attributes.Find(model, Attributes.Model) is null)
        {
            told.Report(Descriptors.SubmodelNotModel, place, property.Name, type);
        }
        else if (property.IsStatic || property.IsIndexer || property.IsVirtual || property.IsAbstract || property.IsOverride || !isHeld)
            told.Report(Descriptors.SubmodelNotHeld, place, property.Name);
        else if (!model.DeclaringSyntaxReferences.Any(reference => compilation.ContainsSyntaxTree(reference.SyntaxTree)))
            told.Report(Descriptors.SubmodelWithoutSource, place, property.Name, type, model.ContainingAssembly.Name);
        else if (IsWithin(model, scope))
            told.Report(Descriptors.SubmodelOfItself, place, property.Name, type);
        else if (TimeUnit(model) != TimeUnit(scope.Type))
            told.Report(Descriptors.SubmodelTimeUnit, place, property.Name, Shown(TimeUnit(model)), Shown(TimeUnit(scope.Type)));
        else
        {
            Add(scope, property, model, isPartial, told);
            return;
        }

        IsSound = false;
    }

    private void Add(ModelScope scope, IPropertySymbol property, INamedTypeSymbol model, bool isPartial, Problems told)
    {
        Problems own = new(); // They are told where the submodel is read on its own.
        PropertyReader properties = new(model, compilation, own, cancellation);
        properties.Read();
        EquationReader equations = new(model, properties, compilation, own, cancellation);
        equations.Read();
        ModelScope child = new(model, scope.Path + property.Name + ".", scope, properties, equations);
        ReadSubmodels(child, own);
        if (own.Found.Any(static problem => problem.Severity == DiagnosticSeverity.Error)) IsSound = false;
        if (properties.HasVectors || scope.Properties.HasVectors)
        {
            told.Report(Descriptors.SubmodelWithVectors, property.Locations[0], property.Name, properties.HasVectors ? model.Name : scope.Type.Name);
            IsSound = false;
            return;
        }

        if (properties.Modes.Count > 0 || model.GetMembers().Any(static member => Attributes.Find(member, Attributes.Event) is not null))
        {
            told.Report(Descriptors.SubmodelWithEvents, property.Locations[0], property.Name, model.Name);
            IsSound = false;
            return;
        }

        ReadStarts(property, child);
        scope.Submodels.Add(new(property, child, isPartial ? PropertyReader.Definition(property, cancellation) : null));
    }

    private void RequireInputs(DeclaredSubmodel submodel, Problems told)
    {
        foreach (DeclaredInput input in submodel.Scope.Properties.Inputs)
        {
            if (submodel.Scope.Connections.ContainsKey(input.Symbol)) continue;
            told.Report(Descriptors.SubmodelInputOpen, submodel.Symbol.Locations[0], submodel.Symbol.Name, input.Symbol.Name, submodel.Scope.Type.Name);
            IsSound = false;
        }
    }

    /// <summary>The constants of an initializer such as <c>= new() { Area = 3 }</c>. What else it does shows in the object, not here.</summary>
    private void ReadStarts(IPropertySymbol property, ModelScope child)
    {
        EqualsValueClauseSyntax? initializer = property.DeclaringSyntaxReferences
            .Select(reference => reference.GetSyntax(cancellation))
            .OfType<PropertyDeclarationSyntax>()
            .Select(static declaration => declaration.Initializer)
            .FirstOrDefault(static found => found is not null);
        if (initializer is null) return;
        IOperation? value = (compilation.GetSemanticModel(initializer.SyntaxTree).GetOperation(initializer, cancellation) as ISymbolInitializerOperation)?.Value;
        while (value is IConversionOperation conversion) value = conversion.Operand;
        if (value is IObjectCreationOperation { Initializer: { } assignments }) ReadStarts(assignments, child);
    }

    private static void ReadStarts(IObjectOrCollectionInitializerOperation initializer, ModelScope scope)
    {
        foreach (IOperation item in initializer.Initializers)
        {
            if (item is ISimpleAssignmentOperation { Target: IPropertyReferenceOperation target, Value.ConstantValue: { HasValue: true, Value: double number } })
                scope.Starts[target.Property.OriginalDefinition] = number;
            else if (item is IMemberInitializerOperation { InitializedMember: IPropertyReferenceOperation member } nested && scope.Find(member.Property) is { } inner)
                ReadStarts(nested.Initializer, inner);
        }
    }

    private void ReadConnection(ModelScope scope, ISymbol member, AttributeData mark, Problems told)
    {
        Location place = Attributes.Place(mark, member);
        string? submodel = mark.ConstructorArguments[0].Value as string;
        string? input = mark.ConstructorArguments[1].Value as string;
        DeclaredSubmodel? found = scope.Submodels.FirstOrDefault(item => item.Symbol.Name == submodel);
        ISymbol? target = found?.Scope.Properties.Open.FirstOrDefault(symbol => symbol.Name == input);
        bool isFailed = submodel is not null && scope.Type.GetMembers(submodel).Any(static other => Attributes.Find(other, Attributes.Submodel) is not null);
        if (found is null && isFailed) return; // Its own problem is told.
        if (found is null || target is null)
            told.Report(Descriptors.ConnectionUnknown, place, member.Name, submodel ?? "", input ?? "");
        else if (found.Scope.Connections.TryGetValue(target, out ISymbol? first))
            told.Report(Descriptors.ConnectionTwice, place, submodel + "." + input, first.Name, member.Name);
        else if (scope.Equations.IsReadable(member, Attributes.Input, null))
            found.Scope.Connections.Add(target, member);
        else
            IsSound = false;
    }

    private static bool IsWithin(INamedTypeSymbol model, ModelScope scope)
    {
        for (ModelScope? outer = scope; outer is not null; outer = outer.Parent)
        {
            if (SymbolEqualityComparer.Default.Equals(outer.Type, model)) return true;
        }

        return false;
    }

    private static string TimeUnit(INamedTypeSymbol model) =>
        Attributes.Find(model, Attributes.Model) is { } mark ? Attributes.Named(mark, "TimeUnit", "") ?? "" : "";

    private static string Shown(string unit) => unit.Length == 0 ? "no unit" : unit;
}
