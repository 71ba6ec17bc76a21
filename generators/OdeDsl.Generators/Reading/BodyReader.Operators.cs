using System;
using System.Collections.Generic;
using System.Numerics;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <content>Operators and conversions.</content>
internal sealed partial class BodyReader
{
    /// <summary>Follows a chain such as <c>a + b + c</c> from its left end, not by recursion: sums may have thousands of terms.</summary>
    private Value Binary(IBinaryOperation operation)
    {
        if (operation.OperatorMethod is { } method) return UserDefined(operation, method);
        Stack<IBinaryOperation> chain = new();
        IOperation first = operation;
        while (first is IBinaryOperation { ConstantValue.HasValue: false, OperatorMethod: null } link)
        {
            chain.Push(link);
            first = link.LeftOperand;
        }

        Value value = Evaluate(first);
        while (chain.Count > 0)
        {
            _cancellation.ThrowIfCancellationRequested();
            IBinaryOperation link = chain.Pop();
            value = link.OperatorKind is BinaryOperatorKind.ConditionalAnd or BinaryOperatorKind.ConditionalOr
                ? Shortcut(link, value)
                : Binary(link, value, Evaluate(link.RightOperand));
        }

        return value;
    }

    private Value Shortcut(IBinaryOperation operation, Value first)
    {
        int condition = ConditionOf(first);
        return operation.OperatorKind == BinaryOperatorKind.ConditionalAnd
            ? Fork(condition, () => Evaluate(operation.RightOperand), () => new ConditionValue(_conditions.False))
            : Fork(condition, () => new ConditionValue(_conditions.True), () => Evaluate(operation.RightOperand));
    }

    private Value Binary(IBinaryOperation operation, Value first, Value second)
    {
        _current = operation;
        return Apply(operation, operation.OperatorKind, first, second, operation.Type, operation.IsChecked);
    }

    /// <param name="type">The type in which whole numbers are computed.</param>
    private Value Apply(IOperation operation, BinaryOperatorKind kind, Value first, Value second, ITypeSymbol? type, bool isChecked)
    {
        if (OnIndices(operation, kind, first, second) is { } index) return index;
        return (first, second) switch
        {
            (UnknownValue, _) or (_, UnknownValue) => UnknownValue.Instance,
            (NumberValue a, NumberValue b) => Apply(operation, kind, a.Node, b.Node),
            (ConditionValue a, ConditionValue b) => Logic(operation, kind, a.Node, b.Node),
            (WholeValue a, WholeValue b) => Apply(operation, kind, a.Choice, b.Choice, type, isChecked),
            (LiteralValue { Constant: float or decimal } literal, _) => Imprecise(operation, literal),
            (_, LiteralValue { Constant: float or decimal } literal) => Imprecise(operation, literal),
            _ => Unsupported(operation),
        };
    }

    private Value Apply(IOperation operation, BinaryOperatorKind kind, int first, int second)
    {
        Operator? found = kind switch
        {
            BinaryOperatorKind.Add => Operator.Add,
            BinaryOperatorKind.Subtract => Operator.Subtract,
            BinaryOperatorKind.Multiply => Operator.Multiply,
            BinaryOperatorKind.Divide => Operator.Divide,
            BinaryOperatorKind.Remainder => Operator.Remainder,
            _ => null,
        };
        if (found is not { } arithmetic) return Relation(operation, kind, first, second, UserText.Of(operation.Syntax));
        int node = _graph.Binary(arithmetic, first, second);
        if (arithmetic == Operator.Remainder) Remember(node, UserText.Of(operation.Syntax));
        return new NumberValue(node);
    }

    private Value Relation(IOperation operation, BinaryOperatorKind kind, int first, int second, string text)
    {
        Operator? found = kind switch
        {
            BinaryOperatorKind.LessThan => Operator.Less,
            BinaryOperatorKind.LessThanOrEqual => Operator.LessOrEqual,
            BinaryOperatorKind.GreaterThan => Operator.Greater,
            BinaryOperatorKind.GreaterThanOrEqual => Operator.GreaterOrEqual,
            BinaryOperatorKind.Equals => Operator.Equal,
            BinaryOperatorKind.NotEquals => Operator.NotEqual,
            _ => null,
        };
        if (found is not { } relation) return Unsupported(operation);
        int node = _graph.Binary(relation, first, second);
        if (relation is not (Operator.Equal or Operator.NotEqual)) Remember(node, text);
        return new ConditionValue(node);
    }

    private void Remember(int node, string text)
    {
        if (!ConditionTexts.ContainsKey(node)) ConditionTexts.Add(node, _scope.Path.Length == 0 ? text : _scope.Path.TrimEnd('.') + ": " + text);
    }

    private Value Logic(IOperation operation, BinaryOperatorKind kind, int first, int second) => kind switch
    {
        BinaryOperatorKind.And => new ConditionValue(_conditions.And(first, second)),
        BinaryOperatorKind.Or => new ConditionValue(_conditions.Or(first, second)),
        BinaryOperatorKind.Equals => new ConditionValue(_conditions.Equal(first, second)),
        BinaryOperatorKind.ExclusiveOr or BinaryOperatorKind.NotEquals =>
            new ConditionValue(_conditions.Not(_conditions.Equal(first, second))),
        _ => Unsupported(operation),
    };

