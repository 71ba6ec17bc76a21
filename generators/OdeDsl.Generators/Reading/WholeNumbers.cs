using System;
using System.Numerics;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;

namespace OdeDsl.Generators.Reading;

/// <summary>Integer arithmetic as C# does it, on values that are known.</summary>
internal static class WholeNumbers
{
    /// <summary>Whether the type is an integer type of fixed size, an enumeration or char.</summary>
    public static bool IsWhole(ITypeSymbol? type) => type is not null && Size(type) is not null;

    /// <summary>A constant of such a type, or null.</summary>
    public static BigInteger? Read(object constant) => constant switch
    {
        int value => value,
        uint value => value,
        long value => value,
        ulong value => value,
        short value => value,
        ushort value => value,
        sbyte value => value,
        byte value => value,
        char value => value,
        _ => null,
    };

    /// <summary>Converts as C# does: rounds to nearest, ties to even, beyond 2^53.</summary>
    public static double ToDouble(BigInteger value) => value >= 0 ? (ulong)value : (double)(long)value;

    /// <exception cref="OverflowException">The value does not fit and the context is checked.</exception>
    public static BigInteger Fit(BigInteger value, ITypeSymbol type, bool isChecked)
    {
        (int bits, bool signed) = Size(type) ?? throw new ArgumentException("Not an integer type.", nameof(type));
        BigInteger span = BigInteger.One << bits;
        BigInteger lowest = signed ? -(span >> 1) : BigInteger.Zero;
        if (value >= lowest && value < lowest + span) return value;
        if (isChecked) throw new OverflowException("the result does not fit into " + type.ToDisplayString());
        BigInteger wrapped = (value - lowest) % span;
        return (wrapped < 0 ? wrapped + span : wrapped) + lowest;
    }

    /// <summary>The operation on two values, before it is fitted into its type; null where it is not supported.</summary>
    public static Func<BigInteger, BigInteger, BigInteger>? Arithmetic(BinaryOperatorKind kind, ITypeSymbol type)
    {
        int shiftMask = (Size(type)?.Bits ?? 32) - 1;
        return kind switch
        {
            BinaryOperatorKind.Add => static (a, b) => a + b,
            BinaryOperatorKind.Subtract => static (a, b) => a - b,
            BinaryOperatorKind.Multiply => static (a, b) => a * b,
            BinaryOperatorKind.Divide => static (a, b) => BigInteger.Divide(a, b),
            BinaryOperatorKind.Remainder => static (a, b) => BigInteger.Remainder(a, b),
            BinaryOperatorKind.And => static (a, b) => a & b,
            BinaryOperatorKind.Or => static (a, b) => a | b,
            BinaryOperatorKind.ExclusiveOr => static (a, b) => a ^ b,
            BinaryOperatorKind.LeftShift => (a, b) => a << (int)(b & shiftMask),
            BinaryOperatorKind.RightShift => (a, b) => a >> (int)(b & shiftMask),
            _ => null,
        };
    }

    public static Func<BigInteger, BigInteger, bool>? Relation(BinaryOperatorKind kind) => kind switch
    {
        BinaryOperatorKind.Equals => static (a, b) => a == b,
        BinaryOperatorKind.NotEquals => static (a, b) => a != b,
        BinaryOperatorKind.LessThan => static (a, b) => a < b,
        BinaryOperatorKind.LessThanOrEqual => static (a, b) => a <= b,
        BinaryOperatorKind.GreaterThan => static (a, b) => a > b,
        BinaryOperatorKind.GreaterThanOrEqual => static (a, b) => a >= b,
        _ => null,
    };

    /// <summary>A function of System.Math on integers: the same for every integer type, apart from overflow, which it throws on.</summary>
    public static Func<BigInteger, BigInteger, BigInteger>? Function(string name) => name switch
    {
        "Abs" => static (a, _) => BigInteger.Abs(a),
        "Sign" => static (a, _) => a.Sign,
        "Min" => static (a, b) => BigInteger.Min(a, b),
        "Max" => static (a, b) => BigInteger.Max(a, b),
        _ => null,
    };

    private static (int Bits, bool Signed)? Size(ITypeSymbol type) => type.SpecialType switch
    {
        SpecialType.System_Int32 => (32, true),
        SpecialType.System_UInt32 => (32, false),
        SpecialType.System_Int64 => (64, true),
        SpecialType.System_UInt64 => (64, false),
        SpecialType.System_Int16 => (16, true),
        SpecialType.System_UInt16 or SpecialType.System_Char => (16, false),
        SpecialType.System_SByte => (8, true),
        SpecialType.System_Byte => (8, false),
        _ => type is INamedTypeSymbol { EnumUnderlyingType: { } underlying } ? Size(underlying) : null,
    };
}
