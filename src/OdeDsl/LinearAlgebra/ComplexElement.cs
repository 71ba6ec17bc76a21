using System.Runtime.CompilerServices;

namespace OdeDsl.LinearAlgebra;

/// <summary>A complex matrix entry, laid out as <see cref="System.Numerics.Complex"/> is, with the plain formulas of arithmetic.</summary>
/// <param name="RealPart">The real part.</param>
/// <param name="ImaginaryPart">The imaginary part.</param>
public readonly record struct ComplexElement(double RealPart, double ImaginaryPart) : IMatrixElement<ComplexElement>
{
    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexElement Real(double value) => new(value, 0);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexElement operator +(ComplexElement left, ComplexElement right) =>
        new(left.RealPart + right.RealPart, left.ImaginaryPart + right.ImaginaryPart);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexElement operator -(ComplexElement left, ComplexElement right) =>
        new(left.RealPart - right.RealPart, left.ImaginaryPart - right.ImaginaryPart);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexElement operator *(ComplexElement left, ComplexElement right) => new(
        left.RealPart * right.RealPart - left.ImaginaryPart * right.ImaginaryPart,
        left.RealPart * right.ImaginaryPart + left.ImaginaryPart * right.RealPart);

    /// <inheritdoc/>
    /// <remarks>By R. L. Smith, Communications of the ACM 5 (1962) 435, which does not overflow before the result does.</remarks>
    public static ComplexElement Inverse(ComplexElement value)
    {
        (double a, double b) = (value.RealPart, value.ImaginaryPart);
        if (Math.Abs(a) >= Math.Abs(b))
        {
            double ratio = b / a, denominator = a + b * ratio;
            return new(1 / denominator, -ratio / denominator);
        }
        else
        {
            double ratio = a / b, denominator = a * ratio + b;
            return new(ratio / denominator, -1 / denominator);
        }
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double Size(ComplexElement value) => Math.Abs(value.RealPart) + Math.Abs(value.ImaginaryPart);
}
