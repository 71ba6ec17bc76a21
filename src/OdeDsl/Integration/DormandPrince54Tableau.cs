namespace OdeDsl.Integration;

/// <summary>
/// The explicit Runge-Kutta pair RK5(4)7M (J. R. Dormand, P. J. Prince, A family of embedded Runge-Kutta formulae, Journal of Computational and
/// Applied Mathematics 6, 1980, table 2) with the continuous extension of order 4 of Hairer, Norsett and Wanner, Solving ODEs I,
/// section II.6 (a choice within the family of L. F. Shampine, Mathematics of Computation 46, 1986). Exact fractions; the order
/// conditions are checked by test.
/// </summary>
internal static class DormandPrince54Tableau
{
    public static ExplicitTableau Instance { get; } = new()
    {
        Method = IntegrationMethod.DormandPrince54,
        Order = 5,
        C = [1.0 / 5, 3.0 / 10, 4.0 / 5, 8.0 / 9, 1],
        A =
        [
            [1.0 / 5],
            [3.0 / 40, 9.0 / 40],
            [44.0 / 45, -56.0 / 15, 32.0 / 9],
            [19372.0 / 6561, -25360.0 / 2187, 64448.0 / 6561, -212.0 / 729],
            [9017.0 / 3168, -355.0 / 33, 46732.0 / 5247, 49.0 / 176, -5103.0 / 18656],
        ],
        B = [35.0 / 384, 0, 500.0 / 1113, 125.0 / 192, -2187.0 / 6784, 11.0 / 84],
        Error = [71.0 / 57600, 0, -71.0 / 16695, 71.0 / 1920, -17253.0 / 339200, 22.0 / 525, -1.0 / 40],
        D =
        [
            [
                -12715105075.0 / 11282082432, 0, 87487479700.0 / 32700410799, -10690763975.0 / 1880347072, 701980252875.0 / 199316789632,
                -1453857185.0 / 822651844, 69997945.0 / 29380423,
            ],
        ],
        Integral = 0.04,
        Factors = (0.2, 10),
        StabilityEdge = 2.6,
    };
}
