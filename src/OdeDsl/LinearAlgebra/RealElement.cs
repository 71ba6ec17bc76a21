using System.Runtime.CompilerServices;

namespace OdeDsl.LinearAlgebra;

/// <summary>A real matrix entry.</summary>
/// <param name="Value">The number.</param>
public readonly record struct RealElement(double Value) : IMatrixElement<RealElement>
{
    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static RealElement Real(double value) => new(value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static RealElement operator +(RealElement left, RealElement right) => new(left.Value + right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static RealElement operator -(RealElement left, RealElement right) => new(left.Value - right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static RealElement operator *(RealElement left, RealElement right) => new(left.Value * right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static RealElement Inverse(RealElement value) => new(1 / value.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double Size(RealElement value) => Math.Abs(value.Value);
}
