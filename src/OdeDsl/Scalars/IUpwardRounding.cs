using System.Runtime.Intrinsics;

namespace OdeDsl.Scalars;

/// <summary>
/// Arithmetic on pairs of doubles whose results are never below the true value. An operation gives a raw result, of which the largest
/// of several may be taken; <see cref="Finish"/> then makes it an upper bound. A NaN stays NaN.
/// </summary>
internal interface IUpwardRounding
{
    static abstract Vector128<double> Sum(Vector128<double> left, Vector128<double> right);

    static abstract Vector128<double> Product(Vector128<double> left, Vector128<double> right);

    static abstract Vector128<double> Quotient(Vector128<double> left, Vector128<double> right);

    static abstract Vector128<double> Finish(Vector128<double> raw);
}
