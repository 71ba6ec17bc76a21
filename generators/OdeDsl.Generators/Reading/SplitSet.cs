using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Reading;

/// <summary>
/// Where the range of an index must be split so that each condition on the index holds or fails on a whole segment: at places counted
/// from the start, and at places counted from the end.
/// </summary>
internal sealed class SplitSet(Affine lower, Affine upper)
{
    private readonly SortedSet<long> _fromStart = [];
    private readonly SortedSet<long> _fromEnd = [];

    /// <summary>Grows whenever the range is split further: what was read with its segments before is then out of date.</summary>
    public int Count => _fromStart.Count + _fromEnd.Count;

    /// <summary>The places, in order, with both ends of the range.</summary>
    private IEnumerable<Affine> Places => new[] { lower }
        .Concat(_fromStart.Select(offset => lower.Plus(offset)))
        .Concat(_fromEnd.Reverse().Select(offset => upper.Plus(-offset)))
        .Append(upper);

    /// <summary>Splits the range at a place.</summary>
    /// <returns>Whether that can be done: the order of the place to the others must be known.</returns>
    public bool Add(Affine place, VectorTables tables)
    {
        Affine fromStart = place - lower, fromEnd = upper - place;
        if ((fromStart.IsConstant && fromStart.Constant <= 0) || (fromEnd.IsConstant && fromEnd.Constant <= 0)) return true;
        if (!fromStart.IsConstant && !fromEnd.IsConstant) return false;
        (long start, long end) = fromStart.IsConstant
            ? (System.Math.Max(fromStart.Constant, Last(_fromStart)), Last(_fromEnd))
            : (Last(_fromStart), System.Math.Max(fromEnd.Constant, Last(_fromEnd)));
        if (!tables.Require((upper - lower).Plus(-start - end))) return false;
        if (fromStart.IsConstant) _fromStart.Add(fromStart.Constant);
        else _fromEnd.Add(fromEnd.Constant);
        return true;
    }

    /// <summary>The segments, in order. Those of more than one value get an index.</summary>
    public IndexRange[] Segments(string name, VectorTables tables)
    {
        Affine[] places = [.. Places];
        return [.. places.Zip(places.Skip(1), (from, to) =>
        {
            IndexRange range = new(from, to, -1);
            return (to - from) is { IsConstant: true, Constant: 1 } ? range : range with { Symbol = tables.AddIndex(name, range, this) };
        })];
    }

    /// <summary>The value an index has on a segment.</summary>
    public static Affine IndexOn(IndexRange range) => range.Symbol >= 0 ? Affine.OfSymbol(range.Symbol) : range.Lower;

    private static long Last(SortedSet<long> offsets) => offsets.Count == 0 ? 0 : offsets.Max;
}
