namespace OdeDsl.Scalars;

// Each function takes its value from Math and its higher coefficients from a recurrence; a constant has no higher coefficients.
public readonly partial struct Jet<TOrder>
{
    /// <summary>Whole exponents up to here are multiplied out: no division by the base, which may be zero or small.</summary>
    private const double LargestMultiplied = 16;

    /// <inheritdoc/>
    public static Jet<TOrder> Sqrt(Jet<TOrder> x)
    {
        double value = Math.Sqrt(x.Value);
        if (x.IsConstant) return Constant(value);
        Span<double> u = stackalloc double[Length], v = stackalloc double[Length];
        x.series.CopyTo(u);
        v[0] = value;
        TaylorRecurrences.Sqrt(u, v);
        return new(TOrder.Load(v));
    }

    /// <inheritdoc/>
    public static Jet<TOrder> Cbrt(Jet<TOrder> x) => Power(x, 1.0 / 3, Math.Cbrt(x.Value));

    /// <inheritdoc/>
    public static Jet<TOrder> Exp(Jet<TOrder> x) => Exponential(x, Math.Exp(x.Value));

    /// <inheritdoc/>
    public static Jet<TOrder> Log(Jet<TOrder> x) => Quotient(x, x, Math.Log(x.Value));

    /// <inheritdoc/>
    public static Jet<TOrder> Log(Jet<TOrder> x, Jet<TOrder> newBase) =>
        (Log(x) / Log(newBase)).WithValue(Math.Log(x.Value, newBase.Value));

    /// <inheritdoc/>
    public static Jet<TOrder> Log2(Jet<TOrder> x) => Quotient(x, x * Math.Log(2), Math.Log2(x.Value));

    /// <inheritdoc/>
    public static Jet<TOrder> Log10(Jet<TOrder> x) => Quotient(x, x * Math.Log(10), Math.Log10(x.Value));

    /// <inheritdoc/>
    /// <remarks>
    /// At a base of zero whole exponents that do not vary give the exact polynomial; for others the coefficients below the exponent are
    /// zero and the rest NaN.
    /// </remarks>
    public static Jet<TOrder> Pow(Jet<TOrder> x, Jet<TOrder> y)
    {
        double value = Math.Pow(x.Value, y.Value);
        if (x.IsConstant && y.IsConstant) return Constant(value);
        if (!y.IsConstant) return Exponential(y * Log(x), value);
        double exponent = y.Value;
        if (exponent >= 0 && exponent <= LargestMultiplied && Math.Floor(exponent) == exponent)
        {
            return WholePower(x, (int)exponent).WithValue(value);
        }

        return x.Value == 0 ? PowerAtZero(exponent, value) : Power(x, exponent, value);
    }

    /// <inheritdoc/>
    public static Jet<TOrder> Sin(Jet<TOrder> x)
    {
        double value = Math.Sin(x.Value);
        if (x.IsConstant) return Constant(value);
        Span<double> u = stackalloc double[Length], sine = stackalloc double[Length], cosine = stackalloc double[Length];
        x.series.CopyTo(u);
        (sine[0], cosine[0]) = (value, Math.Cos(x.Value));
        TaylorRecurrences.Differentiate(u);
        TaylorRecurrences.SinCos(u, -1, sine, cosine);
        return new(TOrder.Load(sine));
    }

    /// <inheritdoc/>
    public static Jet<TOrder> Cos(Jet<TOrder> x)
    {
        double value = Math.Cos(x.Value);
        if (x.IsConstant) return Constant(value);
        Span<double> u = stackalloc double[Length], sine = stackalloc double[Length], cosine = stackalloc double[Length];
        x.series.CopyTo(u);
        (sine[0], cosine[0]) = (Math.Sin(x.Value), value);
        TaylorRecurrences.Differentiate(u);
        TaylorRecurrences.SinCos(u, -1, sine, cosine);
        return new(TOrder.Load(cosine));
    }

    /// <inheritdoc/>
    public static Jet<TOrder> Tan(Jet<TOrder> x)
    {
        double value = Math.Tan(x.Value);
        return Tangent(x, 1, value, 1 + (value * value));
    }

    /// <inheritdoc/>
    public static Jet<TOrder> Asin(Jet<TOrder> x) => Quotient(x, Sqrt((1.0 - x) * (1.0 + x)), Math.Asin(x.Value));

    /// <inheritdoc/>
    public static Jet<TOrder> Acos(Jet<TOrder> x) => Quotient(x, -Sqrt((1.0 - x) * (1.0 + x)), Math.Acos(x.Value));

    /// <inheritdoc/>
    public static Jet<TOrder> Atan(Jet<TOrder> x) => Quotient(x, Square(x) + 1.0, Math.Atan(x.Value));

    /// <inheritdoc/>
    public static Jet<TOrder> Atan2(Jet<TOrder> y, Jet<TOrder> x)
    {
        double value = Math.Atan2(y.Value, x.Value);
        if (x.IsConstant && y.IsConstant) return Constant(value);
        Span<double> ordinate = stackalloc double[Length], rise = stackalloc double[Length];
        Span<double> abscissa = stackalloc double[Length], run = stackalloc double[Length];
        Span<double> turning = stackalloc double[Length];
        y.series.CopyTo(ordinate);
        x.series.CopyTo(abscissa);
        ordinate.CopyTo(rise);
        abscissa.CopyTo(run);
        TaylorRecurrences.Differentiate(rise);
        TaylorRecurrences.Differentiate(run);
        TaylorRecurrences.Turning(ordinate, rise, abscissa, run, turning);
        return Quotient(new(TOrder.Load(turning)), Square(x) + Square(y), value);
    }

    /// <inheritdoc/>
    public static Jet<TOrder> Sinh(Jet<TOrder> x)
    {
        double value = Math.Sinh(x.Value);
        if (x.IsConstant) return Constant(value);
        Span<double> u = stackalloc double[Length], sine = stackalloc double[Length], cosine = stackalloc double[Length];
        x.series.CopyTo(u);
        (sine[0], cosine[0]) = (value, Math.Cosh(x.Value));
        TaylorRecurrences.Differentiate(u);
        TaylorRecurrences.SinCos(u, 1, sine, cosine);
        return new(TOrder.Load(sine));
    }

    /// <inheritdoc/>
    public static Jet<TOrder> Cosh(Jet<TOrder> x)
    {
        double value = Math.Cosh(x.Value);
        if (x.IsConstant) return Constant(value);
        Span<double> u = stackalloc double[Length], sine = stackalloc double[Length], cosine = stackalloc double[Length];
        x.series.CopyTo(u);
        (sine[0], cosine[0]) = (Math.Sinh(x.Value), value);
        TaylorRecurrences.Differentiate(u);
        TaylorRecurrences.SinCos(u, 1, sine, cosine);
        return new(TOrder.Load(cosine));
    }

    /// <inheritdoc/>
    public static Jet<TOrder> Tanh(Jet<TOrder> x)
    {
        double inverse = 1 / Math.Cosh(x.Value); // its square is 1 - tanh² without the cancellation
        return Tangent(x, -1, Math.Tanh(x.Value), inverse * inverse);
    }

    /// <inheritdoc/>
    public static Jet<TOrder> Asinh(Jet<TOrder> x) => Quotient(x, Sqrt(Square(x) + 1.0), Math.Asinh(x.Value));

    /// <inheritdoc/>
    public static Jet<TOrder> Acosh(Jet<TOrder> x) => Quotient(x, Sqrt((x - 1.0) * (x + 1.0)), Math.Acosh(x.Value));

    /// <inheritdoc/>
    public static Jet<TOrder> Atanh(Jet<TOrder> x) => Quotient(x, (1.0 - x) * (1.0 + x), Math.Atanh(x.Value));

    private static Jet<TOrder> Exponential(Jet<TOrder> x, double value)
    {
        if (x.IsConstant) return Constant(value);
        Span<double> u = stackalloc double[Length], v = stackalloc double[Length];
        x.series.CopyTo(u);
        v[0] = value;
        TaylorRecurrences.Differentiate(u);
        TaylorRecurrences.Exp(u, v);
        return new(TOrder.Load(v));
    }

    private static Jet<TOrder> Tangent(Jet<TOrder> x, double sign, double value, double slope)
    {
        if (x.IsConstant) return Constant(value);
        Span<double> u = stackalloc double[Length], v = stackalloc double[Length], w = stackalloc double[Length];
        x.series.CopyTo(u);
        (v[0], w[0]) = (value, slope);
        TaylorRecurrences.Differentiate(u);
        TaylorRecurrences.Tan(u, sign, v, w);
        return new(TOrder.Load(v));
    }

    // The function with the derivative numerator′ / denominator.
    private static Jet<TOrder> Quotient(Jet<TOrder> numerator, Jet<TOrder> denominator, double value)
    {
        if (numerator.IsConstant) return Constant(value);
        Span<double> n = stackalloc double[Length], w = stackalloc double[Length], v = stackalloc double[Length];
        numerator.series.CopyTo(n);
        denominator.series.CopyTo(w);
        v[0] = value;
        TaylorRecurrences.Quotient(n, w, v);
        return new(TOrder.Load(v));
    }

    private static Jet<TOrder> Power(Jet<TOrder> x, double exponent, double value)
    {
        if (x.IsConstant) return Constant(value);
        Span<double> u = stackalloc double[Length], v = stackalloc double[Length];
        x.series.CopyTo(u);
        v[0] = value;
        TaylorRecurrences.Power(u, exponent, v);
        return new(TOrder.Load(v));
    }

    // Repeated squaring.
    private static Jet<TOrder> WholePower(Jet<TOrder> x, int exponent)
    {
        Jet<TOrder> power = Constant(1);
        for (Jet<TOrder> factor = x; exponent > 0; exponent >>= 1, factor = Square(factor))
        {
            if ((exponent & 1) != 0) power *= factor;
        }

        return power;
    }

    // A series without constant term to a power: of the order of t to that power.
    private static Jet<TOrder> PowerAtZero(double exponent, double value)
    {
        Span<double> v = stackalloc double[Length];
        v[0] = value;
        for (int k = 1; k < v.Length; k++) v[k] = k < exponent ? 0 : double.NaN;
        return new(TOrder.Load(v));
    }
}
