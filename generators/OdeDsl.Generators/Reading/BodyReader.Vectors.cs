using System.Collections.Generic;
using System.Linq;
using System.Numerics;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <content>Elements of vectors, and whole numbers that depend on an index or a length.</content>
internal sealed partial class BodyReader
{
    /// <summary>A vector or length of the model, or null if the property is neither.</summary>
    private Value? VectorOrLength(IPropertySymbol property)
    {
        if (_vectors.Vectors.TryGetValue(property.OriginalDefinition, out VectorValue? vector)) return vector;
        return _vectors.Lengths.TryGetValue(property.OriginalDefinition, out int length) ? new IndexValue(Affine.OfSymbol(length)) : null;
    }

    /// <summary>A whole number: a constant where it is one, so that all of C#'s arithmetic is there for it.</summary>
    private static Value WholeOf(Affine number) => number.IsConstant
        ? new WholeValue(new ChoiceLeaf<BigInteger>(number.Constant))
        : new IndexValue(number);

    private static Affine? AffineOf(Value value) => value switch
    {
        IndexValue index => index.Number,
        WholeValue { Choice: ChoiceLeaf<BigInteger> leaf } when BigInteger.Abs(leaf.Value) <= long.MaxValue => Affine.Of((long)leaf.Value),
        _ => null,
    };

    private int NumberOf(Affine number)
    {
        if (number is { Constant: 0, Terms: [{ Factor: 1, Symbol: var symbol }] } && _vectors.Symbols[symbol] is { IsLength: true } length)
            return _graph.Leaf(Operator.Parameter, length.Parameter);
        return number.IsConstant ? _graph.Constant((double)number.Constant) : _graph.Leaf(Operator.IndexNumber, _vectors.Intern(number));
    }

    /// <summary><c>Temperature.Length</c>.</summary>
    private Value? LengthOf(IPropertyReferenceOperation operation)
    {
        if (operation is not { Property: { Name: "Length", ContainingType.SpecialType: SpecialType.System_Array }, Instance: { } instance }) return null;
        return Evaluate(instance) switch
        {
            VectorValue { Lengths: [var length] } => WholeOf(length),
            VectorValue { Lengths: [{ IsConstant: true } rows, { IsConstant: true } columns] } => WholeOf(rows.Times(columns.Constant)),
            VectorValue => NotAffine(operation, "it is a product of lengths"),
            UnknownValue => UnknownValue.Instance,
            _ => Unsupported(operation),
        };
    }

    /// <summary><c>Temperature.GetLength(0)</c>.</summary>
    private Value? LengthOf(IInvocationOperation operation)
    {
        if (operation is not { TargetMethod: { Name: "GetLength", ContainingType.SpecialType: SpecialType.System_Array }, Instance: { } instance }) return null;
        if (Evaluate(instance) is not VectorValue vector) return Unsupported(operation);
        return AffineOf(Evaluate(operation.Arguments[0].Value)) is { IsConstant: true, Constant: var dimension }
            && dimension >= 0 && dimension < vector.Lengths.Count
            ? WholeOf(vector.Lengths[(int)dimension])
            : NotAffine(operation, "the dimension is not known");
    }

    private Value Element(IArrayElementReferenceOperation operation)
    {
        if (operation.ArrayReference is not (IPropertyReferenceOperation or ILocalReferenceOperation or IParameterReferenceOperation))
            return Unsupported(operation);
        Value array = Evaluate(operation.ArrayReference);
        if (array is UnknownValue) return array;
        if (array is not VectorValue vector) return Unsupported(operation);
        List<Affine> indices = [];
        for (int i = 0; i < operation.Indices.Length; i++)
        {
            IOperation index = operation.Indices[i];
            Affine length = vector.Lengths[i];
            // T[^1] counts from the end.
            bool isFromEnd = index is IUnaryOperation { OperatorKind: UnaryOperatorKind.Hat };
            Value value = Evaluate(isFromEnd ? ((IUnaryOperation)index).Operand : index);
            if (value is UnknownValue) return value;
            if (AffineOf(value) is not { } number) return NotAffine(index, "it depends on conditions");
            if (isFromEnd) number = length - number;
            if (!IsInside(operation, vector, number, length)) return UnknownValue.Instance;
            indices.Add(number);
        }

        _current = operation;
        int access = _vectors.Intern(new AccessDefinition(vector.Vector, new([.. indices])));
        return new NumberValue(_graph.Leaf(vector.IsParameter ? Operator.ParameterElement : Operator.StateElement, access));
    }

