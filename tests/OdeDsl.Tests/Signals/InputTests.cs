using OdeDsl;
using OdeDsl.Integration;
using OdeDsl.Modeling;
using Xunit;

namespace OdeDsl.Tests.Signals;

public sealed class InputTests
{
    private static readonly SimulationOptions Tight = new() { RelativeTolerance = 1e-10 };

    [Fact]
    public void Without_a_signal_an_input_is_the_constant_the_property_holds()
    {
        Trajectory run = new Basin { Inflow = 3 }.Simulate(until: 2, Tight);
        Assert.Equal(6 * (1 - Math.Exp(-1)), run.FinalState[0], 1e-8);
        Assert.Equal(6, Assert.Single(new Basin { Inflow = 3 }.FindEquilibria().Equilibria).State[0], 1e-9);
    }

    [Theory]
    [InlineData(IntegrationMethod.DormandPrince54)]
    [InlineData(IntegrationMethod.RadauIIA5)]
    public void Steps_end_on_the_jumps_of_a_signal_and_each_piece_follows_its_exponential(IntegrationMethod method)
    {
        Basin basin = new();
        Trajectory run = basin.WithInput(nameof(basin.Inflow), Signal.Steps([0, 1, 3], [1, 4, 0])).Simulate(until: 5, Tight with { Method = method });
        double first = 2 * (1 - Math.Exp(-0.5)), second = 8 + (first - 8) * Math.Exp(-1);
        Assert.True(run.Times.IndexOf(1.0) > 0 && run.Times.IndexOf(3.0) > 0);
        Assert.Equal(first, run.At(1)[0], 1e-8);
        Assert.Equal(second, run.At(3)[0], 1e-8);
        Assert.Equal(second * Math.Exp(-1), run.FinalState[0], 1e-8);
        Assert.Equal([1, 4, 4, 0], ((double[])[0.5, 1, 2, 3]).Select(run["Taken"].At));
    }

    [Fact]
    public void A_sampled_course_is_integrated_to_the_area_under_it()
    {
        Table course = new([0, 1, 4, 6], [0, 3, 3, 1], Interpolation.Linear, Extrapolation.Hold);
        Basin basin = new() { Rate = 0 };
        Trajectory run = basin.WithInput(nameof(basin.Inflow), Signal.Of(course)).Simulate(until: 8);
        Assert.Equal(1.5 + 9 + 4 + 2, run.FinalState[0], 1e-12);
        foreach (double kink in (double[])[1, 4, 6]) Assert.True(run.Times.IndexOf(kink) > 0);
        // Backwards the same way.
        Trajectory back = run.System.WithInitialState(run.FinalState).Simulate(until: 0, new SimulationOptions { From = 8 });
        Assert.Equal(0, back.FinalState[0], 1e-12);
    }

    [Fact]
    public void A_function_with_a_named_jump_is_followed_on_both_sides()
    {
        Basin basin = new() { Rate = 0 };
        Signal signal = Signal.Of(static t => t < 2 ? Math.Cos(t) : 5 + Math.Sin(t), kinks: [2]);
        Trajectory run = basin.WithInput(nameof(basin.Inflow), signal).Simulate(until: 6, Tight);
        Assert.Equal(Math.Sin(2) + 20 + Math.Cos(2) - Math.Cos(6), run.FinalState[0], 1e-8);
        Assert.True(run.Times.IndexOf(2.0) > 0);
        Signal unnamed = Signal.Of(static t => t < 2 ? Math.Cos(t) : 5 + Math.Sin(t));
        Trajectory blind = basin.WithInput(nameof(basin.Inflow), unnamed).Simulate(until: 6, Tight);
        Assert.True(run.Statistics.RejectedSteps < blind.Statistics.RejectedSteps, "a jump that is not named costs rejected steps");
    }

    [Fact]
    public void A_condition_on_an_input_is_met_where_the_signal_meets_it()
    {
        Basin basin = new() { Rate = 0, Capacity = 2 };
        Table ramp = new([0, 10], [0, 10], Interpolation.Linear, Extrapolation.Hold);
        Trajectory slow = basin.WithInput(nameof(basin.Inflow), Signal.Of(ramp)).Simulate(until: 5);
        Assert.Equal(2, Assert.Single(slow.Crossings).Time, 1e-14);
        Assert.Equal(2 + 6, slow.FinalState[0], 1e-12);
        Trajectory sudden = basin.WithInput(nameof(basin.Inflow), Signal.Steps([0, 3], [1, 7])).Simulate(until: 5);
        Assert.Equal((3, 1), (Assert.Single(sudden.Crossings).Time, sudden.Crossings[0].To));
        Assert.Equal(3 + 4, sudden.FinalState[0], 1e-12);
    }

