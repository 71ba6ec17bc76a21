using System.Collections.Generic;
using System.Linq;

namespace OdeDsl.Generators.Writing;

/// <summary>The heads of printed methods and the calls to them.</summary>
internal static class Signatures
{
    /// <summary>Name, type parameters, parameters and constraint.</summary>
    public static string Head(string method, Quantity quantity, bool withScratch = false) =>
        $"{method}{quantity.Kind.TypeParameters}({Parameters(quantity, withScratch)}){quantity.Kind.Constraint}";

    public static string Parameters(Quantity quantity, bool withScratch = false)
    {
        List<string> parameters = [$"{quantity.Kind.Type} time"];
        parameters.AddRange(quantity.Inputs.Select(input => $"global::System.ReadOnlySpan<{quantity.Kind.TypeOf(input)}> {input}"));
        if (withScratch) parameters.Add($"global::System.Span<{quantity.Kind.Type}> scratch");
        parameters.Add($"global::System.Span<{quantity.Kind.Type}> {quantity.Target}");
        return string.Join(", ", parameters);
    }

    public static string Arguments(Quantity quantity, bool withScratch)
    {
        List<string> arguments = ["time", .. quantity.Inputs];
        if (withScratch) arguments.Add("scratch");
        arguments.Add(quantity.Target);
        return string.Join(", ", arguments);
    }
}
