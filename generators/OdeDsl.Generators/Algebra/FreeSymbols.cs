using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Algebra;

/// <summary>The indices that expressions depend on: those of the loops that an expression must stand in. Inner loops have later symbols.</summary>
internal sealed class FreeSymbols(VectorPart vectors, ExpressionGraph graph)
{
    private static readonly SortedSet<int> None = [];

    private readonly Dictionary<int, SortedSet<int>> _known = [];
    private readonly List<SortedSet<int>> _switches = [];

    public SortedSet<int> this[int index]
    {
        get
        {
            if (!_known.ContainsKey(index))
            {
                foreach (int below in Reach.Of(graph, [index]))
                {
                    if (!_known.ContainsKey(below)) _known.Add(below, Find(graph[below]));
                }
            }

            return _known[index];
        }
    }

    /// <summary>The index of the innermost loop an expression must stand in, or -1.</summary>
    public int Innermost(int index) => this[index] is { Count: > 0 } symbols ? symbols.Max : -1;

    /// <summary>Notes the next family of switching functions: entries of the regime depend on the indices that their function depends on.</summary>
    /// <param name="value">The function; that of a table looks at its own entry.</param>
    public void AddSwitch(int value)
    {
        _switches.Add(this[value]);
        _known.Clear();
    }

    public EquatableArray<IndexRange> RangesOf(int index) => new([.. this[index].Select(symbol =>
        new IndexRange(vectors.Symbols[symbol].Lower, vectors.Symbols[symbol].Upper, symbol))]);

    private SortedSet<int> Find(Node node)
    {
        if (node.IsLeaf)
        {
            SortedSet<int> own = node.Operator switch
            {
                Operator.StateElement or Operator.ParameterElement or Operator.DirectionElement =>
                    [.. vectors.Accesses[node.Index].Indices.SelectMany(IndicesOf)],
                Operator.IndexNumber => [.. IndicesOf(vectors.Numbers[node.Index])],
                Operator.Accumulator => [node.Symbol],
                Operator.Side or Operator.WholeNumber => node.Index < _switches.Count ? _switches[node.Index] : None,
                _ => None,
            };
            return own;
        }

        SortedSet<int> found = [];
        foreach (int operand in node.Operands)
        {
            found.UnionWith(_known[operand]);
        }

        if (node.Operator is not (Operator.Fold or Operator.Sum)) return found;
        found.Remove(node.Symbol);
        found.UnionWith(BoundsOf(node.Symbol));
        return found;
    }

    /// <summary>The indices that the range of a loop depends on.</summary>
    private IEnumerable<int> BoundsOf(int symbol) => IndicesOf(vectors.Symbols[symbol].Lower).Concat(IndicesOf(vectors.Symbols[symbol].Upper));

    private IEnumerable<int> IndicesOf(Affine form) =>
        form.Terms.Select(static term => term.Symbol).Where(symbol => !vectors.Symbols[symbol].IsLength);
}
