using OdeDsl.Cycles;
using OdeDsl.Equilibria;
using Xunit;

namespace OdeDsl.Tests.Cycles;

public class NoLimitCycleTests
{
    private static void Near(double expected, double actual, double relative) =>
        Assert.True(Math.Abs(actual - expected) <= relative * Math.Abs(expected), $"expected {expected:R}, got {actual:R}");

    /// <summary>K(k) = π / (2 agm(1, √(1 - k²))): Abramowitz and Stegun, 17.6.</summary>
    private static double EllipticK(double k)
    {
        (double a, double b) = (1, Math.Sqrt(1 - k * k));
        while (Math.Abs(a - b) > 1e-15 * a) (a, b) = ((a + b) / 2, Math.Sqrt(a * b));
        return Math.PI / (2 * a);
    }

    [Fact]
    public void An_undamped_machine_has_families_with_elliptic_periods_and_no_limit_cycle()
    {
        // δ'' + sin δ = 0 with energy E = slip²/2 + 1 - cos δ and m = E/2: swinging (m < 1) takes 4 K(√m); a full turn (m > 1) takes
        // 2 K(1/√m)/√m (any text on elliptic functions).
        LimitCycleSearchResult found = new Machine().FindLimitCycles();
        Assert.Empty(found.Cycles);
        Assert.Equal([-1, 0, 1], found.Families.Select(family => family.Winding[0]).Order());
        foreach (OrbitFamily family in found.Families)
        {
            Assert.True(family.SecondMultiplierError <= 1e-6);
            Assert.True(family.Members.Length >= 3);
            foreach (ClosedOrbit member in family.Members)
            {
                double m = (member.State[1] * member.State[1] / 2 + 1 - Math.Cos(member.State[0])) / 2;
                double period = family.Winding[0] == 0 ? 4 * EllipticK(Math.Sqrt(m)) : 2 * EllipticK(1 / Math.Sqrt(m)) / Math.Sqrt(m);
                // Beside the separatrix (m = 1) the period depends on the energy without bound.
                Near(period, member.Period, 1e-9 / Math.Abs(1 - m));
            }
        }

        Assert.Contains("no limit cycle", found.Text, StringComparison.Ordinal);
    }

    [Fact]
    public void Lotka_Volterra_has_a_family_and_no_limit_cycle()
    {
        LimitCycleSearchResult found = new LotkaVolterra().FindLimitCycles();
        Assert.Empty(found.Cycles);
        OrbitFamily family = Assert.Single(found.Families);
        Assert.True(family.SecondMultiplierError <= 1e-8);
        // V = x - d ln x + y - g ln y is conserved: every member closes, with its own amplitude.
        Assert.True(family.Members.Select(member => Math.Round(member.Maximum[0], 6)).Distinct().Count() >= 3);
    }

    [Fact]
    public void Small_Lotka_Volterra_oscillations_take_two_pi_over_root_ac()
    {
        // V. Volterra 1926, the law of small oscillations: T → 2π/√(growth death); the correction is of second order in the amplitude.
        var model = new LotkaVolterra { Prey = 3.003, Predator = 1.5 };
        var few = new LimitCycleSearchOptions { SpreadStarts = 0, ReverseTime = false };
        OrbitFamily family = Assert.Single(model.FindLimitCycles(few).Families);
        Near(Math.Tau / Math.Sqrt(1.5 * 3), family.Members[0].Period, 1e-6);
    }

    [Fact]
    public void Two_wells_have_three_families()
    {
        LimitCycleSearchResult found = new TwoWells().FindLimitCycles(new LimitCycleSearchOptions { ExtraStarts = [[-1.3, 0], [0, 1.5]] });
        Assert.Empty(found.Cycles);
        Assert.Equal(3, found.Families.Length);
        // Inside a well small oscillations have ω² = 2: T → 2π/√2 from above.
        OrbitFamily[] inside = [.. found.Families.Where(family => family.Members[0].Minimum[0] * family.Members[0].Maximum[0] > 0)];
        Assert.Equal(2, inside.Length);
        Assert.All(inside, family => Assert.True(family.Members[0].Period >= Math.Tau / Math.Sqrt(2) * (1 - 1e-9)));
    }

    [Fact]
    public void Cycles_on_the_levels_of_a_constant_are_a_family()
    {
        // On each level one attracting circle of radius √level; across the levels nothing attracts.
        LimitCycleSearchResult found = new CirclesOnLevels().FindLimitCycles();
        Assert.Empty(found.Cycles);
        OrbitFamily family = Assert.Single(found.Families);
        Assert.All(family.Members, member => Near(Math.Sqrt(member.State[2]), member.Maximum[0], 1e-8));
        Assert.True(family.Members.Select(member => Math.Round(member.State[2], 4)).Distinct().Count() >= 3);
    }

