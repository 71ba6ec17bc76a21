using OdeDsl;
using OdeDsl.Assessment;
using OdeDsl.Cycles;
using OdeDsl.Equilibria;
using OdeDsl.Integration;

namespace Tarnwater.Tests;

public class UnbalancedDrumTests
{
    [Fact]
    public void Hanging_straight_down_the_drum_rests_at_a_stable_focus()
    {
        UnbalancedDrum drum = new();
        Equilibrium rest = Assert.Single(drum.FindEquilibria().Equilibria, static rest => rest.IsStable);

        // A driven rotor at rest is a damped pendulum: natural frequency sqrt(m g e / J), damping ratio b / (2 sqrt(m g e J)) (mechanics textbooks).
        double weight = drum.Mass * 9.81 * drum.Eccentricity;
        Assert.Equal(EquilibriumKind.Focus, rest.Kind);
        Assert.True(Math.Abs(rest.State[0]) <= 1e-12);
        Assert.True(Math.Abs(rest.Modes[0].NaturalFrequency / Math.Sqrt(weight / drum.Inertia) - 1) <= 1e-12);
        Assert.True(Math.Abs(rest.Modes[0].DampingRatio / (drum.BearingDrag / (2 * Math.Sqrt(weight * drum.Inertia))) - 1) <= 1e-12);
    }

    // Energy balance over a turn: the weight gives back what it takes, so the clutch's work equals the bearings' (mechanics).
    [Fact]
    public void Over_a_turn_of_its_cycle_the_clutch_does_the_work_that_the_bearings_take()
    {
        UnbalancedDrum drum = new();
        LimitCycle cycle = Assert.Single(drum.FindLimitCycles().Cycles, static cycle => cycle.IsStable);
        Assert.Equal([1, 0], cycle.Winding.AsSpan());

        (drum.Angle, drum.Speed) = (cycle.State[0], cycle.State[1]);
        Trajectory turn = drum.Simulate(cycle.Period, new SimulationOptions { RelativeTolerance = 1e-11 });
        Series speed = turn["Speed"], drive = turn["Drive"];

        double taken = Quadrature.OverSteps(turn, time => drum.BearingDrag * speed.At(time) * speed.At(time));
        double given = Quadrature.OverSteps(turn, time => drive.At(time) * speed.At(time));
        Assert.True(given > 0);
        Assert.True(Math.Abs(given / taken - 1) <= 1e-7, $"{given:R} against {taken:R}");
    }

    // The clutch does its work on the angle between engaging and letting go: at most the torque times the window.
    [Fact]
    public void The_clutch_engages_and_lets_go_once_a_turn_inside_its_window()
    {
        UnbalancedDrum drum = new();
        LimitCycle cycle = Assert.Single(drum.FindLimitCycles().Cycles, static cycle => cycle.IsStable);
        (drum.Angle, drum.Speed) = (cycle.State[0], cycle.State[1]);
        Trajectory turn = drum.Simulate(cycle.Period, new SimulationOptions { RelativeTolerance = 1e-10 });

        double[] torques = turn["Drive"].Sample(20001);
        int engagements = torques.Zip(torques.Skip(1).Append(torques[0])).Count(pair => pair.First == 0 && pair.Second > 0);
        Assert.Equal(1, engagements);
        foreach (double[] state in turn.Sample(20001).Where((_, i) => torques[i] > 0))
        {
            Assert.True(Math.Abs(Math.IEEERemainder(state[0] - drum.WindowMiddle, 2 * Math.PI)) <= drum.WindowWidth / 2 + 1e-6);
            Assert.True(state[1] <= drum.ReleaseSpeed + 1e-6);
        }
    }

    // A light drum slides along the release speed until the window ends: neighbours meet on the surface, so the return map loses its rank.
    [Fact]
    public void A_light_drum_slides_along_the_release_speed_on_a_cycle_that_forgets_its_start_in_one_turn()
    {
        UnbalancedDrum drum = new() { Mass = 12 };
        LimitCycle cycle = Assert.Single(drum.FindLimitCycles().Cycles, static cycle => cycle.IsStable);
        Assert.True(cycle.Slides);
        Assert.Equal([1, 0], cycle.Winding.AsSpan());
        Assert.True(cycle.Multipliers.Min(static value => value.Magnitude) <= 1e-6);
    }

    // The margins against plain runs on both sides of them, from a drum turned over fast enough to be caught if a rotating cycle exists.
    [Fact]
    public void The_drum_keeps_turning_up_to_its_margins_and_comes_to_rest_beyond()
    {
        ModelAssessment view = new UnbalancedDrum().Assess(new AssessmentOptions { SampledStarts = 0 });
        MarginEdge Down(string parameter) => view.Margins.Parameters.Single(margin => margin.Parameter.Name == parameter).Down;
        MarginEdge Up(string parameter) => view.Margins.Parameters.Single(margin => margin.Parameter.Name == parameter).Up;

        Assert.Equal(MarginEvent.CycleLost, Down("ReleaseSpeed").Event);
        Assert.Equal(MarginEvent.CycleLost, Down("ClutchTorque").Event);
        Assert.Equal(MarginEvent.None, Up("ReleaseSpeed").Event);
        Assert.Equal(MarginEvent.None, Down("Mass").Event);
        double release = Down("ReleaseSpeed").Value!.Value, torque = Down("ClutchTorque").Value!.Value;
        Assert.True(Turns(new UnbalancedDrum { ReleaseSpeed = 1.002 * release }));
        Assert.False(Turns(new UnbalancedDrum { ReleaseSpeed = 0.998 * release }));
        Assert.True(Turns(new UnbalancedDrum { ClutchTorque = 1.002 * torque }));
        Assert.False(Turns(new UnbalancedDrum { ClutchTorque = 0.998 * torque }));
        Assert.True(Turns(new UnbalancedDrum { ReleaseSpeed = 14 }));
        Assert.True(Turns(new UnbalancedDrum { Mass = 5 }));
    }

    private static bool Turns(UnbalancedDrum drum)
    {
        (drum.Angle, drum.Speed) = (Math.PI, 7);
        Trajectory run = drum.Simulate(400);
        return run.FinalState[0] - run.At(380)[0] > Math.Tau;
    }
}
