namespace OdeDsl.Scalars;

/// <summary>
/// A kind of number that one emitted body of equations runs on: a plain double, several trajectories side by side, an interval, or
/// a truncated Taylor series.
/// </summary>
/// <typeparam name="TScalar">The implementing type itself.</typeparam>
/// <remarks>
/// <para>The contract follows C# and <see cref="System.Math"/>: the same operators and the same function names, so that a formula reads
/// the same for every kind. Literals stay literals: each operator also takes a double on either side, which is cheaper for the
/// composite kinds than a converted constant.</para>
/// <para>A model is mostly evaluated within a locked regime, which turns conditions and functions with kinks or jumps into plain formulas: a
/// locked condition is one bool for all lanes and coefficients, hence C#'s own <c>condition ? a : b</c> selects. What a regime does not lock
/// (conditions on parameters, rates as written) is computed by <see cref="Less"/>, <see cref="LessOrEqual"/> and <see cref="Equal"/>, whose
/// result is a <i>condition</i>: a value of the kind that only <see cref="Choose"/> reads, decided lane by lane, by the value of a series, and
/// for intervals possibly left open.</para>
/// <para>No member throws or allocates; an argument outside a function's domain gives the kind's own "not a number". Every kind is a
/// value without hidden state, safe to use from several threads.</para>
/// </remarks>
public interface IScalar<TScalar>
    where TScalar : struct, IScalar<TScalar>
{
    /// <summary>A number that does not vary: the same in all lanes, a point interval, a series without higher terms.</summary>
    /// <param name="value">The number.</param>
    static abstract TScalar Constant(double value);

    /// <summary>The sum.</summary>
    /// <param name="left">First term.</param>
    /// <param name="right">Second term.</param>
    static abstract TScalar operator +(TScalar left, TScalar right);

    /// <summary>The sum.</summary>
    /// <param name="left">First term.</param>
    /// <param name="right">Second term.</param>
    static abstract TScalar operator +(TScalar left, double right);

    /// <summary>The sum.</summary>
    /// <param name="left">First term.</param>
    /// <param name="right">Second term.</param>
    static abstract TScalar operator +(double left, TScalar right);

    /// <summary>The difference.</summary>
    /// <param name="left">What is subtracted from.</param>
    /// <param name="right">What is subtracted.</param>
    static abstract TScalar operator -(TScalar left, TScalar right);

    /// <summary>The difference.</summary>
    /// <param name="left">What is subtracted from.</param>
    /// <param name="right">What is subtracted.</param>
    static abstract TScalar operator -(TScalar left, double right);

    /// <summary>The difference.</summary>
    /// <param name="left">What is subtracted from.</param>
    /// <param name="right">What is subtracted.</param>
    static abstract TScalar operator -(double left, TScalar right);

    /// <summary>The product.</summary>
    /// <param name="left">First factor.</param>
    /// <param name="right">Second factor.</param>
    static abstract TScalar operator *(TScalar left, TScalar right);

    /// <summary>The product.</summary>
    /// <param name="left">First factor.</param>
    /// <param name="right">Second factor.</param>
    static abstract TScalar operator *(TScalar left, double right);

    /// <summary>The product.</summary>
    /// <param name="left">First factor.</param>
    /// <param name="right">Second factor.</param>
    static abstract TScalar operator *(double left, TScalar right);

    /// <summary>The quotient.</summary>
    /// <param name="left">The numerator.</param>
    /// <param name="right">The denominator.</param>
    static abstract TScalar operator /(TScalar left, TScalar right);

    /// <summary>The quotient.</summary>
    /// <param name="left">The numerator.</param>
    /// <param name="right">The denominator.</param>
    static abstract TScalar operator /(TScalar left, double right);

    /// <summary>The quotient.</summary>
    /// <param name="left">The numerator.</param>
    /// <param name="right">The denominator.</param>
    static abstract TScalar operator /(double left, TScalar right);

    /// <summary>The remainder of the quotient rounded toward zero, as C# defines it for doubles: it has the sign of the dividend.</summary>
    /// <param name="left">The dividend.</param>
    /// <param name="right">The divisor.</param>
    static abstract TScalar operator %(TScalar left, TScalar right);

    /// <summary>The negative.</summary>
    /// <param name="value">The number.</param>
    static abstract TScalar operator -(TScalar value);

    /// <summary>
    /// The square: at double <c>x * x</c>, but narrower for intervals and cheaper for series, since both factors are known to be the
    /// same number.
    /// </summary>
    /// <param name="x">The number.</param>
    static abstract TScalar Square(TScalar x);

    /// <summary><c>x y + z</c>, at double rounded once.</summary>
    /// <param name="x">First factor.</param>
    /// <param name="y">Second factor.</param>
    /// <param name="z">The term added.</param>
    static abstract TScalar FusedMultiplyAdd(TScalar x, TScalar y, TScalar z);

    /// <summary>The square root.</summary>
    /// <param name="x">The argument, not negative.</param>
    static abstract TScalar Sqrt(TScalar x);

    /// <summary>The cube root.</summary>
    /// <param name="x">The argument.</param>
    static abstract TScalar Cbrt(TScalar x);

    /// <summary>The exponential function.</summary>
    /// <param name="x">The argument.</param>
    static abstract TScalar Exp(TScalar x);

    /// <summary>The natural logarithm.</summary>
    /// <param name="x">The argument, positive.</param>
    static abstract TScalar Log(TScalar x);

    /// <summary>The logarithm to a base.</summary>
    /// <param name="x">The argument, positive.</param>
    /// <param name="newBase">The base, positive and not one.</param>
    static abstract TScalar Log(TScalar x, TScalar newBase);

    /// <summary>The logarithm to base two.</summary>
    /// <param name="x">The argument, positive.</param>
    static abstract TScalar Log2(TScalar x);

    /// <summary>The logarithm to base ten.</summary>
    /// <param name="x">The argument, positive.</param>
    static abstract TScalar Log10(TScalar x);

    /// <summary>A power.</summary>
    /// <param name="x">The base; negative only for whole exponents.</param>
    /// <param name="y">The exponent.</param>
    static abstract TScalar Pow(TScalar x, TScalar y);

    /// <summary>The sine.</summary>
    /// <param name="x">The angle, rad.</param>
    static abstract TScalar Sin(TScalar x);

    /// <summary>The cosine.</summary>
    /// <param name="x">The angle, rad.</param>
    static abstract TScalar Cos(TScalar x);

    /// <summary>The tangent.</summary>
    /// <param name="x">The angle, rad.</param>
    static abstract TScalar Tan(TScalar x);

    /// <summary>The inverse sine, rad, from −π/2 to π/2.</summary>
    /// <param name="x">The argument, from −1 to 1.</param>
    static abstract TScalar Asin(TScalar x);

    /// <summary>The inverse cosine, rad, from 0 to π.</summary>
    /// <param name="x">The argument, from −1 to 1.</param>
    static abstract TScalar Acos(TScalar x);

    /// <summary>The inverse tangent, rad, from −π/2 to π/2.</summary>
    /// <param name="x">The argument.</param>
    static abstract TScalar Atan(TScalar x);

    /// <summary>The angle of the point (x, y), rad, from −π to π.</summary>
    /// <param name="y">The ordinate.</param>
    /// <param name="x">The abscissa.</param>
    static abstract TScalar Atan2(TScalar y, TScalar x);

    /// <summary>The hyperbolic sine.</summary>
    /// <param name="x">The argument.</param>
    static abstract TScalar Sinh(TScalar x);

    /// <summary>The hyperbolic cosine.</summary>
    /// <param name="x">The argument.</param>
    static abstract TScalar Cosh(TScalar x);

    /// <summary>The hyperbolic tangent.</summary>
    /// <param name="x">The argument.</param>
    static abstract TScalar Tanh(TScalar x);

    /// <summary>The inverse hyperbolic sine.</summary>
    /// <param name="x">The argument.</param>
    static abstract TScalar Asinh(TScalar x);

    /// <summary>The inverse hyperbolic cosine.</summary>
    /// <param name="x">The argument, at least 1.</param>
    static abstract TScalar Acosh(TScalar x);

    /// <summary>The inverse hyperbolic tangent.</summary>
    /// <param name="x">The argument, between −1 and 1.</param>
    static abstract TScalar Atanh(TScalar x);

    /// <summary>The magnitude of one number with the sign of another.</summary>
    /// <param name="x">Gives the magnitude.</param>
    /// <param name="y">Gives the sign; a zero has one too.</param>
    static abstract TScalar CopySign(TScalar x, TScalar y);

    /// <summary>The remainder of the quotient rounded to the nearest whole number, ties to even.</summary>
    /// <param name="x">The dividend.</param>
    /// <param name="y">The divisor.</param>
    static abstract TScalar IEEERemainder(TScalar x, TScalar y);

    /// <summary>The smaller of two numbers; NaN if one is, and a negative zero is smaller than a positive one.</summary>
    /// <param name="left">One number.</param>
    /// <param name="right">The other number.</param>
    static abstract TScalar Min(TScalar left, TScalar right);

    /// <summary>The larger of two numbers; NaN if one is, and a positive zero is larger than a negative one.</summary>
    /// <param name="left">One number.</param>
    /// <param name="right">The other number.</param>
    static abstract TScalar Max(TScalar left, TScalar right);

    /// <summary>The largest whole number not above the argument.</summary>
    /// <param name="x">The argument.</param>
    static abstract TScalar Floor(TScalar x);

    /// <summary>A condition that does not vary.</summary>
    /// <param name="holds">Whether it holds.</param>
    static abstract TScalar Condition(bool holds);

    /// <summary>The condition that one number is below another.</summary>
    /// <param name="left">Left side.</param>
    /// <param name="right">Right side.</param>
    static abstract TScalar Less(TScalar left, TScalar right);

    /// <summary>The condition that one number is at most another.</summary>
    /// <param name="left">Left side.</param>
    /// <param name="right">Right side.</param>
    static abstract TScalar LessOrEqual(TScalar left, TScalar right);

    /// <summary>The condition that two numbers are equal.</summary>
    /// <param name="left">Left side.</param>
    /// <param name="right">Right side.</param>
    static abstract TScalar Equal(TScalar left, TScalar right);

    /// <summary>
    /// One of two numbers, or of two conditions. Where a condition is open, as it can be for intervals, both are taken into the result.
    /// </summary>
    /// <param name="condition">A condition, made by the members above or by this one.</param>
    /// <param name="whenTrue">What to take where it holds.</param>
    /// <param name="whenFalse">What to take where it does not hold.</param>
    static abstract TScalar Choose(TScalar condition, TScalar whenTrue, TScalar whenFalse);
}
