using System.Numerics;
using OdeDsl.Cycles;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;
using Xunit;

namespace OdeDsl.Tests.Cycles;

public class LimitCycleTests
{
    private static void Near(double expected, double actual, double relative) =>
        Assert.True(Math.Abs(actual - expected) <= relative * Math.Abs(expected), $"expected {expected:R}, got {actual:R}");

    [Theory]
    // Periods and amplitudes to 16 digits: Taylor series of degree 40 in 113-bit arithmetic, a separate program. Published values agree as
    // far as they go: 6.66328686 for mu = 1 (C. M. Andersen and J. F. Geer, SIAM J. Appl. Math. 42, 1982), 162.837 for mu = 100.
    [InlineData(0.1, 6.287111272288726806, 2.000103979872795924)]
    [InlineData(1, 6.663286859323130190, 2.008619860874843137)]
    [InlineData(10, 19.07836956693901407, 2.014285360926405285)]
    [InlineData(100, 162.8370710923700121, 2.001318681177224161)]
    public void Van_der_Pol_cycles_have_their_periods_from_gentle_to_stiff(double mu, double period, double amplitude)
    {
        LimitCycle cycle = Assert.Single(new VanDerPol { Mu = mu }.FindLimitCycles().Cycles);
        Near(period, cycle.Period, 1e-9);
        Near(amplitude, cycle.Amplitude[0], 1e-7);
        Assert.True(cycle.IsStable);
        Assert.False(cycle.Rotates);
        Assert.Equal(MultiplierMethod.VariationalEquations, cycle.MultiplierMethod);
        Assert.True(cycle.TrivialMultiplierError <= 1e-6);
        Assert.True(cycle.Residual <= 1e-9);
    }

    [Fact]
    public void A_gentle_van_der_Pol_period_follows_the_published_series()
    {
        // Frequency 1 - μ²/16 + 17 μ⁴/3072 + 35 μ⁶/884736 - ... (Andersen and Geer 1982; first terms in every textbook).
        const double Mu = 0.1;
        double frequency = 1 - Math.Pow(Mu, 2) / 16 + 17 * Math.Pow(Mu, 4) / 3072 + 35 * Math.Pow(Mu, 6) / 884736;
        LimitCycle cycle = Assert.Single(new VanDerPol { Mu = Mu }.FindLimitCycles().Cycles);
        Near(Math.Tau / frequency, cycle.Period, 1e-10);
    }

    [Theory]
    [InlineData(0.1)]
    [InlineData(1)]
    [InlineData(3)]
    public void The_van_der_Pol_multiplier_is_the_integral_of_the_divergence(double mu)
    {
        var model = new VanDerPol { Mu = mu };
        LimitCycle cycle = Assert.Single(model.FindLimitCycles().Cycles);
        double expected = IndependentQuadrature.MultiplierProduct(DynamicSystem.Of(model), cycle.State.AsSpan(), cycle.Period, 40_000);
        double found = Assert.Single(cycle.TransverseMultipliers).Real;
        Assert.True(Math.Abs(found - expected) <= 1e-6 * expected + 1e-10, $"expected {expected:R}, got {found:R}");
        Assert.True(Complex.Abs(cycle.Multipliers[0] - 1) <= 1e-7);
    }

    [Theory]
    [InlineData(0.09)]
    [InlineData(0.001)]
    public void The_Hopf_normal_form_cycles_at_the_root_of_its_parameter(double c0)
    {
        LimitCycle cycle = Assert.Single(new Circles { C0 = c0 }.FindLimitCycles().Cycles);
        Near(Math.Tau, cycle.Period, 1e-10);
        Near(Math.Sqrt(c0), cycle.Amplitude[0], 1e-8);
        Near(Math.Exp(-2 * Math.Tau * c0), cycle.TransverseMultipliers[0].Real, 1e-8);
        Assert.True(cycle.IsStable);
    }

