using System.Collections.Generic;
using System.Linq;

namespace OdeDsl.Generators.Writing;

/// <summary>The argument lists of printed methods.</summary>
internal static class Signatures
{
    public static string Parameters(Quantity quantity, bool withScratch = false)
    {
        List<string> parameters = ["double time"];
        parameters.AddRange(quantity.Inputs.Select(static input => "global::System.ReadOnlySpan<double> " + input));
        if (withScratch) parameters.Add("global::System.Span<double> scratch");
        parameters.Add("global::System.Span<double> " + quantity.Target);
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
