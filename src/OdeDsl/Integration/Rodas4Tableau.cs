namespace OdeDsl.Integration;

/// <summary>
/// The Rosenbrock method of order 4 with six stages and an embedded method of order 3 (E. Hairer, G. Wanner, Solving ODEs II, second edition 1996,
/// section IV.10, program RODAS) with its continuation of order 3. Typed from memory; the order conditions, which hold to rounding, are
/// checked by test.
/// </summary>
internal static class Rodas4Tableau
{
    private static readonly double[] Last = [1.221224509226641, 6.019134481288629, 12.53708332932087, -0.6878860361058950];

    public static RosenbrockTableau Instance { get; } = new()
    {
        Method = IntegrationMethod.Rodas4,
        Order = 4,
        Gamma = 0.25,
        Places = [0, 0.386, 0.21, 0.63, 1, 1],
        TimeFactors = [0.25, -0.1043, 0.1035, -0.0362, 0, 0],
        A =
        [
            [1.544],
            [0.9466785280815826, 0.2557011698983284],
            [3.314825187068521, 2.896124015972201, 0.9986419139977817],
            Last,
            [.. Last, 1],
        ],
        C =
        [
            [-5.6688],
            [-2.430093356833875, -0.2063599157091915],
            [-0.1073529058151375, -9.594562251023355, -20.47028614809616],
            [7.496443313967647, -10.24680431464352, -33.99990352819905, 11.70890893206160],
            [8.083246795921522, -7.981132988064893, -31.52159432874371, 16.31930543123136, -6.058818238834054],
        ],
        B = [.. Last, 1, 1],
        D =
        [
            [10.12623508344586, -7.487995877610167, -34.80091861555747, -7.992771707568823, 1.025137723295662, 0],
            [-0.6762803392801253, 6.087714651680015, 16.43084320892478, 24.76722511418386, -6.594389125716872, 0],
        ],
    };
}
