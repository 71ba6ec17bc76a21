using System.Collections.Generic;
using System.Globalization;
using System.Linq;
using System.Runtime.CompilerServices;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Units;

/// <content>Expressions.</content>
internal sealed partial class UnitChecker
{
    private Measure Evaluate(IOperation? operation)
    {
        _cancellation.ThrowIfCancellationRequested();
        RuntimeHelpers.EnsureSufficientExecutionStack();
        return operation switch
        {
            ILiteralOperation literal => IsZero(literal) ? Measure.Zero : Measure.Bare,
            IConversionOperation conversion => Evaluate(conversion.Operand),
            IParenthesizedOperation inner => Evaluate(inner.Operand),
            ILocalReferenceOperation local => Variable(local.Local),
            IParameterReferenceOperation parameter => Variable(parameter.Parameter),
            IFieldReferenceOperation field => Field(field),
            IPropertyReferenceOperation property => Property(property),
            IInvocationOperation call => Call(call),
            IBinaryOperation binary => Binary(binary),
            IUnaryOperation unary => Unary(unary),
            IConditionalOperation { Type: not null } choice => Conditional(choice),
            ISwitchExpressionOperation choice => SwitchExpression(choice),
            IIsPatternOperation test => Pattern(test.Pattern, Evaluate(test.Value), test.Value),
            _ => Statement(operation),
        };
    }

    private static bool IsZero(IOperation literal) =>
        literal.ConstantValue is { HasValue: true, Value: System.IConvertible number and not (string or bool or char) }
        && number.ToDouble(CultureInfo.InvariantCulture) == 0;

    private Measure Variable(ISymbol variable) => _variables.TryGetValue(variable, out Measure measure) ? measure : Measure.Unknown;

    private Measure Field(IFieldReferenceOperation operation)
    {
        IFieldSymbol field = operation.Field;
        if (field.ContainingType.SpecialType == SpecialType.System_Double) return Measure.Unknown; // NaN, infinities, limits.
        return MathFunctions.IsHome(field.ContainingType) ? Measure.Bare : Member(field, []);
    }

    /// <summary>A member, or an element of one: elements have the unit of the whole.</summary>
    private Measure Property(IPropertyReferenceOperation operation)
    {
        foreach (IArgumentOperation argument in operation.Arguments) Evaluate(argument.Value);
        return operation.Arguments.Length > 0 && _stated.Of(operation.Property) is null
            ? Evaluate(operation.Instance)
            : Member(operation.Property, []);
    }

    private Measure Unary(IUnaryOperation operation)
    {
        Measure operand = Evaluate(operation.Operand);
        return operation.OperatorKind is UnaryOperatorKind.Minus or UnaryOperatorKind.Plus ? operand : Measure.Unknown;
    }

    private Measure Conditional(IConditionalOperation operation)
    {
        Evaluate(operation.Condition);
        return Joined([(Evaluate(operation.WhenTrue), operation.WhenTrue), (Evaluate(operation.WhenFalse), operation.WhenFalse!)]);
    }

    /// <summary>Follows a chain such as <c>a + b + c</c> from its left end, not by recursion: sums may have thousands of terms.</summary>
    private Measure Binary(IBinaryOperation operation)
    {
        Stack<IBinaryOperation> chain = new();
        IOperation first = operation;
        while (first is IBinaryOperation link)
        {
            chain.Push(link);
            first = link.LeftOperand;
        }

        Measure measure = Evaluate(first);
        while (chain.Count > 0)
        {
            IBinaryOperation link = chain.Pop();
            measure = Apply(link.OperatorKind, measure, link.LeftOperand, Evaluate(link.RightOperand), link.RightOperand);
        }

        return measure;
    }

    private Measure Apply(BinaryOperatorKind kind, Measure first, IOperation firstPlace, Measure second, IOperation secondPlace)
    {
        switch (kind)
        {
            case BinaryOperatorKind.Multiply:
                return Product(first, firstPlace, second, secondPlace, 1);
            case BinaryOperatorKind.Divide:
                return Product(first, firstPlace, second, secondPlace, -1);
            case BinaryOperatorKind.Add or BinaryOperatorKind.Subtract
                when first.Unit is { } a && second.Unit is { } b && (a.IsShifted || b.IsShifted) && a.Dimension.Equals(b.Dimension) && a.HasSizeOf(b):
                return Shifted(kind, a, b, secondPlace);
            case BinaryOperatorKind.Add or BinaryOperatorKind.Subtract:
                return Joined([(first, firstPlace), (second, secondPlace)]);
            case BinaryOperatorKind.Remainder:
                return Joined([(first, firstPlace), (second, secondPlace)]);
            case BinaryOperatorKind.And or BinaryOperatorKind.Or or BinaryOperatorKind.ConditionalAnd or BinaryOperatorKind.ConditionalOr:
                return Measure.Unknown;
            default:
                Joined([(first, firstPlace), (second, secondPlace)]);
                return Measure.Unknown;
        }
    }

    private Measure Product(Measure first, IOperation firstPlace, Measure second, IOperation secondPlace, int power)
    {
        const string Why = "a multiple of it means nothing";
        if (first.Unit is { IsShifted: true }) _complaints.Shifted(firstPlace, Why);
        else if (second.Unit is { IsShifted: true }) _complaints.Shifted(secondPlace, Why);
        else if (first.Unit is { } a && second.Unit is { } b) return new(a.Times(b, power), first.IsBare && second.IsBare);
        return Measure.Unknown;
    }

    /// <summary>Sums and differences with degrees Celsius: a difference of two is in kelvins, which in turn shift a temperature.</summary>
    private Measure Shifted(BinaryOperatorKind kind, Unit first, Unit second, IOperation secondPlace)
    {
        if (first.IsShifted && !second.IsShifted) return new(first);
        if (first.IsShifted && kind == BinaryOperatorKind.Subtract) return new(first.Difference());
        if (!first.IsShifted && kind == BinaryOperatorKind.Add) return new(second);
        _complaints.Shifted(secondPlace, first.IsShifted ? "a sum of two of them means nothing" : "it cannot be taken from kelvins");
        return Measure.Unknown;
    }

    private Measure SwitchExpression(ISwitchExpressionOperation operation)
    {
        Measure input = Evaluate(operation.Value);
        List<(Measure, IOperation)> values = [];
        foreach (ISwitchExpressionArmOperation arm in operation.Arms)
        {
            Pattern(arm.Pattern, input, operation.Value);
            if (arm.Guard is not null) Evaluate(arm.Guard);
            values.Add((Evaluate(arm.Value), arm.Value));
        }

        return Joined(values);
    }

    private Measure Pattern(IPatternOperation pattern, Measure input, IOperation inputPlace)
    {
        switch (pattern)
        {
            case IRelationalPatternOperation relational:
                Joined([(input, inputPlace), (Evaluate(relational.Value), relational.Value)]);
                break;
            case IConstantPatternOperation constant:
                Joined([(input, inputPlace), (Evaluate(constant.Value), constant.Value)]);
                break;
            case INegatedPatternOperation negated:
                Pattern(negated.Pattern, input, inputPlace);
                break;
            case IBinaryPatternOperation binary:
                Pattern(binary.LeftPattern, input, inputPlace);
                Pattern(binary.RightPattern, input, inputPlace);
                break;
            case IDeclarationPatternOperation { DeclaredSymbol: { } variable }:
                _variables[variable] = input;
                break;
        }

        return Measure.Unknown;
    }
}
