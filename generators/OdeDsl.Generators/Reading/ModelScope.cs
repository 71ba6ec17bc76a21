using System.Collections.Generic;
using System.Linq;
using Microsoft.CodeAnalysis;

namespace OdeDsl.Generators.Reading;

/// <summary>One of the models that make up a whole: the model that is read, or a submodel of it at any depth.</summary>
/// <param name="type">Its class.</param>
/// <param name="path">What stands before its members' names in the whole: empty, or as in <c>Upper.</c></param>
/// <param name="parent">The model it is a part of, or null.</param>
internal sealed class ModelScope(INamedTypeSymbol type, string path, ModelScope? parent, PropertyReader properties, EquationReader equations)
{
    public INamedTypeSymbol Type { get; } = type;

    public string Path { get; } = path;

    public ModelScope? Parent { get; } = parent;

    public PropertyReader Properties { get; } = properties;

    public EquationReader Equations { get; } = equations;

    /// <summary>Its submodels, in the order of declaration.</summary>
    public List<DeclaredSubmodel> Submodels { get; } = [];

    /// <summary>The numbers of this model that the model around it gives, with the members that give them.</summary>
    public Dictionary<ISymbol, ISymbol> Connections { get; } = new(SymbolEqualityComparer.Default);

    /// <summary>The starting values that the model around it gives in the submodel's initializer.</summary>
    public Dictionary<ISymbol, double> Starts { get; } = new(SymbolEqualityComparer.Default);

    /// <summary>What its own numbers stand for.</summary>
    public Dictionary<ISymbol, Value> Leaves { get; } = new(SymbolEqualityComparer.Default);

    public ModelScope? Find(ISymbol property) =>
        Submodels.FirstOrDefault(submodel => SymbolEqualityComparer.Default.Equals(submodel.Symbol, property.OriginalDefinition))?.Scope;

    /// <summary>This model and all submodels in it, each before its own.</summary>
    public IEnumerable<ModelScope> All() => Submodels.SelectMany(static submodel => submodel.Scope.All()).Prepend(this);

    /// <summary>The states as they stand in this model's vector.</summary>
    public IEnumerable<(ModelScope Scope, DeclaredState State)> States() =>
        All().SelectMany(static scope => scope.Properties.States.Select(state => (scope, state)));

    /// <summary>The parameters as they stand in this model's vector: those that a model within it gives are none.</summary>
    public IEnumerable<(ModelScope Scope, DeclaredParameter Parameter)> Parameters() =>
        All().SelectMany(scope => scope.Properties.Parameters
            .Where(parameter => scope == this || !scope.Connections.ContainsKey(parameter.Symbol))
            .Select(parameter => (scope, parameter)));

    /// <summary>The starting value of a state or parameter.</summary>
    public double Start(ISymbol property, double declared) => Starts.TryGetValue(property, out double value) ? value : declared;
}

/// <summary>A property that holds a submodel.</summary>
internal sealed record DeclaredSubmodel(IPropertySymbol Symbol, ModelScope Scope, PropertyDefinition? Partial);