    private Value Apply(
        IOperation operation,
        BinaryOperatorKind kind,
        Choice<BigInteger> first,
        Choice<BigInteger> second,
        ITypeSymbol? type,
        bool isChecked)
    {
        if (WholeNumbers.Relation(kind) is { } relation)
        {
            return new ConditionValue(first.Combine(second, relation)
                .Fold(holds => holds ? _conditions.True : _conditions.False, _conditions.Choose));
        }

        if (type is null || !WholeNumbers.IsWhole(type)) return Unsupported(operation);
        if (WholeNumbers.Arithmetic(kind, type) is not { } arithmetic) return Unsupported(operation);
        isChecked |= kind == BinaryOperatorKind.Divide; // The one quotient that does not fit throws in either context.
        return Whole(operation, () => first.Combine(second, (a, b) => WholeNumbers.Fit(arithmetic(a, b), type, isChecked)));
    }

    /// <summary>Runs integer arithmetic and reports what makes it fail.</summary>
    private Value Whole(IOperation operation, Func<Choice<BigInteger>> arithmetic)
    {
        try
        {
            return Bounded(arithmetic());
        }
        catch (ArithmeticException fault)
        {
            string reason = fault is DivideByZeroException ? "it divides by zero" : "its result does not fit into its type";
            return Problem(Descriptors.WholeNumberFault, operation, UserText.Of(operation.Syntax), reason);
        }
    }

    private Value Unary(IUnaryOperation operation)
    {
        if (operation.OperatorMethod is not null) return UserDefined(operation, operation.OperatorMethod);
        Value value = Evaluate(operation.Operand);
        return (operation.OperatorKind, value) switch
        {
            (_, UnknownValue) => value,
            (UnaryOperatorKind.Plus, NumberValue or WholeValue or IndexValue) => value,
            (UnaryOperatorKind.Minus, IndexValue index) => WholeOf(index.Number.Times(-1)),
            (UnaryOperatorKind.Minus, NumberValue number) => new NumberValue(_graph.Unary(Operator.Negate, number.Node)),
            (UnaryOperatorKind.Not, ConditionValue condition) => new ConditionValue(_conditions.Not(condition.Node)),
            (UnaryOperatorKind.Minus, WholeValue whole) when WholeNumbers.IsWhole(operation.Type) =>
                Whole(operation, () => whole.Choice.Select(a => WholeNumbers.Fit(-a, operation.Type!, operation.IsChecked))),
            (UnaryOperatorKind.BitwiseNegation, WholeValue whole) when WholeNumbers.IsWhole(operation.Type) =>
                Whole(operation, () => whole.Choice.Select(a => WholeNumbers.Fit(-a - 1, operation.Type!, isChecked: false))),
            (_, LiteralValue { Constant: float or decimal } literal) => Imprecise(operation, literal),
            _ => Unsupported(operation),
        };
    }

    private Value Conversion(IConversionOperation operation)
    {
        if (operation.OperatorMethod is not null) return UserDefined(operation, operation.OperatorMethod);
        Value value = Evaluate(operation.Operand);
        if (value is UnknownValue || operation.Conversion.IsIdentity) return value;
        if (!operation.Conversion.Exists) return Unresolved(operation);
        ITypeSymbol? target = operation.Type;
        return (value, target?.SpecialType) switch
        {
            (NumberValue, SpecialType.System_Double) => value,
            (WholeValue or IndexValue, SpecialType.System_Double) => new NumberValue(Node(value)),
            (IndexValue, SpecialType.System_Int32 or SpecialType.System_Int64) => value,
            (LiteralValue { Constant: float single }, SpecialType.System_Double) => new NumberValue(_graph.Constant((double)single)),
            (WholeValue whole, _) when WholeNumbers.IsWhole(target) =>
                Whole(operation, () => whole.Choice.Select(a => WholeNumbers.Fit(a, target!, operation.IsChecked))),
            (NumberValue or LiteralValue { Constant: float or decimal }, _) when WholeNumbers.IsWhole(target) =>
                Problem(Descriptors.WholeNumberUnknown, operation, UserText.Of(operation.Syntax), target!.ToDisplayString()),
            (LiteralValue { Constant: decimal } literal, SpecialType.System_Double) =>
                Imprecise(operation, literal),
            (_, SpecialType.System_Single or SpecialType.System_Decimal) =>
                Problem(Descriptors.NotDoublePrecision, operation, UserText.Of(operation.Syntax), target!.ToDisplayString()),
            (ModelValue, _) when operation.Conversion.IsReference && target is { TypeKind: TypeKind.Class } => value,
            _ => Problem(
                Descriptors.ExpressionNotSupported,
                operation,
                "A conversion to '" + target?.ToDisplayString() + "'",
                "use double, bool and whole-number constants"),
        };
    }

    private UnknownValue Imprecise(IOperation operation, LiteralValue literal) =>
        Problem(Descriptors.NotDoublePrecision, operation, UserText.Of(operation.Syntax), literal.Constant is float ? "float" : "decimal");

    private UnknownValue UserDefined(IOperation operation, IMethodSymbol method) =>
        Problem(Descriptors.UserDefinedOperator, operation, UserText.Of(operation.Syntax), method.ToDisplayString());
}
