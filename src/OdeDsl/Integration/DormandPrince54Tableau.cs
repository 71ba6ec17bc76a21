namespace OdeDsl.Integration;

/// <summary>
/// The coefficients of the explicit Runge-Kutta pair RK5(4)7M (J. R. Dormand, P. J. Prince, A family of embedded Runge-Kutta formulae,
/// Journal of Computational and Applied Mathematics 6, 1980, table 2) with the continuous extension of order 4 of Hairer, Norsett
/// and Wanner, Solving ODEs I, section II.6 (a choice within the family of L. F. Shampine, Mathematics of Computation 46, 1986). Exact
/// fractions; the order conditions are checked by test.
/// </summary>
internal static class DormandPrince54Tableau
{
    public const int StageCount = 7;

    public const double C2 = 1.0 / 5, C3 = 3.0 / 10, C4 = 4.0 / 5, C5 = 8.0 / 9;

    public const double A21 = 1.0 / 5;
    public const double A31 = 3.0 / 40, A32 = 9.0 / 40;
    public const double A41 = 44.0 / 45, A42 = -56.0 / 15, A43 = 32.0 / 9;
    public const double A51 = 19372.0 / 6561, A52 = -25360.0 / 2187, A53 = 64448.0 / 6561, A54 = -212.0 / 729;
    public const double A61 = 9017.0 / 3168, A62 = -355.0 / 33, A63 = 46732.0 / 5247, A64 = 49.0 / 176, A65 = -5103.0 / 18656;

    /// <summary>The weights of order 5, which are also the last row of the matrix: the last stage is the first of the next step.</summary>
    public const double B1 = 35.0 / 384, B3 = 500.0 / 1113, B4 = 125.0 / 192, B5 = -2187.0 / 6784, B6 = 11.0 / 84;

    /// <summary>The weights of order 5 minus those of order 4: the error estimate.</summary>
    public const double E1 = 71.0 / 57600, E3 = -71.0 / 16695, E4 = 71.0 / 1920, E5 = -17253.0 / 339200, E6 = 22.0 / 525, E7 = -1.0 / 40;

    /// <summary>The weights of the last coefficient of the continuous extension, <see cref="DenseStep"/>'s d₄.</summary>
    public const double P1 = -12715105075.0 / 11282082432;
    public const double P3 = 87487479700.0 / 32700410799;
    public const double P4 = -10690763975.0 / 1880347072;
    public const double P5 = 701980252875.0 / 199316789632;
    public const double P6 = -1453857185.0 / 822651844;
    public const double P7 = 69997945.0 / 29380423;
}
