namespace OdeDsl.Scalars;

/// <summary>
/// The coefficients of a Taylor series up to a fixed order, and the arithmetic that depends on how they are stored: the type argument of
/// <see cref="Jet{TOrder}"/>. Fulfilled by <see cref="Order3"/> and <see cref="Order8"/>; a series of a lower order is the beginning of
/// a higher one.
/// </summary>
/// <typeparam name="TOrder">The implementing type itself.</typeparam>
/// <remarks>The coefficient of order zero of each result equals, bit for bit, the operation on the coefficients of order zero.</remarks>
public interface IJetOrder<TOrder>
    where TOrder : struct, IJetOrder<TOrder>
{
    /// <summary>The highest order kept.</summary>
    static abstract int Order { get; }

    /// <summary>The coefficient of order zero.</summary>
    double Value { get; }

    /// <summary>Whether all coefficients but that of order zero vanish.</summary>
    bool IsConstant { get; }

    /// <summary>A series without higher terms.</summary>
    /// <param name="value">The coefficient of order zero.</param>
    static abstract TOrder Constant(double value);

    /// <summary>Reads coefficients.</summary>
    /// <param name="coefficients">Exactly <see cref="Order"/> + 1 numbers.</param>
    static abstract TOrder Load(ReadOnlySpan<double> coefficients);

    /// <summary>Writes the coefficients.</summary>
    /// <param name="coefficients">At least <see cref="Order"/> + 1 places.</param>
    void CopyTo(Span<double> coefficients);

    /// <summary>The same series with another coefficient of order zero.</summary>
    /// <param name="value">The new coefficient.</param>
    TOrder WithValue(double value);

    /// <summary>The sum.</summary>
    /// <param name="left">First term.</param>
    /// <param name="right">Second term.</param>
    static abstract TOrder operator +(TOrder left, TOrder right);

    /// <summary>The difference.</summary>
    /// <param name="left">What is subtracted from.</param>
    /// <param name="right">What is subtracted.</param>
    static abstract TOrder operator -(TOrder left, TOrder right);

    /// <summary>The negative.</summary>
    /// <param name="series">The series.</param>
    static abstract TOrder operator -(TOrder series);

    /// <summary>The product: c(k) = a(0) b(k) + a(1) b(k − 1) + ... + a(k) b(0).</summary>
    /// <param name="left">First factor.</param>
    /// <param name="right">Second factor.</param>
    static abstract TOrder operator *(TOrder left, TOrder right);

    /// <summary>The product with a number.</summary>
    /// <param name="series">The series.</param>
    /// <param name="factor">The number.</param>
    static abstract TOrder operator *(TOrder series, double factor);

    /// <summary>The quotient: q(k) = (a(k) − q(0) b(k) − ... − q(k − 1) b(1)) / b(0).</summary>
    /// <param name="left">The numerator.</param>
    /// <param name="right">The denominator.</param>
    static abstract TOrder operator /(TOrder left, TOrder right);

    /// <summary>The quotient with a number.</summary>
    /// <param name="series">The series.</param>
    /// <param name="divisor">The number.</param>
    static abstract TOrder operator /(TOrder series, double divisor);
}
