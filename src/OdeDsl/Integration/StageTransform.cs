using System.Numerics;
using System.Runtime.InteropServices;

namespace OdeDsl.Integration;

/// <summary>Multiplies a 3 × 3 matrix with three padded vectors, component by component. Results may replace the vectors.</summary>
internal static class StageTransform
{
    public static void Apply(double[,] m, double[] x1, double[] x2, double[] x3, double[] y1, double[] y2, double[] y3)
    {
        ref double a = ref MemoryMarshal.GetArrayDataReference(x1), b = ref MemoryMarshal.GetArrayDataReference(x2);
        ref double c = ref MemoryMarshal.GetArrayDataReference(x3), u = ref MemoryMarshal.GetArrayDataReference(y1);
        ref double v = ref MemoryMarshal.GetArrayDataReference(y2), w = ref MemoryMarshal.GetArrayDataReference(y3);
        var (m00, m01, m02) = (new Vector<double>(m[0, 0]), new Vector<double>(m[0, 1]), new Vector<double>(m[0, 2]));
        var (m10, m11, m12) = (new Vector<double>(m[1, 0]), new Vector<double>(m[1, 1]), new Vector<double>(m[1, 2]));
        var (m20, m21, m22) = (new Vector<double>(m[2, 0]), new Vector<double>(m[2, 1]), new Vector<double>(m[2, 2]));
        for (nuint i = 0; i < (nuint)x1.Length; i += (nuint)Vector<double>.Count)
        {
            Vector<double> p = Vector.LoadUnsafe(ref a, i), q = Vector.LoadUnsafe(ref b, i), r = Vector.LoadUnsafe(ref c, i);
            Vector.MultiplyAddEstimate(m02, r, Vector.MultiplyAddEstimate(m01, q, m00 * p)).StoreUnsafe(ref u, i);
            Vector.MultiplyAddEstimate(m12, r, Vector.MultiplyAddEstimate(m11, q, m10 * p)).StoreUnsafe(ref v, i);
            Vector.MultiplyAddEstimate(m22, r, Vector.MultiplyAddEstimate(m21, q, m20 * p)).StoreUnsafe(ref w, i);
        }
    }
}
