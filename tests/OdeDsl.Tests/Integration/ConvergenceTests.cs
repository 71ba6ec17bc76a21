using OdeDsl.Integration;
using OdeDsl.Modeling;
using Xunit;

namespace OdeDsl.Tests.Integration;

public class ConvergenceTests
{
    /// <summary>x'' = −x + cos 2t, x(0) = 2/3, x'(0) = 1: x = cos t + sin t − cos(2t)/3. Linear, so that Newton's method is exact.</summary>
    private readonly struct ForcedOscillator : IHandWritten<ForcedOscillator>
    {
        public static ModelDescription Description { get; } = IHandWritten<ForcedOscillator>.Describe("Forced", 2.0 / 3, 1);

        public static void F(double time, ReadOnlySpan<double> x, ReadOnlySpan<double> p, Span<double> dx)
        {
            dx[0] = x[1];
            dx[1] = -x[0] + Math.Cos(2 * time);
        }

        public static double Exact(double t) => Math.Cos(t) + Math.Sin(t) - Math.Cos(2 * t) / 3;
    }

    /// <summary>x' = −2 t x², x(0) = 1: x = 1 / (1 + t²).</summary>
    private readonly struct Rational : IHandWritten<Rational>
    {
        public static ModelDescription Description { get; } = IHandWritten<Rational>.Describe("Rational", 1);

        public static void F(double time, ReadOnlySpan<double> x, ReadOnlySpan<double> p, Span<double> dx) => dx[0] = -2 * time * x[0] * x[0];

        public static double Exact(double t) => 1 / (1 + t * t);
    }

    [Theory]
    [InlineData(IntegrationMethod.DormandPrince54, 5, 0.2, 0.1, 0.05)]
    [InlineData(IntegrationMethod.Tsitouras54, 5, 0.2, 0.1, 0.05)]
    [InlineData(IntegrationMethod.RadauIIA5, 5, 0.2, 0.1, 0.05)]
    [InlineData(IntegrationMethod.Rodas4, 4, 0.2, 0.1, 0.05)]
    [InlineData(IntegrationMethod.Rodas5P, 5, 0.2, 0.1, 0.05)]
    public void A_method_converges_with_its_order_under_forcing(IntegrationMethod method, double order, params double[] steps) =>
        AssertSlope(order, h => LargestError(DynamicSystem.Of<ForcedOscillator>(), method, h, 2, ForcedOscillator.Exact), steps);

    [Theory]
    [InlineData(IntegrationMethod.DormandPrince54, 5, 0.1, 0.05, 0.025)]
    [InlineData(IntegrationMethod.Tsitouras54, 5, 0.1, 0.05, 0.025)]
    [InlineData(IntegrationMethod.DormandPrince853, 8, 0.2, 0.1)]
    [InlineData(IntegrationMethod.Rodas4, 4, 0.1, 0.05, 0.025)]
    [InlineData(IntegrationMethod.Rodas5P, 5, 0.1, 0.05, 0.025)]
    public void A_method_converges_with_its_order_on_a_nonlinear_problem(IntegrationMethod method, double order, params double[] steps) =>
        AssertSlope(order, h => LargestError(DynamicSystem.Of<Rational>(), method, h, 2, Rational.Exact), steps);

    [Theory]
    [InlineData(IntegrationMethod.DormandPrince853, 8, 1.0, 0.5, 0.25)]
    [InlineData(IntegrationMethod.RadauIIA9, 9, 2.0, 1.0)]
    // The next halving meets rounding; so large steps do not show the full 13 yet (the simplifying assumptions do).
    [InlineData(IntegrationMethod.RadauIIA13, 12, 4.0, 2.0)]
    public void A_method_of_high_order_converges_with_its_order_on_an_oscillation(IntegrationMethod method, double order, params double[] steps) =>
        AssertSlope(order, h => LargestError(Cosine, method, h, 8, Math.Cos), steps);

    [Theory]
    [InlineData(IntegrationMethod.DormandPrince54, 5, 0.2, 0.1, 0.05)]
    [InlineData(IntegrationMethod.Tsitouras54, 5, 0.2, 0.1, 0.05)]
    [InlineData(IntegrationMethod.DormandPrince853, 8, 0.8, 0.4, 0.2)]
    [InlineData(IntegrationMethod.RadauIIA5, 4, 0.2, 0.1, 0.05)]
    [InlineData(IntegrationMethod.RadauIIA9, 6, 0.4, 0.2, 0.1)]
    [InlineData(IntegrationMethod.RadauIIA13, 8, 0.6, 0.3)]
    [InlineData(IntegrationMethod.Rodas4, 4, 0.2, 0.1, 0.05)]
    [InlineData(IntegrationMethod.Rodas5P, 5, 0.2, 0.1, 0.05)]
    public void A_continuation_has_a_local_error_of_its_order(IntegrationMethod method, double order, params double[] steps) =>
        AssertSlope(order, h => InnerError(method, h), steps);

    /// <summary>x'' = −x from x = 1, x' = 0, with exact derivatives: x = cos t.</summary>
    private static DynamicSystem Cosine => DynamicSystem.Of(new Swing { Stiffness = 1 });

    // A tolerance that accepts everything and a largest step make the steps equal.
    private static Trajectory FixedSteps(DynamicSystem system, IntegrationMethod method, double h, double until)
    {
        Trajectory run = system.Simulate(
            until, new SimulationOptions { Method = method, InitialStep = h, MaximumStep = h, AbsoluteTolerance = 1e9 });
        Assert.Equal((long)Math.Round(until / h), run.Statistics.AcceptedSteps);
        return run;
    }

    private static double LargestError(DynamicSystem system, IntegrationMethod method, double h, double until, Func<double, double> exact)
    {
        Trajectory run = FixedSteps(system, method, h, until);
        return Enumerable.Range(0, run.Times.Length).Max(node => Math.Abs(run.StateAtNode(node)[0] - exact(run.Times[node])));
    }

    // x'' = x from x = 1, x' = −1: exp(−t), whose derivatives are all alike.
    private static double InnerError(IntegrationMethod method, double h)
    {
        Trajectory run = FixedSteps(DynamicSystem.Of(new Swing { Stiffness = -1, X = 1, V = -1 }), method, h, h);
        return Enumerable.Range(1, 19).Max(i => Math.Abs(run.At(h * i / 20)[0] - Math.Exp(-h * i / 20)));
    }

    private static void AssertSlope(double order, Func<double, double> error, params double[] steps)
    {
        double[] errors = [.. steps.Select(error)];
        for (int i = 1; i < steps.Length; i++)
        {
            double slope = Math.Log(errors[i - 1] / errors[i]) / Math.Log(steps[i - 1] / steps[i]);
            // Higher than expected happens where error terms cancel; half an order less does not.
            Assert.True(slope >= order - 0.3 && slope <= order + 0.7, $"slope {slope:g4} from errors {string.Join(", ", errors)}");
        }
    }
}
