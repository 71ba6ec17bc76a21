using OdeDsl.Integration;
using OdeDsl.Modeling;
using Xunit;

namespace OdeDsl.Tests.Integration;

public class FailureTests
{
    public static TheoryData<IntegrationMethod> Methods => TestMethods.AllWithMultistep;

    /// <summary>x' = x², x(0) = 1: x = 1 / (1 − t) leaves to infinity at t = 1.</summary>
    private readonly struct BlowUp : IHandWritten<BlowUp>
    {
        public static ModelDescription Description { get; } = IHandWritten<BlowUp>.Describe("BlowUp", 1);

        public static void F(double time, ReadOnlySpan<double> x, ReadOnlySpan<double> p, Span<double> dx) => dx[0] = x[0] * x[0];
    }

    /// <summary>x' = −x, and on one call something else happens. Parameters: the number of that call, and what happens (0: NaN, 1: throws).</summary>
    private readonly struct Faulty : IHandWritten<Faulty>
    {
        [ThreadStatic]
        private static long calls;

        public static ModelDescription Description { get; } = IHandWritten<Faulty>.Describe("Faulty", [1], [0, 0]);

        public static void Reset() => calls = 0;

        public static void F(double time, ReadOnlySpan<double> x, ReadOnlySpan<double> p, Span<double> dx)
        {
            calls++;
            dx[0] = -x[0];
            if (p[0] <= 0 || calls != p[0]) return;
            if (p[1] == 1) throw new InvalidOperationException("call " + calls);
            dx[0] = double.NaN;
        }
    }

