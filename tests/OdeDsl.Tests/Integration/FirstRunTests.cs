using OdeDsl.Integration;
using OdeDsl.Modeling;
using Xunit;

namespace OdeDsl.Tests.Integration;

public class FirstRunTests
{
    private readonly struct Lorenz : IHandWritten<Lorenz>
    {
        public static ModelDescription Description { get; } = IHandWritten<Lorenz>.Describe("Lorenz", 0, 1, 0);

        public static void F(double time, ReadOnlySpan<double> x, Span<double> dx)
        {
            dx[0] = 10 * (x[1] - x[0]);
            dx[1] = x[0] * (28 - x[2]) - x[1];
            dx[2] = x[0] * x[1] - 8.0 / 3 * x[2];
        }
    }

    [Fact]
    public void The_Lorenz_equations_reach_their_reference()
    {
        Trajectory run = DynamicSystem.Of<Lorenz>().Simulate(
            until: 10, new SimulationOptions { RelativeTolerance = 1e-10, AbsoluteTolerance = 1e-12, Method = IntegrationMethod.DormandPrince54 });
        double[] end = run.FinalState;
        // E. N. Lorenz, Journal of the Atmospheric Sciences 20, 1963; end values by two integrators in 113-bit arithmetic.
        Assert.True(Math.Abs(end[0] - -5.91661812174324812) <= 1e-6, $"{end[0]}");
        Assert.True(Math.Abs(end[1] - -5.52371776957541201) <= 1e-6, $"{end[1]}");
        Assert.True(Math.Abs(end[2] - 24.5719649020096001) <= 1e-6, $"{end[2]}");
        Assert.True(Math.Abs(run.At(10)[0] - end[0]) <= 0);
    }

    [Fact]
    public void Tangents_agree_with_differences_of_the_flow()
    {
        DynamicSystem system = DynamicSystem.Of<Lorenz>();
        var flow = new Flow(system, new FlowOptions { RelativeTolerance = 1e-12, Method = IntegrationMethod.DormandPrince54 });
        double[] tangents = [1, 0, 0, 0, 1, 0, 0, 0, 1];
        double[] state = system.InitialState.ToArray();
        flow.Advance(state, tangents, 3, 0, 1);
        const double Step = 1e-5;
        for (int j = 0; j < 3; j++)
        {
            double[] plus = system.InitialState.ToArray(), minus = system.InitialState.ToArray();
            plus[j] += Step;
            minus[j] -= Step;
            flow.Advance(plus, 0, 1);
            flow.Advance(minus, 0, 1);
            for (int i = 0; i < 3; i++)
                Assert.Equal((plus[i] - minus[i]) / (2 * Step), tangents[i * 3 + j], 1e-4 * (1 + Math.Abs(tangents[i * 3 + j])));
        }

        flow.Advance(state, 1, 0);
        for (int i = 0; i < 3; i++) Assert.Equal(system.InitialState[i], state[i], 1e-5);
    }
}
