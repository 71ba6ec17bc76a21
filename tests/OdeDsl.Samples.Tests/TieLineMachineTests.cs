using System.Collections.Immutable;
using OdeDsl;
using OdeDsl.Cycles;
using OdeDsl.Equilibria;
using OdeDsl.Integration;
using OdeDsl.Modeling;

namespace Tarnwater.Tests;

public class TieLineMachineTests
{
    private const double GridSpeed = 2 * Math.PI * 50;

    // Swing equation linearised: P. Kundur, Power System Stability and Control, 1994, chapter 12 (from memory).
    [Fact]
    public void Small_undamped_swings_have_the_textbook_frequency()
    {
        TieLineMachine machine = new() { Damping = 0 };
        double rest = Math.Asin(machine.TurbinePower / machine.LinePower);
        double expected = Math.Sqrt(machine.LinePower * Math.Cos(rest) * GridSpeed / (2 * machine.Inertia));

        Equilibrium found = Assert.Single(machine.FindEquilibria().Equilibria, static rest => rest.Kind == EquilibriumKind.Centre);

        Assert.True(Math.Abs(found.State[0] - rest) <= 1e-10);
        Assert.True(Math.Abs(found.Modes[0].NaturalFrequency / expected - 1) <= 1e-10);
    }

    [Fact]
    public void The_machine_rests_in_step_at_a_stable_focus_and_its_saddle_is_the_supplement_of_that_angle()
    {
        TieLineMachine machine = new();
        double rest = Math.Asin(machine.TurbinePower / machine.LinePower);

        ImmutableArray<Equilibrium> found = machine.FindEquilibria().Equilibria;

        Assert.Equal(2, found.Length);
        Assert.Contains(found, item => item is { IsStable: true, Kind: EquilibriumKind.Focus } && Math.Abs(item.State[0] - rest) <= 1e-10);
        Assert.Contains(found, item => item.Kind == EquilibriumKind.Saddle && Math.Abs(item.State[0] - (Math.PI - rest)) <= 1e-10);
    }

    // Equal-area criterion for a fault that carries no power (P. Kundur, chapter 13; J. Grainger and W. Stevenson, Power System Analysis, 1994,
    // chapter 16): cos(critical) = (Pm / Pmax) (pi - 2 rest) - cos(rest). During the fault the angle grows as in free fall.
    [Theory]
    [InlineData(0.7, 1.3, 3.5)]
    [InlineData(1.0, 2.1, 5.0)]
    [InlineData(0.3, 1.1, 8.0)]
    public void Faults_cleared_just_before_the_equal_area_angle_are_survived_and_just_after_it_are_not(double power, double line, double inertia)
    {
        double rest = Math.Asin(power / line);
        double critical = Math.Acos(power / line * (Math.PI - 2 * rest) - Math.Cos(rest));
        double duration = Math.Sqrt(4 * inertia * (critical - rest) / (GridSpeed * power));

        Assert.True(StaysInStep(0.9999 * duration));
        Assert.False(StaysInStep(1.0001 * duration));

        bool StaysInStep(double fault)
        {
            TieLineMachine machine = new() { TurbinePower = power, LinePower = 0, Inertia = inertia, Damping = 0, Angle = rest, Slip = 0 };
            SimulationOptions tight = new() { RelativeTolerance = 1e-11 };
            double[] cleared = machine.Simulate(fault, tight).FinalState;
            machine.LinePower = line;
            (machine.Angle, machine.Slip) = (cleared[0], cleared[1]);
            // Ten swings: near the critical duration the rotor lingers at the saddle.
            double swing = 2 * Math.PI / Math.Sqrt(line * Math.Cos(rest) * GridSpeed / (2 * inertia));
            return machine.Simulate(10 * swing, tight)["Angle"].Maximum.Value < Math.PI - rest;
        }
    }

    // J. Grainger and W. Stevenson, Power System Analysis, examples on the equal-area criterion (from memory): Pe = 2.10 sin(angle), Pm = 1.0,
    // H = 5, 60 Hz: critical clearing angle 81.697 degrees, critical clearing time 0.222 s. Time scales with the root of the grid's speed.
    [Fact]
    public void The_rotor_of_the_worked_example_reaches_the_critical_angle_at_the_critical_time()
    {
        double rest = Math.Asin(1.0 / 2.1);
        TieLineMachine machine = new() { TurbinePower = 1.0, LinePower = 0, Inertia = 5, Damping = 0, Angle = rest, Slip = 0 };

        double angle = machine.Simulate(0.222 * Math.Sqrt(60.0 / 50.0)).FinalState[0] * 180 / Math.PI;

        // The printed time has three digits: half a unit in the last is 0.25 % of the time, 0.5 % of the 53 degrees gained.
        Assert.True(Math.Abs(angle - 81.697) <= 0.005 * 53.3, $"{angle}");
    }

