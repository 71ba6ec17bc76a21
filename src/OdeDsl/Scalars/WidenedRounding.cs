using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace OdeDsl.Scalars;

/// <summary>
/// Rounding to nearest, then a step up: v + φ|v| + η with φ = 2⁻⁵³ (1 + 2⁻⁵²) and η the smallest subnormal number is at least the
/// successor of v (S. M. Rump, P. Zimmermann, S. Boldo, G. Melquiond, "Computing predecessor and successor in rounding to nearest",
/// 2009). Works on every machine; one or two units wider than needed.
/// </summary>
internal readonly struct WidenedRounding : IUpwardRounding
{
    private const double Phi = 1.1102230246251568e-16;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Sum(Vector128<double> left, Vector128<double> right) => left + right;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Product(Vector128<double> left, Vector128<double> right) => left * right;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Quotient(Vector128<double> left, Vector128<double> right) => left / right;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Finish(Vector128<double> raw) => Widen(raw, Phi, double.Epsilon);

    /// <summary>
    /// The value plus a part of its size and a distance. An overflow to −∞ first becomes the lowest double, which bounds it from above.
    /// </summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Widen(Vector128<double> raw, double relative, double absolute)
    {
        Vector128<double> lowest = Vector128.Create(double.MinValue);
        raw = Vector128.ConditionalSelect(Vector128.LessThan(raw, lowest), lowest, raw); // keeps NaN, as Max need not
        return raw + Vector128.FusedMultiplyAdd(Vector128.Create(relative), Vector128.Abs(raw), Vector128.Create(absolute));
    }
}
