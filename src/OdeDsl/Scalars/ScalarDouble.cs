using System.Runtime.CompilerServices;

namespace OdeDsl.Scalars;

/// <summary>
/// A double, so that the generic printing of a model can be compared with the plain one: every member is the operation C# or
/// <see cref="Math"/> performs, hence equal to it bit for bit.
/// </summary>
/// <param name="Value">The number.</param>
public readonly record struct ScalarDouble(double Value) : IScalar<ScalarDouble>
{
    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Constant(double value) => new(value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble operator +(ScalarDouble left, ScalarDouble right) => new(left.Value + right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble operator +(ScalarDouble left, double right) => new(left.Value + right);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble operator +(double left, ScalarDouble right) => new(left + right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble operator -(ScalarDouble left, ScalarDouble right) => new(left.Value - right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble operator -(ScalarDouble left, double right) => new(left.Value - right);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble operator -(double left, ScalarDouble right) => new(left - right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble operator *(ScalarDouble left, ScalarDouble right) => new(left.Value * right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble operator *(ScalarDouble left, double right) => new(left.Value * right);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble operator *(double left, ScalarDouble right) => new(left * right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble operator /(ScalarDouble left, ScalarDouble right) => new(left.Value / right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble operator /(ScalarDouble left, double right) => new(left.Value / right);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble operator /(double left, ScalarDouble right) => new(left / right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble operator %(ScalarDouble left, ScalarDouble right) => new(left.Value % right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble operator -(ScalarDouble value) => new(-value.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Square(ScalarDouble x) => new(x.Value * x.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble FusedMultiplyAdd(ScalarDouble x, ScalarDouble y, ScalarDouble z) =>
        new(Math.FusedMultiplyAdd(x.Value, y.Value, z.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Sqrt(ScalarDouble x) => new(Math.Sqrt(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Cbrt(ScalarDouble x) => new(Math.Cbrt(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Exp(ScalarDouble x) => new(Math.Exp(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Log(ScalarDouble x) => new(Math.Log(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Log(ScalarDouble x, ScalarDouble newBase) => new(Math.Log(x.Value, newBase.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Log2(ScalarDouble x) => new(Math.Log2(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Log10(ScalarDouble x) => new(Math.Log10(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Pow(ScalarDouble x, ScalarDouble y) => new(Math.Pow(x.Value, y.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Sin(ScalarDouble x) => new(Math.Sin(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Cos(ScalarDouble x) => new(Math.Cos(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Tan(ScalarDouble x) => new(Math.Tan(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Asin(ScalarDouble x) => new(Math.Asin(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Acos(ScalarDouble x) => new(Math.Acos(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Atan(ScalarDouble x) => new(Math.Atan(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Atan2(ScalarDouble y, ScalarDouble x) => new(Math.Atan2(y.Value, x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Sinh(ScalarDouble x) => new(Math.Sinh(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Cosh(ScalarDouble x) => new(Math.Cosh(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Tanh(ScalarDouble x) => new(Math.Tanh(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Asinh(ScalarDouble x) => new(Math.Asinh(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Acosh(ScalarDouble x) => new(Math.Acosh(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Atanh(ScalarDouble x) => new(Math.Atanh(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble CopySign(ScalarDouble x, ScalarDouble y) => new(Math.CopySign(x.Value, y.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble IEEERemainder(ScalarDouble x, ScalarDouble y) => new(Math.IEEERemainder(x.Value, y.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Min(ScalarDouble left, ScalarDouble right) => new(Math.Min(left.Value, right.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Max(ScalarDouble left, ScalarDouble right) => new(Math.Max(left.Value, right.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Floor(ScalarDouble x) => new(Math.Floor(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Condition(bool holds) => new(holds ? 1.0 : 0.0);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Less(ScalarDouble left, ScalarDouble right) => Condition(left.Value < right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble LessOrEqual(ScalarDouble left, ScalarDouble right) => Condition(left.Value <= right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Equal(ScalarDouble left, ScalarDouble right) => Condition(left.Value == right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ScalarDouble Choose(ScalarDouble condition, ScalarDouble whenTrue, ScalarDouble whenFalse) =>
        condition.Value != 0.0 ? whenTrue : whenFalse;
}
