using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>Makes C# identifiers.</summary>
internal static class Identifiers
{
    /// <summary>The identifier as it must be written: keywords get their <c>@</c>, also those that are keywords only in places.</summary>
    public static string Escape(string name) => UserText.Escaped(name);

    /// <summary>The name with a small first letter, as locals have it. The dots of a submodel's members are left out.</summary>
    public static string Local(string name) => char.ToLowerInvariant(name[0]) + Joined(name).Substring(1);

    /// <summary>The name with a capital first letter, as parts of names have it.</summary>
    public static string Part(string name) => char.ToUpperInvariant(name[0]) + Joined(name).Substring(1);

    private static string Joined(string name) => name.IndexOf('.') < 0
        ? name
        : string.Concat(name.Split('.').Select(static part => char.ToUpperInvariant(part[0]) + part.Substring(1)));
}

/// <summary>Hands out names that are not taken yet.</summary>
internal sealed class NameScope(IEnumerable<string> taken)
{
    private readonly HashSet<string> _taken = [.. taken];

    /// <summary>The wanted name, with a number behind it if it is taken. Not escaped.</summary>
    public string Claim(string wanted)
    {
        string name = wanted;
        for (int number = 2; !_taken.Add(name); number++) name = wanted + Literals.Integer(number);
        return name;
    }
}
