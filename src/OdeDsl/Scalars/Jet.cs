using System.Globalization;
using System.Runtime.CompilerServices;

namespace OdeDsl.Scalars;

/// <summary>
/// A Taylor series in one variable, cut off after a fixed order: c(0) + c(1) t + c(2) t² + ... . Formulas evaluated on series give the
/// series of the result, hence higher derivatives along a direction, or the Taylor coefficients of a solution.
/// </summary>
/// <typeparam name="TOrder">The highest order kept, and how the coefficients are stored.</typeparam>
/// <remarks>
/// <para><see cref="Value"/> of every result equals the plain double operation bit for bit. A function of a series without higher terms has
/// none either, also at the ends of the function's domain.</para>
/// <para>Where a function has no derivative of some order (the square root at zero), that coefficient and all above it are not finite:
/// infinite or NaN. Products and quotients hand on infinities as NaN among the higher coefficients.</para>
/// <para>The higher coefficients carry the rounding of their recurrences: a few units in the last place, more where large terms cancel.</para>
/// </remarks>
public readonly partial struct Jet<TOrder> : IScalar<Jet<TOrder>>, IEquatable<Jet<TOrder>>
    where TOrder : struct, IJetOrder<TOrder>
{
    private readonly TOrder series;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private Jet(TOrder series) => this.series = series;

    /// <summary>A series from its coefficients; missing ones are zero.</summary>
    /// <param name="coefficients">At least one and at most <see cref="Order"/> + 1 coefficients, by increasing order.</param>
    /// <exception cref="ArgumentException">There are none or too many.</exception>
    public Jet(ReadOnlySpan<double> coefficients)
    {
        if (coefficients.IsEmpty || coefficients.Length > Length)
        {
            throw new ArgumentException(string.Create(
                CultureInfo.InvariantCulture,
                $"A series of order {Order} takes 1 to {Length} coefficients, not {coefficients.Length}."), nameof(coefficients));
        }

        Span<double> all = stackalloc double[Length];
        coefficients.CopyTo(all);
        series = TOrder.Load(all);
    }

    /// <summary>The highest order kept.</summary>
    public static int Order => TOrder.Order;

    private static int Length => TOrder.Order + 1;

    /// <summary>The coefficient of order zero.</summary>
    public double Value => series.Value;

    /// <summary>Whether all coefficients but that of order zero vanish.</summary>
    public bool IsConstant => series.IsConstant;

    /// <summary>A coefficient.</summary>
    /// <param name="order">From zero to <see cref="Order"/>.</param>
    /// <exception cref="ArgumentOutOfRangeException">No such order is kept.</exception>
    public double this[int order]
    {
        get
        {
            ArgumentOutOfRangeException.ThrowIfGreaterThan((uint)order, (uint)Order, nameof(order));
            Span<double> all = stackalloc double[Length];
            series.CopyTo(all);
            return all[order];
        }
    }

    /// <summary>The linear series value + slope t, from which derivatives along a direction start.</summary>
    /// <param name="value">The point.</param>
    /// <param name="slope">The direction's component.</param>
    public static Jet<TOrder> Variable(double value, double slope)
    {
        Span<double> all = stackalloc double[Length];
        (all[0], all[1]) = (value, slope);
        return new(TOrder.Load(all));
    }

    /// <summary>A derivative by t at t = 0: the coefficient times the factorial of its order.</summary>
    /// <param name="order">From zero to <see cref="Order"/>.</param>
    /// <exception cref="ArgumentOutOfRangeException">No such order is kept.</exception>
    public double Derivative(int order)
    {
        double derivative = this[order];
        for (int k = 2; k <= order; k++) derivative *= k;
        return derivative;
    }

    /// <summary>Writes the coefficients by increasing order.</summary>
    /// <param name="coefficients">Receives <see cref="Order"/> + 1 numbers.</param>
    /// <exception cref="ArgumentException">The span is too short.</exception>
    public void CopyTo(Span<double> coefficients)
    {
        if (coefficients.Length < Length)
        {
            throw new ArgumentException(string.Create(
                CultureInfo.InvariantCulture,
                $"A series of order {Order} needs {Length} places, not {coefficients.Length}."), nameof(coefficients));
        }

        series.CopyTo(coefficients);
    }

    /// <summary>Whether all coefficients are equal as doubles are; NaN equals NaN here.</summary>
    /// <param name="other">The other series.</param>
    public bool Equals(Jet<TOrder> other)
    {
        Span<double> a = stackalloc double[Length], b = stackalloc double[Length];
        series.CopyTo(a);
        other.series.CopyTo(b);
        return a.SequenceEqual(b);
    }

    /// <inheritdoc/>
    public override bool Equals(object? obj) => obj is Jet<TOrder> other && Equals(other);

    /// <inheritdoc/>
    public override int GetHashCode()
    {
        HashCode hash = default;
        for (int k = 0; k <= Order; k++) hash.Add(this[k]);
        return hash.ToHashCode();
    }

    /// <summary>The coefficients in brackets with all their digits, in the invariant culture.</summary>
    public override string ToString()
    {
        string[] parts = new string[Length];
        for (int k = 0; k <= Order; k++) parts[k] = this[k].ToString("R", CultureInfo.InvariantCulture);
        return $"[{string.Join(", ", parts)}]";
    }

    /// <summary>Whether all coefficients agree.</summary>
    /// <param name="left">Left side.</param>
    /// <param name="right">Right side.</param>
    public static bool operator ==(Jet<TOrder> left, Jet<TOrder> right) => left.Equals(right);

    /// <summary>Whether a coefficient differs.</summary>
    /// <param name="left">Left side.</param>
    /// <param name="right">Right side.</param>
    public static bool operator !=(Jet<TOrder> left, Jet<TOrder> right) => !left.Equals(right);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> Constant(double value) => new(TOrder.Constant(value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> operator +(Jet<TOrder> left, Jet<TOrder> right) => new(left.series + right.series);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> operator +(Jet<TOrder> left, double right) => new(left.series + TOrder.Constant(right));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> operator +(double left, Jet<TOrder> right) => new(TOrder.Constant(left) + right.series);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> operator -(Jet<TOrder> left, Jet<TOrder> right) => new(left.series - right.series);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> operator -(Jet<TOrder> left, double right) => new(left.series - TOrder.Constant(right));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> operator -(double left, Jet<TOrder> right) => new(TOrder.Constant(left) - right.series);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> operator *(Jet<TOrder> left, Jet<TOrder> right) => new(left.series * right.series);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> operator *(Jet<TOrder> left, double right) => new(left.series * right);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> operator *(double left, Jet<TOrder> right) => new(right.series * left);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> operator /(Jet<TOrder> left, Jet<TOrder> right) => new(left.series / right.series);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> operator /(Jet<TOrder> left, double right) => new(left.series / right);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> operator /(double left, Jet<TOrder> right) => new(TOrder.Constant(left) / right.series);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> operator -(Jet<TOrder> value) => new(-value.series);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> Square(Jet<TOrder> x) => new(x.series * x.series);

    /// <inheritdoc/>
    public static Jet<TOrder> FusedMultiplyAdd(Jet<TOrder> x, Jet<TOrder> y, Jet<TOrder> z) =>
        ((x * y) + z).WithValue(Math.FusedMultiplyAdd(x.Value, y.Value, z.Value));

    /// <inheritdoc/>
    public static Jet<TOrder> operator %(Jet<TOrder> left, Jet<TOrder> right) => Remainder(left, right, left.Value % right.Value);

    /// <inheritdoc/>
    public static Jet<TOrder> IEEERemainder(Jet<TOrder> x, Jet<TOrder> y) => Remainder(x, y, Math.IEEERemainder(x.Value, y.Value));

    /// <inheritdoc/>
    public static Jet<TOrder> CopySign(Jet<TOrder> x, Jet<TOrder> y) =>
        double.IsNegative(x.Value) == double.IsNegative(y.Value) ? x : -x;

    /// <inheritdoc/>
    public static Jet<TOrder> Min(Jet<TOrder> left, Jet<TOrder> right)
    {
        double value = Math.Min(left.Value, right.Value);
        return value.Equals(left.Value) ? left.WithValue(value) : right.WithValue(value);
    }

    /// <inheritdoc/>
    public static Jet<TOrder> Max(Jet<TOrder> left, Jet<TOrder> right)
    {
        double value = Math.Max(left.Value, right.Value);
        return value.Equals(left.Value) ? left.WithValue(value) : right.WithValue(value);
    }

    /// <inheritdoc/>
    public static Jet<TOrder> Floor(Jet<TOrder> x) => Constant(Math.Floor(x.Value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> Condition(bool holds) => Constant(holds ? 1 : 0);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> Less(Jet<TOrder> left, Jet<TOrder> right) => Condition(left.Value < right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> LessOrEqual(Jet<TOrder> left, Jet<TOrder> right) => Condition(left.Value <= right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> Equal(Jet<TOrder> left, Jet<TOrder> right) => Condition(left.Value == right.Value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Jet<TOrder> Choose(Jet<TOrder> condition, Jet<TOrder> whenTrue, Jet<TOrder> whenFalse) =>
        condition.Value != 0 ? whenTrue : whenFalse;

    // left - n right with the whole number n that belongs to the value.
    private static Jet<TOrder> Remainder(Jet<TOrder> left, Jet<TOrder> right, double value)
    {
        if (right.IsConstant) return left.WithValue(value);
        double whole = Math.Round((left.Value - value) / right.Value);
        return (left - (whole * right)).WithValue(value);
    }

    private Jet<TOrder> WithValue(double value) => new(series.WithValue(value));
}
