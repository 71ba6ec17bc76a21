using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace OdeDsl.Scalars;

/// <summary>Eight trajectories side by side: one number of each in the lanes of a <see cref="Vector512{T}"/>.</summary>
/// <remarks>
/// <para>The operators, the square root and <see cref="FusedMultiplyAdd"/> round in every lane as a double does. The other functions
/// differ from <see cref="Math"/> by at most so many units in the last place, over all magnitudes at which the result is a normal number
/// (measured over the range and kept by tests): <see cref="Sin"/> and <see cref="Cos"/> 1, <see cref="Exp"/> 2, <see cref="Log(Lanes8)"/>
/// 3, <see cref="Log2"/>, <see cref="Tan"/>, <see cref="Pow"/> and <see cref="Cosh"/> 4, <see cref="Log10"/>, <see cref="Sinh"/> and
/// <see cref="Tanh"/> 5. The inverse functions, <see cref="Cbrt"/>, logarithms to other bases and the remainders call <see cref="Math"/>
/// lane by lane and equal it bit for bit. Zeros, infinities and NaN give what <see cref="Math"/> gives.</para>
/// <para>Only worth using where <see cref="Vector512.IsHardwareAccelerated"/>; elsewhere it is right but slower than one trajectory after
/// another. Equality compares lane by lane as doubles do: NaN equals nothing.</para>
/// </remarks>
public readonly struct Lanes8 : ILanes<Lanes8>, IEquatable<Lanes8>
{
    /// <summary>The number of lanes.</summary>
    public const int Count = 8;

    /// <summary>Takes the lanes from a vector.</summary>
    /// <param name="vector">The lanes.</param>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Lanes8(Vector512<double> vector) => Vector = vector;

    /// <summary>Takes the lanes from the first eight numbers of a span.</summary>
    /// <param name="lanes">The numbers.</param>
    /// <exception cref="ArgumentOutOfRangeException">The span has fewer than eight numbers.</exception>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Lanes8(ReadOnlySpan<double> lanes) => Vector = Vector512.Create(lanes);

    /// <summary>The lanes.</summary>
    public Vector512<double> Vector { get; }

    /// <summary>The number in a lane.</summary>
    /// <param name="lane">From 0 to 7.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such lane.</exception>
    public double this[int lane]
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => Vector[lane];
    }

    /// <summary>Writes the lanes to the first eight places of a span.</summary>
    /// <param name="lanes">Receives the numbers.</param>
    /// <exception cref="ArgumentException">The span has fewer than eight places.</exception>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void CopyTo(Span<double> lanes) => Vector.CopyTo(lanes);

    /// <inheritdoc/>
    public bool Equals(Lanes8 other) => Vector512.EqualsAll(Vector, other.Vector);

    /// <inheritdoc/>
    public override bool Equals(object? obj) => obj is Lanes8 other && Equals(other);

    /// <inheritdoc/>
    public override int GetHashCode() => Vector.GetHashCode();

    /// <summary>The lanes in brackets.</summary>
    public override string ToString() => Vector.ToString();

    /// <summary>Whether all lanes are equal.</summary>
    /// <param name="left">Left side.</param>
    /// <param name="right">Right side.</param>
    public static bool operator ==(Lanes8 left, Lanes8 right) => left.Equals(right);

    /// <summary>Whether any lane differs.</summary>
    /// <param name="left">Left side.</param>
    /// <param name="right">Right side.</param>
    public static bool operator !=(Lanes8 left, Lanes8 right) => !left.Equals(right);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 Constant(double value) => new(Vector512.Create(value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator +(Lanes8 left, Lanes8 right) => new(left.Vector + right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator +(Lanes8 left, double right) => new(left.Vector + Vector512.Create(right));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator +(double left, Lanes8 right) => new(Vector512.Create(left) + right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator -(Lanes8 left, Lanes8 right) => new(left.Vector - right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator -(Lanes8 left, double right) => new(left.Vector - Vector512.Create(right));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator -(double left, Lanes8 right) => new(Vector512.Create(left) - right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator *(Lanes8 left, Lanes8 right) => new(left.Vector * right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator *(Lanes8 left, double right) => new(left.Vector * Vector512.Create(right));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator *(double left, Lanes8 right) => new(Vector512.Create(left) * right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator /(Lanes8 left, Lanes8 right) => new(left.Vector / right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator /(Lanes8 left, double right) => new(left.Vector / Vector512.Create(right));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator /(double left, Lanes8 right) => new(Vector512.Create(left) / right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator -(Lanes8 value) => new(-value.Vector);

    /// <inheritdoc/>
    public static Lanes8 operator %(Lanes8 left, Lanes8 right) => Map(static (a, b) => a % b, left, right);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 Square(Lanes8 x) => new(x.Vector * x.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 FusedMultiplyAdd(Lanes8 x, Lanes8 y, Lanes8 z) => new(Vector512.FusedMultiplyAdd(x.Vector, y.Vector, z.Vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 Sqrt(Lanes8 x) => new(Vector512.Sqrt(x.Vector));

    /// <inheritdoc/>
    public static Lanes8 Cbrt(Lanes8 x) => Map(Math.Cbrt, x);

    /// <inheritdoc/>
    public static Lanes8 Exp(Lanes8 x) => new(Vector512.Exp(x.Vector));

    /// <inheritdoc/>
    public static Lanes8 Log(Lanes8 x) => new(Vector512.Log(x.Vector));

    /// <inheritdoc/>
    public static Lanes8 Log(Lanes8 x, Lanes8 newBase) => Map(Math.Log, x, newBase);

    /// <inheritdoc/>
    public static Lanes8 Log2(Lanes8 x) => new(Vector512.Log2(x.Vector));

    /// <inheritdoc/>
    public static Lanes8 Log10(Lanes8 x) => LaneFunctions.Log10(x);

    /// <inheritdoc/>
    public static Lanes8 Pow(Lanes8 x, Lanes8 y) => LanePower.Pow(x, y);

    /// <inheritdoc/>
    public static Lanes8 Sin(Lanes8 x) => new(Vector512.Sin(x.Vector));

    /// <inheritdoc/>
    public static Lanes8 Cos(Lanes8 x) => new(Vector512.Cos(x.Vector));

    /// <inheritdoc/>
    public static Lanes8 Tan(Lanes8 x) => LaneFunctions.Tan(x);

    /// <inheritdoc/>
    public static Lanes8 Asin(Lanes8 x) => Map(Math.Asin, x);

    /// <inheritdoc/>
    public static Lanes8 Acos(Lanes8 x) => Map(Math.Acos, x);

    /// <inheritdoc/>
    public static Lanes8 Atan(Lanes8 x) => Map(Math.Atan, x);

    /// <inheritdoc/>
    public static Lanes8 Atan2(Lanes8 y, Lanes8 x) => Map(Math.Atan2, y, x);

    /// <inheritdoc/>
    public static Lanes8 Sinh(Lanes8 x) => LaneFunctions.Sinh(x);

    /// <inheritdoc/>
    public static Lanes8 Cosh(Lanes8 x) => LaneFunctions.Cosh(x);

    /// <inheritdoc/>
    public static Lanes8 Tanh(Lanes8 x) => LaneFunctions.Tanh(x);

    /// <inheritdoc/>
    public static Lanes8 Asinh(Lanes8 x) => Map(Math.Asinh, x);

    /// <inheritdoc/>
    public static Lanes8 Acosh(Lanes8 x) => Map(Math.Acosh, x);

    /// <inheritdoc/>
    public static Lanes8 Atanh(Lanes8 x) => Map(Math.Atanh, x);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 CopySign(Lanes8 x, Lanes8 y) => new(Vector512.CopySign(x.Vector, y.Vector));

    /// <inheritdoc/>
    public static Lanes8 IEEERemainder(Lanes8 x, Lanes8 y) => Map(Math.IEEERemainder, x, y);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 Min(Lanes8 left, Lanes8 right) => new(Vector512.Min(left.Vector, right.Vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 Max(Lanes8 left, Lanes8 right) => new(Vector512.Max(left.Vector, right.Vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 Floor(Lanes8 x) => new(Vector512.Floor(x.Vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 Condition(bool holds) => new(holds ? Vector512<double>.AllBitsSet : Vector512<double>.Zero);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 Less(Lanes8 left, Lanes8 right) => new(Vector512.LessThan(left.Vector, right.Vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 LessOrEqual(Lanes8 left, Lanes8 right) => new(Vector512.LessThanOrEqual(left.Vector, right.Vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 Equal(Lanes8 left, Lanes8 right) => new(Vector512.Equals(left.Vector, right.Vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 Choose(Lanes8 condition, Lanes8 whenTrue, Lanes8 whenFalse) =>
        new(Vector512.ConditionalSelect(condition.Vector, whenTrue.Vector, whenFalse.Vector));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    static Lanes8 ILanes<Lanes8>.Abs(Lanes8 x) => new(Vector512.Abs(x.Vector));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    static Lanes8 ILanes<Lanes8>.Round(Lanes8 x) => new(Vector512.Round(x.Vector));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    static Lanes8 ILanes<Lanes8>.And(Lanes8 left, Lanes8 right) => new(left.Vector & right.Vector);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    static Lanes8 ILanes<Lanes8>.AndNot(Lanes8 left, Lanes8 right) => new(Vector512.AndNot(left.Vector, right.Vector));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    static bool ILanes<Lanes8>.All(Lanes8 mask) => Vector512.EqualsAll(mask.Vector.AsInt64(), Vector512<long>.AllBitsSet);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    static (Lanes8 Mantissa, Lanes8 Exponent) ILanes<Lanes8>.Split(Lanes8 x)
    {
        // Counting from the bits of √½, the exponent field steps by one at each power of two times √½.
        Vector512<long> bits = x.Vector.AsInt64();
        Vector512<long> exponent = (bits - Vector512.Create(BitConverter.DoubleToInt64Bits(0.70710678118654752))) >> 52;
        return (new((bits - (exponent << 52)).AsDouble()), new(Vector512.ConvertToDouble(exponent)));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    static (Lanes8 Sine, Lanes8 Cosine) ILanes<Lanes8>.SinCos(Lanes8 x)
    {
        (Vector512<double> sine, Vector512<double> cosine) = Vector512.SinCos(x.Vector);
        return (new(sine), new(cosine));
    }

    static Lanes8 ILanes<Lanes8>.Map(Func<double, double> function, Lanes8 x) => Map(function, x);

    static Lanes8 ILanes<Lanes8>.Map(Func<double, double, double> function, Lanes8 x, Lanes8 y) => Map(function, x, y);

    private static Lanes8 Map(Func<double, double> function, Lanes8 x)
    {
        Vector512<double> v = x.Vector;
        return new(Vector512.Create(
            function(v[0]), function(v[1]), function(v[2]), function(v[3]),
            function(v[4]), function(v[5]), function(v[6]), function(v[7])));
    }

    private static Lanes8 Map(Func<double, double, double> function, Lanes8 x, Lanes8 y)
    {
        Vector512<double> v = x.Vector, w = y.Vector;
        return new(Vector512.Create(
            function(v[0], w[0]), function(v[1], w[1]), function(v[2], w[2]), function(v[3], w[3]),
            function(v[4], w[4]), function(v[5], w[5]), function(v[6], w[6]), function(v[7], w[7])));
    }
}