    [Fact]
    public void The_derivative_by_time_counts_the_slope_of_a_signal()
    {
        Basin basin = new();
        Table ramp = new([0, 10], [0, 20], Interpolation.Linear, Extrapolation.Hold);
        double[] derivative = [0], regime = [0];
        basin.WithInput("Inflow", Signal.Of(ramp)).TimeDerivative(3, [1], regime, derivative);
        Assert.Equal(2, derivative[0]);
        basin.WithInput("Loss", Signal.Of(Math.Sin)).TimeDerivative(3, [1], regime, derivative);
        Assert.Equal(-Math.Cos(3), derivative[0], 1e-10);
        basin.WithInput("Loss", Signal.Of(Math.Sin, Math.Cos)).TimeDerivative(3, [1], regime, derivative);
        Assert.Equal(-Math.Cos(3), derivative[0], 1e-15);
    }

    [Fact]
    public void Analyses_without_time_refuse_a_signal_and_say_so()
    {
        DynamicSystem driven = new Basin().WithInput("Inflow", Signal.Steps([0, 1], [1, 2]));
        Assert.Contains("bound to an input of Basin", Assert.Throws<InvalidOperationException>(() => driven.FindEquilibria()).Message, StringComparison.Ordinal);
        Assert.True(driven.DependsOnTime);
        Assert.False(driven.WithInput("Inflow", 4).DependsOnTime);
        Assert.Equal(4, driven.WithInput("Inflow", 4).Inputs[0]);
        Assert.Equal(8, Assert.Single(driven.WithInput("Inflow", 4).FindEquilibria().Equilibria).State[0], 1e-9);
    }

    [Fact]
    public void Misuse_is_told_with_what_there_is()
    {
        Assert.Contains("Inflow, Loss", Assert.Throws<ArgumentException>(() => new Basin().WithInput("Outflow", Signal.Of(Math.Sin))).Message, StringComparison.Ordinal);
        Assert.Contains("Time 1", Assert.Throws<ArgumentException>(() => Signal.Steps([0, double.NaN], [1, 2])).Message, StringComparison.Ordinal);
        Assert.Contains("not above time 0", Assert.Throws<ArgumentException>(() => Signal.Steps([1, 1], [1, 2])).Message, StringComparison.Ordinal);
        Assert.Contains("2 times, but 1 values", Assert.Throws<ArgumentException>(() => Signal.Steps([1, 2], [1])).Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentException>(() => Signal.Of(Math.Sin, kinks: [double.NaN]));
        Assert.Contains("input Inflow is NaN", Assert.Throws<ArgumentException>(() => new Basin { Inflow = double.NaN }.Simulate(1)).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_table_that_does_not_extrapolate_ends_the_run_behind_its_last_knot()
    {
        Table course = new([0, 2], [1, 1], Interpolation.Linear, Extrapolation.Fail);
        DynamicSystem driven = new Basin().WithInput("Inflow", Signal.Of(course));
        Assert.Equal(2, driven.Simulate(until: 2).EndTime);
        IntegrationException failure = Assert.Throws<IntegrationException>(() => driven.Simulate(until: 3));
        Assert.IsType<TableRangeException>(failure.InnerException);
        Assert.Equal(2, failure.Time);
    }

    [Fact]
    public void Modes_of_every_type_mean_in_the_equations_what_they_mean_in_the_model()
    {
        foreach (bool on in (bool[])[true, false])
        {
            foreach (Stage stage in Enum.GetValues<Stage>())
            {
                for (int count = -1; count <= 3; count++)
                {
                    Modal model = new() { On = on, Stage = stage, Count = count, Held = 0.1 * count };
                    double[] rates = [0];
                    DynamicSystem.Of(model).Rates(0, [1.5], rates);
                    model.X = 1.5;
                    Assert.Equal(model.Written, rates[0]);
                }
            }
        }

        Assert.Equal([1, 2, 2, 0.25], DynamicSystem.Of(new Modal()).Modes.ToArray());
        Assert.Equal([1, 2, 2, 0.25], DynamicSystem.Of<Modal.Equations>().Modes.ToArray());
        Assert.Equal([0, 3, 5, 1], DynamicSystem.Of(new Modal()).WithModes([0, 3, 5, 1]).Modes.ToArray());
        Assert.Throws<ArgumentException>(() => DynamicSystem.Of(new Modal()).WithModes([0, 3]));
    }
}
