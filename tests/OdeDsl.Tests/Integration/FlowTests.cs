using OdeDsl.Integration;
using OdeDsl.Modeling;
using OdeDsl.Tests.Problems;
using Xunit;

namespace OdeDsl.Tests.Integration;

public class FlowTests
{
    public static TheoryData<IntegrationMethod> Methods => TestMethods.All;

    /// <summary>x' = A x with the entries of A as parameters.</summary>
    private readonly struct Linear3 : IHandWritten<Linear3>
    {
        public static ModelDescription Description { get; } = IHandWritten<Linear3>.Describe("Linear", [1, 2, -1], new double[9]);

        public static void F(double time, ReadOnlySpan<double> x, ReadOnlySpan<double> p, Span<double> dx)
        {
            for (int i = 0; i < 3; i++) dx[i] = p[3 * i] * x[0] + p[3 * i + 1] * x[1] + p[3 * i + 2] * x[2];
        }
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Tangents_of_a_linear_system_are_the_matrix_exponential(IntegrationMethod method)
    {
        // A rotation about the first axis with decay, coupled to a growing first component: exact exponential by its blocks.
        DynamicSystem system = DynamicSystem.Of<Linear3>().WithParameters([0.3, 0, 0, 0, -0.2, -2, 0, 2, -0.2]);
        var flow = new Flow(system, new FlowOptions { Method = method, RelativeTolerance = 1e-11 });
        double[] state = system.InitialState.ToArray(), tangents = [1, 0, 0, 0, 1, 0, 0, 0, 1];
        const double T = 1.7;
        flow.Advance(state, tangents, 3, 0, T);
        double grow = Math.Exp(0.3 * T), decay = Math.Exp(-0.2 * T), c = decay * Math.Cos(2 * T), s = decay * Math.Sin(2 * T);
        double[] exact = [grow, 0, 0, 0, c, -s, 0, s, c];
        for (int i = 0; i < 9; i++) Assert.True(Math.Abs(tangents[i] - exact[i]) <= 1e-9, $"entry {i}: {tangents[i]} against {exact[i]}");
        Assert.True(Math.Abs(state[1] - (2 * c + s)) <= 1e-9);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Tangents_agree_with_differences_of_the_flow(IntegrationMethod method) =>
        AssertTangents(DynamicSystem.Of(new Lorenz63()), method, until: 1, tolerance: 1e-7, increment: 1e-5);

    [Theory]
    [MemberData(nameof(TestMethods.AllForStiffMotion), MemberType = typeof(TestMethods))]
    public void Tangents_of_stiff_motion_agree_with_differences_of_the_flow(IntegrationMethod method) =>
        AssertTangents(DynamicSystem.Of(new VanDerPol { Mu = 100 }), method, until: 30, tolerance: 1e-5, increment: 1e-6);

    [Theory]
    [MemberData(nameof(Methods))]
    public void Saltation_agrees_with_differences_of_the_flow_across_crossings(IntegrationMethod method) =>
        AssertTangents(DynamicSystem.Of(new BouncingRelay()).WithInitialState([0.3, 0.8]), method, until: 9, tolerance: 1e-7, increment: 1e-5);

    [Theory]
    [MemberData(nameof(Methods))]
    public void Saltation_agrees_with_differences_of_the_flow_through_a_nonlinear_surface(IntegrationMethod method) =>
        AssertTangents(DynamicSystem.Of(new CircularFence()), method, until: 6, tolerance: 1e-6, increment: 1e-5);

    [Theory]
    [MemberData(nameof(Methods))]
    public void Tangents_agree_with_differences_of_the_flow_through_sticking_and_slipping(IntegrationMethod method) =>
        AssertTangents(DynamicSystem.Of(new BeltBlock()).WithInitialState([-1.2, 0.9]), method, until: 12, tolerance: 1e-6, increment: 1e-5);

    [Fact]
    public void Sticking_makes_the_flow_lose_rank()
    {
        // While the block rides with the belt its speed is the belt's: the tangents become parallel.
        var flow = new Flow(DynamicSystem.Of(new BeltBlock()));
        double[] state = [-1.2, 0.9], tangents = [1, 0, 0, 1];
        flow.Advance(state, tangents, 2, 0, 12);
        Assert.True(flow.Slid);
        double determinant = tangents[0] * tangents[3] - tangents[1] * tangents[2];
        double size = tangents.Max(static value => Math.Abs(value));
        Assert.True(Math.Abs(determinant) <= 1e-8 * size * size, $"{determinant} against {size}");
        flow.Advance([0.1, 0], 0, 0.1);
        Assert.False(flow.Slid);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Backwards_runs_undo_forward_runs(IntegrationMethod method)
    {
        DynamicSystem system = DynamicSystem.Of(new VanDerPol());
        var flow = new Flow(system, new FlowOptions { Method = method, RelativeTolerance = 1e-11 });
        double[] state = [2, 0];
        flow.Advance(state, 0, 3);
        flow.Advance(state, 3, 0);
        Assert.True(Math.Abs(state[0] - 2) <= 1e-6 && Math.Abs(state[1]) <= 1e-6, $"{state[0]}, {state[1]}");
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void A_section_is_met_once_per_turn_in_its_direction(IntegrationMethod method)
    {
        // x = cos 2t, v = −2 sin 2t: x rises through 0 at t = 3π/4 + kπ, falls at π/4 + kπ.
        DynamicSystem system = DynamicSystem.Of(new Swing());
        var flow = new Flow(system, new FlowOptions { Method = method, RelativeTolerance = 1e-11 });
        double[] state = system.InitialState.ToArray();
        double time = 0;
        var rising = new Section([1, 0], 0, 1);
        for (int turn = 0; turn < 5; turn++)
        {
            Assert.True(flow.AdvanceToSection(state, [], 0, ref time, 100, rising));
            Assert.True(Math.Abs(time - (0.75 + turn) * Math.PI) <= 1e-8, $"{time}");
            Assert.True(Math.Abs(state[0]) <= 1e-14, $"{state[0]}");
            Assert.True(state[1] > 0);
        }

        Assert.True(flow.AdvanceToSection(state, [], 0, ref time, 100, rising with { Direction = 0 }));
        Assert.True(Math.Abs(time - 5.25 * Math.PI) <= 1e-8, $"{time}");
        Assert.True(flow.AdvanceToSection(state, [], 0, ref time, 0, rising with { Direction = -1 }));
        Assert.True(Math.Abs(time - 4.75 * Math.PI) <= 1e-8, $"backwards {time}");
        Assert.False(flow.AdvanceToSection(state, [], 0, ref time, 50, new Section([1, 0], 3, 0)));
        Assert.Equal(50, time);
    }

    [Fact]
    public void A_section_that_does_not_fit_is_refused()
    {
        var flow = new Flow(DynamicSystem.Of(new Swing()));
        double[] state = [1, 0];
        double time = 0;
        Assert.Throws<ArgumentException>(() => flow.AdvanceToSection(state, [], 0, ref time, 1, new Section([1], 0, 1)));
        Assert.Throws<ArgumentException>(() => flow.AdvanceToSection(state, [], 0, ref time, 1, new Section([0, 0], 0, 1)));
        Assert.Throws<ArgumentException>(() => flow.Advance(new double[3], 0, 1));
        Assert.Throws<ArgumentException>(() => flow.Advance(state, new double[3], 2, 0, 1));
        Assert.Throws<ArgumentException>(() => flow.Advance(state, 0, double.NaN));
    }

    private static void AssertTangents(DynamicSystem system, IntegrationMethod method, double until, double tolerance, double increment)
    {
        int n = system.StateCount;
        var flow = new Flow(system, new FlowOptions { Method = method, RelativeTolerance = 1e-12 });
        double[] state = system.InitialState.ToArray(), tangents = new double[n * n];
        for (int i = 0; i < n; i++) tangents[i * n + i] = 1;
        flow.Advance(state, tangents, n, 0, until);
        double size = tangents.Max(static value => Math.Abs(value));
        for (int j = 0; j < n; j++)
        {
            double[] difference = Difference(flow, system, j, until, increment), half = Difference(flow, system, j, until, increment / 2);
            for (int i = 0; i < n; i++)
            {
                // Richardson's extrapolation removes the second-order error of the central difference.
                double expected = (4 * half[i] - difference[i]) / 3;
                double error = Math.Abs(tangents[i * n + j] - expected);
                Assert.True(error <= tolerance * size, $"entry ({i}, {j}): {tangents[i * n + j]} against {expected}");
            }
        }
    }

    private static double[] Difference(Flow flow, DynamicSystem system, int j, double until, double increment)
    {
        double[] plus = system.InitialState.ToArray(), minus = system.InitialState.ToArray();
        plus[j] += increment;
        minus[j] -= increment;
        flow.Advance(plus, 0, until);
        flow.Advance(minus, 0, until);
        return [.. plus.Zip(minus, (p, m) => (p - m) / (2 * increment))];
    }
}
