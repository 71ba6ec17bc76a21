using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace OdeDsl.LinearAlgebra;

/// <summary>
/// σ I − J factored row by row within a fixed pattern and order, without exchanges (T. A. Davis, Direct Methods for Sparse Linear Systems,
/// 2006, chapter 6): pivots are watched instead. Work and memory grow with the entries of the factors.
/// </summary>
internal sealed class SparseFactorization<T>
    where T : struct, IFieldNumber<T>
{
    private readonly SparseElimination plan;
    private readonly double worstPivot;
    private readonly T[] lower, upper, reciprocals, work;

    /// <param name="plan">The order and the entries.</param>
    /// <param name="worstPivot">
    /// A pivot smaller than this part of the diagonal entry it comes from, or larger by as much, has lost the digits that matter.
    /// </param>
    public SparseFactorization(SparseElimination plan, double worstPivot)
    {
        this.plan = plan;
        this.worstPivot = worstPivot;
        int n = plan.Order.Length;
        (lower, upper) = (new T[plan.LowerColumns.Length], new T[plan.UpperColumns.Length]);
        (reciprocals, work) = (new T[n], new T[n]);
    }

    /// <summary>The number of numbers held.</summary>
    public long EntryCount => lower.Length + upper.Length + 2L * reciprocals.Length;

    /// <summary>Loads and factors the matrix; false if a pivot is zero, not finite or of no accuracy.</summary>
    public bool Factor(ReadOnlySpan<double> jacobian, T shift)
    {
        ReadOnlySpan<int> starts = plan.Pattern.RowStarts.AsSpan();
        ref T w = ref MemoryMarshal.GetArrayDataReference(work);
        ref T u = ref MemoryMarshal.GetArrayDataReference(upper);
        ref int uColumns = ref MemoryMarshal.GetArrayDataReference(plan.UpperColumns);
        int[] uStarts = plan.UpperStarts, lStarts = plan.LowerStarts, lColumns = plan.LowerColumns;
        for (int i = 0; i < reciprocals.Length; i++)
        {
            int firstLower = lStarts[i], endLower = lStarts[i + 1], firstUpper = uStarts[i], endUpper = uStarts[i + 1];
            for (int at = firstLower; at < endLower; at++) Unsafe.Add(ref w, lColumns[at]) = default;
            for (int at = firstUpper; at < endUpper; at++) Unsafe.Add(ref w, Unsafe.Add(ref uColumns, at)) = default;
            work[i] = shift;
            int row = plan.Order[i];
            for (int entry = starts[row]; entry < starts[row + 1]; entry++) work[plan.EntryColumns[entry]] += -jacobian[entry];
            double before = work[i].Size;
            for (int at = firstLower; at < endLower; at++)
            {
                int k = lColumns[at];
                T factor = lower[at] = Unsafe.Add(ref w, k) * reciprocals[k];
                int end = uStarts[k + 1];
                for (int source = uStarts[k]; source < end; source++)
                {
                    ref T target = ref Unsafe.Add(ref w, Unsafe.Add(ref uColumns, source));
                    target = target.Minus(factor, Unsafe.Add(ref u, source));
                }
            }

            double size = work[i].Size;
            // Also false for pivots that are not numbers.
            if (!(size > worstPivot * before && size * worstPivot <= before && size <= double.MaxValue)) return false;
            reciprocals[i] = work[i].Reciprocal();
            for (int at = firstUpper; at < endUpper; at++) Unsafe.Add(ref u, at) = Unsafe.Add(ref w, Unsafe.Add(ref uColumns, at));
        }

        return true;
    }

    /// <summary>Solves with the factors. Vectors are in the matrix's own order.</summary>
    public void Solve(Span<T> vector)
    {
        int[] order = plan.Order, uStarts = plan.UpperStarts, lStarts = plan.LowerStarts, lColumns = plan.LowerColumns, uColumns = plan.UpperColumns;
        ref T x = ref MemoryMarshal.GetArrayDataReference(work);
        for (int i = 0; i < order.Length; i++)
        {
            T sum = vector[order[i]];
            for (int at = lStarts[i]; at < lStarts[i + 1]; at++) sum = sum.Minus(lower[at], Unsafe.Add(ref x, lColumns[at]));
            work[i] = sum;
        }

        for (int i = order.Length - 1; i >= 0; i--)
        {
            T sum = work[i];
            for (int at = uStarts[i]; at < uStarts[i + 1]; at++) sum = sum.Minus(upper[at], Unsafe.Add(ref x, uColumns[at]));
            vector[order[i]] = work[i] = sum * reciprocals[i];
        }
    }
}