    /// <summary>x' = √(1 − t): not a number beyond t = 1.</summary>
    private readonly struct EndOfDomain : IHandWritten<EndOfDomain>
    {
        public static ModelDescription Description { get; } = IHandWritten<EndOfDomain>.Describe("EndOfDomain", 0);

        public static void F(double time, ReadOnlySpan<double> x, ReadOnlySpan<double> p, Span<double> dx) => dx[0] = Math.Sqrt(1 - time);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void A_solution_that_leaves_to_infinity_ends_near_its_true_time(IntegrationMethod method)
    {
        var failure = Assert.Throws<IntegrationException>(
            () => DynamicSystem.Of<BlowUp>().Simulate(2, new SimulationOptions { Method = method, RelativeTolerance = 1e-8 }));
        Assert.True(failure.Reason is IntegrationFailure.StepTooSmall or IntegrationFailure.NotFinite, failure.Message);
        Assert.True(Math.Abs(failure.Time - 1) <= 1e-6, failure.Message);
        Assert.True(failure.State[0] > 1e6);
        Assert.True(Math.Abs(failure.Partial!.At(0.5)[0] - 2) <= 1e-6);
        Assert.Equal(failure.Time, failure.Partial.EndTime);
    }

    [Theory]
    [MemberData(nameof(TestMethods.All), MemberType = typeof(TestMethods))]
    public void Rates_without_value_beyond_a_time_end_the_run_there(IntegrationMethod method)
    {
        var failure = Assert.Throws<IntegrationException>(
            () => DynamicSystem.Of<EndOfDomain>().Simulate(2, new SimulationOptions { Method = method }));
        Assert.Equal(IntegrationFailure.NotFinite, failure.Reason);
        Assert.True(Math.Abs(failure.Time - 1) <= 1e-6, failure.Message);
        Assert.True(Math.Abs(failure.State[0] - 2.0 / 3) <= 1e-5);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Rates_that_are_not_a_number_once_cost_a_step_and_no_more(IntegrationMethod method)
    {
        foreach (int call in new[] { 2, 3, 9, 17, 40 })
        {
            Faulty.Reset();
            Trajectory run = DynamicSystem.Of<Faulty>().WithParameters([call, 0]).Simulate(5, new SimulationOptions { Method = method });
            Assert.True(Math.Abs(run.FinalState[0] - Math.Exp(-5)) <= 1e-6, $"call {call}");
        }
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Rates_that_are_not_a_number_at_the_start_are_named(IntegrationMethod method)
    {
        Faulty.Reset();
        var failure = Assert.Throws<IntegrationException>(
            () => DynamicSystem.Of<Faulty>().WithParameters([1, 0]).Simulate(5, new SimulationOptions { Method = method }));
        Assert.Equal(IntegrationFailure.NotFinite, failure.Reason);
        Assert.Equal(0, failure.Time);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Rates_that_throw_end_the_run_with_the_cause_inside(IntegrationMethod method)
    {
        foreach (int call in new[] { 1, 2, 5, 30 })
        {
            Faulty.Reset();
            var failure = Assert.Throws<IntegrationException>(
                () => DynamicSystem.Of<Faulty>().WithParameters([call, 1]).Simulate(5, new SimulationOptions { Method = method }));
            Assert.Equal(IntegrationFailure.EquationsThrew, failure.Reason);
            Assert.Equal("call " + call, Assert.IsType<InvalidOperationException>(failure.InnerException).Message);
            Trajectory partial = failure.Partial!;
            Assert.True(Math.Abs(partial.FinalState[0] - Math.Exp(-partial.EndTime)) <= 1e-5);
            Assert.Equal(partial.EndTime, failure.Time);
        }
    }

    [Fact]
    public void A_flow_that_fails_leaves_the_callers_state_alone()
    {
        var flow = new Flow(DynamicSystem.Of<BlowUp>());
        double[] state = [1], tangent = [1];
        Assert.Throws<IntegrationException>(() => flow.Advance(state, tangent, 1, 0, 2));
        Assert.Equal([1.0], state);
        Assert.Equal([1.0], tangent);
        flow.Advance(state, 0, 0.5);
        Assert.True(Math.Abs(state[0] - 2) <= 1e-7);
    }

    [Fact]
    public void The_permitted_number_of_steps_is_kept()
    {
        var failure = Assert.Throws<IntegrationException>(
            () => DynamicSystem.Of<Faulty>().Simulate(1e6, new SimulationOptions { MaximumSteps = 50, Method = IntegrationMethod.DormandPrince54 }));
        Assert.Equal(IntegrationFailure.TooManySteps, failure.Reason);
        IntegrationStatistics spent = failure.Partial!.Statistics;
        Assert.Equal(50, spent.AcceptedSteps + spent.RejectedSteps);
    }

    [Fact]
    public void Cancelling_keeps_the_run_so_far_and_is_an_ordinary_cancellation()
    {
        using var source = new CancellationTokenSource();
        var progress = new Immediate(part =>
        {
            if (part >= 0.5) source.Cancel();
        });
        var cancelled = Assert.Throws<IntegrationCanceledException>(
            () => DynamicSystem.Of<Faulty>().Simulate(10, new SimulationOptions { MaximumStep = 0.1 }, progress, source.Token));
        Assert.IsAssignableFrom<OperationCanceledException>(cancelled);
        Assert.Equal(source.Token, cancelled.CancellationToken);
        Assert.Equal(IntegrationFailure.Cancelled, cancelled.Reason);
        Assert.True(cancelled.Time >= 5 && cancelled.Time <= 5.2);
        Assert.True(Math.Abs(cancelled.Partial!.At(4)[0] - Math.Exp(-4)) <= 1e-6);
    }

    [Fact]
    public void Options_without_meaning_are_refused_by_name()
    {
        DynamicSystem system = DynamicSystem.Of<Faulty>();
        foreach (double bad in new[] { 0, -1e-6, double.NaN, double.PositiveInfinity })
        {
            Refused(new SimulationOptions { RelativeTolerance = bad }, nameof(SimulationOptions.RelativeTolerance));
            Refused(new SimulationOptions { AbsoluteTolerance = bad }, nameof(SimulationOptions.AbsoluteTolerance));
            Refused(new SimulationOptions { InitialStep = bad }, nameof(SimulationOptions.InitialStep));
            Refused(new SimulationOptions { MaximumStep = bad }, nameof(SimulationOptions.MaximumStep));
        }

        Refused(new SimulationOptions { RelativeTolerance = 1e-15 }, nameof(SimulationOptions.RelativeTolerance));
        Refused(new SimulationOptions { MaximumSteps = 0 }, nameof(SimulationOptions.MaximumSteps));
        Refused(new SimulationOptions { Method = (IntegrationMethod)77 }, nameof(SimulationOptions.Method));
        Assert.Throws<ArgumentException>(() => system.Simulate(1, new SimulationOptions { From = double.NaN }));
        Assert.Throws<ArgumentOutOfRangeException>(() => system.Simulate(double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>(() => system.Simulate(double.PositiveInfinity));

        void Refused(SimulationOptions options, string name) =>
            Assert.Contains(name, Assert.ThrowsAny<ArgumentException>(() => system.Simulate(1, options)).Message, StringComparison.OrdinalIgnoreCase);
    }

    [Fact]
    public void States_and_parameters_that_are_not_finite_are_refused_by_name()
    {
        DynamicSystem system = DynamicSystem.Of(new BeltBlock());
        Assert.Contains("BeltSpeed", Assert.Throws<ArgumentException>(() => system.WithParameter(0, double.NaN)).Message, StringComparison.Ordinal);
        Assert.Contains(
            "V", Assert.Throws<ArgumentException>(() => system.WithInitialState([0, double.PositiveInfinity])).Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentException>(() => system.WithInitialState([1, 2, 3]));
        Assert.Throws<ArgumentOutOfRangeException>(() => system.WithParameter(2, 1));
        Assert.Throws<ArgumentException>(() => new BeltBlock { X = double.NaN }.Simulate(1));
    }

    private sealed class Immediate(Action<double> report) : IProgress<double>
    {
        public void Report(double value) => report(value);
    }
}