    /// <summary>Whether an index is one of the vector's; a length gets a larger least value if that is what it takes.</summary>
    private bool IsInside(IOperation operation, VectorValue vector, Affine index, Affine length)
    {
        string? where = !_vectors.Require(LeastOf(index)) ? "before the first element"
            : !_vectors.Require(LeastOf(length.Plus(-1) - index)) ? "behind the last element"
            : null;
        if (where is null) return true;
        Problem(Descriptors.IndexOutOfRange, operation, UserText.Of(operation.Syntax), where, vector.Name);
        return false;
    }

    /// <summary>The least value of a form over its indices, as a form of lengths.</summary>
    private Affine LeastOf(Affine form)
    {
        while (form.LastSymbol is >= 0 and int last && _vectors.Symbols[last] is { IsLength: false } index)
        {
            long factor = form.FactorOf(last);
            form = form.Without(last) + (factor > 0 ? index.Lower : index.Upper.Plus(-1)).Times(factor);
        }

        return form;
    }

    /// <summary>An operator of which at least one operand depends on an index or a length; null if it is not that.</summary>
    private Value? OnIndices(IOperation operation, BinaryOperatorKind kind, Value first, Value second)
    {
        if (first is not IndexValue && second is not IndexValue) return null;
        if (first is UnknownValue || second is UnknownValue) return UnknownValue.Instance;
        if (AffineOf(first) is not { } a || AffineOf(second) is not { } b)
            return NotAffine(operation, "one side depends on conditions");
        switch (kind)
        {
            case BinaryOperatorKind.Add: return WholeOf(a + b);
            case BinaryOperatorKind.Subtract: return WholeOf(a - b);
            case BinaryOperatorKind.Multiply when a.IsConstant: return WholeOf(b.Times(a.Constant));
            case BinaryOperatorKind.Multiply when b.IsConstant: return WholeOf(a.Times(b.Constant));
            case BinaryOperatorKind.Multiply: return NotAffine(operation, "it multiplies indices or lengths with one another");
            case BinaryOperatorKind.Remainder when _vectors.IsNotNegative(a) == true: return Remainder(operation, a, b);
            case BinaryOperatorKind.LessThan: return AtLeast(b - a.Plus(1), Operator.Less, a, b);
            case BinaryOperatorKind.LessThanOrEqual: return AtLeast(b - a, Operator.LessOrEqual, a, b);
            case BinaryOperatorKind.GreaterThan: return AtLeast(a - b.Plus(1), Operator.Greater, a, b);
            case BinaryOperatorKind.GreaterThanOrEqual: return AtLeast(a - b, Operator.GreaterOrEqual, a, b);
            case BinaryOperatorKind.Equals: return new ConditionValue(SameOrNot(a, b, Operator.Equal));
            case BinaryOperatorKind.NotEquals: return new ConditionValue(_conditions.Not(SameOrNot(a, b, Operator.Equal)));
            default: return NotAffine(operation, "this operator does not keep it a sum");
        }
    }

    private ConditionValue AtLeast(Affine difference, Operator relation, Affine a, Affine b) => new ConditionValue(_vectors.IsNotNegative(difference) switch
    {
        true => _conditions.True,
        false => _conditions.False,
        null => _graph.Binary(relation, NumberOf(a), NumberOf(b)),
    });

    private int SameOrNot(Affine a, Affine b, Operator relation) => _vectors.Sign(a - b) switch
    {
        0 => _conditions.True,
        null => _graph.Binary(relation, NumberOf(a), NumberOf(b)),
        _ => _conditions.False,
    };

    /// <summary>a % b for a from 0 to below 2 b, as in a ring of cells.</summary>
    private Value Remainder(IOperation operation, Affine a, Affine b)
    {
        if (_vectors.IsNotNegative(b - a.Plus(1)) is not { } isBelow) return NotAffine(operation, "the quotient is not known");
        if (isBelow) return WholeOf(a);
        return _vectors.IsNotNegative(b + b - a.Plus(1)) == true ? WholeOf(a - b) : NotAffine(operation, "the quotient is not known");
    }

    /// <summary>Math.Min and Math.Max of whole numbers: one of the two, on each segment of an index.</summary>
    private Value? OnIndices(IOperation operation, string function, Value[] arguments)
    {
        if (!arguments.Any(static argument => argument is IndexValue)) return null;
        if (function is not ("Min" or "Max") || AffineOf(arguments[0]) is not { } a || AffineOf(arguments[1]) is not { } b)
            return NotAffine(operation, "this function does not keep it a sum");
        if (_vectors.IsNotNegative(b - a) is not { } isOrdered) return NotAffine(operation, "which is larger is not known");
        return WholeOf(isOrdered == (function == "Min") ? a : b);
    }

    private UnknownValue NotAffine(IOperation operation, string reason) =>
        Problem(Descriptors.IndexNotSupported, operation, UserText.Of(operation.Syntax), reason);
}
