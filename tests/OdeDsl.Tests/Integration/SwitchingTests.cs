using OdeDsl.Integration;
using OdeDsl.Modeling;
using Xunit;

namespace OdeDsl.Tests.Integration;

public class SwitchingTests
{
    public static TheoryData<IntegrationMethod> Methods => TestMethods.All;

    [Theory]
    [MemberData(nameof(Methods))]
    public void A_bouncing_relay_keeps_its_closed_form_period(IntegrationMethod method)
    {
        // Parabolas: each half period lasts 2, whatever the tolerance, because every step is exact and no step straddles the surface.
        // What remains is rounding, which methods with large coefficients magnify.
        Trajectory run = new BouncingRelay().Simulate(until: 100, new SimulationOptions { Method = method, RelativeTolerance = 1e-4 });
        Assert.Equal(49, run.Crossings.Count(static crossing => crossing.Time < 99));
        for (int i = 0; i < 49; i++) Assert.True(Math.Abs(run.Crossings[i].Time - 2 * (i + 1)) <= 1e-9, $"{run.Crossings[i]}");
        Assert.True(Math.Abs(run["X"].Maximum.Value - 0.5) <= 1e-11);
        Assert.True(Math.Abs(run["X"].Minimum.Value + 0.5) <= 1e-11);
        Assert.True(Math.Abs(run.At(97.5)[0] - (1.5 - 1.5 * 1.5 / 2)) <= 1e-9);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Conditions_on_time_are_landed_on_exactly(IntegrationMethod method)
    {
        // x = 1 + t to t = 2, then falls by 2 per unit to 0 at 3.5 and stays.
        Trajectory run = new SteppedForcing().Simulate(until: 4.5, new SimulationOptions { Method = method });
        Assert.Equal([2.0, 3.5], run.Crossings.Select(static crossing => crossing.Time));
        Assert.Contains(2.0, run.Times.ToArray());
        Assert.Contains(3.5, run.Times.ToArray());
        Assert.True(Math.Abs(run.At(2)[0] - 3) <= 1e-12);
        Assert.True(Math.Abs(run.At(3)[0] - 1) <= 1e-12);
        Assert.True(Math.Abs(run.FinalState[0]) <= 1e-12);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Whole_number_surfaces_are_met_in_time_and_in_the_state(IntegrationMethod method)
    {
        // x' = ⌊t⌋: 0 + 1 + 2 + 3 + 4 at t = 5. y' = 1 / (1 + ⌊y⌋): reaches 1 at 0.5, 2 at 2.5, 3 at 5.5.
        Trajectory run = new Staircase().Simulate(until: 6, new SimulationOptions { Method = method });
        Assert.True(Math.Abs(run.At(5)[0] - 10) <= 1e-12);
        Assert.True(Math.Abs(run.At(0.5)[1] - 1) <= 1e-12);
        Assert.True(Math.Abs(run.At(2.5)[1] - 2) <= 1e-12);
        Assert.True(Math.Abs(run.At(5.5)[1] - 3) <= 1e-12);
        Crossing[] inState = [.. run.Crossings.Where(static crossing => crossing.Switch == 1)];
        Assert.Equal([1.0, 2, 3], inState.Select(static crossing => crossing.To));
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void A_window_far_shorter_than_a_step_is_never_missed(IntegrationMethod method)
    {
        // sin φ > 1 − ε holds for 2 arccos(1 − ε) once per turn; φ' = 1.
        Trajectory run = new NarrowWindow().Simulate(until: 100, new SimulationOptions { Method = method });
        Assert.Equal(32, run.Crossings.Count);
        Assert.True(Math.Abs(run.FinalState[1] - 16 * 2 * Math.Acos(1 - 1e-6)) <= 1e-9);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void A_graze_that_does_not_reach_the_surface_changes_nothing(IntegrationMethod method)
    {
        // The window opens at sin φ = 1 + ε: never.
        Trajectory run = new NarrowWindow { Narrowness = -1e-9 }.Simulate(until: 100, new SimulationOptions { Method = method });
        Assert.Empty(run.Crossings);
        Assert.Equal(0, run.FinalState[1]);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void A_root_without_values_beyond_its_surface_is_run_up_to_the_surface(IntegrationMethod method)
    {
        // √h falls linearly: h = (2 − t)², empty at t = 2.
        Trajectory run = new DrainingTank().Simulate(until: 5, new SimulationOptions { Method = method });
        Crossing crossing = Assert.Single(run.Crossings);
        Assert.True(Math.Abs(crossing.Time - 2) <= 1e-4, $"{crossing.Time}");
        Assert.True(Math.Abs(run.At(1)[0] - 1) <= 1e-5);
        Assert.True(Math.Abs(run.FinalState[0]) <= 1e-9);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Backwards_integration_undoes_a_run_with_crossings(IntegrationMethod method)
    {
        DynamicSystem system = DynamicSystem.Of(new BouncingRelay()).WithInitialState([0.3, -0.2]);
        var options = new SimulationOptions { Method = method, RelativeTolerance = 1e-9 };
        double[] end = system.Simulate(7.3, options).FinalState;
        double[] back = system.WithInitialState(end).Simulate(0, options with { From = 7.3 }).FinalState;
        Assert.True(Math.Abs(back[0] - 0.3) <= 1e-11 && Math.Abs(back[1] + 0.2) <= 1e-11);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Dry_friction_sticks_until_the_spring_overcomes_it(IntegrationMethod method)
    {
        // The block rides with the belt (v = 0.2) until the spring force x reaches the friction 1: from x = 0 at t = 5.
        Trajectory run = new BeltBlock().Simulate(until: 20, new SimulationOptions { Method = method, RelativeTolerance = 1e-8 });
        Assert.Equal(
            [CrossingKind.SlidingBegan, CrossingKind.SlidingEnded, CrossingKind.SlidingBegan, CrossingKind.SlidingEnded],
            run.Crossings.Select(static crossing => crossing.Kind));
        Assert.Equal(0, run.Crossings[0].Time);
        Assert.True(Math.Abs(run.Crossings[1].Time - 5) <= 1e-9, $"{run.Crossings[1].Time}");
        Assert.True(Math.Abs(run.At(3)[0] - 0.6) <= 1e-10);
        Assert.True(Math.Abs(run.At(3)[1] - 0.2) <= 1e-10);
        // It sticks again from x₂ and rides for (1 − x₂) / 0.2.
        double stick = run.Crossings[2].Time;
        Assert.True(Math.Abs(run.Crossings[3].Time - stick - (1 - run.At(stick)[0]) / 0.2) <= 1e-6);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Crossings_that_accumulate_end_the_run_with_their_reason(IntegrationMethod method)
    {
        // A. F. Filippov, Differential Equations with Discontinuous Righthand Sides, 1988, section 4 (an example of this kind): straight lines
        // shrink by 1/3 per quadrant pair; from (1, 0.3) the origin is reached at t = 0.65 after infinitely many crossings.
        var failure = Assert.Throws<IntegrationException>(
            () => new FiniteSpiral().Simulate(until: 10, new SimulationOptions { Method = method }));
        Assert.Equal(IntegrationFailure.CrossingsAccumulate, failure.Reason);
        Assert.True(Math.Abs(failure.Time - 0.65) <= 1e-12, $"{failure.Time}");
        Assert.True(Math.Abs(failure.State[0]) <= 1e-12 && Math.Abs(failure.State[1]) <= 1e-12);
        Assert.Equal(failure.Time, failure.Partial!.EndTime);
    }

    [Theory]
    [MemberData(nameof(Methods))]
    public void Sliding_on_two_surfaces_at_once_ends_the_run_with_its_reason(IntegrationMethod method)
    {
        var failure = Assert.Throws<IntegrationException>(
            () => new TwoSurfaces().Simulate(until: 10, new SimulationOptions { Method = method }));
        Assert.Equal(IntegrationFailure.SlidingOnSeveralSurfaces, failure.Reason);
        Assert.True(Math.Abs(failure.Time - 2) <= 1e-12);
        Assert.Equal(failure.Time, failure.Partial!.EndTime);
    }

    [Fact]
    public void A_start_on_a_surface_moves_to_the_side_its_rates_lead_to()
    {
        // Sign(0) is 0 as written; the motion goes up, where the rate is −1.
        Trajectory run = new BouncingRelay().Simulate(until: 1);
        Assert.Empty(run.Crossings);
        Assert.True(Math.Abs(run.FinalState[0] - 0.5) <= 1e-13);
    }

    [Fact]
    public void Several_conditions_may_change_at_one_time()
    {
        Trajectory run = new SimultaneousSwitches().Simulate(until: 2);
        Assert.Equal(3, run.Crossings.Count);
        Assert.All(run.Crossings, static crossing => Assert.True(Math.Abs(crossing.Time - 1) <= 1e-12));
        Assert.True(Math.Abs(run.FinalState[1] - 6) <= 1e-11);
    }
}
