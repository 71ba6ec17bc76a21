using OdeDsl.Modeling;
using OdeDsl.Tests.Problems;
using Xunit;

namespace OdeDsl.Tests.Modeling;

/// <summary>A pendulum with friction that fades with the angle, and a drag with a kink: derivatives of every order in closed form.</summary>
[OdeModel]
internal sealed partial class FadingPendulum
{
    [State(Initial = 0.7)] public partial double Angle { get; set; }
    [State(Initial = -0.4)] public partial double Speed { get; set; }
    [Parameter(1.7)] public partial double Gain { get; set; }
    [Parameter(0.3)] public partial double Drag { get; set; }

    [Rate(nameof(Angle))] private double AngleRate => Speed;
    [Rate(nameof(Speed))] private double SpeedRate =>
        -Gain * Math.Sin(Angle) - Math.Exp(-Angle) * Speed - Drag * Speed * Math.Abs(Speed);
}

public sealed class HigherDerivativeTests
{
    private static readonly double[] NoRegime = [];

    [Fact]
    public void Second_derivatives_of_the_convection_model_are_its_products_and_third_ones_vanish()
    {
        DynamicSystem system = DynamicSystem.Of(new Lorenz63());
        double[] x = [1.3, -2.1, 17.4], u = [0.3, -1.1, 0.7], v = [2.3, 0.9, -0.4], w = [1, 2, 3];
        Close([0, -(u[0] * v[2] + u[2] * v[0]), u[0] * v[1] + u[1] * v[0]], Second(system, x, NoRegime, u, v), 1e-14);
        Close([0, 0, 0], Third(system, x, NoRegime, u, v, w), 1e-13);
    }

    [Theory]
    [InlineData(0.7, -0.4)]
    [InlineData(-2.9, 3.1)]
    public void Derivatives_agree_with_closed_forms_on_each_side_of_a_kink(double angle, double speed)
    {
        DynamicSystem system = DynamicSystem.Of(new FadingPendulum());
        (double gain, double drag) = (system.Parameters[0], system.Parameters[1]);
        double side = Math.Sign(speed), fading = Math.Exp(-angle);
        double[] x = [angle, speed], u = [0.3, -1.1], v = [2.3, 0.9], w = [-0.6, 0.2], q = [0.4, -0.8];
        double[] regime = new double[system.SwitchCount];
        system.Regime(0, x, regime);

        double byAngles = gain * Math.Sin(angle) - fading * speed;
        double second = byAngles * u[0] * v[0] + fading * (u[0] * v[1] + u[1] * v[0]) - 2 * drag * side * u[1] * v[1];
        Close([0, second], Second(system, x, regime, u, v), 1e-13);

        double third = (gain * Math.Cos(angle) + fading * speed) * u[0] * v[0] * w[0]
            - fading * (u[0] * v[0] * w[1] + u[0] * v[1] * w[0] + u[1] * v[0] * w[0]);
        Close([0, third], Third(system, x, regime, u, v, w), 1e-13);

        double mixed = -Math.Cos(angle) * u[0] * q[0] - 2 * side * speed * u[1] * q[1];
        Close([0, mixed], Mixed(system, x, regime, u, q), 1e-13);
    }

    public static TheoryData<string> Problems =>
        [.. PublicProblem.Nonstiff.Concat(PublicProblem.Stiff).Select(problem => problem.Name)];

    [Theory]
    [MemberData(nameof(Problems))]
    public void Second_derivatives_agree_with_extrapolated_differences_of_the_first(string name)
    {
        DynamicSystem system = System(name);
        Random random = new(3);
        double[] x = [.. system.InitialState.ToArray().Select(value => value + 0.1 * random.NextDouble())];
        double[] u = Direction(system.StateCount, random), v = Direction(system.StateCount, random);
        // Richardson: errors of h and h/2 in h² cancel.
        double[] coarse = Difference(system, x, u, v, 2e-3), fine = Difference(system, x, u, v, 1e-3);
        double[] expected = [.. fine.Select((value, i) => value + (value - coarse[i]) / 3)];
        double scale = expected.Max(Math.Abs) + 1;
        double[] actual = Second(system, x, NoRegime, u, v);
        for (int i = 0; i < actual.Length; i++)
            Assert.True(Math.Abs(actual[i] - expected[i]) <= 1e-6 * scale, $"{i}: {actual[i]:R} against {expected[i]:R}");
    }

