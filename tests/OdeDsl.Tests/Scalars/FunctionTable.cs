using OdeDsl.Scalars;
using Xunit;

namespace OdeDsl.Tests.Scalars;

/// <summary>Every function of the contract by name, for any kind of number, with plain code beside it.</summary>
internal static class FunctionTable
{
    /// <summary>A function of one argument with the range of arguments, within its domain, that tests draw from.</summary>
    public sealed record Unary(string Name, Func<double, double> Plain, double Lower, double Upper);

    public sealed record Binary(string Name, Func<double, double, double> Plain);

    public static readonly Unary[] OfOne =
    [
        new("Negate", x => -x, -1e6, 1e6),
        new("Square", x => x * x, -1e6, 1e6),
        new("Sqrt", Math.Sqrt, 0, 1e6),
        new("Cbrt", Math.Cbrt, -1e6, 1e6),
        new("Exp", Math.Exp, -700, 700),
        new("Log", Math.Log, 1e-300, 1e6),
        new("Log2", Math.Log2, 1e-300, 1e6),
        new("Log10", Math.Log10, 1e-300, 1e6),
        new("Sin", Math.Sin, -1e4, 1e4),
        new("Cos", Math.Cos, -1e4, 1e4),
        new("Tan", Math.Tan, -1e4, 1e4),
        new("Asin", Math.Asin, -1, 1),
        new("Acos", Math.Acos, -1, 1),
        new("Atan", Math.Atan, -1e6, 1e6),
        new("Sinh", Math.Sinh, -700, 700),
        new("Cosh", Math.Cosh, -700, 700),
        new("Tanh", Math.Tanh, -30, 30),
        new("Asinh", Math.Asinh, -1e6, 1e6),
        new("Acosh", Math.Acosh, 1, 1e6),
        new("Atanh", Math.Atanh, -1, 1),
    ];

    public static readonly Binary[] OfTwo =
    [
        new("Add", (x, y) => x + y),
        new("Subtract", (x, y) => x - y),
        new("Multiply", (x, y) => x * y),
        new("Divide", (x, y) => x / y),
        new("Remainder", (x, y) => x % y),
        new("Pow", Math.Pow),
        new("LogBase", Math.Log),
        new("Atan2", Math.Atan2),
        new("CopySign", Math.CopySign),
        new("IEEERemainder", Math.IEEERemainder),
    ];

    public static TheoryData<string> UnaryNames => [.. OfOne.Select(f => f.Name)];

    public static TheoryData<string> BinaryNames => [.. OfTwo.Select(f => f.Name)];

    public static Unary One(string name) => OfOne.Single(f => f.Name == name);

    public static Binary Two(string name) => OfTwo.Single(f => f.Name == name);

    public static Func<T, T> One<T>(string name)
        where T : struct, IScalar<T> => name switch
        {
            "Negate" => x => -x,
            "Square" => T.Square,
            "Sqrt" => T.Sqrt,
            "Cbrt" => T.Cbrt,
            "Exp" => T.Exp,
            "Log" => T.Log,
            "Log2" => T.Log2,
            "Log10" => T.Log10,
            "Sin" => T.Sin,
            "Cos" => T.Cos,
            "Tan" => T.Tan,
            "Asin" => T.Asin,
            "Acos" => T.Acos,
            "Atan" => T.Atan,
            "Sinh" => T.Sinh,
            "Cosh" => T.Cosh,
            "Tanh" => T.Tanh,
            "Asinh" => T.Asinh,
            "Acosh" => T.Acosh,
            "Atanh" => T.Atanh,
            _ => throw new ArgumentOutOfRangeException(nameof(name), name, "No such function."),
        };

    public static Func<T, T, T> Two<T>(string name)
        where T : struct, IScalar<T> => name switch
        {
            "Add" => (x, y) => x + y,
            "Subtract" => (x, y) => x - y,
            "Multiply" => (x, y) => x * y,
            "Divide" => (x, y) => x / y,
            "Remainder" => (x, y) => x % y,
            "Pow" => T.Pow,
            "LogBase" => T.Log,
            "Atan2" => T.Atan2,
            "CopySign" => T.CopySign,
            "IEEERemainder" => T.IEEERemainder,
            _ => throw new ArgumentOutOfRangeException(nameof(name), name, "No such function."),
        };

    /// <summary>The same operation with a double on one side.</summary>
    public static (Func<T, double, T> Right, Func<double, T, T> Left) Mixed<T>(string name)
        where T : struct, IScalar<T> => name switch
        {
            "Add" => ((x, y) => x + y, (x, y) => x + y),
            "Subtract" => ((x, y) => x - y, (x, y) => x - y),
            "Multiply" => ((x, y) => x * y, (x, y) => x * y),
            "Divide" => ((x, y) => x / y, (x, y) => x / y),
            _ => throw new ArgumentOutOfRangeException(nameof(name), name, "No operator of that name takes a double."),
        };
}
