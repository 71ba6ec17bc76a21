using System.Collections.Generic;
using System.Linq;
using System.Threading;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Algebra;

/// <summary>
/// Differentiates one row by everything it reads: single quantities, elements beside the row's own, and elements inside loops that add up,
/// each of which is a whole range of columns.
/// </summary>
internal sealed class JacobianRowBuilder(
    VectorEquations equations, Differentiator differentiator, RowGroup group, Operator element, CancellationToken cancellationToken)
{
    private readonly ExpressionGraph _graph = equations.Locked;
    private readonly VectorPart _vectors = equations.Model.Vectors!;
    private readonly HashSet<int> _own = [.. group.Ranges.Select(static range => range.Symbol)];
    private readonly List<int> _reached = Reach.Of(equations.Locked, [group.Locked]);

    public JacobianRow Build()
    {
        Operator scalar = element == Operator.StateElement ? Operator.State : Operator.Parameter;
        List<(int Column, int Node)> scalars = [];
        Dictionary<int, List<ElementEntry>> entries = [];
        foreach (int leaf in _reached)
        {
            cancellationToken.ThrowIfCancellationRequested();
            Node node = _graph[leaf];
            if (node.Operator == scalar && !IsLength(node) && Derivative(group.Locked, leaf) is { } derivative)
                scalars.Add((node.Index, derivative));
            if (node.Operator != element) continue;
            int vector = _vectors.Accesses[node.Index].Vector;
            if (!entries.TryGetValue(vector, out List<ElementEntry>? found)) entries.Add(vector, found = []);
            Collect(leaf, node.Index, [], found);
        }

        return new(
            [.. scalars.OrderBy(static entry => entry.Column)],
            [.. entries.Where(static pair => pair.Value.Count > 0).OrderBy(static pair => pair.Key).Select(pair => Columns(pair.Key, pair.Value))]);
    }

    private bool IsLength(Node node) => node.Operator == Operator.Parameter && equations.Model.Parameters[node.Index].IsWhole;

    private VectorColumns Columns(int vector, List<ElementEntry> entries)
    {
        bool isDense = entries.Any(static entry => entry.Loops.Count > 0);
        if (!isDense) entries.Sort(Compare);
        return new(vector, isDense, entries);
    }

    /// <summary>Follows an element (or a sum that contains it) outwards to the row.</summary>
    /// <param name="inner">The element or sum.</param>
    /// <param name="inside">The loops already passed, from the outside in; the last factor is the innermost.</param>
    private void Collect(int inner, int access, IReadOnlyList<(int Symbol, int Factor)> inside, List<ElementEntry> entries)
    {
        int loop = equations.Symbols[inner].Where(symbol => !_own.Contains(symbol)).DefaultIfEmpty(-1).Max();
        if (loop < 0)
        {
            if (Derivative(group.Locked, inner) is not { } outermost) return;
            // Loops hold (symbol, factor inside it); seen from outside each loop has the factor before it.
            List<(int, int)> loops = [];
            int factor = outermost;
            foreach ((int symbol, int next) in inside)
            {
                loops.Add((symbol, factor));
                factor = next;
            }

            entries.Add(new(access, loops, factor));
            return;
        }

        foreach (int sum in _reached.Where(index => _graph[index].Operator == Operator.Fold && _graph[index].Symbol == loop))
        {
            if (Derivative(_graph[sum].Second, inner) is { } factor) Collect(sum, access, [(loop, factor), .. inside], entries);
        }
    }

    private int? Derivative(int of, int by) => of == by
        ? differentiator.One
        : differentiator.Along([new(by, differentiator.One)], cancellationToken).TryGetValue(of, out int derivative) ? derivative : null;

    /// <summary>The order of elements; reading has made sure that it is the same for all rows of the group.</summary>
    private int Compare(ElementEntry first, ElementEntry second)
    {
        EquatableArray<Affine> a = _vectors.Accesses[first.Access].Indices, b = _vectors.Accesses[second.Access].Indices;
        for (int i = 0; i < a.Count; i++)
        {
            int order = SignOf(a[i] - b[i]);
            if (order != 0) return order;
        }

        return 0;
    }

    /// <summary>The sign of a form that keeps it for all elements: found at one element, with vectors so long that no range is empty.</summary>
    private int SignOf(Affine form)
    {
        const long Long = 1000;
        while (form.LastSymbol is >= 0 and int last)
        {
            SymbolDefinition symbol = _vectors.Symbols[last];
            form = form.Without(last) + (symbol.IsLength ? Affine.Of(System.Math.Max(symbol.Minimum, 0) + Long) : symbol.Lower).Times(form.FactorOf(last));
        }

        return System.Math.Sign(form.Constant);
    }
}
