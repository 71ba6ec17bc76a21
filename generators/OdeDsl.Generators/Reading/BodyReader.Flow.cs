using System;
using System.Collections.Generic;
using System.Collections.Immutable;
using System.Globalization;
using System.Numerics;
using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <content>Following both sides of a branch and joining them.</content>
internal sealed partial class BodyReader
{
    private Value Fork(int condition, Func<Value> whenTrue, Func<Value> whenFalse)
    {
        Value? first = null;
        Value? second = null;
        Fork(condition, () => { first = whenTrue(); }, () => { second = whenFalse(); });
        return first is null ? second! : second is null ? first : Choose(condition, first, second);
    }

    /// <summary>Follows the sides that are possible and joins what is known behind them.</summary>
    private void Fork(int condition, Action whenTrue, Action whenFalse)
    {
        IOperation? at = _current;
        Flow start = _flow;
        if (condition != _conditions.False) whenTrue();
        if (condition == _conditions.True) return;
        Flow afterFirst = _flow;
        _flow = start;
        whenFalse();
        _current = at;
        if (condition != _conditions.False) _flow = Join(condition, afterFirst, _flow);
    }

    private Flow Join(int condition, Flow first, Flow second)
    {
        if (ReferenceEquals(first, second)) return first;
        ImmutableDictionary<ISymbol, Value> variables =
            IsOver(first) ? second.Variables : IsOver(second) ? first.Variables : Join(condition, first.Variables, second.Variables);
        Value? result =
            first.Result is null ? second.Result
            : second.Result is null ? first.Result
            : Choose(condition, first.Result, second.Result);
        ImmutableDictionary<ISymbol, Value> afterBreak =
            first.Broken == _conditions.False ? second.AfterBreak
            : second.Broken == _conditions.False ? first.AfterBreak
            : Join(condition, first.AfterBreak, second.AfterBreak);
        return new(
            variables,
            _conditions.Choose(condition, first.Returned, second.Returned),
            result,
            _conditions.Choose(condition, first.Broken, second.Broken),
            afterBreak,
            first.Outside)
        {
            AfterReturn = !IsInAction || first.Returned == _conditions.False ? second.AfterReturn
                : second.Returned == _conditions.False ? first.AfterReturn
                : Join(condition, first.AfterReturn, second.AfterReturn),
        };
    }

    /// <summary>Whether no execution goes on from here.</summary>
    private bool IsOver(Flow flow) => _conditions.Or(flow.Returned, _conditions.Or(flow.Broken, flow.Outside)) == _conditions.True;

    private ImmutableDictionary<ISymbol, Value> Join(
        int condition, ImmutableDictionary<ISymbol, Value> first, ImmutableDictionary<ISymbol, Value> second)
    {
        if (ReferenceEquals(first, second)) return first;
        ImmutableDictionary<ISymbol, Value>.Builder joined = NoVariables.ToBuilder();
        foreach (KeyValuePair<ISymbol, Value> variable in first)
        {
            // A variable set on one side only cannot be read after the branch: C# demands definite assignment.
            if (second.TryGetValue(variable.Key, out Value? other)) joined.Add(variable.Key, Choose(condition, variable.Value, other));
        }

        return joined.ToImmutable();
    }

    private Value Choose(int condition, Value whenTrue, Value whenFalse) => (whenTrue, whenFalse) switch
    {
        _ when whenTrue == whenFalse => whenTrue,
        (NumberValue first, NumberValue second) => new NumberValue(_conditions.ChooseNumber(condition, first.Node, second.Node)),
        (ConditionValue first, ConditionValue second) => new ConditionValue(_conditions.Choose(condition, first.Node, second.Node)),
        (WholeValue first, WholeValue second) => Bounded(Choice.Between(condition, first.Choice, second.Choice)),
        (LiteralValue { Constant: float or decimal } first, LiteralValue) => Imprecise(_current!, first),
        (UnknownValue, _) or (_, UnknownValue) => UnknownValue.Instance,
        (IndexValue, _) or (_, IndexValue) => NotAffine(_current!, "it depends on conditions"),
        _ => Unsupported(_current!),
    };

    private Value Bounded(Choice<BigInteger> choice) => choice.Count <= Choice.MaximumCount
        ? new WholeValue(choice)
        : Problem(
            Descriptors.TooManyCases, _current!, UserText.Of(_current!.Syntax), Choice.MaximumCount.ToString(CultureInfo.InvariantCulture));
}
