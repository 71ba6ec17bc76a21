using OdeDsl.Integration;

namespace Tarnwater.Tests;

/// <summary>Integrals over time along a run, step by step so that a jump at a step's end does no harm.</summary>
internal static class Quadrature
{
    // Gauss-Legendre with four points: exact for polynomials of degree seven.
    private static readonly (double Place, double Weight)[] Points =
    [
        (0.5 - 0.5 * 0.8611363115940526, 0.3478548451374538 / 2),
        (0.5 - 0.5 * 0.3399810435848563, 0.6521451548625461 / 2),
        (0.5 + 0.5 * 0.3399810435848563, 0.6521451548625461 / 2),
        (0.5 + 0.5 * 0.8611363115940526, 0.3478548451374538 / 2),
    ];

    public static double OverSteps(Trajectory run, string quantity, Func<double, double> integrand) =>
        OverSteps(run, time => integrand(run[quantity].At(time)));

    public static double OverSteps(Trajectory run, Func<double, double> integrand)
    {
        double sum = 0;
        for (int step = 0; step + 1 < run.Times.Length; step++)
        {
            double from = run.Times[step], length = run.Times[step + 1] - from;
            foreach ((double place, double weight) in Points) sum += length * weight * integrand(from + place * length);
        }

        return sum;
    }
}
