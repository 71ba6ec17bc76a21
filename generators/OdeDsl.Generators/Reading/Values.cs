using System.Numerics;

namespace OdeDsl.Generators.Reading;

/// <summary>What an expression of an equation stands for while it is read.</summary>
internal abstract record Value;

/// <summary>A double.</summary>
internal sealed record NumberValue(int Node) : Value;

/// <summary>A bool.</summary>
internal sealed record ConditionValue(int Node) : Value;

/// <summary>A value of an integer type, of an enumeration or a char: a choice between constants.</summary>
/// <param name="Number">The node that has the value as a double already, if there is one.</param>
internal sealed record WholeValue(Choice<BigInteger> Choice, int? Number = null) : Value;

/// <summary>A constant of another type: float, decimal, text or null. It can be passed on and, if it is a number, converted.</summary>
internal sealed record LiteralValue(object? Constant) : Value;

/// <summary>A table, by its position in the model.</summary>
internal sealed record TableReference(int Index) : Value;

/// <summary>The model itself or a submodel.</summary>
internal sealed record ModelValue(ModelScope Scope) : Value;

/// <summary>The value of code with a problem that is told already. It spreads silently.</summary>
internal sealed record UnknownValue : Value
{
    public static readonly UnknownValue Instance = new();
}
