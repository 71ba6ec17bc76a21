using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <content>Patterns, switch expressions and switch statements.</content>
internal sealed partial class BodyReader
{
    private Value SwitchExpression(ISwitchExpressionOperation operation)
    {
        if (operation.Type is IErrorTypeSymbol) return Unresolved(operation);
        Value input = Evaluate(operation.Value);
        if (!operation.IsExhaustive)
        {
            return operation.Syntax is SwitchExpressionSyntax syntax
                ? Problem(Descriptors.SwitchWithoutMatch, syntax.SwitchKeyword.GetLocation())
                : Problem(Descriptors.SwitchWithoutMatch, operation);
        }

        _current = operation;
        return Arm(operation, input, UserText.Of(operation.Value.Syntax), 0);
    }

    private Value Arm(ISwitchExpressionOperation operation, Value input, string inputText, int index)
    {
        ISwitchExpressionArmOperation arm = operation.Arms[index];
        int matches = Guarded(Match(arm.Pattern, input, inputText), arm.Guard);
        if (index == operation.Arms.Length - 1) return Evaluate(arm.Value); // The compiler found that no input is left over.
        return Fork(matches, () => Evaluate(arm.Value), () => Arm(operation, input, inputText, index + 1));
    }

    private int Guarded(int matches, IOperation? guard) => guard is null || matches == _conditions.False
        ? matches
        : ConditionOf(Fork(matches, () => Evaluate(guard), () => new ConditionValue(_conditions.False)));

    private void Switch(ISwitchOperation operation)
    {
        Value input = Evaluate(operation.Value);
        Flow before = _flow;
        int outside = _conditions.Or(before.Outside, before.Broken);
        _flow = before with { Broken = _conditions.False, AfterBreak = NoVariables, Outside = outside };
        Section(operation, input, UserText.Of(operation.Value.Syntax), 0);

        // Executions that broke out go on after the switch, together with those that ran to its end.
        var variables = _flow.Broken == _conditions.False ? _flow.Variables
            : IsOver(_flow) ? _flow.AfterBreak
            : Join(_flow.Broken, _flow.AfterBreak, _flow.Variables);
        _flow = _flow with { Variables = variables, Broken = before.Broken, AfterBreak = before.AfterBreak, Outside = before.Outside };
    }

    private void Section(ISwitchOperation operation, Value input, string inputText, int index)
    {
        if (index == operation.Cases.Length)
        {
            ISwitchCaseOperation? otherwise = operation.Cases.FirstOrDefault(
                static section => section.Clauses.Any(static clause => clause.CaseKind == CaseKind.Default));
            if (otherwise is not null) Body(otherwise);
            return;
        }

        int matches = _conditions.False;
        foreach (ICaseClauseOperation clause in operation.Cases[index].Clauses)
            matches = _conditions.Or(matches, Match(clause, input, inputText));
        Fork(matches, () => Body(operation.Cases[index]), () => Section(operation, input, inputText, index + 1));

        void Body(ISwitchCaseOperation section)
        {
            foreach (IOperation statement in section.Body)
            {
                if (IsOver(_flow)) break;
                Execute(statement);
            }
        }
    }

    private int Match(ICaseClauseOperation clause, Value input, string inputText) => clause switch
    {
        IDefaultCaseClauseOperation => _conditions.False,
        ISingleValueCaseClauseOperation single => MatchConstant(clause, input, Evaluate(single.Value)),
        IPatternCaseClauseOperation pattern => Guarded(Match(pattern.Pattern, input, inputText), pattern.Guard),
        _ => NoMatch(clause),
    };

    private int Match(IPatternOperation pattern, Value input, string inputText)
    {
        if (input is UnknownValue) return Undecided;
        switch (pattern)
        {
            case IDiscardPatternOperation:
                return _conditions.True;
            case IConstantPatternOperation constant:
                return MatchConstant(pattern, input, Evaluate(constant.Value));
            case IRelationalPatternOperation relational:
                Value bound = Evaluate(relational.Value);
                return (input, bound) switch
                {
                    (UnknownValue, _) or (_, UnknownValue) => Undecided,
                    (NumberValue a, NumberValue b) => ConditionOf(
                        Relation(pattern, relational.OperatorKind, a.Node, b.Node, inputText + " " + UserText.Of(pattern.Syntax))),
                    (WholeValue a, WholeValue b) => ConditionOf(Apply(pattern, relational.OperatorKind, a.Choice, b.Choice, null, false)),
                    (IndexValue, WholeValue) => ConditionOf(Apply(pattern, relational.OperatorKind, input, bound, null, false)),
                    _ => NoMatch(pattern),
                };
            case INegatedPatternOperation negated:
                return _conditions.Not(Match(negated.Pattern, input, inputText));
            case IBinaryPatternOperation binary:
                int first = Match(binary.LeftPattern, input, inputText);
                int second = Match(binary.RightPattern, input, inputText);
                return binary.OperatorKind == BinaryOperatorKind.And ? _conditions.And(first, second) : _conditions.Or(first, second);
            case IDeclarationPatternOperation declaration when MatchesAll(declaration):
                if (declaration.DeclaredSymbol is { } variable) Assign(variable, input);
                return _conditions.True;
            default:
                return NoMatch(pattern);
        }
    }

    /// <summary>Whether the pattern is <c>var x</c>, or names the very type of a number or condition.</summary>
    private static bool MatchesAll(IDeclarationPatternOperation pattern) =>
        pattern.MatchesNull
        || (pattern.InputType.IsValueType && SymbolEqualityComparer.Default.Equals(pattern.InputType, pattern.MatchedType));

    private int MatchConstant(IOperation pattern, Value input, Value constant) => (input, constant) switch
    {
        (UnknownValue, _) or (_, UnknownValue) => Undecided,
        // A pattern matches NaN, which equals nothing.
        (NumberValue a, NumberValue b) when double.IsNaN(_graph[b.Node].Constant) => _graph.Binary(Operator.NotEqual, a.Node, a.Node),
        (NumberValue a, NumberValue b) => _graph.Binary(Operator.Equal, a.Node, b.Node),
        (ConditionValue a, ConditionValue b) => _conditions.Equal(a.Node, b.Node),
        (WholeValue a, WholeValue b) => ConditionOf(Apply(pattern, BinaryOperatorKind.Equals, a.Choice, b.Choice, null, false)),
        (IndexValue, WholeValue) => ConditionOf(Apply(pattern, BinaryOperatorKind.Equals, input, constant, null, false)),
        _ => NoMatch(pattern),
    };

    private int NoMatch(IOperation pattern)
    {
        if (pattern is IInvalidOperation) Unresolved(pattern);
        else Problem(Descriptors.PatternNotSupported, pattern, "The pattern '" + UserText.Of(pattern.Syntax) + "'");
        return Undecided;
    }
}