    [Theory]
    [MemberData(nameof(Problems))]
    public void Products_from_both_sides_are_those_of_the_dense_Jacobian(string name)
    {
        DynamicSystem system = System(name);
        int n = system.StateCount;
        Random random = new(4);
        double[] x = [.. system.InitialState.ToArray().Select(value => value + 0.1 * random.NextDouble())];
        double[] u = Direction(n, random), jacobian = new double[n * n], right = new double[n], left = new double[n];
        system.StateJacobian(0, x, NoRegime, jacobian);
        system.JacobianVectorProduct(0, x, NoRegime, u, right);
        system.VectorJacobianProduct(0, x, NoRegime, u, left);
        for (int i = 0; i < n; i++)
        {
            double[] row = [.. Enumerable.Range(0, n).Select(j => jacobian[i * n + j] * u[j])];
            double[] column = [.. Enumerable.Range(0, n).Select(j => u[j] * jacobian[j * n + i])];
            Assert.True(Math.Abs(right[i] - row.Sum()) <= 1e-13 * row.Sum(Math.Abs));
            Assert.True(Math.Abs(left[i] - column.Sum()) <= 1e-13 * column.Sum(Math.Abs));
        }
    }

    [Fact]
    public void Directions_of_very_different_lengths_cost_no_digits()
    {
        DynamicSystem system = DynamicSystem.Of(new FadingPendulum());
        double[] x = [0.7, 0.4], u = [0.3, -1.1], v = [2.3, 0.9], regime = new double[system.SwitchCount];
        system.Regime(0, x, regime);
        double[] tiny = [.. v.Select(value => value * 1e-12)];
        double expected = Second(system, x, regime, u, v)[1] * 1e-12;
        double actual = Second(system, x, regime, u, tiny)[1];
        Assert.True(Math.Abs(actual - expected) <= 1e-13 * Math.Abs(expected), $"{actual:R} against {expected:R}");
        Close([0, 0], Second(system, x, regime, u, [0, 0]), 0);
    }

    [Fact]
    public void No_derivative_allocates()
    {
        DynamicSystem system = DynamicSystem.Of(new Pleiades());
        double[] x = system.InitialState.ToArray(), result = new double[x.Length];
        Evaluate();
        long before = GC.GetAllocatedBytesForCurrentThread();
        Evaluate();
        Assert.Equal(before, GC.GetAllocatedBytesForCurrentThread());

        void Evaluate()
        {
            system.VectorJacobianProduct(0, x, NoRegime, x, result);
            system.SecondDerivative(0, x, NoRegime, x, x, result);
            system.ThirdDerivative(0, x, NoRegime, x, x, x, result);
        }
    }

    private static DynamicSystem System(string name) =>
        PublicProblem.Nonstiff.Concat(PublicProblem.Stiff).Single(problem => problem.Name == name).System;

    private static double[] Direction(int count, Random random) => [.. Enumerable.Range(0, count).Select(_ => random.NextDouble() - 0.5)];

    private static double[] Difference(DynamicSystem system, double[] x, double[] u, double[] v, double h)
    {
        double[] plus = new double[x.Length], minus = new double[x.Length];
        system.JacobianVectorProduct(0, [.. x.Select((value, i) => value + h * v[i])], NoRegime, u, plus);
        system.JacobianVectorProduct(0, [.. x.Select((value, i) => value - h * v[i])], NoRegime, u, minus);
        return [.. plus.Select((value, i) => (value - minus[i]) / (2 * h))];
    }

    private static double[] Second(DynamicSystem system, double[] x, double[] regime, double[] u, double[] v)
    {
        double[] result = [.. x.Select(_ => double.NaN)];
        system.SecondDerivative(0, x, regime, u, v, result);
        return result;
    }

    private static double[] Third(DynamicSystem system, double[] x, double[] regime, double[] u, double[] v, double[] w)
    {
        double[] result = [.. x.Select(_ => double.NaN)];
        system.ThirdDerivative(0, x, regime, u, v, w, result);
        return result;
    }

    private static double[] Mixed(DynamicSystem system, double[] x, double[] regime, double[] u, double[] q)
    {
        double[] result = [.. x.Select(_ => double.NaN)];
        system.MixedDerivative(0, x, regime, u, q, result);
        return result;
    }

    private static void Close(double[] expected, double[] actual, double tolerance)
    {
        double scale = Math.Max(1, expected.Max(Math.Abs));
        for (int i = 0; i < expected.Length; i++)
            Assert.True(Math.Abs(actual[i] - expected[i]) <= tolerance * scale, $"{i}: {actual[i]:R} instead of {expected[i]:R}");
    }
}
