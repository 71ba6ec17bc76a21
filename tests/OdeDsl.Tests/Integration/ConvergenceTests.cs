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

    [Fact]
    public void Dormand_and_Princes_pair_converges_with_order_five()
    {
        AssertSlope(5, h => LargestError<ForcedOscillator>(IntegrationMethod.DormandPrince54, h, ForcedOscillator.Exact), 0.2, 0.1, 0.05);
        AssertSlope(5, h => LargestError<Rational>(IntegrationMethod.DormandPrince54, h, Rational.Exact), 0.1, 0.05, 0.025);
    }

    [Fact]
    public void Radau_IIA_converges_with_order_five() =>
        AssertSlope(5, h => LargestError<ForcedOscillator>(IntegrationMethod.RadauIIA5, h, ForcedOscillator.Exact), 0.2, 0.1, 0.05);

    [Fact]
    public void The_continuation_of_Dormand_and_Princes_pair_has_a_local_error_of_order_five() =>
        AssertSlope(5, h => InnerError<ForcedOscillator>(IntegrationMethod.DormandPrince54, h, ForcedOscillator.Exact), 0.2, 0.1, 0.05);

    [Fact]
    public void The_continuation_of_Radau_IIA_has_a_local_error_of_order_four() =>
        AssertSlope(4, h => InnerError<ForcedOscillator>(IntegrationMethod.RadauIIA5, h, ForcedOscillator.Exact), 0.2, 0.1, 0.05);

    // A tolerance that accepts everything and a largest step make the steps equal.
    private static Trajectory FixedSteps<TSystem>(IntegrationMethod method, double h, double until)
        where TSystem : struct, IOdeSystem
    {
        Trajectory run = DynamicSystem.Of<TSystem>().Simulate(
            until, new SimulationOptions { Method = method, InitialStep = h, MaximumStep = h, AbsoluteTolerance = 1e9 });
        Assert.Equal((long)Math.Round(until / h), run.Statistics.AcceptedSteps);
        return run;
    }

    private static double LargestError<TSystem>(IntegrationMethod method, double h, Func<double, double> exact)
        where TSystem : struct, IOdeSystem
    {
        Trajectory run = FixedSteps<TSystem>(method, h, 2);
        return Enumerable.Range(0, run.Times.Length).Max(node => Math.Abs(run.StateAtNode(node)[0] - exact(run.Times[node])));
    }

    private static double InnerError<TSystem>(IntegrationMethod method, double h, Func<double, double> exact)
        where TSystem : struct, IOdeSystem
    {
        Trajectory run = FixedSteps<TSystem>(method, h, h);
        return Enumerable.Range(1, 19).Max(i => Math.Abs(run.At(h * i / 20)[0] - exact(h * i / 20)));
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
