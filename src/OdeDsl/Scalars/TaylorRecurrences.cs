namespace OdeDsl.Scalars;

/// <summary>
/// Taylor coefficients of functions of a series u, order by order, from the differential equation each function obeys (R. E. Moore,
/// "Interval Analysis", 1966, chapter 11; A. Griewank and A. Walther, "Evaluating Derivatives", 2008, section 13.2 and table 13.2).
/// All spans have one length; the coefficient of order zero of a result is already in place, and of order zero only.
/// </summary>
/// <remarks>
/// Where the equation contains u′ the argument is <em>du</em>, with du(k) = k u(k), as <see cref="Differentiate"/> makes it: the
/// coefficients of t u′.
/// </remarks>
internal static class TaylorRecurrences
{
    private static ReadOnlySpan<double> Inverses => [0, 1, 1.0 / 2, 1.0 / 3, 1.0 / 4, 1.0 / 5, 1.0 / 6, 1.0 / 7, 1.0 / 8];

    /// <summary>u becomes t u′.</summary>
    public static void Differentiate(Span<double> u)
    {
        for (int k = 0; k < u.Length; k++) u[k] *= k;
    }

    /// <summary>v² = u.</summary>
    public static void Sqrt(ReadOnlySpan<double> u, Span<double> v)
    {
        double inverse = 0.5 / v[0];
        for (int k = 1; k < u.Length; k++)
        {
            double sum = u[k];
            for (int j = 1; j < k; j++) sum -= v[j] * v[k - j];
            v[k] = sum * inverse;
        }
    }

    /// <summary>u v′ = r v u′: v = u^r.</summary>
    public static void Power(ReadOnlySpan<double> u, double exponent, Span<double> v)
    {
        double inverse = 1 / u[0];
        for (int k = 1; k < u.Length; k++)
        {
            double sum = 0;
            for (int j = 1; j <= k; j++) sum += ((j * exponent) - (k - j)) * u[j] * v[k - j];
            v[k] = sum * Inverses[k] * inverse;
        }
    }

    /// <summary>v′ = v u′.</summary>
    public static void Exp(ReadOnlySpan<double> du, Span<double> v)
    {
        for (int k = 1; k < du.Length; k++) v[k] = Primitive(v, du, k);
    }

    /// <summary>s′ = c u′ and c′ = sign · s u′: circular functions for −1, hyperbolic ones for 1.</summary>
    public static void SinCos(ReadOnlySpan<double> du, double sign, Span<double> s, Span<double> c)
    {
        for (int k = 1; k < du.Length; k++)
        {
            s[k] = Primitive(c, du, k);
            c[k] = sign * Primitive(s, du, k);
        }
    }

    /// <summary>v′ = w u′ with w = 1 + sign · v²: the tangent for 1, the hyperbolic tangent for −1.</summary>
    public static void Tan(ReadOnlySpan<double> du, double sign, Span<double> v, Span<double> w)
    {
        for (int k = 1; k < du.Length; k++)
        {
            v[k] = Primitive(w, du, k);
            double square = 0;
            for (int j = 0; j <= k; j++) square += v[j] * v[k - j];
            w[k] = sign * square;
        }
    }

    /// <summary>w v′ = n′: the logarithm (w = n = u) and the inverse functions.</summary>
    public static void Quotient(ReadOnlySpan<double> n, ReadOnlySpan<double> w, Span<double> v)
    {
        double inverse = 1 / w[0];
        for (int k = 1; k < n.Length; k++)
        {
            double sum = 0;
            for (int j = 1; j < k; j++) sum += j * v[j] * w[k - j];
            v[k] = (n[k] - (sum * Inverses[k])) * inverse;
        }
    }

    /// <summary>n′ = x y′ − y x′: what turns in the plane.</summary>
    public static void Turning(
        ReadOnlySpan<double> y, ReadOnlySpan<double> dy, ReadOnlySpan<double> x, ReadOnlySpan<double> dx, Span<double> n)
    {
        for (int k = 1; k < y.Length; k++) n[k] = Primitive(x, dy, k) - Primitive(y, dx, k);
    }

    // Coefficient k of the integral of w u′.
    private static double Primitive(ReadOnlySpan<double> w, ReadOnlySpan<double> du, int k)
    {
        double sum = 0;
        for (int j = 1; j <= k; j++) sum += du[j] * w[k - j];
        return sum * Inverses[k];
    }
}
