using System.Collections.Generic;
using System.Collections.Immutable;
using System.Linq;
using System.Numerics;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <content>Actions of events: states and modes are variables that the action sets; helpers see the values set so far.</content>
internal sealed partial class BodyReader
{
    private ISymbol[] _settable = [];

    private bool IsInAction => _settable.Length > 0;

    /// <summary>Reads the guard of an event.</summary>
    /// <returns>A number, 1 or -1 for a condition; null with a problem reported.</returns>
    public int? ReadGuard(ModelScope model, ISymbol member)
    {
        _scope = model;
        return (model.Leaves.TryGetValue(member, out Value? leaf) ? leaf : Call(member, TimeFor(member))) switch
        {
            NumberValue number => number.Node,
            ConditionValue condition => _graph.Ternary(Operator.Conditional, condition.Node, _graph.Constant(1.0), _graph.Constant(-1.0)),
            _ => null,
        };
    }

    /// <summary>Runs the action of an event.</summary>
    /// <param name="model">The model it belongs to.</param>
    /// <param name="action">The method.</param>
    /// <returns>The values that all states, those of submodels behind, and the modes have afterwards; null with a problem reported.</returns>
    public int[]? ReadAction(ModelScope model, IMethodSymbol action)
    {
        _scope = _receiver = model;
        IReadOnlyList<DeclaredMode> modes = model.Properties.Modes;
        ISymbol[] settable = [.. model.Properties.States.Select(static state => state.Symbol), .. modes.Select(static mode => mode.Symbol)];
        Flow before = _flow;
        int problemsBefore = _problems.Found.Count;
        ImmutableDictionary<ISymbol, Value> variables = NoVariables.SetItems(settable.Select(symbol => new KeyValuePair<ISymbol, Value>(symbol, model.Leaves[symbol])));
        if (action.Parameters.Length == 1) variables = variables.SetItem(action.Parameters[0], new NumberValue(_graph.Leaf(Operator.Time)));
        _active.Add((action, model));
        _settable = settable;
        try
        {
            _flow = Start(variables);
            if (Block(Bodies.Find(action, _compilation, _cancellation)!) is { } block) Execute(block);
            ImmutableDictionary<ISymbol, Value> after =
                _flow.Returned == _conditions.False ? _flow.Variables
                : _flow.Returned == _conditions.True ? _flow.AfterReturn
                : Join(_flow.Returned, _flow.AfterReturn, _flow.Variables);
            if (_problems.Found.Count > problemsBefore) return null;
            foreach (DeclaredMode mode in modes) CheckValues(mode, after[mode.Symbol], action);
            return
            [
                .. model.States().Select(item => NumberOf(item.Scope == model ? after[item.State.Symbol] : item.Scope.Leaves[item.State.Symbol])),
                .. modes.Select(mode => NumberOf(after[mode.Symbol])),
            ];
        }
        finally
        {
            _settable = [];
            _active.RemoveAt(_active.Count - 1);
            _flow = before;
        }
    }

    /// <summary>The values set so far, for a member that an action calls.</summary>
    private ImmutableDictionary<ISymbol, Value> SetSoFar() => NoVariables.SetItems(
        _settable.Where(_flow.Variables.ContainsKey).Select(symbol => new KeyValuePair<ISymbol, Value>(symbol, _flow.Variables[symbol])));

    /// <summary>All executions that are still on the way return from an action.</summary>
    private void ReturnFromAction()
    {
        int elsewhere = _conditions.Or(_flow.Broken, _flow.Outside);
        ImmutableDictionary<ISymbol, Value> after =
            _flow.Returned == _conditions.False ? _flow.Variables : Join(_flow.Returned, _flow.AfterReturn, _flow.Variables);
        _flow = _flow with { Returned = _conditions.Or(_flow.Returned, _conditions.Not(elsewhere)), AfterReturn = after };
    }

    /// <summary>The state or mode that an assignment in an action sets; null, and reported, for every other property or field.</summary>
    private ISymbol? SetByAction(IOperation target)
    {
        ISymbol? member = (target as IMemberReferenceOperation)?.Member.OriginalDefinition;
        if (member is null) return null;
        bool isOwn = (target as IMemberReferenceOperation)?.Instance is IInstanceReferenceOperation;
        bool isHelper = !SymbolEqualityComparer.Default.Equals(_active[_active.Count - 1].Member, _active[0].Member);
        if (isOwn && !isHelper && _settable.FirstOrDefault(symbol => SymbolEqualityComparer.Default.Equals(symbol, member)) is { } settable) return settable;
        Problem(Descriptors.EventAssignment, target, UserText.Of(target.Syntax), _active[0].Member.Name);
        return null;
    }

    private int NumberOf(Value value) => value is ConditionValue condition
        ? _conditions.ChooseNumber(condition.Node, _graph.Constant(1.0), _graph.Constant(0.0))
        : Node(value);

    private void CheckValues(DeclaredMode mode, Value value, IMethodSymbol action)
    {
        if (mode.Values.Count == 0 || value is not WholeValue whole) return;
        BigInteger? outside = whole.Choice.Fold<BigInteger?>(
            leaf => mode.Values.Any(known => leaf == known) ? null : leaf, static (_, first, second) => first ?? second);
        if (outside is { } found)
            Problem(Descriptors.ModeValueOutside, action.Locations[0], action.Name, mode.Definition.Property.Name, found.ToString(System.Globalization.CultureInfo.InvariantCulture));
    }
}
