using OdeDsl;
using OdeDsl.Branches;
using OdeDsl.Equilibria;
using OdeDsl.Integration;

namespace Tarnwater.Tests;

public class SurgeTankTests
{
    private const double Density = 1000, Gravity = 9.81;

    // D. Thoma 1910, as in any handbook of hydraulic transients (for example M. H. Chaudhry, Applied Hydraulic Transients, chapter on surge
    // tanks; from memory): the smallest stable area is L A / (2 g c H_net).
    [Fact]
    public void Following_the_tank_area_down_loses_stability_at_the_Thoma_area()
    {
        SurgeTank tank = new();
        double velocity = VelocityAtRest(tank);
        double netHead = tank.Head - tank.Loss * velocity * velocity;
        double thoma = tank.Length * tank.TunnelArea / (2 * Gravity * tank.Loss * netHead);

        BranchResult branch = tank.Follow(p => p.TankArea, from: 200, to: 20);

        SpecialPoint hopf = Assert.Single(branch.Special(SpecialPointKind.HopfPoint));
        Assert.True(Math.Abs(hopf.Parameter / thoma - 1) <= 1e-9, $"{hopf.Parameter:R} against {thoma:R}");
    }

    // Bernoulli and continuity by hand: the water that the turbine draws at the net head is what the tunnel carries.
    [Fact]
    public void The_rest_in_the_bounds_with_little_loss_is_stable_and_the_one_with_much_loss_a_saddle()
    {
        SurgeTank tank = new();
        double velocity = VelocityAtRest(tank);

        EquilibriumSearchResult found = tank.FindEquilibria();

        Assert.Equal(2, found.Equilibria.Length);
        Equilibrium stable = Assert.Single(found.Equilibria, static rest => rest.IsStable);
        Assert.True(Math.Abs(stable.State[1] / velocity - 1) <= 1e-10);
        Assert.True(Math.Abs(stable.State[0] / (-tank.Loss * velocity * velocity) - 1) <= 1e-10);
        Assert.Contains(found.Equilibria, static rest => rest.Kind == EquilibriumKind.Saddle);
    }

    // Mass oscillation without loss after the turbine is shut: period 2 pi sqrt(L As / (g At)), amplitude v0 sqrt(L At / (g As))
    // (handbooks of hydraulic transients; the sum of kinetic and potential energy is constant).
    [Fact]
    public void Without_loss_and_power_the_level_swings_with_the_period_and_height_of_the_handbook()
    {
        SurgeTank tank = new() { Loss = 0, Power = 0, Level = 0, Velocity = 2 };
        double period = 2 * Math.PI * Math.Sqrt(tank.Length * tank.TankArea / (Gravity * tank.TunnelArea));
        double height = 2 * Math.Sqrt(tank.Length * tank.TunnelArea / (Gravity * tank.TankArea));

        Trajectory run = tank.Simulate(period, new SimulationOptions { RelativeTolerance = 1e-11 });

        Assert.True(Math.Abs(run.FinalState[0]) <= 1e-8 * height);
        Assert.True(Math.Abs(run.FinalState[1] - 2) <= 1e-8);
        Assert.True(Math.Abs(run["Level"].Maximum.Value / height - 1) <= 1e-8);
    }

    [Theory]
    [InlineData(1.05, true)]
    [InlineData(0.95, false)]
    public void A_small_surge_dies_out_above_the_Thoma_area_and_grows_below(double share, bool diesOut)
    {
        SurgeTank tank = new();
        double velocity = VelocityAtRest(tank);
        double level = -tank.Loss * velocity * velocity;
        tank.TankArea = share * tank.Length * tank.TunnelArea / (2 * Gravity * tank.Loss * (tank.Head + level));
        tank.Level = level + 0.01;
        tank.Velocity = velocity;

        Series surge = tank.Simulate(until: 4000, new SimulationOptions { RelativeTolerance = 1e-10 })["Level"];

        double late = surge.Sample(4001)[3600..].Max(value => Math.Abs(value - level));
        Assert.Equal(diesOut, late < 0.01);
    }

    private static double VelocityAtRest(SurgeTank tank)
    {
        // v A (H - c v^2) = P / (rho g); the smaller positive root lies below the velocity of greatest power.
        double low = 0, high = Math.Sqrt(tank.Head / (3 * tank.Loss));
        for (int i = 0; i < 200; i++)
        {
            double middle = (low + high) / 2;
            bool tooSlow = middle * tank.TunnelArea * (tank.Head - tank.Loss * middle * middle) < tank.Power / (Density * Gravity);
            (low, high) = tooSlow ? (middle, high) : (low, middle);
        }

        return low;
    }
}
