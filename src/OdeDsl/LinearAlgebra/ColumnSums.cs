using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace OdeDsl.LinearAlgebra;

/// <summary>
/// y ← y − c x over parts of columns that have room for one register before and after their entries, so that no
/// part needs a remainder loop: entries outside the part but inside the room may be overwritten only where stated.
/// </summary>
internal static class ColumnSums
{
    /// <summary>The room before the first and after the last entry of a column.</summary>
    public static int Room => Vector<double>.Count;

    /// <summary>The distance between columns of n entries.</summary>
    public static int Stride(int n) => n + 2 * Room;

    /// <summary>Entries from <paramref name="from"/> to the end; what follows the end is overwritten.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void SubtractBelow(double[] y, int yColumn, double c, double[] x, int xColumn, int from, int n)
    {
        ref double to = ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(y), yColumn + Room);
        ref double source = ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(x), xColumn + Room);
        var factor = new Vector<double>(-c);
        for (int i = from; i < n; i += Vector<double>.Count)
        {
            Vector<double> sum = Vector.MultiplyAddEstimate(
                factor, Vector.LoadUnsafe(ref source, (nuint)i), Vector.LoadUnsafe(ref to, (nuint)i));
            sum.StoreUnsafe(ref to, (nuint)i);
        }
    }

    /// <summary>Entries before <paramref name="end"/>; what precedes the first is overwritten.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void SubtractAbove(double[] y, double c, double[] x, int xColumn, int end)
    {
        ref double to = ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(y), Room);
        ref double source = ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(x), xColumn + Room);
        var factor = new Vector<double>(-c);
        for (int i = end - Vector<double>.Count; i > -Vector<double>.Count; i -= Vector<double>.Count)
        {
            ref double place = ref Unsafe.Add(ref to, i);
            Vector<double> sum = Vector.MultiplyAddEstimate(
                factor, Vector.LoadUnsafe(ref Unsafe.Add(ref source, i)), Vector.LoadUnsafe(ref place));
            sum.StoreUnsafe(ref place);
        }
    }
}
