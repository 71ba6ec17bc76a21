using System.Collections.Generic;
using System.Linq;
using System.Threading;
using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <summary>
/// Reads the rate of a vector segment by segment: conditions on the index hold or fail on whole segments, so that none is left in the
/// loops. The segments are found while reading: a condition that is open on a segment splits it, and the rate is read again.
/// </summary>
internal sealed class VectorRateReader(
    ModelScope whole, BodyReader bodies, VectorTables tables, ExpressionGraph graph, Problems problems, CancellationToken cancellation)
{
    /// <summary>Segments of one index at most; more would mean a rate that is written out cell by cell.</summary>
    private const int LargestSplitCount = 200;

    /// <returns>The segments in the order of the elements; a rate with a problem has -1 for its node.</returns>
    public SegmentDefinition[] Read(DeclaredVector vector, ISymbol member)
    {
        string[] names = [.. ((IMethodSymbol)member).Parameters
            .Where(static parameter => parameter.Type.SpecialType == SpecialType.System_Int32).Select(static parameter => parameter.Name)];
        SplitSet[] splits = [.. vector.Lengths.Select(static length => new SplitSet(Affine.Zero, length))];
        (int, int) mark = bodies.Mark;
        while (true)
        {
            cancellation.ThrowIfCancellationRequested();
            int splitsBefore = splits.Sum(static set => set.Count);
            List<SegmentDefinition> segments = [];
            foreach (IndexRange outer in splits[0].Segments(names[0], tables))
            {
                if (splits.Length == 1) segments.Add(Read(member, [outer]));
                else segments.AddRange(splits[1].Segments(names[1], tables).Select(inner => Read(member, [outer, inner])));
            }

            int splitsAfter = splits.Sum(static set => set.Count);
            if (splitsAfter == splitsBefore) return [.. segments];
            bodies.GoBackTo(mark);
            if (splitsAfter <= LargestSplitCount) continue;
            problems.Report(Descriptors.IndexNotSupported, member.Locations[0], member.Name, "it treats too many elements apart");
            return [.. segments];
        }
    }

    private SegmentDefinition Read(ISymbol member, IndexRange[] ranges)
    {
        int? rate = bodies.Read(whole, member, [.. ranges.Select(SplitSet.IndexOn)]);
        if (rate is { } node)
        {
            RequireOrder(member, node);
            RequireFixedSwitches(member, node);
        }

        return new(new(ranges), rate ?? -1);
    }

    /// <summary>
    /// Elements of one vector that a rate reads must be told apart and put in order for a whole segment, because each of them is a
    /// column of the Jacobian: where T[i - 1] becomes T[0], the segment is split.
    /// </summary>
    private void RequireOrder(ISymbol member, int rate)
    {
        IEnumerable<IGrouping<(Operator, int), AccessDefinition>> vectors = Reach.Of(graph, [rate])
            .Select(index => graph[index])
            .Where(static node => node.Operator is Operator.StateElement or Operator.ParameterElement)
            .Select(node => (node.Operator, Access: tables.Access(node.Index)))
            .GroupBy(static element => (element.Operator, element.Access.Vector), static element => element.Access);
        foreach (IGrouping<(Operator, int), AccessDefinition> accesses in vectors)
        {
            AccessDefinition[] all = [.. accesses];
            for (int i = 0; i < all.Length; i++)
            {
                for (int j = 0; j < i; j++)
                {
                    if (IsOrdered(all[i], all[j])) continue;
                    problems.Report(
                        Descriptors.IndexNotSupported, member.Locations[0], member.Name, "it is open which of two elements it reads comes first");
                    return;
                }
            }
        }
    }

    /// <summary>
    /// A condition on an element inside a loop is one switching function for each pass; their number must not depend on an index outside.
    /// </summary>
    public void RequireFixedSwitches(ISymbol member, int equation)
    {
        Dictionary<int, HashSet<int>> open = [];
        foreach (int index in Reach.Of(graph, [equation]))
        {
            Node node = graph[index];
            HashSet<int> found = [.. node.Operands.SelectMany(operand => open[operand])];
            if (node.Operator == Operator.StateElement)
                found.UnionWith(tables.Access(node.Index).Indices.SelectMany(static form => form.Terms).Select(static term => term.Symbol).Where(tables.HasOpenRange));
            if (node.Operator == Operator.Fold) found.Remove(node.Symbol);
            open.Add(index, found);
            bool isSwitch = MathFunctions.HasKink(node.Operator)
                || node.Operator is Operator.Remainder or Operator.TableValue or (>= Operator.Less and <= Operator.GreaterOrEqual);
            if (!isSwitch || found.Count == 0) continue;
            problems.Report(
                Descriptors.LoopNotSupported, member.Locations[0], "its range depends on an index, and a condition in it on the elements; let it run over the whole vector");
            return;
        }
    }

    private bool IsOrdered(AccessDefinition first, AccessDefinition second)
    {
        for (int i = 0; i < first.Indices.Count; i++)
        {
            Affine difference = first.Indices[i] - second.Indices[i];
            // Elements inside a loop are added up where they meet others.
            if (difference.Terms.Any(term => tables.IsLoopIndex(term.Symbol))) return true;
            if (tables.SignForLongVectors(difference) is not { } sign) return false;
            if (sign != 0) return true;
        }

        return true;
    }
}
