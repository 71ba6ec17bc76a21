using System.Collections.Generic;
using System.Linq;
using Microsoft.CodeAnalysis;

namespace OdeDsl.Generators.Diagnostics;

/// <summary>Collects the problems of one model. The same problem at the same place is told once, however many equations use it.</summary>
internal sealed class Problems
{
    private readonly List<Diagnostic> _found = [];
    private readonly HashSet<(string Id, Location Place)> _told = [];

    public IReadOnlyList<Diagnostic> Found => _found;

    /// <summary>Forgets what was found since there were this many: it came from a reading that is done again.</summary>
    public void ForgetSince(int count)
    {
        foreach (Diagnostic forgotten in _found.Skip(count)) _told.Remove((forgotten.Id, forgotten.Location));
        _found.RemoveRange(count, _found.Count - count);
    }

    /// <param name="place">A true location in a syntax tree of the compilation, so that suppression by pragma works.</param>
    public void Report(DiagnosticDescriptor descriptor, Location place, params object[] arguments)
    {
        if (_told.Add((descriptor.Id, place))) _found.Add(Diagnostic.Create(descriptor, place, arguments));
    }
}
