using System;
using System.Collections.Generic;
using System.Collections.Immutable;
using System.Linq;
using System.Runtime.CompilerServices;
using System.Threading;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Diagnostics;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Units;

/// <summary>
/// Runs the bodies of a model's members on units instead of numbers, and tells where units do not fit. What has no stated unit is
/// unknown and fits everything, so that a model without units gets no message.
/// </summary>
/// <remarks>It decides nothing about the generated code: its findings are warnings, and it reads the bound operations on its own.</remarks>
internal sealed partial class UnitChecker
{
    private readonly INamedTypeSymbol _model;
    private readonly Compilation _compilation;
    private readonly CancellationToken _cancellation;
    private readonly StatedUnits _stated;
    private readonly UnitComplaints _complaints;
    private readonly Dictionary<SyntaxTree, SemanticModel> _semantics = [];
    private readonly Dictionary<(ISymbol Member, string Arguments), Measure> _known = [];
    private readonly HashSet<ISymbol> _active = new(SymbolEqualityComparer.Default);

    private readonly HashSet<ISymbol> _checked = new(SymbolEqualityComparer.Default);

    private Unit? _time;
    private Dictionary<ISymbol, Measure> _variables = new(SymbolEqualityComparer.Default);
    private List<(Measure Measure, IOperation Place)> _returned = [];
    private (string What, Unit Unit, bool StatesNumbers)? _wanted;

    private UnitChecker(INamedTypeSymbol model, Compilation compilation, Problems problems, CancellationToken cancellation)
    {
        _model = model;
        _compilation = compilation;
        _cancellation = cancellation;
        _stated = new(problems, cancellation);
        _complaints = new(problems);
    }

    /// <summary>Checks a model.</summary>
    /// <param name="equations">The states with the members that compute their rates, and other numbers with the members that give them.</param>
    public static void Check(
        INamedTypeSymbol model,
        IEnumerable<(ISymbol Target, ISymbol? Member, bool IsRate)> equations,
        Compilation compilation,
        Problems problems,
        CancellationToken cancellation)
    {
        (ISymbol Target, ISymbol? Member, bool IsRate)[] all = [.. equations];
        if (!model.GetMembers().Concat(all.Select(static item => item.Target)).Any(StatedUnits.IsStated)) return;
        try
        {
            new UnitChecker(model, compilation, problems, cancellation).Check(all);
        }
        catch (InsufficientExecutionStackException)
        {
            // Such a formula is told of elsewhere: it has no code either.
        }
    }

    private void Check((ISymbol Target, ISymbol? Member, bool IsRate)[] equations)
    {
        _time = _stated.OfTime(_model);
        foreach ((_, ISymbol? member, _) in equations)
        {
            if (member is not null) _checked.Add(member);
        }

        foreach ((ISymbol target, ISymbol? member, bool isRate) in equations)
        {
            if (member is null) continue;
            Unit? unit = _stated.Of(target);
            if (isRate) unit = unit is null || _time is null ? null : unit.Difference().Times(_time, -1);
            CheckBody(member, unit is null ? null : (isRate ? $"the rate of '{target.Name}'" : $"'{target.Name}'", unit, !isRate));
        }

        foreach (ISymbol member in _model.GetMembers())
        {
            bool isWatched = Attributes.Find(member, Attributes.Observable) is not null;
            if (_stated.Of(member) is { } unit) CheckStated(member, unit);
            else if (isWatched && _checked.Add(member)) CheckBody(member, null);
        }
    }

    /// <summary>Checks the body of a member against the unit it states, once.</summary>
    private void CheckStated(ISymbol member, Unit unit)
    {
        if (IsOfOtherModel(member) || !_checked.Add(member.OriginalDefinition)) return;
        CheckBody(member, ($"'{member.Name}'", unit, true));
    }

    /// <summary>Other models, which are checked on their own.</summary>
    private bool IsOfOtherModel(ISymbol member) =>
        member.ContainingType is { } type
        && !SymbolEqualityComparer.Default.Equals(type.OriginalDefinition, _model)
        && Attributes.Find(type, Attributes.Model) is not null;

    private void CheckBody(ISymbol member, (string What, Unit Unit, bool StatesNumbers)? wanted)
    {
        if (Bodies.Find(member, _compilation, _cancellation) is not { } body) return;
        Dictionary<ISymbol, Measure> arguments = new(SymbolEqualityComparer.Default);
        foreach (IParameterSymbol parameter in ParametersOf(member))
            arguments[parameter] = new(_stated.Of(parameter) ?? (parameter.Name is "time" or "t" ? _time : null));
        Run(member.OriginalDefinition, body, arguments, wanted);
    }

