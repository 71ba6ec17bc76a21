using System.Collections.Generic;
using System.Linq;
using Microsoft.CodeAnalysis;

namespace OdeDsl.Generators.Reading;

/// <summary>What reading a class gives: the model unless nothing can be generated for it, and the problems found.</summary>
/// <remarks>The two part ways in the pipeline: problems carry source locations, which change at almost every edit.</remarks>
internal sealed record ModelReading(ModelDefinition? Model, EquatableArray<Diagnostic> Problems)
{
    public static ModelReading Failed(IEnumerable<Diagnostic> problems) => new(null, new(problems.ToArray()));
}
