using System.Collections.Generic;
using Microsoft.CodeAnalysis;

namespace OdeDsl.Generators.Reading;

/// <summary>Types whose members give another value at each call: clocks, random numbers, the surroundings of the process.</summary>
internal static class NotAFunction
{
    private static readonly HashSet<string> Names =
    [
        "System.Console",
        "System.DateOnly",
        "System.DateTime",
        "System.DateTimeOffset",
        "System.Diagnostics.Stopwatch",
        "System.Environment",
        "System.Guid",
        "System.Random",
        "System.TimeOnly",
        "System.TimeProvider",
    ];

    public static bool Contains(INamedTypeSymbol? type) => type is not null && Names.Contains(type.ToDisplayString());
}
