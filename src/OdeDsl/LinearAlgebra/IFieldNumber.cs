using System.Runtime.CompilerServices;

namespace OdeDsl.LinearAlgebra;

/// <summary>What a factorisation needs of its numbers, so that real and complex matrices share one code.</summary>
internal interface IFieldNumber<T>
    where T : struct, IFieldNumber<T>
{
    /// <summary>A cheap measure of size: |real| + |imaginary|.</summary>
    double Size { get; }

    /// <summary>1 / this.</summary>
    T Reciprocal();

    static abstract T operator +(T left, double right);

    static abstract T operator *(T left, T right);

    /// <summary>this − a b.</summary>
    T Minus(T a, T b);
}

/// <summary>A real number.</summary>
internal readonly record struct RealNumber(double Value) : IFieldNumber<RealNumber>
{
    public double Size => Math.Abs(Value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static RealNumber operator +(RealNumber left, double right) => new(left.Value + right);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static RealNumber operator *(RealNumber left, RealNumber right) => new(left.Value * right.Value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public RealNumber Reciprocal() => new(1 / Value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public RealNumber Minus(RealNumber a, RealNumber b) => new(Math.FusedMultiplyAdd(-a.Value, b.Value, Value));
}

/// <summary>A complex number.</summary>
internal readonly record struct ComplexNumber(double Real, double Imaginary) : IFieldNumber<ComplexNumber>
{
    public double Size => Math.Abs(Real) + Math.Abs(Imaginary);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexNumber operator +(ComplexNumber left, double right) => new(left.Real + right, left.Imaginary);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexNumber operator *(ComplexNumber left, ComplexNumber right) => new(
        Math.FusedMultiplyAdd(left.Real, right.Real, -left.Imaginary * right.Imaginary),
        Math.FusedMultiplyAdd(left.Real, right.Imaginary, left.Imaginary * right.Real));

    /// <summary>1 / this by R. L. Smith's division (Communications of the ACM 5, 1962): no overflow for representable results.</summary>
    public ComplexNumber Reciprocal()
    {
        if (Math.Abs(Real) >= Math.Abs(Imaginary))
        {
            double ratio = Imaginary / Real, scale = 1 / (Real + Imaginary * ratio);
            return new ComplexNumber(scale, -ratio * scale);
        }
        else
        {
            double ratio = Real / Imaginary, scale = 1 / (Real * ratio + Imaginary);
            return new ComplexNumber(ratio * scale, -scale);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexNumber Minus(ComplexNumber a, ComplexNumber b) => new(
        Math.FusedMultiplyAdd(a.Imaginary, b.Imaginary, Math.FusedMultiplyAdd(-a.Real, b.Real, Real)),
        Math.FusedMultiplyAdd(-a.Imaginary, b.Real, Math.FusedMultiplyAdd(-a.Real, b.Imaginary, Imaginary)));

    /// <summary>Puts real and imaginary parts together.</summary>
    public static void Join(ReadOnlySpan<double> real, ReadOnlySpan<double> imaginary, Span<ComplexNumber> vector)
    {
        for (int i = 0; i < vector.Length; i++) vector[i] = new ComplexNumber(real[i], imaginary[i]);
    }

    /// <summary>Takes real and imaginary parts apart.</summary>
    public static void Split(ReadOnlySpan<ComplexNumber> vector, Span<double> real, Span<double> imaginary)
    {
        for (int i = 0; i < vector.Length; i++) (real[i], imaginary[i]) = (vector[i].Real, vector[i].Imaginary);
    }
}
