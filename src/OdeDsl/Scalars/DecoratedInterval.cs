namespace OdeDsl.Scalars;

/// <summary>
/// An interval that knows whether the function evaluated was defined and continuous on the whole of its argument, as theorems about the
/// existence of a solution require (Brouwer, Miranda, interval Newton). After the idea of decorations in IEEE 1788-2015, section 11.
/// </summary>
/// <param name="Value">The enclosure of the function's values.</param>
/// <param name="IsContinuous">
/// Whether every operation so far was defined and continuous for all points of its operands. False means "not known", never "known not".
/// </param>
public readonly record struct DecoratedInterval(Interval Value, bool IsContinuous) : IScalar<DecoratedInterval>
{
    /// <summary>Decorates an argument: continuous if there is a number in it.</summary>
    /// <param name="value">The interval.</param>
    public DecoratedInterval(Interval value)
        : this(value, !value.IsEmpty)
    {
    }

    /// <inheritdoc/>
    public static DecoratedInterval Constant(double value) => new(Interval.Constant(value));

    /// <inheritdoc/>
    public static DecoratedInterval operator +(DecoratedInterval left, DecoratedInterval right) =>
        new(left.Value + right.Value, left.IsContinuous && right.IsContinuous);

    /// <inheritdoc/>
    public static DecoratedInterval operator +(DecoratedInterval left, double right) => left + Constant(right);

    /// <inheritdoc/>
    public static DecoratedInterval operator +(double left, DecoratedInterval right) => Constant(left) + right;

    /// <inheritdoc/>
    public static DecoratedInterval operator -(DecoratedInterval left, DecoratedInterval right) =>
        new(left.Value - right.Value, left.IsContinuous && right.IsContinuous);

    /// <inheritdoc/>
    public static DecoratedInterval operator -(DecoratedInterval left, double right) => left - Constant(right);

    /// <inheritdoc/>
    public static DecoratedInterval operator -(double left, DecoratedInterval right) => Constant(left) - right;

    /// <inheritdoc/>
    public static DecoratedInterval operator *(DecoratedInterval left, DecoratedInterval right) =>
        new(left.Value * right.Value, left.IsContinuous && right.IsContinuous);

    /// <inheritdoc/>
    public static DecoratedInterval operator *(DecoratedInterval left, double right) => left * Constant(right);

    /// <inheritdoc/>
    public static DecoratedInterval operator *(double left, DecoratedInterval right) => Constant(left) * right;

    /// <inheritdoc/>
    public static DecoratedInterval operator /(DecoratedInterval left, DecoratedInterval right) =>
        new(left.Value / right.Value, left.IsContinuous && right.IsContinuous && !right.Value.Contains(0));

    /// <inheritdoc/>
    public static DecoratedInterval operator /(DecoratedInterval left, double right) => left / Constant(right);

    /// <inheritdoc/>
    public static DecoratedInterval operator /(double left, DecoratedInterval right) => Constant(left) / right;

    /// <inheritdoc/>
    /// <remarks>Called continuous only where the whole quotient is certainly one number.</remarks>
    public static DecoratedInterval operator %(DecoratedInterval left, DecoratedInterval right)
    {
        DecoratedInterval quotient = left / right;
        bool constant = Math.Truncate(quotient.Value.Lower) == Math.Truncate(quotient.Value.Upper);
        return new(left.Value % right.Value, quotient.IsContinuous && constant);
    }

    /// <inheritdoc/>
    public static DecoratedInterval operator -(DecoratedInterval value) => value with { Value = -value.Value };

    /// <inheritdoc/>
    public static DecoratedInterval Square(DecoratedInterval x) => x with { Value = Interval.Square(x.Value) };

    /// <inheritdoc/>
    public static DecoratedInterval FusedMultiplyAdd(DecoratedInterval x, DecoratedInterval y, DecoratedInterval z) => (x * y) + z;

    /// <inheritdoc/>
    public static DecoratedInterval Sqrt(DecoratedInterval x) => new(Interval.Sqrt(x.Value), x.IsContinuous && x.Value.Lower >= 0);

    /// <inheritdoc/>
    public static DecoratedInterval Cbrt(DecoratedInterval x) => x with { Value = Interval.Cbrt(x.Value) };

    /// <inheritdoc/>
    public static DecoratedInterval Exp(DecoratedInterval x) => x with { Value = Interval.Exp(x.Value) };

    /// <inheritdoc/>
    public static DecoratedInterval Log(DecoratedInterval x) => new(Interval.Log(x.Value), x.IsContinuous && x.Value.Lower > 0);

    /// <inheritdoc/>
    public static DecoratedInterval Log(DecoratedInterval x, DecoratedInterval newBase) => Log(x) / Log(newBase);

    /// <inheritdoc/>
    public static DecoratedInterval Log2(DecoratedInterval x) => new(Interval.Log2(x.Value), x.IsContinuous && x.Value.Lower > 0);

    /// <inheritdoc/>
    public static DecoratedInterval Log10(DecoratedInterval x) => new(Interval.Log10(x.Value), x.IsContinuous && x.Value.Lower > 0);

    /// <inheritdoc/>
    public static DecoratedInterval Pow(DecoratedInterval x, DecoratedInterval y)
    {
        (Interval b, Interval exponent) = (x.Value, y.Value);
        bool whole = exponent.Lower == exponent.Upper && Math.Floor(exponent.Lower) == exponent.Lower;
        bool inside = b.Lower > 0
            || (b.Lower >= 0 && exponent.Lower > 0)
            || (whole && (exponent.Lower >= 0 || !b.Contains(0)));
        return new(Interval.Pow(b, exponent), x.IsContinuous && y.IsContinuous && inside);
    }

    /// <inheritdoc/>
    public static DecoratedInterval Sin(DecoratedInterval x) => x with { Value = Interval.Sin(x.Value) };

    /// <inheritdoc/>
    public static DecoratedInterval Cos(DecoratedInterval x) => x with { Value = Interval.Cos(x.Value) };

    /// <inheritdoc/>
    public static DecoratedInterval Tan(DecoratedInterval x)
    {
        Interval value = Interval.Tan(x.Value);
        return new(value, x.IsContinuous && value.IsBounded);
    }

    /// <inheritdoc/>
    public static DecoratedInterval Asin(DecoratedInterval x) => new(Interval.Asin(x.Value), x.IsContinuous && x.Value.Magnitude <= 1);

    /// <inheritdoc/>
    public static DecoratedInterval Acos(DecoratedInterval x) => new(Interval.Acos(x.Value), x.IsContinuous && x.Value.Magnitude <= 1);

    /// <inheritdoc/>
    public static DecoratedInterval Atan(DecoratedInterval x) => x with { Value = Interval.Atan(x.Value) };

    /// <inheritdoc/>
    public static DecoratedInterval Atan2(DecoratedInterval y, DecoratedInterval x)
    {
        bool jumps = y.Value.Contains(0) && x.Value.Lower <= 0;
        return new(Interval.Atan2(y.Value, x.Value), x.IsContinuous && y.IsContinuous && !jumps);
    }

    /// <inheritdoc/>
    public static DecoratedInterval Sinh(DecoratedInterval x) => x with { Value = Interval.Sinh(x.Value) };

    /// <inheritdoc/>
    public static DecoratedInterval Cosh(DecoratedInterval x) => x with { Value = Interval.Cosh(x.Value) };

    /// <inheritdoc/>
    public static DecoratedInterval Tanh(DecoratedInterval x) => x with { Value = Interval.Tanh(x.Value) };

    /// <inheritdoc/>
    public static DecoratedInterval Asinh(DecoratedInterval x) => x with { Value = Interval.Asinh(x.Value) };

    /// <inheritdoc/>
    public static DecoratedInterval Acosh(DecoratedInterval x) => new(Interval.Acosh(x.Value), x.IsContinuous && x.Value.Lower >= 1);

    /// <inheritdoc/>
    public static DecoratedInterval Atanh(DecoratedInterval x) => new(Interval.Atanh(x.Value), x.IsContinuous && x.Value.Magnitude < 1);

    /// <inheritdoc/>
    public static DecoratedInterval CopySign(DecoratedInterval x, DecoratedInterval y) =>
        new(Interval.CopySign(x.Value, y.Value), x.IsContinuous && y.IsContinuous && !y.Value.Contains(0));

    /// <inheritdoc/>
    /// <remarks>Called continuous only where the whole quotient is certainly one number.</remarks>
    public static DecoratedInterval IEEERemainder(DecoratedInterval x, DecoratedInterval y)
    {
        DecoratedInterval quotient = x / y;
        bool constant = Math.Round(quotient.Value.Lower) == Math.Round(quotient.Value.Upper);
        return new(Interval.IEEERemainder(x.Value, y.Value), quotient.IsContinuous && constant);
    }

    /// <inheritdoc/>
    public static DecoratedInterval Min(DecoratedInterval left, DecoratedInterval right) =>
        new(Interval.Min(left.Value, right.Value), left.IsContinuous && right.IsContinuous);

    /// <inheritdoc/>
    public static DecoratedInterval Max(DecoratedInterval left, DecoratedInterval right) =>
        new(Interval.Max(left.Value, right.Value), left.IsContinuous && right.IsContinuous);

    /// <inheritdoc/>
    public static DecoratedInterval Floor(DecoratedInterval x)
    {
        Interval value = Interval.Floor(x.Value);
        return new(value, x.IsContinuous && value.Lower == value.Upper);
    }

    /// <inheritdoc/>
    public static DecoratedInterval Condition(bool holds) => new(Interval.Condition(holds), true);

    /// <inheritdoc/>
    public static DecoratedInterval Less(DecoratedInterval left, DecoratedInterval right) =>
        new(Interval.Less(left.Value, right.Value), left.IsContinuous && right.IsContinuous);

    /// <inheritdoc/>
    public static DecoratedInterval LessOrEqual(DecoratedInterval left, DecoratedInterval right) =>
        new(Interval.LessOrEqual(left.Value, right.Value), left.IsContinuous && right.IsContinuous);

    /// <inheritdoc/>
    public static DecoratedInterval Equal(DecoratedInterval left, DecoratedInterval right) =>
        new(Interval.Equal(left.Value, right.Value), left.IsContinuous && right.IsContinuous);

    /// <inheritdoc/>
    /// <remarks>Called continuous only where the condition is decided.</remarks>
    public static DecoratedInterval Choose(DecoratedInterval condition, DecoratedInterval whenTrue, DecoratedInterval whenFalse)
    {
        bool isDecided = condition.Value.Lower == condition.Value.Upper;
        DecoratedInterval branch = condition.Value.Lower > 0 ? whenTrue : whenFalse;
        return new(
            Interval.Choose(condition.Value, whenTrue.Value, whenFalse.Value), isDecided && condition.IsContinuous && branch.IsContinuous);
    }
}
