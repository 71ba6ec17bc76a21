using OdeDsl;
using OdeDsl.Cycles;
using OdeDsl.Equilibria;
using OdeDsl.Integration;

namespace Tarnwater.Tests;

public class SludgeBasinTests
{
    // J. Monod 1950; A. Novick and L. Szilard 1950: bacteria are washed out above the growth rate that the inflow's feed allows.
    [Theory]
    [InlineData(0.999, false)]
    [InlineData(1.001, true)]
    public void The_empty_basin_is_stable_exactly_above_the_washout_dilution(double share, bool isStable)
    {
        SludgeBasin basin = new();
        double washout = basin.BacteriaGrowth * basin.InflowFeed / (basin.BacteriaHalfFeed + basin.InflowFeed);
        basin.Dilution = share * washout;

        Equilibrium empty = Assert.Single(
            basin.FindEquilibria().Equilibria, rest => Math.Abs(rest.State[1]) <= 1e-9 && Math.Abs(rest.State[2]) <= 1e-9);

        Assert.True(Math.Abs(empty.State[0] / basin.InflowFeed - 1) <= 1e-12);
        Assert.Equal(isStable, empty.IsStable);
        Assert.True(Math.Abs(empty.Eigenvalues.Max(static value => value.Real) - (1 - share) * washout) <= 1e-9 * washout);
    }

    // Monod's steady state of a flow-through culture: feed K D / (growth - D), bacteria = yield (inflow - feed).
    [Fact]
    public void Without_ciliates_feed_and_bacteria_stand_at_Monods_steady_state()
    {
        SludgeBasin basin = new() { Dilution = 3 };
        double feed = basin.BacteriaHalfFeed * basin.Dilution / (basin.BacteriaGrowth - basin.Dilution);

        Equilibrium rest = Assert.Single(basin.FindEquilibria().Equilibria, static rest => rest.IsStable);

        Assert.True(Math.Abs(rest.State[0] / feed - 1) <= 1e-10);
        Assert.True(Math.Abs(rest.State[1] / (basin.BacteriaYield * (basin.InflowFeed - feed)) - 1) <= 1e-10);
        Assert.True(Math.Abs(rest.State[2]) <= 1e-9);
    }

    // The same argument one link up: ciliates grow at the dilution rate where bacteria stand at K2 D / (growth2 - D).
    [Fact]
    public void With_ciliates_the_bacteria_stand_where_ciliates_just_keep_up_with_the_flow()
    {
        SludgeBasin basin = new() { Dilution = 1.7 };
        double bacteria = basin.CiliateHalfFood * basin.Dilution / (basin.CiliateGrowth - basin.Dilution);

        Equilibrium rest = Assert.Single(basin.FindEquilibria().Equilibria, static rest => rest.IsStable);

        Assert.True(Math.Abs(rest.State[1] / bacteria - 1) <= 1e-10);
        Assert.True(rest.State[2] > 1);
    }

    [Fact]
    public void At_a_low_dilution_bacteria_and_ciliates_rise_and_fall_in_turn()
    {
        LimitCycle cycle = Assert.Single(new SludgeBasin().FindLimitCycles().Cycles, static cycle => cycle.IsStable);

        // Over a period every quantity must come back, so that mean growth equals dilution (growth of ciliates: mean of the logarithm's rate).
        SludgeBasin basin = new() { Feed = cycle.State[0], Bacteria = cycle.State[1], Ciliates = cycle.State[2] };
        var turn = basin.Simulate(cycle.Period, new SimulationOptions { RelativeTolerance = 1e-11 });
        var food = turn["Bacteria"];
        double growth = Quadrature.OverSteps(turn, time => basin.CiliateGrowth * food.At(time) / (basin.CiliateHalfFood + food.At(time))) / cycle.Period;
        Assert.True(Math.Abs(growth / basin.Dilution - 1) <= 1e-7, $"{growth:R}");
    }
}