    [Fact]
    public void An_unstable_cycle_in_the_plane_is_reached_by_reversed_time()
    {
        LimitCycle cycle = Assert.Single(new Circles { C0 = -0.25, C1 = 1 }.FindLimitCycles().Cycles);
        Assert.Equal(Stability.Unstable, cycle.Stability);
        Assert.True(cycle.FoundInReversedTime);
        Near(0.5, cycle.Amplitude[0], 1e-8);
        Near(Math.Tau, cycle.Period, 1e-10);
        Near(Math.Exp(Math.PI), cycle.TransverseMultipliers[0].Real, 1e-8);
    }

    [Fact]
    public void An_unstable_cycle_between_a_stable_rest_and_a_stable_cycle_is_found()
    {
        // r' = -r (r² - 1/4)(r² - 1) = r (-1/4 + 5/4 r² - r⁴).
        LimitCycleSearchResult found = new Circles { C0 = -0.25, C1 = 1.25, C2 = -1 }.FindLimitCycles();
        Assert.Equal(2, found.Cycles.Length);
        LimitCycle stable = Assert.Single(found.Cycles, cycle => cycle.IsStable);
        LimitCycle unstable = Assert.Single(found.Cycles, cycle => !cycle.IsStable);
        Near(1, stable.Amplitude[1], 1e-8);
        Near(0.5, unstable.Amplitude[1], 1e-8);
        Near(Math.Exp(Math.Tau * (2.5 - 4)), stable.TransverseMultipliers[0].Real, 1e-7);
        Near(Math.Exp(Math.Tau * (2 * 1.25 * 0.25 - 4 * 0.0625)), unstable.TransverseMultipliers[0].Real, 1e-7);
        Assert.Equal(RunOutcome.Rest, found.Runs[0].Outcome);
    }

    [Fact]
    public void A_half_stable_cycle_is_neither_called_stable_nor_a_family()
    {
        // r' = -r (r² - 1)² = r (-1 + 2 r² - r⁴): attracts from outside, repels inside, multiplier exactly 1.
        LimitCycleSearchResult found = new Circles { C0 = -1, C1 = 2, C2 = -1 }.FindLimitCycles();
        Assert.Empty(found.Families);
        Assert.All(found.Cycles, cycle => Assert.Equal(Stability.Undecided, cycle.Stability));
        Assert.All(found.Cycles, cycle => Near(1, cycle.Amplitude[0], 1e-3));
    }

    [Fact]
    public void The_Brusselator_cycles_beyond_its_Hopf_point_only()
    {
        // Hopf point at B = 1 + A² (Prigogine and Lefever 1968). Period and largest X for A = 1, B = 3: Taylor series of degree 40 in
        // 113-bit arithmetic, a separate program.
        var model = new Brusselator();
        LimitCycle cycle = Assert.Single(model.FindLimitCycles().Cycles);
        Near(BrusselatorPeriod, cycle.Period, 1e-10);
        Near(BrusselatorLargestX, cycle.Maximum[0], 1e-8);
        double product = IndependentQuadrature.MultiplierProduct(DynamicSystem.Of(model), cycle.State.AsSpan(), cycle.Period, 40_000);
        Near(product, cycle.TransverseMultipliers[0].Real, 1e-6);

        LimitCycleSearchResult below = new Brusselator { B = 1.9 }.FindLimitCycles();
        Assert.Empty(below.Cycles);
        Assert.Empty(below.Families);
    }

    [Fact]
    public void A_driven_machine_slips_on_a_cycle_that_closes_after_one_turn()
    {
        // The divergence is -D everywhere: the multiplier is exp(-D T). Over one turn the drive's work 2πP equals D ∮ slip² dt.
        LimitCycleSearchResult found = new Machine { Drive = 0.7, Damping = 0.15 }.FindLimitCycles();
        LimitCycle cycle = Assert.Single(found.Cycles);
        Assert.Equal<int>([1, 0], cycle.Winding);
        Assert.True(cycle.Rotates);
        Near(Math.Exp(-0.15 * cycle.Period), cycle.TransverseMultipliers[0].Real, 1e-9);
        Near(Math.Tau, cycle.Maximum[0] - cycle.Minimum[0], 1e-9);
        const int Intervals = 2000;
        double[][] states = cycle.Orbit.Sample(Intervals + 1);
        double mean = states.Skip(1).Average(state => state[1]), square = states.Skip(1).Average(state => state[1] * state[1]);
        Near(Math.Tau / cycle.Period, mean, 1e-8);
        Near(Math.Tau * 0.7, 0.15 * square * cycle.Period, 1e-8);
        Assert.Contains(found.Runs, run => run.Outcome == RunOutcome.Rest);
    }

