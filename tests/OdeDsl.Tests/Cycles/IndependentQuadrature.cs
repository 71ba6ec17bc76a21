using OdeDsl.Modeling;

namespace OdeDsl.Tests.Cycles;

/// <summary>
/// The product of the multipliers by Abel, Jacobi and Liouville's identity: exp ∮ div f dt, with the classical Runge-Kutta method of order
/// 4 in many equal steps: independent of the integrators under test.
/// </summary>
internal static class IndependentQuadrature
{
    public static double MultiplierProduct(DynamicSystem system, ReadOnlySpan<double> start, double period, int steps)
    {
        int n = system.StateCount;
        double[] y = [.. start, 0];
        double h = period / steps;
        double[][] k = [.. Enumerable.Range(0, 4).Select(_ => new double[n + 1])];
        var stage = new double[n + 1];
        for (int s = 0; s < steps; s++)
        {
            Evaluate(system, y, k[0]);
            Evaluate(system, Add(y, h / 2, k[0], stage), k[1]);
            Evaluate(system, Add(y, h / 2, k[1], stage), k[2]);
            Evaluate(system, Add(y, h, k[2], stage), k[3]);
            for (int i = 0; i <= n; i++) y[i] += h / 6 * (k[0][i] + 2 * k[1][i] + 2 * k[2][i] + k[3][i]);
        }

        return Math.Exp(y[n]);
    }

    private static double[] Add(double[] y, double factor, double[] k, double[] result)
    {
        for (int i = 0; i < y.Length; i++) result[i] = y[i] + factor * k[i];
        return result;
    }

    private static void Evaluate(DynamicSystem system, double[] y, double[] rates)
    {
        int n = system.StateCount;
        Span<double> jacobian = stackalloc double[n * n];
        system.Rates(0, y.AsSpan(0, n), rates.AsSpan(0, n));
        system.StateJacobian(0, y.AsSpan(0, n), [], jacobian);
        rates[n] = 0;
        for (int i = 0; i < n; i++) rates[n] += jacobian[i * n + i];
    }
}
