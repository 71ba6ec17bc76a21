using OdeDsl;
using OdeDsl.Branches;
using OdeDsl.Ensembles;
using OdeDsl.Equilibria;

namespace Tarnwater.Tests;

public class StirredMixerTests
{
    // E. N. Lorenz, Journal of the Atmospheric Sciences 20, 1963: steady convection loses its stability at
    // sigma (sigma + beta + 3) / (sigma - beta - 1).
    [Fact]
    public void Steady_circulation_loses_its_stability_at_the_heating_Lorenz_gives()
    {
        StirredMixer mixer = new() { Circulation = 30, Contrast = 3, Layering = 4 };
        double sigma = mixer.Friction / mixer.Exchange, beta = mixer.Smoothing / mixer.Exchange;
        double expected = sigma * (sigma + beta + 3) / (sigma - beta - 1) * mixer.Exchange * mixer.Reach / mixer.Lift;

        BranchResult branch = mixer.Follow(p => p.Heating, from: 4, to: 12);

        SpecialPoint hopf = Assert.Single(branch.Special(SpecialPointKind.HopfPoint));
        Assert.True(Math.Abs(hopf.Parameter / expected - 1) <= 1e-9, $"{hopf.Parameter:R} against {expected:R}");
    }

    [Fact]
    public void As_built_it_has_three_rests_and_none_is_stable()
    {
        EquilibriumSearchResult found = new StirredMixer().FindEquilibria();

        Assert.Equal(3, found.Equilibria.Length);
        Assert.DoesNotContain(found.Equilibria, static rest => rest.IsStable);
    }

    // Liouville's formula: volumes shrink at the divergence of the rates, which is constant here.
    [Fact]
    public void The_exponents_add_up_to_the_divergence()
    {
        StirredMixer mixer = new();

        LyapunovResult exponents = mixer.LyapunovExponents();

        double divergence = -(mixer.Friction + mixer.Exchange + mixer.Smoothing);
        Assert.Equal(3, exponents.Exponents.Count);
        Assert.True(exponents.Largest.IsPositive);
        Assert.True(Math.Abs(exponents.Sum / divergence - 1) <= 1e-6, $"{exponents.Sum:R}");
    }

    // With Lorenz's own numbers (sigma 10, beta 8/3, rho 28) the largest exponent is 0.906 in his time: A. Wolf et al., Physica D 16, 1985
    // (there in bits: 1.31 = 0.906 / ln 2, from memory); J. C. Sprott, Chaos and Time-Series Analysis, 2003: 0.9056 (from memory).
    [Fact]
    public void With_the_numbers_of_the_literature_the_largest_exponent_is_the_literatures()
    {
        StirredMixer mixer = new() { Smoothing = 0.02 * 8 / 3 };

        LyapunovExponent largest = mixer.LyapunovExponents().Largest;

        Assert.True(largest.Uncertainty <= 0.05 * 0.906 * mixer.Exchange, $"{largest}");
        Assert.True(Math.Abs(largest.Value - 0.906 * mixer.Exchange) <= Math.Max(2 * largest.Uncertainty, 0.01 * 0.906 * mixer.Exchange), $"{largest}");
    }
}
