using System.Collections.Immutable;
using OdeDsl;
using OdeDsl.Branches;
using OdeDsl.Equilibria;

namespace Tarnwater.Tests;

public class HeatedReactorTests
{
    private const double GasConstant = 8.31446261815324;

    // C. van Heerden, Industrial and Engineering Chemistry 45, 1953: rests are where the heat set free (a step over temperature) meets the heat
    // carried off (a straight line). The heat balance is evaluated here by hand, from the textbook's conversion of a stirred tank.
    [Theory]
    [InlineData(0.05)]
    [InlineData(0.15)]
    [InlineData(0.25)]
    [InlineData(0.6)]
    [InlineData(1.4)]
    public void Rests_are_where_heat_set_free_meets_heat_carried_off(double flow)
    {
        HeatedReactor reactor = new() { Flow = flow };
        double[] expected = [.. Crossings(temperature => Balance(reactor, temperature), 275, 420)];

        ImmutableArray<Equilibrium> found = reactor.FindEquilibria().Equilibria;

        double[] temperatures = [.. found.Select(static rest => rest.State[1]).Order()];
        Assert.Equal(expected.Length, temperatures.Length);
        Assert.All(expected.Zip(temperatures), static pair => Assert.True(Math.Abs(pair.First - pair.Second) <= 1e-8));
    }

    [Fact]
    public void The_tank_as_built_lies_cold_or_burns_hot_with_a_saddle_between()
    {
        ImmutableArray<Equilibrium> found = new HeatedReactor().FindEquilibria().Equilibria;

        Equilibrium[] byTemperature = [.. found.OrderBy(static rest => rest.State[1])];
        Assert.Equal(3, byTemperature.Length);
        Assert.True(byTemperature[0].IsStable);
        Assert.Equal(EquilibriumKind.Saddle, byTemperature[1].Kind);
        Assert.True(byTemperature[2].IsStable);
    }

    // Van Heerden's slope condition: ignition and extinction are where the line touches the step. Solved for the coolant's temperature, the
    // balance gives it as a function of the tank's; that function's extrema are the folds.
    [Fact]
    public void Ignition_and_extinction_are_where_the_line_touches_the_step()
    {
        HeatedReactor reactor = new() { Concentration = 3800, Temperature = 285 };
        double[] turning = [.. Crossings(temperature => (Coolant(reactor, temperature + 1e-4) - Coolant(reactor, temperature - 1e-4)) / 2e-4, 280, 400)];
        double[] expected = [.. turning.Select(temperature => Coolant(reactor, temperature)).Order()];
        Assert.Equal(2, expected.Length);

        BranchResult branch = reactor.Follow(p => p.CoolantTemperature, from: 276, to: 325);

        double[] folds = [.. branch.Special(SpecialPointKind.Fold).Select(static fold => fold.Parameter).Order()];
        Assert.Equal(2, folds.Length);
        // The extremum's value is flat: an error of the differences of 1e-4 K in place shows only in its square.
        Assert.All(expected.Zip(folds), static pair => Assert.True(Math.Abs(pair.First - pair.Second) <= 1e-7, $"{pair}"));
    }

    private static double Reacted(HeatedReactor reactor, double temperature)
    {
        double rate = reactor.Rate320 * Math.Exp(-reactor.ActivationEnergy / GasConstant * (1 / temperature - 1 / 320.0));
        return reactor.Flow * reactor.InflowConcentration * rate * reactor.Volume / (reactor.Flow + rate * reactor.Volume);
    }

    private static double Balance(HeatedReactor reactor, double temperature) =>
        reactor.ReactionHeat * Reacted(reactor, temperature)
        - reactor.Flow * reactor.HeatCapacity * (temperature - reactor.InflowTemperature)
        - reactor.Cooling * (temperature - reactor.CoolantTemperature);

    private static double Coolant(HeatedReactor reactor, double temperature) =>
        temperature
        - (reactor.ReactionHeat * Reacted(reactor, temperature) - reactor.Flow * reactor.HeatCapacity * (temperature - reactor.InflowTemperature)) / reactor.Cooling;

    private static IEnumerable<double> Crossings(Func<double, double> function, double from, double to)
    {
        const int Parts = 20_000;
        for (int i = 0; i < Parts; i++)
        {
            double low = from + (to - from) * i / Parts, high = from + (to - from) * (i + 1) / Parts;
            if (function(low) > 0 == function(high) > 0) continue;
            bool rises = function(low) <= 0;
            for (int k = 0; k < 100; k++)
            {
                double middle = (low + high) / 2;
                (low, high) = function(middle) > 0 == rises ? (low, middle) : (middle, high);
            }

            yield return low;
        }
    }
}
