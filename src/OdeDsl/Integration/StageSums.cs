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

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Combine(
        double[] result, double[] y, double c1, double[] k1, double c2, double[] k2, double c3, double[] k3)
    {
        ref double to = ref Ref(result), from = ref Ref(y), r1 = ref Ref(k1), r2 = ref Ref(k2), r3 = ref Ref(k3);
        var (v1, v2, v3) = (new Vector<double>(c1), new Vector<double>(c2), new Vector<double>(c3));
        for (nuint i = 0; i < (nuint)result.Length; i += (nuint)Vector<double>.Count)
        {
            Vector<double> sum = Add(v1, ref r1, i, Load(ref from, i));
            sum = Add(v2, ref r2, i, sum);
            Add(v3, ref r3, i, sum).StoreUnsafe(ref to, i);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Combine(
        double[] result, double[] y, double c1, double[] k1, double c2, double[] k2, double c3, double[] k3, double c4, double[] k4)
    {
        ref double to = ref Ref(result), from = ref Ref(y);
        ref double r1 = ref Ref(k1), r2 = ref Ref(k2), r3 = ref Ref(k3), r4 = ref Ref(k4);
        var (v1, v2, v3, v4) = (new Vector<double>(c1), new Vector<double>(c2), new Vector<double>(c3), new Vector<double>(c4));
        for (nuint i = 0; i < (nuint)result.Length; i += (nuint)Vector<double>.Count)
        {
            Vector<double> sum = Add(v1, ref r1, i, Load(ref from, i));
            sum = Add(v2, ref r2, i, sum);
            sum = Add(v3, ref r3, i, sum);
            Add(v4, ref r4, i, sum).StoreUnsafe(ref to, i);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Combine(
        double[] result,
        double[] y,
        double c1,
        double[] k1,
        double c2,
        double[] k2,
        double c3,
        double[] k3,
        double c4,
        double[] k4,
        double c5,
        double[] k5)
    {
        ref double to = ref Ref(result), from = ref Ref(y);
        ref double r1 = ref Ref(k1), r2 = ref Ref(k2), r3 = ref Ref(k3), r4 = ref Ref(k4), r5 = ref Ref(k5);
        var (v1, v2, v3) = (new Vector<double>(c1), new Vector<double>(c2), new Vector<double>(c3));
        var (v4, v5) = (new Vector<double>(c4), new Vector<double>(c5));
        for (nuint i = 0; i < (nuint)result.Length; i += (nuint)Vector<double>.Count)
        {
            Vector<double> sum = Add(v1, ref r1, i, Load(ref from, i));
            sum = Add(v2, ref r2, i, sum);
            sum = Add(v3, ref r3, i, sum);
            sum = Add(v4, ref r4, i, sum);
            Add(v5, ref r5, i, sum).StoreUnsafe(ref to, i);
        }
    }

    /// <summary>Computes c₁k₁ + c₂k₂ + c₃k₃.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Combine(double[] result, double c1, double[] k1, double c2, double[] k2, double c3, double[] k3)
    {
        ref double to = ref Ref(result), r1 = ref Ref(k1), r2 = ref Ref(k2), r3 = ref Ref(k3);
        var (v1, v2, v3) = (new Vector<double>(c1), new Vector<double>(c2), new Vector<double>(c3));
        for (nuint i = 0; i < (nuint)result.Length; i += (nuint)Vector<double>.Count)
        {
            Vector<double> sum = Add(v2, ref r2, i, v1 * Load(ref r1, i));
            Add(v3, ref r3, i, sum).StoreUnsafe(ref to, i);
        }
    }

    /// <summary>Computes c₁k₁ + ... + c₆k₆.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Combine(
        double[] result,
        double c1,
        double[] k1,
        double c2,
        double[] k2,
        double c3,
        double[] k3,
        double c4,
        double[] k4,
        double c5,
        double[] k5,
        double c6,
        double[] k6)
    {
        ref double to = ref Ref(result);
        ref double r1 = ref Ref(k1), r2 = ref Ref(k2), r3 = ref Ref(k3), r4 = ref Ref(k4), r5 = ref Ref(k5), r6 = ref Ref(k6);
        var (v1, v2, v3) = (new Vector<double>(c1), new Vector<double>(c2), new Vector<double>(c3));
        var (v4, v5, v6) = (new Vector<double>(c4), new Vector<double>(c5), new Vector<double>(c6));
        for (nuint i = 0; i < (nuint)result.Length; i += (nuint)Vector<double>.Count)
        {
            Vector<double> sum = Add(v2, ref r2, i, v1 * Load(ref r1, i));
            sum = Add(v3, ref r3, i, sum);
            sum = Add(v4, ref r4, i, sum);
            sum = Add(v5, ref r5, i, sum);
            Add(v6, ref r6, i, sum).StoreUnsafe(ref to, i);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector<double> Add(Vector<double> factor, ref double vector, nuint at, Vector<double> sum) =>
        Vector.MultiplyAddEstimate(factor, Load(ref vector, at), sum);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector<double> Load(ref double vector, nuint at) => Vector.LoadUnsafe(ref vector, at);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static ref double Ref(double[] vector) => ref MemoryMarshal.GetArrayDataReference(vector);
}
