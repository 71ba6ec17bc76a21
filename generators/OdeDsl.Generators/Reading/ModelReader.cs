using System.Collections.Generic;
using System.Linq;
using System.Threading;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Diagnostics;
using OdeDsl.Generators.Units;

namespace OdeDsl.Generators.Reading;

/// <summary>Reads one marked class: the whole way from the compiler's objects to values.</summary>
/// <param name="model">The marked class.</param>
/// <param name="declaration">The part that carries the attribute.</param>
internal sealed class ModelReader(
    INamedTypeSymbol model, TypeDeclarationSyntax declaration, Compilation compilation, CancellationToken cancellation)
{
    private readonly Problems _problems = new();

    public ModelReading Read()
    {
        Location place = declaration.Identifier.GetLocation();
        if (RepeatedMark() is { } repeated)
        {
            _problems.Report(Descriptors.DuplicateModelAttribute, repeated, model.Name);
            return ModelReading.Failed(_problems.Found);
        }

        TypeReader type = new(model, place, _problems, cancellation);
        LanguageVersion language = ((CSharpParseOptions)declaration.SyntaxTree.Options).LanguageVersion;
        if (type.Read(language) is not { } chain) return ModelReading.Failed(_problems.Found);

        ReportInherited(place);
        PropertyReader properties = new(model, compilation, _problems, cancellation);
        properties.Read();
        TableReader.Check(model, compilation, _problems, cancellation);
        EquationReader equations = new(model, properties, compilation, _problems, cancellation);
        equations.Read();
        SubmodelReader submodels = new(compilation, _problems, cancellation);
        ModelScope whole = submodels.Read(model, properties, equations);
        if (submodels.IsSound && properties.FailedStates.Count + properties.VectorStates.Count == 0 && !whole.States().Any())
            _problems.Report(Descriptors.ModelWithoutStates, place, model.Name);
        ModelDefinition definition = Define(chain, type.TakenNames(), whole, submodels.IsSound);
        Problems advice = new();
        if (_problems.Found.Count == 0) UnitChecker.Check(model, Equations(whole), compilation, advice, cancellation);
        return new(definition, new([.. _problems.Found.Where(problem => !IsInSubmodel(problem, whole)), .. advice.Found]));
    }

    /// <summary>Whether a problem stands in a submodel, where it is told when that is read on its own.</summary>
    private bool IsInSubmodel(Diagnostic problem, ModelScope whole) => whole.All().Skip(1)
        .SelectMany(static scope => scope.Type.DeclaringSyntaxReferences)
        .Any(part => part.SyntaxTree == problem.Location.SourceTree
            && part.Span.Contains(problem.Location.SourceSpan)
            && !model.DeclaringSyntaxReferences.Any(own => own.SyntaxTree == part.SyntaxTree && part.Span.Contains(own.Span)));

    /// <summary>Where the attribute of this part stands, if another part of the class carries it before.</summary>
    private Location? RepeatedMark()
    {
        AttributeData[] marks = model.GetAttributes().Where(static attribute => Attributes.Is(attribute, Attributes.Model)).ToArray();
        AttributeData? here = marks.FirstOrDefault(mark =>
            mark.ApplicationSyntaxReference is { } reference
            && reference.SyntaxTree == declaration.SyntaxTree
            && declaration.Span.Contains(reference.Span));
        return here is null || here == marks[0] ? null : Attributes.Place(here, model);
    }

    private void ReportInherited(Location place)
    {
        for (INamedTypeSymbol? type = model.BaseType; type is not null; type = type.BaseType)
        {
            foreach (ISymbol member in type.GetMembers())
            {
                if (Attributes.OfMembers.FirstOrDefault(name => Attributes.Find(member, name) is not null) is not { } mark) continue;
                _problems.Report(Descriptors.InheritedModelMember, place, model.Name, member.Name, mark);
                return;
            }
        }
    }

    private ModelDefinition Define(
        TypeChain chain, EquatableArray<string> takenNames, ModelScope whole, bool isReadable)
    {
        ExpressionGraph graph = new();
        PropertyReader properties = whole.Properties;
        EquationReader equations = whole.Equations;
        ModelLeaves.AddTo(whole, graph);
        BodyReader bodies = new(whole, compilation, properties.Tables, graph, _problems, cancellation);
        (ModelScope Scope, ISymbol? Member)[] rates =
            [.. whole.States().Select(static item => (item.Scope, item.Scope.Equations.RateOf(item.State.Property.Name)))];
        (ModelScope Scope, (ISymbol Member, string Unit) Observable)[] observables =
            [.. whole.All().SelectMany(static scope => scope.Equations.Observables.Select(observable => (scope, observable)))];
        VectorRateReader vectorRates = new(whole, bodies, properties.Tables, graph, _problems, cancellation);
        SegmentDefinition[][] segments = [.. properties.VectorStates.Select(state =>
            equations.RateOf(state.Property.Name) is { } rate ? vectorRates.Read(state, rate) : WithoutRate(state))];
        IReadOnlyList<DeclaredEvent> events = new EventReader(model, compilation, _problems, cancellation).Read();
        if (properties.HasVectors && properties.Inputs.Count + properties.Modes.Count + events.Count > 0)
            _problems.Report(Descriptors.VectorsWithInputs, model.Locations[0], model.Name);
        (ModelScope Scope, ISymbol? Member)[] members = [.. rates, .. observables.Select(static item => (item.Scope, (ISymbol?)item.Observable.Member))];
        int?[] results = members
            .Select(item => item.Member is null ? null : bodies.Read(item.Scope, item.Member))
            .Concat(segments.SelectMany(static all => all).Select(static segment => segment.Rate < 0 ? (int?)null : segment.Rate))
            .Concat(events.SelectMany(item => EventResults(item, bodies, whole)))
            .ToArray();
        RequireLengths(properties);
        foreach ((ISymbol? member, int? node) in members.Zip(results, static (item, node) => (item.Member, node)))
        {
            if (member is not null && node is { } equation) vectorRates.RequireFixedSwitches(member, equation);
        }

        bool isSound = isReadable && _problems.Found.Count == 0 && results.All(static result => result is not null);
        PrunedGraph pruned = isSound
            ? PrunedGraph.Of(graph, results.Select(static result => result!.Value).ToArray())
            : PrunedGraph.NotANumber(results.Length);
        Queue<int> vectorNodes = new(pruned.Results.Skip(rates.Length + equations.Observables.Count));

        return new(
            chain,
            Summaries.Of(model, cancellation),
            new([.. whole.States().Select((item, i) => Define(item.Scope, item.State, pruned.Results[i], TextOf(rates[i].Member)))]),
            new([.. whole.Parameters().Select(static item => Define(item.Scope, item.Parameter))]),
            new([.. observables.Select((item, i) => Define(item.Scope, item.Observable, pruned.Results[rates.Length + i]))]),
            pruned.Nodes,
            pruned.Renumber(bodies.ConditionTexts),
            takenNames)
        {
            Submodels = new([.. whole.Submodels.Select(submodel => Define(whole, submodel))]),
            Modes = new(properties.Modes.Select(static mode => mode.Definition).ToArray()),
            Inputs = new(properties.Inputs.Select(static input => input.Definition).ToArray()),
            Events = new(events.Select((item, i) => Define(
                item, whole, pruned.Results.Skip(members.Length + segments.Sum(static all => all.Length)), i)).ToArray()),
            Tables = isSound ? new(bodies.Tables.ToArray()) : EquatableArray<TableDefinition>.Empty,
            TimeUnit = Attributes.Find(model, "OdeModel") is { } mark ? Attributes.Named(mark, "TimeUnit", "") ?? "" : "",
            Vectors = properties.HasVectors
                ? properties.Tables.Finish(
                    properties.VectorStates.Select((state, i) => Define(state, equations.RateOf(state.Property.Name), segments[i], vectorNodes)),
                    properties.VectorParameters.Select(Define))
                : null,
        };
    }

    /// <summary>The equations may treat so many elements apart that a length is too small for them.</summary>
    private void RequireLengths(PropertyReader properties)
    {
        foreach (SymbolDefinition length in properties.Tables.Symbols.Where(static symbol => symbol.IsLength))
        {
            DeclaredParameter parameter = properties.Parameters[length.Parameter];
            double value = System.BitConverter.Int64BitsToDouble(parameter.Definition.ValueBits);
            if (value >= length.Minimum) continue;
            _problems.Report(
                Descriptors.LengthTooShort, parameter.Symbol.Locations[0], length.Name,
                value.ToString("R", System.Globalization.CultureInfo.InvariantCulture), length.Minimum.ToString(System.Globalization.CultureInfo.InvariantCulture));
        }
    }

    private static SegmentDefinition[] WithoutRate(DeclaredVector state) =>
        [new(new([.. state.Lengths.Select(static length => new IndexRange(Affine.Zero, length, -1))]), -1)];

    private VectorStateDefinition Define(DeclaredVector state, ISymbol? rate, SegmentDefinition[] segments, Queue<int> nodes) => new(
        state.Property,
        state.Unit,
        PropertyReader.Bits(state.Start),
        PropertyReader.Bits(state.Lower),
        PropertyReader.Bits(state.Upper),
        state.AnglePeriod is { } period ? PropertyReader.Bits(period) : null,
        state.Lengths,
        new([.. segments.Select(segment => segment with { Rate = nodes.Dequeue() })]),
        rate is IMethodSymbol method
            ? string.Join(", ", method.Parameters.Where(static parameter => parameter.Type.SpecialType == SpecialType.System_Int32).Select(static parameter => parameter.Name))
            : "",
        TextOf(rate));

    private static VectorParameterDefinition Define(DeclaredVector parameter) => new(
        parameter.Property,
        parameter.Unit,
        PropertyReader.Bits(parameter.Start),
        PropertyReader.Bits(parameter.Lower),
        PropertyReader.Bits(parameter.Upper),
        parameter.Lengths);

    /// <summary>The guard's node, then those of the states and modes that the action sets: those of submodels stay as they are.</summary>
    private static IEnumerable<int?> EventResults(DeclaredEvent item, BodyReader bodies, ModelScope whole)
    {
        int[]? set = bodies.ReadAction(whole, item.Action);
        int count = whole.States().Count() + whole.Properties.Modes.Count;
        return new[] { bodies.ReadGuard(whole, item.Guard) }.Concat(Enumerable.Range(0, count).Select(i => set?[i]));
    }

    private EventDefinition Define(DeclaredEvent item, ModelScope whole, IEnumerable<int> results, int index)
    {
        int n = whole.States().Count(), k = whole.Properties.Modes.Count;
        int[] own = [.. results.Skip(index * (1 + n + k)).Take(1 + n + k)];
        return new(
            item.Action.Name, Summaries.Of(item.Action, cancellation), item.Guard.Name, TextOf(item.Guard) is { Length: > 0 } text ? text : item.Guard.Name, TextOf(item.Action), item.Direction,
            item.IsTerminal, item.IsCondition, own[0], new([.. own.Skip(1).Take(n)]), new([.. own.Skip(1 + n)]));
    }

    /// <summary>What the units of must fit: states with their rates, and numbers of submodels with what is given to them.</summary>
    private static IEnumerable<(ISymbol Target, ISymbol? Member, bool IsRate)> Equations(ModelScope whole) =>
        whole.Properties.States.Select(state => ((ISymbol)state.Symbol, whole.Equations.RateOf(state.Property.Name), true))
            .Concat(whole.Submodels.SelectMany(static submodel => submodel.Scope.Connections).Select(static pair => (pair.Key, (ISymbol?)pair.Value, false)));

    private static StateDefinition Define(ModelScope scope, DeclaredState state, int rate, string text) => new(
        state.Property with { Name = scope.Path + state.Property.Name },
        state.Unit,
        PropertyReader.Bits(scope.Start(state.Symbol, state.Initial)),
        PropertyReader.Bits(state.Lower),
        PropertyReader.Bits(state.Upper),
        state.AnglePeriod is { } period ? PropertyReader.Bits(period) : null,
        rate,
        text);

    private static ParameterDefinition Define(ModelScope scope, DeclaredParameter parameter)
    {
        ParameterDefinition declared = parameter.Definition;
        double value = scope.Start(parameter.Symbol, System.BitConverter.Int64BitsToDouble(declared.ValueBits));
        return declared with { Property = declared.Property with { Name = scope.Path + declared.Property.Name }, ValueBits = PropertyReader.Bits(value) };
    }

    private static SubmodelDefinition Define(ModelScope whole, DeclaredSubmodel submodel)
    {
        var all = whole.Parameters().ToList();
        return new(
            submodel.Symbol.Name,
            submodel.Scope.Type.ToDisplayString(SymbolDisplayFormat.FullyQualifiedFormat),
            submodel.Partial,
            submodel.Scope.States().Count(),
            new([.. submodel.Scope.Parameters().Select(own => all.FindIndex(item => item.Scope == own.Scope && item.Parameter == own.Parameter))]));
    }

    private ObservableDefinition Define(ModelScope scope, (ISymbol Member, string Unit) observable, int value) => new(
        scope.Path + observable.Member.Name, Summaries.Of(observable.Member, cancellation), observable.Unit, value, TextOf(observable.Member));

    private string TextOf(ISymbol? member) =>
        member is not null && Bodies.Find(member, compilation, cancellation) is { } body ? UserText.OfBody(body) : "";
}
