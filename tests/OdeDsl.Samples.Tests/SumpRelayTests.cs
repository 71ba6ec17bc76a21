using OdeDsl;
using OdeDsl.Assessment;
using OdeDsl.Cycles;

namespace Tarnwater.Tests;

public class SumpRelayTests
{
    // Filling and emptying at constant rates (any text on relay control or pump sumps): V / Qin + V / (Qpump - Qin). The armature needs
    // PullInTime ln 2 to the middle, in which the level runs on: V grows by Qin d + (Qpump - Qin) d. What is left of the armature's way is
    // e^(-T/PullInTime), here below 1e-50.
    [Theory]
    [InlineData(0.05)]
    [InlineData(0.2)]
    [InlineData(0.5)]
    [InlineData(5.0)]
    public void The_pump_cycles_with_the_closed_form_period(double pullInTime)
    {
        SumpRelay sump = new() { PullInTime = pullInTime };
        double delay = pullInTime * Math.Log(2);

        LimitCycle cycle = Assert.Single(sump.FindLimitCycles().Cycles);

        Assert.True(cycle.IsStable);
        double volume = sump.Area * (sump.HighContact - sump.LowContact) + sump.PumpFlow * delay;
        double expected = volume / sump.Inflow + volume / (sump.PumpFlow - sump.Inflow);
        Assert.True(Math.Abs(cycle.Period / expected - 1) <= 1e-9, $"{cycle.Period:R} against {expected:R}");
        Assert.True(Math.Abs(cycle.Maximum[0] - (sump.HighContact + sump.Inflow * delay / sump.Area)) <= 1e-9);
        Assert.True(Math.Abs(cycle.Minimum[0] - (sump.LowContact - (sump.PumpFlow - sump.Inflow) * delay / sump.Area)) <= 1e-9);
    }

    [Fact]
    public void The_period_tends_to_the_textbooks_for_a_fast_contactor()
    {
        double textbook = 3.0 * (1 / 0.008 + 1 / (0.02 - 0.008));
        double Gap(double time) => Assert.Single(new SumpRelay { PullInTime = time }.FindLimitCycles().Cycles).Period - textbook;
        double[] gaps = [Gap(4), Gap(2), Gap(1)];

        // The gap is proportional to the contactor's time.
        Assert.True(gaps[2] <= 0.01 * textbook);
        Assert.True(Math.Abs(gaps[0] / gaps[1] - 2) <= 1e-6);
        Assert.True(Math.Abs(gaps[1] / gaps[2] - 2) <= 1e-6);
    }

    [Fact]
    public void The_sump_never_rests() => Assert.DoesNotContain(new SumpRelay().FindEquilibria().Equilibria, static rest => rest.IsStable);

    // The sump empties only while the pump carries more than flows in; towards equality the period grows without bound (mass balance).
    [Fact]
    public void The_relay_cycle_is_lost_where_the_pump_carries_just_what_flows_in()
    {
        SumpRelay sump = new();
        ModelAssessment view = sump.Assess(new AssessmentOptions { SampledStarts = 0 });
        MarginEdge pump = view.Margins.Parameters.Single(static margin => margin.Parameter.Name == "PumpFlow").Down;
        MarginEdge inflow = view.Margins.Parameters.Single(static margin => margin.Parameter.Name == "Inflow").Up;
        Assert.Equal(MarginEvent.CycleLost, pump.Event);
        Assert.Equal(MarginEvent.CycleLost, inflow.Event);
        Assert.True(Math.Abs(pump.Value!.Value - sump.Inflow) <= pump.Uncertainty);
        Assert.True(Math.Abs(inflow.Value!.Value - sump.PumpFlow) <= inflow.Uncertainty);
        Assert.True(pump.Uncertainty <= 1e-3 * sump.Inflow && inflow.Uncertainty <= 1e-3 * sump.PumpFlow);
    }
}