    // Energy integral of the swing equation: slip^2 / 2 - (ws / 2H) (Pm angle + Pmax cos angle) is constant without damping.
    [Fact]
    public void The_undamped_machine_keeps_its_energy()
    {
        TieLineMachine machine = new() { Damping = 0, Angle = 1.2, Slip = 0 };
        double factor = GridSpeed / (2 * machine.Inertia);

        Trajectory run = machine.Simulate(60, new SimulationOptions { RelativeTolerance = 1e-11 });

        double start = Energy(run.At(0)), depth = factor * (machine.TurbinePower * 1.2 + machine.LinePower);
        double worst = run.Sample(2000).Max(state => Math.Abs(Energy(state) - start));
        Assert.True(worst <= 1e-8 * depth, $"{worst}");

        double Energy(double[] state) =>
            state[1] * state[1] / 2 - factor * (machine.TurbinePower * state[0] + machine.LinePower * Math.Cos(state[0]));
    }

    [Fact]
    public void The_undamped_machine_has_a_family_of_closed_orbits_and_no_limit_cycle()
    {
        LimitCycleSearchResult found = new TieLineMachine { Damping = 0 }.FindLimitCycles();

        Assert.Empty(found.Cycles);
        Assert.NotEmpty(found.Families);
    }

    // Without turbine power the rotor swings as a pendulum: period 4 K(sin(amplitude/2)) / w0. K by the arithmetic-geometric mean:
    // M. Abramowitz and I. Stegun, Handbook of Mathematical Functions, 17.6.
    [Theory]
    [InlineData(0.01)]
    [InlineData(1.5)]
    [InlineData(2.8)]
    [InlineData(3.1)]
    public void The_undamped_idle_machine_swings_with_the_period_of_the_elliptic_integral(double amplitude)
    {
        TieLineMachine machine = new() { TurbinePower = 0, Damping = 0 };
        double slow = Math.Sqrt(machine.LinePower * GridSpeed / (2 * machine.Inertia));
        double expected = 4 * CompleteElliptic(Math.Sin(amplitude / 2)) / slow;

        Flow flow = new(DynamicSystem.Of(machine), new FlowOptions { RelativeTolerance = 1e-12 });
        double[] state = [amplitude, 0];
        double time = 0;
        bool returned = flow.AdvanceToSection(state, [], 0, ref time, 2 * expected, new Section([0, 1], 0, -1));

        Assert.True(returned);
        Assert.True(Math.Abs(time / expected - 1) <= 1e-8, $"{time:R} against {expected:R}");
    }

    // Over one turn of the rotating cycle the line gives back what it takes, so that the turbine's work equals the damper's:
    // the mean of the slip over the angle is Pm ws / D exactly.
    [Fact]
    public void Slipping_poles_the_machine_turns_at_the_speed_at_which_the_damper_takes_the_turbines_power()
    {
        TieLineMachine machine = new();
        LimitCycle cycle = Assert.Single(machine.FindLimitCycles().Cycles, static cycle => cycle.Rotates);
        Assert.True(cycle.IsStable);
        Assert.Equal([1, 0], cycle.Winding.AsSpan());

        (machine.Angle, machine.Slip) = (cycle.State[0], cycle.State[1]);
        Trajectory turn = machine.Simulate(cycle.Period, new SimulationOptions { RelativeTolerance = 1e-11 });

        // The integral of slip over the angle is the integral of slip^2 over time.
        double mean = Quadrature.OverSteps(turn, "Slip", static slip => slip * slip) / (2 * Math.PI);
        double expected = machine.TurbinePower * GridSpeed / machine.Damping;
        Assert.True(Math.Abs(mean / expected - 1) <= 1e-8, $"{mean:R} against {expected:R}");
    }

    private static double CompleteElliptic(double modulus)
    {
        double a = 1, b = Math.Sqrt(1 - modulus * modulus);
        for (int i = 0; i < 20; i++) (a, b) = ((a + b) / 2, Math.Sqrt(a * b));
        return Math.PI / (2 * a);
    }
}
