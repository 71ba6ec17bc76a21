using System;
using System.Collections.Generic;
using System.Globalization;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Diagnostics.Advice;

/// <summary>The values that an expression takes while states go through their bounds and parameters have the values the model proposes.</summary>
internal readonly record struct ValueRange(double Lower, double Upper)
{
    public bool HoldsZero => Lower <= 0 && Upper >= 0;

    /// <param name="operation">The expression.</param>
    /// <param name="states">Receives the states it mentions.</param>
    /// <returns>
    /// The exact range, or null where it is not plain to see: in helpers, functions and where a state occurs twice, because the two
    /// occurrences do not vary alone.
    /// </returns>
    public static ValueRange? Of(IOperation operation, List<ISymbol> states)
    {
        if (operation.ConstantValue is { HasValue: true, Value: IConvertible constant and not string and not char and not bool })
        {
            double value = constant.ToDouble(CultureInfo.InvariantCulture);
            return new(value, value);
        }

        return operation switch
        {
            IParenthesizedOperation parenthesized => Of(parenthesized.Operand, states),
            IConversionOperation { OperatorMethod: null } conversion when ModelCode.IsDouble(conversion) => Of(conversion.Operand, states),
            IPropertyReferenceOperation reference => Of(reference.Property, states),
            IUnaryOperation { OperatorKind: UnaryOperatorKind.Minus, OperatorMethod: null } minus => Negated(Of(minus.Operand, states)),
            IBinaryOperation { OperatorMethod: null } binary => Of(binary, states),
            _ => null,
        };
    }

    private static ValueRange? Of(IPropertySymbol property, List<ISymbol> states)
    {
        if (Attributes.Find(property, Attributes.Parameter) is { } parameter)
            return Attributes.First<double?>(parameter) is { } value ? new(value, value) : null;
        if (Attributes.Find(property, Attributes.State) is not { } state || states.Contains(property, SymbolEqualityComparer.Default)) return null;
        states.Add(property);
        double? lower = Attributes.Named<double?>(state, "Lower", double.NegativeInfinity);
        double? upper = Attributes.Named<double?>(state, "Upper", double.PositiveInfinity);
        return lower is { } low && upper is { } high ? new(low, high) : null;
    }

    private static ValueRange? Of(IBinaryOperation binary, List<ISymbol> states)
    {
        if (Of(binary.LeftOperand, states) is not { } left || Of(binary.RightOperand, states) is not { } right) return null;
        return binary.OperatorKind switch
        {
            BinaryOperatorKind.Add => new(left.Lower + right.Lower, left.Upper + right.Upper),
            BinaryOperatorKind.Subtract => new(left.Lower - right.Upper, left.Upper - right.Lower),
            BinaryOperatorKind.Multiply => Product(left, right),
            _ => null,
        };
    }

    private static ValueRange? Negated(ValueRange? range) => range is { } given ? new(-given.Upper, -given.Lower) : null;

    private static ValueRange Product(ValueRange a, ValueRange b)
    {
        // 0 times an infinite bound: the bound is never reached, the product is 0.
        static double Times(double x, double y) => x == 0 || y == 0 ? 0 : x * y;
        double p = Times(a.Lower, b.Lower), q = Times(a.Lower, b.Upper), r = Times(a.Upper, b.Lower), s = Times(a.Upper, b.Upper);
        return new(Math.Min(Math.Min(p, q), Math.Min(r, s)), Math.Max(Math.Max(p, q), Math.Max(r, s)));
    }
}
