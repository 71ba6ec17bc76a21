using System.Collections.Generic;
using System.Linq;
using System.Threading;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <summary>Reads one marked class: the whole way from the compiler's objects to values.</summary>
internal static class ModelReader
{
    /// <param name="model">The marked class.</param>
    /// <param name="declaration">The part that carries the attribute.</param>
    public static ModelReading Read(INamedTypeSymbol model, TypeDeclarationSyntax declaration, Compilation compilation, CancellationToken cancellation)
    {
        Problems problems = new();
        Location place = declaration.Identifier.GetLocation();
        if (IsRepeated(model, declaration, out Location repeated))
        {
            problems.Report(Descriptors.DuplicateModelAttribute, repeated, model.Name);
            return ModelReading.Failed(problems.Found);
        }

        TypeReader type = new(model, place, problems, cancellation);
        LanguageVersion language = ((CSharpParseOptions)declaration.SyntaxTree.Options).LanguageVersion;
        if (type.Read(language) is not { } chain) return ModelReading.Failed(problems.Found);

        ReportInherited(model, place, problems);
        PropertyReader properties = new(model, compilation, problems, cancellation);
        properties.Read();
        if (properties.States.Count + properties.FailedStates.Count == 0) problems.Report(Descriptors.ModelWithoutStates, place, model.Name);
        EquationReader equations = new(model, properties, compilation, problems, cancellation);
        equations.Read();

        ModelDefinition definition = ReadEquations(model, compilation, properties, equations, problems, cancellation) with
        {
            Type = chain,
            Summary = Summaries.Of(model, cancellation),
            TimeUnit = TimeUnit(model),
            TakenNames = type.TakenNames(),
        };
        return new(definition, new(problems.Found.ToArray()));
    }

    private static string TimeUnit(INamedTypeSymbol model) =>
        model.GetAttributes().FirstOrDefault(static attribute => Attributes.Is(attribute, "OdeModel")) is { } mark
            ? Attributes.Named(mark, "TimeUnit", "") ?? ""
            : "";

    /// <summary>Whether another part of the class carries the attribute before this one.</summary>
    private static bool IsRepeated(INamedTypeSymbol model, TypeDeclarationSyntax declaration, out Location repeated)
    {
        AttributeData[] marks = model.GetAttributes().Where(static attribute => Attributes.Is(attribute, "OdeModel")).ToArray();
        AttributeData? here = marks.FirstOrDefault(mark =>
            mark.ApplicationSyntaxReference is { } reference && reference.SyntaxTree == declaration.SyntaxTree && declaration.Span.Contains(reference.Span));
        repeated = here is null ? declaration.Identifier.GetLocation() : Attributes.Place(here, model);
        return here is not null && here != marks[0];
    }

    private static void ReportInherited(INamedTypeSymbol model, Location place, Problems problems)
    {
        for (INamedTypeSymbol? type = model.BaseType; type is not null; type = type.BaseType)
        {
            foreach (ISymbol member in type.GetMembers())
            {
                if (Attributes.OfMembers.FirstOrDefault(name => Attributes.Find(member, name) is not null) is not { } mark) continue;
                problems.Report(Descriptors.InheritedModelMember, place, model.Name, member.Name, mark);
                return;
            }
        }
    }

    private static ModelDefinition ReadEquations(
        INamedTypeSymbol model, Compilation compilation, PropertyReader properties, EquationReader equations, Problems problems, CancellationToken cancellation)
    {
        ExpressionGraph graph = new();
        Dictionary<ISymbol, int> leaves = new(SymbolEqualityComparer.Default);
        for (int i = 0; i < properties.States.Count; i++) leaves.Add(properties.States[i].Symbol, graph.Leaf(Operator.State, i));
        for (int i = 0; i < properties.Parameters.Count; i++) leaves.Add(properties.Parameters[i].Symbol, graph.Leaf(Operator.Parameter, i));
        BodyReader bodies = new(model, compilation, leaves, graph, problems, cancellation);

        ISymbol?[] rateMembers = properties.States.Select(state => equations.Rates.TryGetValue(state.Property.Name, out ISymbol? member) ? member : null).ToArray();
        int?[] roots = rateMembers.Concat(equations.Observables.Select(static observable => observable.Member))
            .Select(member => member is null ? null : bodies.Read(member))
            .ToArray();
        bool isSound = problems.Found.Count == 0 && roots.All(static root => root is not null);
        PrunedGraph pruned = isSound ? PrunedGraph.Of(graph, roots.Select(static root => root!.Value).ToArray()) : PrunedGraph.NotANumber(roots.Length);

        string Text(ISymbol? member) =>
            member is not null && Bodies.Find(member, compilation, cancellation) is { } body ? UserText.OfBody(body) : "";
        StateDefinition[] states = properties.States.Select((state, i) => new StateDefinition(
            state.Property,
            state.Unit,
            PropertyReader.Bits(state.Initial),
            PropertyReader.Bits(state.Lower),
            PropertyReader.Bits(state.Upper),
            state.AnglePeriod is { } period ? PropertyReader.Bits(period) : null,
            pruned.Roots[i],
            Text(rateMembers[i]))).ToArray();
        ObservableDefinition[] observables = equations.Observables.Select((observable, i) => new ObservableDefinition(
            observable.Member.Name,
            Summaries.Of(observable.Member, cancellation),
            observable.Unit,
            pruned.Roots[states.Length + i],
            Text(observable.Member))).ToArray();
        ConditionText[] texts = bodies.ConditionTexts
            .Where(pair => pruned.NewIndex.ContainsKey(pair.Key))
            .Select(pair => new ConditionText(pruned.NewIndex[pair.Key], pair.Value))
            .OrderBy(static text => text.Node)
            .ToArray();
        return new(
            null!, "", new(states), new(properties.Parameters.Select(static parameter => parameter.Definition).ToArray()),
            new(observables), pruned.Nodes, new(texts), EquatableArray<string>.Empty);
    }
}
