using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace OdeDsl.Integration;

/// <summary>
/// Sums y + c₁k₁ + c₂k₂ + ... over vectors padded with zeros to whole machine registers. The vectors have equal length;
/// the result may be one of them.
/// </summary>
internal static class StageSums
{
    /// <summary>Makes a zero vector padded to whole registers.</summary>
    public static double[] Allocate(int count) =>
        new double[(count + Vector<double>.Count - 1) / Vector<double>.Count * Vector<double>.Count];

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Combine(double[] result, double[] y, double c1, double[] k1)
    {
        ref double to = ref Ref(result), from = ref Ref(y), r1 = ref Ref(k1);
        var v1 = new Vector<double>(c1);
        for (nuint i = 0; i < (nuint)result.Length; i += (nuint)Vector<double>.Count)
            Vector.MultiplyAddEstimate(v1, Load(ref r1, i), Load(ref from, i)).StoreUnsafe(ref to, i);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Combine(double[] result, double[] y, double c1, double[] k1, double c2, double[] k2)
    {
        ref double to = ref Ref(result), from = ref Ref(y), r1 = ref Ref(k1), r2 = ref Ref(k2);
        var (v1, v2) = (new Vector<double>(c1), new Vector<double>(c2));
        for (nuint i = 0; i < (nuint)result.Length; i += (nuint)Vector<double>.Count)
        {
            Vector<double> sum = Add(v1, ref r1, i, Load(ref from, i));
            Add(v2, ref r2, i, sum).StoreUnsafe(ref to, i);
        }
    }

    /// <summary>Computes y + h (w₁k₁ + w₂k₂ + ...).</summary>
    public static void Combine(double[] result, double[] y, double h, double[] weights, double[][] k)
    {
        ref double to = ref Ref(result), from = ref Ref(y);
        var step = new Vector<double>(h);
        for (nuint i = 0; i < (nuint)result.Length; i += (nuint)Vector<double>.Count)
            Vector.MultiplyAddEstimate(step, Weigh(weights, k, i), Load(ref from, i)).StoreUnsafe(ref to, i);
    }

    /// <summary>Computes h (w₁k₁ + w₂k₂ + ...).</summary>
    public static void Sum(double[] result, double h, double[] weights, double[][] k)
    {
        ref double to = ref Ref(result);
        var step = new Vector<double>(h);
        for (nuint i = 0; i < (nuint)result.Length; i += (nuint)Vector<double>.Count) (step * Weigh(weights, k, i)).StoreUnsafe(ref to, i);
    }

    // The stage computed last comes last: the sum of the others need not wait for it.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector<double> Weigh(double[] weights, double[][] k, nuint at)
    {
        Vector<double> sum = new Vector<double>(weights[0]) * Load(ref Ref(k[0]), at);
        for (int j = 1; j < weights.Length; j++) sum = Add(new Vector<double>(weights[j]), ref Ref(k[j]), at, sum);
        return sum;
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector<double> Add(Vector<double> factor, ref double vector, nuint at, Vector<double> sum) =>
        Vector.MultiplyAddEstimate(factor, Load(ref vector, at), sum);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector<double> Load(ref double vector, nuint at) => Vector.LoadUnsafe(ref vector, at);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static ref double Ref(double[] vector) => ref MemoryMarshal.GetArrayDataReference(vector);
}
