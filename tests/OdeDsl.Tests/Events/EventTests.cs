using OdeDsl;
using OdeDsl.Integration;
using OdeDsl.Modeling;
using Xunit;

namespace OdeDsl.Tests.Events;

public sealed class EventTests
{
    private static readonly SimulationOptions Tight = new() { RelativeTolerance = 1e-11, AbsoluteTolerance = 1e-13 };

    // Free fall (any textbook of mechanics): t₁ = √(2h/g), impact speed √(2gh); each flight lasts e times the one before.
    [Theory]
    [InlineData(IntegrationMethod.DormandPrince54)]
    [InlineData(IntegrationMethod.RadauIIA5)]
    public void A_bouncing_ball_meets_the_ground_at_the_times_of_the_geometric_series(IntegrationMethod method)
    {
        Trajectory run = new Ball().Simulate(until: 1.3, Tight with { Method = method });
        double fall = Math.Sqrt(2 / 9.81), time = fall, speed = Math.Sqrt(2 * 9.81);
        Assert.True(run.Events.Count >= 5);
        for (int k = 0; k < run.Events.Count; k++)
        {
            EventOccurrence impact = run.Events[k];
            Assert.Equal(time, impact.Time, 1e-10);
            Assert.Equal(-speed, impact.Before[1], 1e-9);
            Assert.Equal(0.5 * speed, impact.After[1], 1e-9);
            Assert.Equal((0, 0.5 * -impact.Before[1]), (impact.After[0], impact.After[1]));
            Assert.Equal(impact.After[1], run["Speed"].At(impact.Time));
            speed /= 2;
            time += 2 * speed / 9.81;
        }

        Assert.True(run["Height"].Minimum.Value >= -1e-12);
        // Two impacts before, at t₁ and 2 t₁: each leaves e² of the energy.
        Assert.Equal(9.81 / 16, run["Energy"].At(1), 1e-8);
    }

    [Fact]
    public void Impacts_that_accumulate_end_the_run_at_the_limit_of_their_times()
    {
        IntegrationException failure = Assert.Throws<IntegrationException>(() => new Ball().Simulate(until: 10));
        Assert.Equal(IntegrationFailure.EventsAccumulate, failure.Reason);
        // t₁ (1 + 2e / (1 − e)) = 3 t₁ for e = 1/2.
        Assert.Equal(3 * Math.Sqrt(2 / 9.81), failure.Time, 1e-6);
        Assert.True(failure.Partial!.Events.Count > 15);
        Assert.Equal(IntegrationFailure.EventsAccumulate, Assert.Throws<IntegrationException>(() => new Ball { Restitution = 0 }.Simulate(until: 10)).Reason);
    }

    // A saltation matrix for the bouncing ball in closed form: with v = impact speed, the displacement (dh, dv) of a drop from height h arrives
    // after one impact, at a fixed time T, as the derivative of the explicit solution by h.
    [Fact]
    public void Tangents_through_a_bounce_are_the_derivatives_of_the_closed_solution()
    {
        const double T = 0.7, g = 9.81, e = 0.5;
        Flow flow = new(DynamicSystem.Of(new Ball()), new FlowOptions { RelativeTolerance = 1e-11 });
        double[] state = [1, 0], tangents = [1, 0, 0, 1];
        flow.Advance(state, tangents, 2, 0, T);
        (double Height, double Speed) Solution(double h, double v)
        {
            double impact = (v + Math.Sqrt(v * v + 2 * g * h)) / g, up = e * Math.Sqrt(v * v + 2 * g * h), left = T - impact;
            return (up * left - g * left * left / 2, up - g * left);
        }

        const double d = 1e-5;
        (double Height, double Speed) expected = Solution(1, 0);
        Assert.Equal(expected.Height, state[0], 1e-9);
        Assert.Equal(expected.Speed, state[1], 1e-9);
        Assert.Equal((Solution(1 + d, 0).Height - Solution(1 - d, 0).Height) / (2 * d), tangents[0], 1e-7);
        Assert.Equal((Solution(1 + d, 0).Speed - Solution(1 - d, 0).Speed) / (2 * d), tangents[2], 1e-7);
        Assert.Equal((Solution(1, d).Height - Solution(1, -d).Height) / (2 * d), tangents[1], 1e-7);
        Assert.Equal((Solution(1, d).Speed - Solution(1, -d).Speed) / (2 * d), tangents[3], 1e-7);
    }

    // First-order heating and cooling between 20 and 22: Tau ln(22/20) down, Tau ln((50 - 20)/(50 - 22)) up.
    [Fact]
    public void A_thermostat_cycles_with_the_period_of_its_exponentials()
    {
        Trajectory run = new Thermostat().Simulate(until: 30, Tight);
        double down = 10 * Math.Log(22.0 / 20), up = 10 * Math.Log(30.0 / 28), first = 10 * Math.Log(32.0 / 28);
        double[] expected = [first, first + down, first + down + up, first + 2 * down + up];
        for (int i = 0; i < expected.Length; i++)
        {
            Assert.Equal(expected[i], run.Events[i].Time, 1e-8);
            Assert.Equal((i % 2, i + 1), (run.Events[i].Modes[0], run.Events[i].Modes[1]));
            Assert.Equal(i % 2 == 0 ? "TurnOff" : "TurnOn", run.System.Description.Events[run.Events[i].Event].Name);
        }

        Assert.Equal(0, run["Heating"].At(first + down / 2));
        Assert.Equal(5, run["Heating"].At(first + down + up / 2));
        Assert.Equal(5, run["Heating"].At(0));
        Flow flow = new(run.System, new FlowOptions { RelativeTolerance = 1e-11 });
        double[] state = [18], tangent = [1];
        flow.Advance(state, tangent, 1, 0, first + down / 2);
        double rate = 5 - 1.8;
        // Along the motion a displacement is one of time: the ratio of the rates there and here.
        Assert.Equal(-state[0] / 10 / rate, tangent[0], 1e-8);
    }

