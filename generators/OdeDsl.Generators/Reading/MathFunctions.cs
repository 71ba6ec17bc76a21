using System.Collections.Generic;
using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Reading;

/// <summary>The functions of reals in System.Math, and those of System.Double that are defined as calls of them.</summary>
internal static class MathFunctions
{
    private static readonly Dictionary<string, Operator> Unary = new()
    {
        ["Sqrt"] = Operator.Sqrt,
        ["Cbrt"] = Operator.Cbrt,
        ["Exp"] = Operator.Exp,
        ["Log"] = Operator.Log,
        ["Log2"] = Operator.Log2,
        ["Log10"] = Operator.Log10,
        ["Sin"] = Operator.Sin,
        ["Cos"] = Operator.Cos,
        ["Tan"] = Operator.Tan,
        ["Asin"] = Operator.Asin,
        ["Acos"] = Operator.Acos,
        ["Atan"] = Operator.Atan,
        ["Sinh"] = Operator.Sinh,
        ["Cosh"] = Operator.Cosh,
        ["Tanh"] = Operator.Tanh,
        ["Asinh"] = Operator.Asinh,
        ["Acosh"] = Operator.Acosh,
        ["Atanh"] = Operator.Atanh,
        ["Abs"] = Operator.Abs,
        ["Sign"] = Operator.Sign,
        ["Floor"] = Operator.Floor,
        ["Ceiling"] = Operator.Ceiling,
        ["Truncate"] = Operator.Truncate,
        ["Round"] = Operator.Round,
    };

    private static readonly Dictionary<string, Operator> Binary = new()
    {
        ["Log"] = Operator.LogBase,
        ["Pow"] = Operator.Pow,
        ["Atan2"] = Operator.Atan2,
        ["CopySign"] = Operator.CopySign,
        ["IEEERemainder"] = Operator.IEEERemainder,
        ["Ieee754Remainder"] = Operator.IEEERemainder,
        ["Min"] = Operator.Min,
        ["Max"] = Operator.Max,
        ["MinMagnitude"] = Operator.MinMagnitude,
        ["MaxMagnitude"] = Operator.MaxMagnitude,
    };

    private static readonly Dictionary<string, Operator> Ternary = new()
    {
        ["FusedMultiplyAdd"] = Operator.FusedMultiplyAdd,
        ["Clamp"] = Operator.Clamp,
    };

    /// <summary>What to do instead, for functions that cannot be part of an equation.</summary>
    private static readonly Dictionary<string, string> Instead = new()
    {
        ["SinCos"] = "call Math.Sin and Math.Cos",
        ["Round"] = "scale by hand, as in Math.Round(100 * x) / 100, with a constant rounding mode",
        ["ReciprocalEstimate"] = "write 1 / x, because the estimate differs between machines",
        ["ReciprocalSqrtEstimate"] = "write 1 / Math.Sqrt(x), because the estimate differs between machines",
        ["IsNaN"] = "state the range where the formula holds by a comparison",
        ["IsFinite"] = "state the range where the formula holds by a comparison",
        ["IsInfinity"] = "state the range where the formula holds by a comparison",
        ["ScaleB"] = "multiply by the power of two",
        ["Hypot"] = "write Math.Sqrt(x * x + y * y)",
        ["ExpM1"] = "write Math.Exp(x) - 1",
        ["LogP1"] = "write Math.Log(1 + x)",
        ["Lerp"] = "write a + (b - a) * x",
        ["DegreesToRadians"] = "write x * Math.PI / 180",
        ["RadiansToDegrees"] = "write x * 180 / Math.PI",
    };

    public static bool IsHome(INamedTypeSymbol type) =>
        type.SpecialType == SpecialType.System_Double
        || (type is { Name: "Math" or "MathF", ContainingType: null }
            && type.ContainingNamespace is { Name: "System", ContainingNamespace.IsGlobalNamespace: true });

    /// <summary>The operator of a function of doubles, or null.</summary>
    public static Operator? Find(IMethodSymbol method)
    {
        foreach (IParameterSymbol parameter in method.Parameters)
        {
            if (parameter.Type.SpecialType != SpecialType.System_Double) return null;
        }

        Dictionary<string, Operator>? table = method.Parameters.Length switch { 1 => Unary, 2 => Binary, 3 => Ternary, _ => null };
        return table is not null && table.TryGetValue(method.Name, out Operator operation) ? operation : null;
    }

    public static string AdviceFor(string name) =>
        Instead.TryGetValue(name, out string? advice) ? advice : "write it with arithmetic and the functions of System.Math on doubles";

    /// <summary>Whether a function has a kink or a jump, so that its place must be named to people.</summary>
    public static bool HasKink(Operator operation) =>
        operation is Operator.CopySign or Operator.IEEERemainder or (>= Operator.Abs and <= Operator.RoundAwayFromZero);
}
