using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace OdeDsl.Integration;

/// <summary>Multiplies a matrix with padded vectors, component by component.</summary>
internal static class StageTransform
{
    private const int MostStages = 7;

    /// <summary>Computes yᵢ = Σⱼ mᵢⱼ xⱼ for the leading <paramref name="count"/> vectors on both sides. Results may replace the vectors.</summary>
    public static void Apply(double[,] m, int count, double[][] x, double[][] y)
    {
        Span<Vector<double>> values = stackalloc Vector<double>[MostStages];
        values = values[..count];
        ref double matrix = ref m[0, 0];
        int length = x[0].Length;
        for (int at = 0; at < length; at += Vector<double>.Count)
        {
            for (int j = 0; j < values.Length; j++) values[j] = Vector.LoadUnsafe(ref MemoryMarshal.GetArrayDataReference(x[j]), (nuint)at);
            for (int i = 0; i < count; i++)
            {
                ref double row = ref Unsafe.Add(ref matrix, i * count);
                Vector<double> sum = new Vector<double>(row) * values[0];
                for (int j = 1; j < values.Length; j++)
                    sum = Vector.MultiplyAddEstimate(new Vector<double>(Unsafe.Add(ref row, j)), values[j], sum);
                sum.StoreUnsafe(ref MemoryMarshal.GetArrayDataReference(y[i]), (nuint)at);
            }
        }
    }

    /// <summary>Computes yᵢ = Σⱼ mᵢⱼ xⱼ for a matrix of other shape by rows. Results must not replace the vectors.</summary>
    public static void Apply(ReadOnlySpan<double> m, int rows, int columns, double[][] x, double[][] y)
    {
        for (int at = 0; at < x[0].Length; at += Vector<double>.Count)
        {
            for (int i = 0; i < rows; i++)
            {
                Vector<double> sum = Vector<double>.Zero;
                for (int j = 0; j < columns; j++)
                {
                    sum = Vector.MultiplyAddEstimate(
                        new Vector<double>(m[i * columns + j]),
                        Vector.LoadUnsafe(ref MemoryMarshal.GetArrayDataReference(x[j]), (nuint)at),
                        sum);
                }

                sum.StoreUnsafe(ref MemoryMarshal.GetArrayDataReference(y[i]), (nuint)at);
            }
        }
    }
}