    [Fact]
    public void Events_at_one_time_run_in_the_order_of_declaration_and_a_terminal_one_ends_the_run()
    {
        Trajectory run = new Ending().Simulate(until: 5);
        Assert.Equal(["MarkFirst", "MarkSecond", "End"], run.Events.Select(item => run.System.Description.Events[item.Event].Name));
        Assert.Equal((1, 2), (run.Events[1].Modes[0], run.Events[1].Modes[1]));
        Assert.Equal(1, run.EndTime, 1e-14);
        Assert.Equal(run.Events[2], run.EndedBy);
        Assert.Null(new Ending().Simulate(until: 0.9).EndedBy);
        Flow flow = new(run.System);
        double[] state = [0];
        IntegrationException failure = Assert.Throws<IntegrationException>(() => flow.Advance(state, 0, 5));
        Assert.Equal(IntegrationFailure.TerminalEvent, failure.Reason);
    }

    [Fact]
    public void A_sampled_controller_acts_at_its_times()
    {
        Trajectory run = new Sampled().Simulate(until: 2.2);
        // The guard starts at zero and has to leave it first: nothing is held until the clock has passed the next time.
        Assert.Equal([0.5, 1, 1.5, 2], new Sampled { Next = 0.5 }.Simulate(until: 2.2).Events.Select(static item => Math.Round(item.Time, 12)));
        Assert.Equal(Math.Pow(0.5, 3) * 0.8, Math.Abs(new Sampled { Next = 0.5 }.Simulate(until: 2.2).FinalState[0]), 1e-12);
        Assert.True(run.System.DependsOnTime);
    }

    [Fact]
    public void Time_does_not_run_backwards_through_events()
    {
        IntegrationException failure = Assert.Throws<IntegrationException>(() => new Ball().Simulate(until: -1));
        Assert.Equal(IntegrationFailure.EventsInReverse, failure.Reason);
    }

    public static TheoryData<IntegrationMethod> Methods => [.. Enum.GetValues<IntegrationMethod>().Where(static method => method != IntegrationMethod.BackwardDifferentiation)];

    [Fact]
    public void The_backward_differentiation_formulas_refuse_events() => Assert.Contains(
        "choose another method",
        Assert.Throws<ArgumentException>(static () => new Ball().Simulate(1, new SimulationOptions { Method = IntegrationMethod.BackwardDifferentiation })).Message,
        StringComparison.Ordinal);

    // Level = 1 + 0.3 t reaches 3 at t = 20/3.
    [Theory]
    [MemberData(nameof(Methods))]
    public void Guards_on_the_surface_of_a_condition_are_met_with_it(IntegrationMethod method)
    {
        Trajectory run = new ThrottledBasin().Simulate(20, new SimulationOptions { Method = method });
        Assert.Equal(2, run.Events.Count);
        Assert.All(run.Events, static item => Assert.True(Math.Abs(item.Time - 20.0 / 3) <= 1e-9));
        Assert.True(Math.Abs(run.FinalState[0] - (3 + 0.2 * (20 - 20.0 / 3))) <= 1e-6);
    }

    // X = sin t passes 1/2 upwards at π/6 + 2πk: 160 times before t = 1000.
    [Theory]
    [MemberData(nameof(Methods))]
    public void A_condition_as_guard_is_met_once_a_turn_for_many_turns(IntegrationMethod method)
    {
        const double Until = 1000;
        Trajectory run = new SwingPastMark().Simulate(Until, new SimulationOptions { Method = method });
        Assert.Equal((int)Math.Floor((Until - Math.PI / 6) / Math.Tau) + 1, run.Events.Count);
    }

    // The impacts of a ball accumulate at sqrt(2 h / g) (1 + e) / (1 - e) (mechanics textbooks): a failure there, whatever the restitution.
    [Theory]
    [InlineData(0.1)]
    [InlineData(0.3)]
    [InlineData(0.5)]
    [InlineData(0.8)]
    [InlineData(0.9)]
    public void Impacts_that_accumulate_end_the_run_where_they_do(double restitution)
    {
        foreach (IntegrationMethod method in Methods)
        {
            var options = new SimulationOptions { Method = method, RelativeTolerance = 1e-6 };
            IntegrationException failure = Assert.Throws<IntegrationException>(() => new Ball { Restitution = restitution }.Simulate(20, options));
            Assert.Equal(IntegrationFailure.EventsAccumulate, failure.Reason);
            double end = Math.Sqrt(2 / 9.81) * (1 + restitution) / (1 - restitution);
            Assert.True(Math.Abs(failure.Time - end) <= 1e-3 * end, $"{method}: {failure.Time:R}, not {end:R}");
        }
    }
}
