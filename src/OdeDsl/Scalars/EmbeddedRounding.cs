using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;
using System.Runtime.Intrinsics.X86;

namespace OdeDsl.Scalars;

/// <summary>
/// Rounding up asked of the processor in the instruction itself (AVX-512 embedded rounding, which exists at full width): the tightest
/// bound. Only where <see cref="Avx512F.IsSupported"/>.
/// </summary>
internal readonly struct EmbeddedRounding : IUpwardRounding
{
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Sum(Vector128<double> left, Vector128<double> right) =>
        Lower(Avx512F.Add(Full(left), Full(right), FloatRoundingMode.ToPositiveInfinity));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Product(Vector128<double> left, Vector128<double> right) =>
        Lower(Avx512F.Multiply(Full(left), Full(right), FloatRoundingMode.ToPositiveInfinity));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Quotient(Vector128<double> left, Vector128<double> right) =>
        Lower(Avx512F.Divide(Full(left), Full(right), FloatRoundingMode.ToPositiveInfinity));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Finish(Vector128<double> raw) => raw;

    // The upper lanes are computed and thrown away, whatever is in them.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector512<double> Full(Vector128<double> vector) => vector.ToVector256Unsafe().ToVector512Unsafe();

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector128<double> Lower(Vector512<double> vector) => vector.GetLower().GetLower();
}
