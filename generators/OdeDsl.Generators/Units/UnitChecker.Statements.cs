using System.Collections.Generic;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;

namespace OdeDsl.Generators.Units;

/// <content>Statements and assignments. Branches are followed one after the other, each from the same start.</content>
internal sealed partial class UnitChecker
{
    private Measure Statement(IOperation? operation)
    {
        switch (operation)
        {
            case null or ILocalFunctionOperation or IAnonymousFunctionOperation:
                return Measure.Unknown;
            case IReturnOperation { Kind: OperationKind.Return, ReturnedValue: { } value }:
                Return(Evaluate(value), value);
                return Measure.Unknown;
            case IVariableDeclaratorOperation { Initializer.Value: { } value } declarator:
                return _variables[declarator.Symbol] = Evaluate(value);
            case ISimpleAssignmentOperation assignment:
                return Assign(assignment.Target, Evaluate(assignment.Value));
            case ICompoundAssignmentOperation assignment:
                Measure target = Evaluate(assignment.Target);
                Measure second = Evaluate(assignment.Value);
                return Assign(assignment.Target, Apply(assignment.OperatorKind, target, assignment.Target, second, assignment.Value));
            case IIncrementOrDecrementOperation step:
                return Evaluate(step.Target);
            case IConditionalOperation branch:
                Evaluate(branch.Condition);
                Branches([[branch.WhenTrue], [branch.WhenFalse]]);
                return Measure.Unknown;
            case ISwitchOperation choice:
                Switch(choice);
                return Measure.Unknown;
            default:
                foreach (IOperation child in operation.ChildOperations) Evaluate(child);
                return Measure.Unknown;
        }
    }

    private void Return(Measure measure, IOperation place)
    {
        _returned.Add((measure, place));
        if (_wanted is not { } wanted || measure.Unit is not { } unit || (wanted.StatesNumbers && measure.IsBare)) return;
        _complaints.Result(unit, place, wanted.What, wanted.Unit);
        _returned[_returned.Count - 1] = (Measure.Unknown, place);
    }

    private Measure Assign(IOperation target, Measure measure)
    {
        ISymbol? variable = target switch
        {
            ILocalReferenceOperation local => local.Local,
            IParameterReferenceOperation parameter => parameter.Parameter,
            _ => null,
        };
        if (variable is not null) _variables[variable] = measure;
        return measure;
    }

    private void Switch(ISwitchOperation operation)
    {
        Measure input = Evaluate(operation.Value);
        foreach (ISwitchCaseOperation section in operation.Cases)
        {
            foreach (ICaseClauseOperation clause in section.Clauses)
            {
                if (clause is ISingleValueCaseClauseOperation single)
                    Joined([(input, operation.Value), (Evaluate(single.Value), single.Value)]);
                if (clause is not IPatternCaseClauseOperation pattern) continue;
                Pattern(pattern.Pattern, input, operation.Value);
                Evaluate(pattern.Guard);
            }
        }

        Branches([.. operation.Cases.Select(static section => section.Body), []]);
    }

    /// <summary>Follows alternatives; a variable that they leave in different units is unknown behind them.</summary>
    private void Branches(IReadOnlyList<IEnumerable<IOperation?>> alternatives)
    {
        Dictionary<ISymbol, Measure> start = _variables;
        Dictionary<ISymbol, Measure>? end = null;
        foreach (IEnumerable<IOperation?> alternative in alternatives)
        {
            _variables = new(start, SymbolEqualityComparer.Default);
            foreach (IOperation? statement in alternative) Evaluate(statement);
            end = end is null ? _variables : Common(end, _variables);
        }

        _variables = end ?? start;
    }

    private static Dictionary<ISymbol, Measure> Common(Dictionary<ISymbol, Measure> first, Dictionary<ISymbol, Measure> second)
    {
        Dictionary<ISymbol, Measure> common = new(SymbolEqualityComparer.Default);
        foreach (KeyValuePair<ISymbol, Measure> item in first)
        {
            if (!second.TryGetValue(item.Key, out Measure other)) continue;
            bool agree = item.Value.Unit is null || other.Unit is null || item.Value.Unit.Agrees(other.Unit);
            common[item.Key] = agree ? new(item.Value.Unit ?? other.Unit, item.Value.IsBare && other.IsBare) : Measure.Unknown;
        }

        return common;
    }
}
