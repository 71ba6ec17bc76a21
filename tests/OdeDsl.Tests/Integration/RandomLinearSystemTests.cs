using CsCheck;
using OdeDsl.Integration;
using OdeDsl.Modeling;
using Xunit;

namespace OdeDsl.Tests.Integration;

public class RandomLinearSystemTests
{
    /// <summary>x' = A (x − c(t)) + c'(t) with c = (sin t, cos t, sin 2t): x = c + exp(A t) (x₀ − c₀).</summary>
    private readonly struct Tracking : IHandWritten<Tracking>
    {
        public static ModelDescription Description { get; } = IHandWritten<Tracking>.Describe("Tracking", [0, 0, 0], new double[9]);

        public static void F(double time, ReadOnlySpan<double> x, ReadOnlySpan<double> p, Span<double> dx)
        {
            Span<double> offset = [x[0] - Math.Sin(time), x[1] - Math.Cos(time), x[2] - Math.Sin(2 * time)];
            Span<double> change = [Math.Cos(time), -Math.Sin(time), 2 * Math.Cos(2 * time)];
            for (int i = 0; i < 3; i++)
                dx[i] = p[3 * i] * offset[0] + p[3 * i + 1] * offset[1] + p[3 * i + 2] * offset[2] + change[i];
        }
    }

    // A = Q diag(-a, [-b w; -w -b]) Qᵀ with Q a rotation: decay rates from 0.01 to 10⁵ at once.
    private static readonly Gen<(double A, double B, double W, double Phi, double Psi, double[] X)> Systems = Gen.Select(
        Gen.Double[-2, 5], Gen.Double[-2, 3], Gen.Double[-2, 1.3], Gen.Double[0, 6.2], Gen.Double[0, 6.2], Gen.Double[-1, 1].Array[3],
        static (a, b, w, phi, psi, x) => (Math.Pow(10, a), Math.Pow(10, b), Math.Pow(10, w), phi, psi, x));

    [Theory]
    [MemberData(nameof(TestMethods.AllForStiffMotion), MemberType = typeof(TestMethods))]
    public void Random_stiff_linear_systems_follow_their_exact_solution(IntegrationMethod method) =>
        Systems.Sample(
            sample =>
            {
                const double Until = 3, Tolerance = 1e-7;
                double[,] q = Rotation(sample.Phi, sample.Psi);
                DynamicSystem system = DynamicSystem.Of<Tracking>()
                    .WithParameters(Matrix(q, sample.A, sample.B, sample.W)).WithInitialState(sample.X);
                double[] end = system.Simulate(Until, new SimulationOptions { Method = method, RelativeTolerance = Tolerance }).FinalState;
                double[] exact = Exact(q, sample.A, sample.B, sample.W, sample.X, Until);
                double error = Enumerable.Range(0, 3).Max(i => Math.Abs(end[i] - exact[i]));
                // The estimates of high order are of much lower order than the methods and pass at looser tolerances.
                bool high = method is IntegrationMethod.RadauIIA9 or IntegrationMethod.RadauIIA13 or IntegrationMethod.RadauIIA;
                return error <= (high ? 1000 : 100) * Tolerance;
            },
            iter: 200);

    private static double[,] Rotation(double phi, double psi)
    {
        (double s, double c) = Math.SinCos(phi);
        (double r, double d) = Math.SinCos(psi);
        return new[,] { { c, -s * d, s * r }, { s, c * d, -c * r }, { 0, r, d } };
    }

    private static double[] Matrix(double[,] q, double a, double b, double w)
    {
        double[,] core = { { -a, 0, 0 }, { 0, -b, w }, { 0, -w, -b } };
        var product = new double[9];
        for (int i = 0; i < 3; i++)
        {
            for (int j = 0; j < 3; j++)
            {
                for (int k = 0; k < 3; k++)
                {
                    for (int l = 0; l < 3; l++) product[3 * i + j] += q[i, k] * core[k, l] * q[j, l];
                }
            }
        }

        return product;
    }

    private static double[] Exact(double[,] q, double a, double b, double w, double[] start, double t)
    {
        double[] offset = [start[0], start[1] - 1, start[2]], inner = new double[3];
        for (int k = 0; k < 3; k++) inner[k] = q[0, k] * offset[0] + q[1, k] * offset[1] + q[2, k] * offset[2];
        (double s, double c) = Math.SinCos(w * t);
        double decay = Math.Exp(-b * t);
        inner = [Math.Exp(-a * t) * inner[0], decay * (c * inner[1] + s * inner[2]), decay * (c * inner[2] - s * inner[1])];
        double[] forced = [Math.Sin(t), Math.Cos(t), Math.Sin(2 * t)];
        return [.. Enumerable.Range(0, 3).Select(i => forced[i] + q[i, 0] * inner[0] + q[i, 1] * inner[1] + q[i, 2] * inner[2])];
    }
}
