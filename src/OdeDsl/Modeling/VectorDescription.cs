using System.Collections.Immutable;
using System.Globalization;

namespace OdeDsl.Modeling;

/// <summary>Where a vector-valued state or parameter lies among all states or parameters.</summary>
/// <param name="Name">The property's name.</param>
/// <param name="Start">The position of its first element.</param>
/// <param name="Lengths">Its length, or its numbers of rows and columns; elements lie row by row.</param>
public sealed record VectorDescription(string Name, int Start, ImmutableArray<int> Lengths)
{
    /// <summary>The number of elements.</summary>
    public int Count { get; } = Lengths.Aggregate(1, static (product, length) => checked(product * length));

    /// <summary>The name of an element, as in <c>Temperature[3]</c> or <c>Temperature[3, 4]</c>.</summary>
    /// <param name="offset">The element's position within the vector.</param>
    /// <returns>The name.</returns>
    public string NameOf(int offset) => $"{Name}[{IndexText(offset)}]";

    /// <summary>The position among all states or parameters of the element with this name.</summary>
    /// <param name="name">A name as <see cref="NameOf"/> gives it; spaces do not matter.</param>
    /// <returns>The position, or -1 if the vector has no such element.</returns>
    public int IndexOf(ReadOnlySpan<char> name)
    {
        if (!name.StartsWith(Name, StringComparison.Ordinal)) return -1;
        name = name[Name.Length..];
        if (name is not ['[', .. var inner, ']']) return -1;
        int offset = 0, dimension = 0;
        foreach (Range part in inner.Split(','))
        {
            bool isIndex = dimension < Lengths.Length
                && int.TryParse(inner[part], NumberStyles.AllowLeadingWhite | NumberStyles.AllowTrailingWhite, CultureInfo.InvariantCulture, out int index)
                && index < Lengths[dimension]
                && (offset = offset * Lengths[dimension] + index) >= 0;
            if (!isIndex) return -1;
            dimension++;
        }

        return dimension == Lengths.Length ? Start + offset : -1;
    }

    internal string IndexText(int offset) => Lengths.Length == 1
        ? offset.ToString(CultureInfo.InvariantCulture)
        : string.Create(CultureInfo.InvariantCulture, $"{offset / Lengths[1]}, {offset % Lengths[1]}");
}