    [Fact]
    public void Two_angles_without_pull_close_as_a_family_or_never()
    {
        Assert.Empty(new TwoAngles { Pull = 0 }.FindLimitCycles().Cycles);
        Assert.Equal<int>([2, 3], Assert.Single(new TwoAngles { Pull = 0 }.FindLimitCycles().Families).Winding);
        // The golden ratio: no whole turns ever match (quasi-periodic motion).
        LimitCycleSearchResult never = new TwoAngles { Pull = 0, Ratio = (1 + Math.Sqrt(5)) / 2 }.FindLimitCycles();
        Assert.Empty(never.Cycles);
        Assert.Empty(never.Families);
        Assert.All(never.Runs, run => Assert.Equal(RunOutcome.Unsettled, run.Outcome));
    }

    [Theory]
    [InlineData(2e-4)]
    [InlineData(2e-6)]
    public void A_slow_spiral_is_neither_a_cycle_nor_a_family(double damping)
    {
        LimitCycleSearchResult found = new SlowSpiral { Damping = damping }.FindLimitCycles();
        Assert.Empty(found.Cycles);
        Assert.Empty(found.Families);
    }

    [Fact]
    public void A_slow_linear_spiral_is_recognised_by_its_eigenvalue()
    {
        LimitCycleSearchResult found = new SlowSpiral { Hardening = 0, X = 0.5 }.FindLimitCycles();
        Assert.Equal(RunOutcome.Rest, found.Runs[0].Outcome);
        Assert.Contains("spirals towards", found.Runs[0].Text, StringComparison.Ordinal);
    }

    [Fact]
    public void Irregular_motion_is_not_called_a_cycle()
    {
        // Lorenz at ρ = 28: no stable cycle (W. Tucker, C. R. Acad. Sci. 328, 1999: the attractor is strange).
        LimitCycleSearchResult found = new Equilibria.Lorenz().FindLimitCycles(new LimitCycleSearchOptions { SpreadStarts = 3 });
        Assert.Empty(found.Cycles);
        Assert.Empty(found.Families);
        Assert.All(found.Runs, run => Assert.Equal(RunOutcome.Unsettled, run.Outcome));
        Assert.Contains("may exist all the same", found.Text, StringComparison.Ordinal);
    }

    [Fact]
    public void Dry_friction_brings_every_run_to_rest()
    {
        LimitCycleSearchResult found = new Equilibria.Block().FindLimitCycles(new LimitCycleSearchOptions { ReverseTime = false });
        Assert.Empty(found.Cycles);
        Assert.All(found.Runs, run => Assert.Equal((RunOutcome.Rest, 0), (run.Outcome, run.Index)));
    }

    [Fact]
    public void A_growing_motion_is_a_runaway()
    {
        var forward = new LimitCycleSearchOptions { ReverseTime = false };
        LimitCycleSearchResult found = new Equilibria.Linear { A = 0.1, D = 0.1 }.FindLimitCycles(forward);
        Assert.Empty(found.Cycles);
        Assert.All(found.Runs, run => Assert.Equal(RunOutcome.Runaway, run.Outcome));
    }

    [Fact]
    public void Starts_lie_within_the_bounds_and_a_motion_held_at_a_saddle_is_said_to_be()
    {
        // Without predators prey grow: the run beside the origin along the prey's axis leaves; beside the origin along the predators' axis
        // nothing repels. Negative numbers of animals are outside the bounds.
        var few = new LimitCycleSearchOptions { SpreadStarts = 2 };
        LimitCycleSearchResult found = new LotkaVolterra { Prey = 0, Predator = 2 }.FindLimitCycles(few);
        Assert.All(found.Runs, run => Assert.All(run.Start, value => Assert.InRange(value, 0, 10)));
        SearchRun first = found.Runs[0];
        Assert.Equal(RunOutcome.Rest, first.Outcome);
        Assert.Equal([0.0, 0.0], found.Equilibria[first.Index].State.AsSpan().ToArray());
        Assert.Contains("repels", first.Text, StringComparison.Ordinal);
    }

    [Fact]
    public void A_single_state_that_is_no_angle_is_known_not_to_oscillate()
    {
        LimitCycleSearchResult found = new Equilibria.NoRest().FindLimitCycles();
        Assert.Empty(found.Cycles);
        Assert.All(found.Runs, run => Assert.Equal(RunOutcome.Runaway, run.Outcome));
        Assert.Contains("cannot oscillate", found.Text, StringComparison.Ordinal);
    }

    [Fact]
    public void A_model_that_depends_on_time_is_refused()
    {
        Assert.Throws<InvalidOperationException>(() => new Equilibria.Driven().FindLimitCycles());
    }

    [Fact]
    public void Options_without_meaning_are_refused()
    {
        LimitCycleSearchOptions[] meaningless =
        [
            new() { ClosingTolerance = 0.1 }, new() { ClosingTolerance = double.NaN },
            new() { SpreadStarts = -1 }, new() { ExtraStarts = [[1.0]] },
        ];
        Assert.All(meaningless, options => Assert.Throws<ArgumentException>(() => new Brusselator().FindLimitCycles(options)));
    }

    [Fact]
    public void A_cancelled_search_ends()
    {
        using var source = new CancellationTokenSource();
        source.Cancel();
        Assert.ThrowsAny<OperationCanceledException>(() => new Brusselator().FindLimitCycles(cancellationToken: source.Token));
    }
}