    [Fact]
    public void A_single_angle_turns_with_the_published_period()
    {
        // T = 2π / √(ω² - a²): S. H. Strogatz, "Nonlinear Dynamics and Chaos", section 4.3.
        LimitCycle cycle = Assert.Single(new OneAngle().FindLimitCycles().Cycles);
        Near(Math.Tau / Math.Sqrt(3), cycle.Period, 1e-10);
        Assert.Equal<int>([1], cycle.Winding);
        Assert.True(cycle.IsStable);
        Assert.Empty(cycle.TransverseMultipliers);
        Assert.Empty(new OneAngle { Drive = 0.5 }.FindLimitCycles().Cycles);
    }

    [Fact]
    public void A_cycle_on_a_torus_closes_after_several_turns()
    {
        // ψ = 2φ₂ - 3φ₁ obeys ψ' = 2K sin ψ: locked at π with rate -2K; φ₁ makes 2 turns and φ₂ 3 in the time 4π.
        LimitCycleSearchResult found = new TwoAngles().FindLimitCycles();
        LimitCycle cycle = Assert.Single(found.Cycles, candidate => candidate.IsStable);
        Assert.Equal<int>([2, 3], cycle.Winding);
        Near(2 * Math.Tau, cycle.Period, 1e-10);
        Near(Math.Exp(-0.2 * 2 * Math.Tau), cycle.TransverseMultipliers[0].Real, 1e-9);
        LimitCycle repelling = Assert.Single(found.Cycles, candidate => !candidate.IsStable);
        Assert.Equal<int>([2, 3], repelling.Winding);
        Near(Math.Exp(0.2 * 2 * Math.Tau), repelling.TransverseMultipliers[0].Real, 1e-8);
    }

    [Fact]
    public void An_unstable_rotating_cycle_is_found_on_the_cylinder()
    {
        LimitCycle cycle = Assert.Single(new RepellingRotor().FindLimitCycles().Cycles);
        Assert.Equal<int>([1, 0], cycle.Winding);
        Assert.Equal(Stability.Unstable, cycle.Stability);
        Near(Math.Exp(0.5 * cycle.Period), cycle.TransverseMultipliers[0].Real, 1e-8);
    }

    [Fact]
    public void A_clock_ticks_with_the_closed_form_of_its_half_swings()
    {
        // Each half swing is a damped cosine about ±push: with q = exp(-π ζ/√(1-ζ²)), A = push (1 + q)/(1 - q),
        // T = 2π/√(1-ζ²), and a half swing shrinks disturbances by q.
        (double zeta, double push) = (0.1, 0.5);
        double root = Math.Sqrt(1 - zeta * zeta), q = Math.Exp(-Math.PI * zeta / root);
        LimitCycleSearchResult found = new Clock { Damping = zeta, Push = push }.FindLimitCycles();
        LimitCycle cycle = Assert.Single(found.Cycles, candidate => candidate.IsStable);
        Near(Math.Tau / root, cycle.Period, 1e-9);
        Near(push * (1 + q) / (1 - q), cycle.Amplitude[0], 1e-8);
        Near(q * q, cycle.TransverseMultipliers[0].Real, 1e-7);
        Assert.False(cycle.Slides);
    }

