namespace OdeDsl.Integration;

/// <summary>
/// The explicit Runge-Kutta pair of orders 5 and 4 and its continuous extension of order 4 (Ch. Tsitouras, Runge-Kutta pairs of order 5(4) satisfying
/// only the first column simplifying assumption, Computers and Mathematics with Applications 62, 2011, table 1). Typed from memory;
/// the order conditions, which hold to rounding, are checked by test.
/// </summary>
internal static class Tsitouras54Tableau
{
    public static ExplicitTableau Instance { get; } = new()
    {
        Method = IntegrationMethod.Tsitouras54,
        Order = 5,
        C = [0.161, 0.327, 0.9, 0.9800255409045097, 1],
        A =
        [
            [0.161],
            [-0.008480655492356989, 0.335480655492357],
            [2.8971530571054935, -6.359448489975075, 4.3622954328695815],
            [5.325864828439257, -11.748883564062828, 7.4955393428898365, -0.09249506636175525],
            [5.86145544294642, -12.92096931784711, 8.159367898576159, -0.071584973281401, -0.028269050394068383],
        ],
        B = [0.09646076681806523, 0.01, 0.4798896504144996, 1.379008574103742, -3.290069515436081, 2.324710524099774],
        Error =
        [
            -0.00178001105222577714, -0.0008164344596567469, 0.007880878010261995, -0.1447110071732629, 0.5823571654525552,
            -0.45808210592918697, 1.0 / 66,
        ],
        D =
        [
            [
                -1.0530884977290216, 0.1017, 2.490627285651252793, -16.54810288924490272, 47.37952196281928122, -34.87065786149660974, 2.5,
            ],
        ],
        Integral = 0.04,
        Factors = (0.2, 10),
        StabilityEdge = 2.6,
    };
}
