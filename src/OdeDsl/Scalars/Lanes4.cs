using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace OdeDsl.Scalars;

/// <summary>Four trajectories side by side: one number of each in the lanes of a <see cref="Vector256{T}"/>.</summary>
/// <remarks>
/// <para>The operators, the square root and <see cref="FusedMultiplyAdd"/> round in every lane as a double does. The other functions
/// differ from <see cref="Math"/> by at most so many units in the last place, over all magnitudes at which the result is a normal number
/// (measured over the range and kept by tests): <see cref="Sin"/> and <see cref="Cos"/> 1, <see cref="Exp"/> 2, <see cref="Log(Lanes4)"/>
/// 3, <see cref="Log2"/>, <see cref="Tan"/>, <see cref="Pow"/> and <see cref="Cosh"/> 4, <see cref="Log10"/>, <see cref="Sinh"/> and
/// <see cref="Tanh"/> 5. The inverse functions, <see cref="Cbrt"/>, logarithms to other bases and the remainders call <see cref="Math"/>
/// lane by lane and equal it bit for bit. Zeros, infinities and NaN give what <see cref="Math"/> gives.</para>
/// <para>Only worth using where <see cref="Vector256.IsHardwareAccelerated"/>; elsewhere it is right but slower than one trajectory after
/// another. Equality compares lane by lane as doubles do: NaN equals nothing.</para>
/// </remarks>
public readonly struct Lanes4 : ILanes<Lanes4>, IEquatable<Lanes4>
{
    /// <summary>The number of lanes.</summary>
    public const int Count = 4;

    /// <summary>Takes the lanes from a vector.</summary>
    /// <param name="vector">The lanes.</param>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Lanes4(Vector256<double> vector) => Vector = vector;

    /// <summary>Takes the lanes from the first four numbers of a span.</summary>
    /// <param name="lanes">The numbers.</param>
    /// <exception cref="ArgumentOutOfRangeException">The span has fewer than four numbers.</exception>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Lanes4(ReadOnlySpan<double> lanes) => Vector = Vector256.Create(lanes);

    /// <summary>The lanes.</summary>
    public Vector256<double> Vector { get; }

    /// <summary>The number in a lane.</summary>
    /// <param name="lane">From 0 to 3.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such lane.</exception>
    public double this[int lane]
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => Vector[lane];
    }

    /// <summary>Writes the lanes to the first four places of a span.</summary>
    /// <param name="lanes">Receives the numbers.</param>
    /// <exception cref="ArgumentException">The span has fewer than four places.</exception>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void CopyTo(Span<double> lanes) => Vector.CopyTo(lanes);

    /// <inheritdoc/>
    public bool Equals(Lanes4 other) => Vector256.EqualsAll(Vector, other.Vector);

    /// <inheritdoc/>
    public override bool Equals(object? obj) => obj is Lanes4 other && Equals(other);

    /// <inheritdoc/>
    public override int GetHashCode() => Vector.GetHashCode();

    /// <summary>The lanes in brackets.</summary>
    public override string ToString() => Vector.ToString();

    /// <summary>Whether all lanes are equal.</summary>
    /// <param name="left">Left side.</param>
    /// <param name="right">Right side.</param>
    public static bool operator ==(Lanes4 left, Lanes4 right) => left.Equals(right);

    /// <summary>Whether any lane differs.</summary>
    /// <param name="left">Left side.</param>
    /// <param name="right">Right side.</param>
    public static bool operator !=(Lanes4 left, Lanes4 right) => !left.Equals(right);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 Constant(double value) => new(Vector256.Create(value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator +(Lanes4 left, Lanes4 right) => new(left.Vector + right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator +(Lanes4 left, double right) => new(left.Vector + Vector256.Create(right));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator +(double left, Lanes4 right) => new(Vector256.Create(left) + right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator -(Lanes4 left, Lanes4 right) => new(left.Vector - right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator -(Lanes4 left, double right) => new(left.Vector - Vector256.Create(right));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator -(double left, Lanes4 right) => new(Vector256.Create(left) - right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator *(Lanes4 left, Lanes4 right) => new(left.Vector * right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator *(Lanes4 left, double right) => new(left.Vector * Vector256.Create(right));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator *(double left, Lanes4 right) => new(Vector256.Create(left) * right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator /(Lanes4 left, Lanes4 right) => new(left.Vector / right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator /(Lanes4 left, double right) => new(left.Vector / Vector256.Create(right));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator /(double left, Lanes4 right) => new(Vector256.Create(left) / right.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator -(Lanes4 value) => new(-value.Vector);

    /// <inheritdoc/>
    public static Lanes4 operator %(Lanes4 left, Lanes4 right) => Map(static (a, b) => a % b, left, right);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 Square(Lanes4 x) => new(x.Vector * x.Vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 FusedMultiplyAdd(Lanes4 x, Lanes4 y, Lanes4 z) => new(Vector256.FusedMultiplyAdd(x.Vector, y.Vector, z.Vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 Sqrt(Lanes4 x) => new(Vector256.Sqrt(x.Vector));

    /// <inheritdoc/>
    public static Lanes4 Cbrt(Lanes4 x) => Map(Math.Cbrt, x);

    /// <inheritdoc/>
    public static Lanes4 Exp(Lanes4 x) => new(Vector256.Exp(x.Vector));

    /// <inheritdoc/>
    public static Lanes4 Log(Lanes4 x) => new(Vector256.Log(x.Vector));

    /// <inheritdoc/>
    public static Lanes4 Log(Lanes4 x, Lanes4 newBase) => Map(Math.Log, x, newBase);

    /// <inheritdoc/>
    public static Lanes4 Log2(Lanes4 x) => new(Vector256.Log2(x.Vector));

    /// <inheritdoc/>
    public static Lanes4 Log10(Lanes4 x) => LaneFunctions.Log10(x);

    /// <inheritdoc/>
    public static Lanes4 Pow(Lanes4 x, Lanes4 y) => LanePower.Pow(x, y);

    /// <inheritdoc/>
    public static Lanes4 Sin(Lanes4 x) => new(Vector256.Sin(x.Vector));

    /// <inheritdoc/>
    public static Lanes4 Cos(Lanes4 x) => new(Vector256.Cos(x.Vector));

    /// <inheritdoc/>
    public static Lanes4 Tan(Lanes4 x) => LaneFunctions.Tan(x);

    /// <inheritdoc/>
    public static Lanes4 Asin(Lanes4 x) => Map(Math.Asin, x);

    /// <inheritdoc/>
    public static Lanes4 Acos(Lanes4 x) => Map(Math.Acos, x);

    /// <inheritdoc/>
    public static Lanes4 Atan(Lanes4 x) => Map(Math.Atan, x);

    /// <inheritdoc/>
    public static Lanes4 Atan2(Lanes4 y, Lanes4 x) => Map(Math.Atan2, y, x);

    /// <inheritdoc/>
    public static Lanes4 Sinh(Lanes4 x) => LaneFunctions.Sinh(x);

    /// <inheritdoc/>
    public static Lanes4 Cosh(Lanes4 x) => LaneFunctions.Cosh(x);

    /// <inheritdoc/>
    public static Lanes4 Tanh(Lanes4 x) => LaneFunctions.Tanh(x);

    /// <inheritdoc/>
    public static Lanes4 Asinh(Lanes4 x) => Map(Math.Asinh, x);

    /// <inheritdoc/>
    public static Lanes4 Acosh(Lanes4 x) => Map(Math.Acosh, x);

    /// <inheritdoc/>
    public static Lanes4 Atanh(Lanes4 x) => Map(Math.Atanh, x);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 CopySign(Lanes4 x, Lanes4 y) => new(Vector256.CopySign(x.Vector, y.Vector));

    /// <inheritdoc/>
    public static Lanes4 IEEERemainder(Lanes4 x, Lanes4 y) => Map(Math.IEEERemainder, x, y);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 Min(Lanes4 left, Lanes4 right) => new(Vector256.Min(left.Vector, right.Vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 Max(Lanes4 left, Lanes4 right) => new(Vector256.Max(left.Vector, right.Vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 Floor(Lanes4 x) => new(Vector256.Floor(x.Vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 Condition(bool holds) => new(holds ? Vector256<double>.AllBitsSet : Vector256<double>.Zero);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 Less(Lanes4 left, Lanes4 right) => new(Vector256.LessThan(left.Vector, right.Vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 LessOrEqual(Lanes4 left, Lanes4 right) => new(Vector256.LessThanOrEqual(left.Vector, right.Vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 Equal(Lanes4 left, Lanes4 right) => new(Vector256.Equals(left.Vector, right.Vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 Choose(Lanes4 condition, Lanes4 whenTrue, Lanes4 whenFalse) =>
        new(Vector256.ConditionalSelect(condition.Vector, whenTrue.Vector, whenFalse.Vector));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    static Lanes4 ILanes<Lanes4>.Abs(Lanes4 x) => new(Vector256.Abs(x.Vector));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    static Lanes4 ILanes<Lanes4>.Round(Lanes4 x) => new(Vector256.Round(x.Vector));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    static Lanes4 ILanes<Lanes4>.And(Lanes4 left, Lanes4 right) => new(left.Vector & right.Vector);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    static Lanes4 ILanes<Lanes4>.AndNot(Lanes4 left, Lanes4 right) => new(Vector256.AndNot(left.Vector, right.Vector));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    static bool ILanes<Lanes4>.All(Lanes4 mask) => Vector256.EqualsAll(mask.Vector.AsInt64(), Vector256<long>.AllBitsSet);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    static (Lanes4 Mantissa, Lanes4 Exponent) ILanes<Lanes4>.Split(Lanes4 x)
    {
        // Counting from the bits of √½, the exponent field steps by one at each power of two times √½.
        Vector256<long> bits = x.Vector.AsInt64();
        Vector256<long> exponent = (bits - Vector256.Create(BitConverter.DoubleToInt64Bits(0.70710678118654752))) >> 52;
        return (new((bits - (exponent << 52)).AsDouble()), new(Vector256.ConvertToDouble(exponent)));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    static (Lanes4 Sine, Lanes4 Cosine) ILanes<Lanes4>.SinCos(Lanes4 x)
    {
        (Vector256<double> sine, Vector256<double> cosine) = Vector256.SinCos(x.Vector);
        return (new(sine), new(cosine));
    }

    static Lanes4 ILanes<Lanes4>.Map(Func<double, double> function, Lanes4 x) => Map(function, x);

    static Lanes4 ILanes<Lanes4>.Map(Func<double, double, double> function, Lanes4 x, Lanes4 y) => Map(function, x, y);

    private static Lanes4 Map(Func<double, double> function, Lanes4 x)
    {
        Vector256<double> v = x.Vector;
        return new(Vector256.Create(function(v[0]), function(v[1]), function(v[2]), function(v[3])));
    }

    private static Lanes4 Map(Func<double, double, double> function, Lanes4 x, Lanes4 y)
    {
        Vector256<double> v = x.Vector, w = y.Vector;
        return new(Vector256.Create(function(v[0], w[0]), function(v[1], w[1]), function(v[2], w[2]), function(v[3], w[3])));
    }
}