    [Fact]
    public void A_block_on_a_belt_sticks_and_slips_with_the_period_of_its_exact_solution()
    {
        // Slip from (grip, speed): x'' - w x' + x = grip - w speed, a growing rotation about a = grip - w speed, until x' = speed
        // again at x = b; stick for (grip - b)/speed. Every motion that sticks starts its slip from the same point: multiplier 0.
        (double speed, double grip, double w) = (0.5, 1, 0.3);
        double centre = grip - w * speed, sigma = w / 2, omega = Math.Sqrt(1 - sigma * sigma);
        (double x0, double c) = (grip - centre, (speed - sigma * (grip - centre)) / omega);
        (double X, double V) Slip(double t)
        {
            (double cosine, double sine, double growth) = (Math.Cos(omega * t), Math.Sin(omega * t), Math.Exp(sigma * t));
            double x = growth * (x0 * cosine + c * sine);
            return (centre + x, sigma * x + growth * omega * (c * cosine - x0 * sine));
        }

        // Past the lowest speed the block is slower than the belt and catches up again after more than half a turn.
        (double low, double high) = (Math.PI / omega, Math.Tau / omega);
        for (int i = 0; i < 200; i++)
        {
            double middle = (low + high) / 2;
            if (Slip(middle).V < speed) low = middle;
            else high = middle;
        }

        double period = high + (grip - Slip(high).X) / speed;
        LimitCycle cycle = Assert.Single(new Belt().FindLimitCycles().Cycles, candidate => candidate.IsStable);
        Assert.True(cycle.Slides);
        Assert.Equal(MultiplierMethod.ReturnMapDifferences, cycle.MultiplierMethod);
        Near(period, cycle.Period, 1e-8);
        Near(speed, cycle.Maximum[1], 1e-8);
        Near(grip, cycle.Orbit.Sample(4001).Where(state => state[1] >= speed - 1e-9).Max(state => state[0]), 1e-3);
        Assert.True(Complex.Abs(cycle.TransverseMultipliers[0]) <= 1e-6);
    }

    [Theory]
    [InlineData(2.5, 1)]
    [InlineData(3.5, 2)]
    public void A_doubled_cycle_is_reported_with_its_doubled_period(double c, int turns)
    {
        // The Roessler system doubles its period between c = 2.5 and c = 3.5 (a = b = 0.2; S. H. Strogatz, section 12.3); one turn
        // takes between 5.7 and 5.9 time units there.
        var model = new Roessler { C = c };
        LimitCycle cycle = Assert.Single(model.FindLimitCycles().Cycles);
        Assert.True(cycle.IsStable);
        Assert.InRange(cycle.Period / turns, 5.7, 5.9);
        double product = IndependentQuadrature.MultiplierProduct(DynamicSystem.Of(model), cycle.State.AsSpan(), cycle.Period, 40_000);
        Complex found = cycle.Multipliers.Aggregate(Complex.One, (left, right) => left * right);
        Assert.True(Complex.Abs(found - product) <= 1e-8);
    }

    [Fact]
    public void Lorenz_settles_on_a_symmetric_cycle_in_its_periodic_window()
    {
        // Stable symmetric cycle for 148 < ρ < 166 (C. Sparrow, "The Lorenz Equations", 1982, chapter 4). The divergence is -(σ+1+β).
        LimitCycleSearchResult found = new Equilibria.Lorenz { Rho = 160 }.FindLimitCycles(Few);
        LimitCycle cycle = Assert.Single(found.Cycles);
        Assert.True(cycle.IsStable);
        Near(-cycle.Minimum[0], cycle.Maximum[0], 1e-7);
        Complex product = cycle.Multipliers.Aggregate(Complex.One, (left, right) => left * right);
        Assert.True(Complex.Abs(product - Math.Exp(-(11 + 8.0 / 3) * cycle.Period)) <= 1e-6);
    }

    [Fact]
    public void Equal_seeds_give_equal_results()
    {
        LimitCycleSearchResult first = new Brusselator().FindLimitCycles(), second = new Brusselator().FindLimitCycles();
        Assert.Equal(first.Cycles[0].State.AsSpan().ToArray(), second.Cycles[0].State.AsSpan().ToArray());
        Assert.Equal(first.Runs.Select(run => run.Duration), second.Runs.Select(run => run.Duration));
    }

    private const double BrusselatorPeriod = 7.156919921179879820;
    private const double BrusselatorLargestX = 3.751773911233660769;

    private static readonly LimitCycleSearchOptions Few = new() { SpreadStarts = 3 };
}