    /// <summary>The unit of a member where it is used.</summary>
    private Measure Member(ISymbol member, Measure[] arguments)
    {
        if (_stated.Of(member) is { } unit)
        {
            CheckStated(member, unit);
            return new(unit);
        }

        ISymbol definition = ((member as IMethodSymbol)?.PartialImplementationPart ?? member).OriginalDefinition;
        (ISymbol, string) key = (definition, string.Join(";", arguments.Select(static argument => argument.Unit?.Shown() ?? "?")));
        if (_known.TryGetValue(key, out Measure known)) return known;
        Measure measure = Bodies.Find(definition, _compilation, _cancellation) is { } body
            ? Run(definition, body, Arguments(definition, arguments), null)
            : Initializer(definition);
        // A member that is nothing but a number has no unit until it states one.
        return _known[key] = measure.IsBare && definition is not IMethodSymbol { MethodKind: MethodKind.LocalFunction } ? Measure.Unknown : measure;
    }

    private Dictionary<ISymbol, Measure> Arguments(ISymbol definition, Measure[] arguments)
    {
        Dictionary<ISymbol, Measure> variables = new(SymbolEqualityComparer.Default);
        foreach (IParameterSymbol parameter in ParametersOf(definition))
            variables[parameter] = _stated.Of(parameter) is { } unit ? new(unit) : arguments[parameter.Ordinal];
        return variables;
    }

    private static ImmutableArray<IParameterSymbol> ParametersOf(ISymbol member) =>
        member is IMethodSymbol method ? method.Parameters : ImmutableArray<IParameterSymbol>.Empty;

    private Measure Initializer(ISymbol member)
    {
        SyntaxReference? source = member.DeclaringSyntaxReferences.FirstOrDefault();
        if (source is null || !_compilation.ContainsSyntaxTree(source.SyntaxTree) || !_active.Add(member)) return Measure.Unknown;
        try
        {
            EqualsValueClauseSyntax? initializer = source.GetSyntax(_cancellation) switch
            {
                VariableDeclaratorSyntax field => field.Initializer,
                PropertyDeclarationSyntax property => property.Initializer,
                _ => null,
            };
            if (initializer is null) return Measure.Unknown;
            return Semantics(initializer.SyntaxTree).GetOperation(initializer, _cancellation) is ISymbolInitializerOperation { Value: var value }
                ? Evaluate(value)
                : Measure.Unknown;
        }
        finally
        {
            _active.Remove(member);
        }
    }

    private Measure Run(
        ISymbol definition, SyntaxNode body, Dictionary<ISymbol, Measure> variables, (string What, Unit Unit, bool StatesNumbers)? wanted)
    {
        if (!_active.Add(definition)) return Measure.Unknown; // Recursion is told elsewhere.
        var before = (_variables, _returned, _wanted, _complaints.AreMuted);
        (_variables, _returned, _wanted) = (variables, [], wanted);
        _complaints.AreMuted |= IsOfOtherModel(definition);
        try
        {
            RuntimeHelpers.EnsureSufficientExecutionStack();
            Evaluate(Block(body));
            return Joined(_returned);
        }
        finally
        {
            (_variables, _returned, _wanted, _complaints.AreMuted) = before;
            _active.Remove(definition);
        }
    }

    private IOperation? Block(SyntaxNode body) => Semantics(body.SyntaxTree).GetOperation(body, _cancellation) switch
    {
        IMethodBodyBaseOperation method => method.BlockBody ?? method.ExpressionBody,
        ILocalFunctionOperation function => function.Body,
        var other => other,
    };

    private SemanticModel Semantics(SyntaxTree tree)
    {
        if (!_semantics.TryGetValue(tree, out SemanticModel? model)) _semantics.Add(tree, model = _compilation.GetSemanticModel(tree));
        return model;
    }

    /// <summary>What several values that stand for one have in common; it is told where one does not fit those before it.</summary>
    private Measure Joined(IReadOnlyList<(Measure Measure, IOperation Place)> values)
    {
        if (values.Count == 0) return Measure.Unknown;
        bool isBare = values.All(static value => value.Measure.IsBare);
        int first = -1;
        bool fits = true;
        for (int i = 0; i < values.Count; i++)
        {
            if (values[i].Measure.Unit is not { } unit) continue;
            if (first < 0) first = i;
            else fits &= _complaints.Fit(values[first].Measure.Unit!, values[first].Place, unit, values[i].Place);
        }

        return fits ? new(first < 0 ? null : values[first].Measure.Unit, isBare) : Measure.Unknown;
    }
}
