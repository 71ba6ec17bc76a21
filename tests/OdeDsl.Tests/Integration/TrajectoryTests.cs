using OdeDsl.Integration;
using OdeDsl.Modeling;
using OdeDsl.Tests.Problems;
using Xunit;

namespace OdeDsl.Tests.Integration;

public class TrajectoryTests
{
    public static TheoryData<IntegrationMethod> Methods => TestMethods.AllButAutomatic;

    [Theory]
    [MemberData(nameof(Methods))]
    public void A_run_is_accurate_between_its_steps_too(IntegrationMethod method)
    {
        // x = cos t.
        Trajectory run = new Swing { Stiffness = 1 }.Simulate(until: 20, new SimulationOptions { Method = method, RelativeTolerance = 1e-8 });
        double largest = 0;
        foreach (double time in run.SampleTimes(1001)) largest = Math.Max(largest, Math.Abs(run.At(time)[0] - Math.Cos(time)));
        Assert.True(largest <= 3e-6, $"{largest}");
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Extrema_are_found_between_the_steps(IntegrationMethod method)
    {
        Trajectory run = new Swing { Stiffness = 1, X = 0, V = 1 }.Simulate(until: 5, new SimulationOptions { Method = method, RelativeTolerance = 1e-9 });
        Extremum highest = run["X"].Maximum, lowest = run["X"].Minimum;
        Assert.True(Math.Abs(highest.Value - 1) <= 1e-6, $"{highest}");
        Assert.True(Math.Abs(highest.Time - Math.PI / 2) <= 1e-3, $"{highest}");
        Assert.True(Math.Abs(lowest.Value + 1) <= 1e-6, $"{lowest}");
        Assert.True(Math.Abs(lowest.Time - 3 * Math.PI / 2) <= 1e-3, $"{lowest}");
        // Energy v²/2 + x²/2 stays at 1/2; twice the position is an observable with the same extrema doubled.
        Assert.True(Math.Abs(run["Doubled"].Maximum.Value - 2) <= 2e-6);
        Assert.True(Math.Abs(run["Energy"].Maximum.Value - 0.5) <= 1e-6);
        Assert.True(Math.Abs(run["Energy"].Minimum.Value - 0.5) <= 1e-6);
    }

    [Fact]
    public void Series_are_found_by_property_by_name_and_with_observables()
    {
        var pendulum = new Swing();
        Trajectory run = pendulum.Simulate(until: 3);
        Assert.Equal("X", run[pendulum.X].Name);
        Assert.Equal("m", run[pendulum.X].Unit);
        Assert.Equal(run["V"].Values, run[pendulum.V].Values);
        Series energy = run["Energy"];
        Assert.Equal("J/kg", energy.Unit);
        double[] at = run.At(1.7);
        Assert.Equal(at[1] * at[1] / 2 + 4 * at[0] * at[0] / 2, energy.At(1.7), 1e-14);
        Assert.Equal(run.Times.Length, energy.Values.Length);
        Assert.Equal(run.FinalState[0], run["X"].Final);
        Assert.Equal(run.SampleTimes(7).Select(time => run.At(time)[0]), run["X"].Sample(7));
    }

    [Fact]
    public void An_unknown_name_is_answered_with_the_known_ones()
    {
        Trajectory run = new Swing().Simulate(until: 1);
        string message = Assert.Throws<KeyNotFoundException>(() => run["Speed"]).Message;
        Assert.Contains("'Speed'", message, StringComparison.Ordinal);
        Assert.Contains("X, V, Energy, Doubled", message, StringComparison.Ordinal);
        Assert.Throws<KeyNotFoundException>(() => run[new Swing().Stiffness]);
    }

    [Fact]
    public void Times_outside_the_run_are_refused()
    {
        Trajectory run = new Swing().Simulate(until: 1);
        foreach (double time in new[] { -1e-9, 1.0000001, double.NaN })
        {
            Assert.Throws<ArgumentOutOfRangeException>(() => run.At(time));
            Assert.Throws<ArgumentOutOfRangeException>(() => run["X"].At(time));
        }

        Assert.Throws<ArgumentOutOfRangeException>(() => run.SampleTimes(1));
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void The_end_is_landed_on_exactly_and_the_nodes_are_kept_exactly(IntegrationMethod method)
    {
        foreach (double end in new[] { 0.1, 1.0 / 3, 7.77, -2.5 })
        {
            Trajectory run = new Swing().Simulate(end, new SimulationOptions { Method = method });
            Assert.Equal(end, run.EndTime);
            for (int node = 0; node < run.Times.Length; node++) Assert.Equal(run.StateAtNode(node).ToArray(), run.At(run.Times[node]));
        }
    }

    [Fact]
    public void A_run_without_duration_is_its_start()
    {
        Trajectory run = new Swing().Simulate(until: 0);
        Assert.Equal([1.0, 0], run.FinalState);
        Assert.Equal([1.0, 0], run.At(0));
        Assert.Equal(1, run["X"].Maximum.Value);
    }

    [Fact]
    public void Simulating_does_not_change_the_model()
    {
        var pendulum = new Swing { X = 0.5, Stiffness = 2 };
        pendulum.Simulate(until: 10);
        Assert.Equal((0.5, 0.0, 2.0), (pendulum.X, pendulum.V, pendulum.Stiffness));
    }

    [Fact]
    public void Progress_rises_to_one()
    {
        var seen = new List<double>();
        new Swing().Simulate(until: 50, new SimulationOptions { MaximumStep = 0.2 }, new Recorder(seen));
        Assert.Equal(seen.Order(), seen);
        Assert.True(seen.Count is > 50 and <= 101);
        Assert.Equal(1, seen[^1]);
    }

    [Fact]
    public void A_shortened_last_step_does_not_set_the_next_one()
    {
        // Stopping in between costs the landing step, a repeated first estimate of the step, and nothing more.
        var flow = new Flow(DynamicSystem.Of(new Lorenz63()), new FlowOptions { Method = IntegrationMethod.DormandPrince54 });
        double[] state = [1, 1, 20];
        flow.Advance(state, 0, 10);
        long whole = flow.AcceptedSteps;
        state = [1, 1, 20];
        flow.Advance(state, 0, 3.3333);
        flow.Advance(state, 3.3333, 3.3334);
        flow.Advance(state, 3.3334, 10);
        Assert.True(flow.AcceptedSteps - whole <= whole + 20, $"{whole}, then {flow.AcceptedSteps - whole}");
    }

    private sealed class Recorder(List<double> seen) : IProgress<double>
    {
        public void Report(double value) => seen.Add(value);
    }
}

/// <summary>A mass on a spring; x = cos t for stiffness 1.</summary>
[OdeModel]
internal sealed partial class Swing
{
    [State(Initial = 1, Unit = "m")] public partial double X { get; set; }
    [State(Initial = 0, Unit = "m/s")] public partial double V { get; set; }
    [Parameter(4)] public partial double Stiffness { get; set; }
    [Rate(nameof(X))] private double XRate => V;
    [Rate(nameof(V))] private double VRate => -Stiffness * X;
    [Observable(Unit = "J/kg")] private double Energy => V * V / 2 + Stiffness * X * X / 2;
    [Observable] private double Doubled => 2 * X;
}
