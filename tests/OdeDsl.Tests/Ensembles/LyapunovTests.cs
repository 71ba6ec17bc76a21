using OdeDsl.Cycles;
using OdeDsl.Ensembles;
using OdeDsl.Integration;
using OdeDsl.Tests.Assessment;
using OdeDsl.Tests.Branches;
using Xunit;

namespace OdeDsl.Tests.Ensembles;

public class LyapunovTests
{
    [Fact]
    public void The_Lorenz_exponents_agree_with_the_published_ones_within_their_uncertainty()
    {
        // 0.9056, 0, -14.5723 for the classical parameters (J. C. Sprott, Chaos and Time-Series Analysis, 2003, appendix A; from memory).
        LyapunovResult result = new Lorenz().LyapunovExponents(new LyapunovOptions { Duration = 2000 });
        Assert.Equal(3, result.Exponents.Count);
        Assert.True(Math.Abs(result.Exponents[0].Value - 0.9056) <= result.Exponents[0].Uncertainty, $"{result.Exponents[0]}");
        Assert.True(Math.Abs(result.Exponents[1].Value) <= result.Exponents[1].Uncertainty, $"{result.Exponents[1]}");
        Assert.True(Math.Abs(result.Exponents[2].Value + 14.5723) <= result.Exponents[2].Uncertainty, $"{result.Exponents[2]}");
        Assert.True(result.Largest.IsPositive);
        Assert.True(result.Largest.Uncertainty <= 0.03, $"{result.Largest}");
    }

    [Fact]
    public void The_exponents_add_up_to_the_mean_divergence()
    {
        // The divergence of Lorenz's equations is -(σ + 1 + β) everywhere.
        LyapunovResult result = new Lorenz().LyapunovExponents(new LyapunovOptions { Duration = 200 });
        double divergence = -(10 + 1 + 8.0 / 3);
        Assert.True(Math.Abs(result.Sum - divergence) <= 1e-7 * Math.Abs(divergence), $"{result.Sum:R}");
        Assert.True(Math.Abs(result.MeanDivergence - divergence) <= 1e-12 * Math.Abs(divergence), $"{result.MeanDivergence:R}");
    }

    [Fact]
    public void The_largest_exponent_alone_agrees_with_the_one_of_the_spectrum()
    {
        LyapunovResult all = new Lorenz().LyapunovExponents(new LyapunovOptions { Duration = 500 });
        LyapunovResult one = new Lorenz().LyapunovExponents(new LyapunovOptions { Duration = 500, Count = 1 });
        Assert.Single(one.Exponents);
        Assert.True(Math.Abs(all.Largest.Value - one.Largest.Value) <= all.Largest.Uncertainty + one.Largest.Uncertainty);
    }

    [Fact]
    public void On_a_limit_cycle_the_second_exponent_is_the_logarithm_of_the_multiplier_over_the_period()
    {
        // Floquet: μ = e^(λ T).
        LimitCycle cycle = Assert.Single(new VanDerPol().FindLimitCycles().Cycles);
        double expected = Math.Log(cycle.TransverseMultipliers[0].Magnitude) / cycle.Period;
        LyapunovResult result = new VanDerPol().LyapunovExponents(new LyapunovOptions { Transient = 100, Duration = 100 * cycle.Period });
        Assert.True(Math.Abs(result.Exponents[0].Value) <= result.Exponents[0].Uncertainty, $"{result.Exponents[0]}");
        Assert.True(Math.Abs(result.Exponents[1].Value - expected) <= 1e-4 * Math.Abs(expected) + result.Exponents[1].Uncertainty, $"{result.Exponents[1]} {expected}");
        Assert.False(result.Largest.IsPositive);
    }

    [Fact]
    public void At_a_stable_rest_the_exponents_are_the_real_parts_of_the_eigenvalues()
    {
        // x' = (1 - x²)(x - b), y' = -y at x = 1: eigenvalues -2 (1 - b) and -1.
        LyapunovResult result = new Bistable().LyapunovExponents(new LyapunovOptions { Transient = 40, Duration = 100 });
        Assert.True(Math.Abs(result.Exponents[0].Value + 1) <= 1e-6, $"{result.Exponents[0]}");
        Assert.True(Math.Abs(result.Exponents[1].Value + 1) <= 1e-6, $"{result.Exponents[1]}");
        LyapunovResult other = new Bistable { Border = -0.25 }.LyapunovExponents(new LyapunovOptions { Transient = 40, Duration = 100 });
        Assert.True(Math.Abs(other.Exponents[1].Value + 2.5) <= 1e-6, $"{other.Exponents[1]}");
    }

    [Fact]
    public void Equal_options_give_equal_exponents()
    {
        var options = new LyapunovOptions { Duration = 50 };
        Assert.Equal(new Lorenz().LyapunovExponents(options).Exponents, new Lorenz().LyapunovExponents(options).Exponents);
    }

    [Fact]
    public void A_motion_that_runs_away_ends_the_estimation_with_the_integration_failure()
    {
        Assert.Throws<IntegrationException>(() => new Runaway().LyapunovExponents(new LyapunovOptions { Duration = 10 }));
    }

    [Fact]
    public void Options_without_meaning_are_refused()
    {
        var model = new Lorenz();
        Assert.Throws<ArgumentOutOfRangeException>(() => model.LyapunovExponents(new LyapunovOptions { Count = 4 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => model.LyapunovExponents(new LyapunovOptions { Duration = double.NaN }));
        Assert.Throws<ArgumentOutOfRangeException>(() => model.LyapunovExponents(new LyapunovOptions { Transient = -1 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => model.LyapunovExponents(new LyapunovOptions { Interval = 0 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => model.LyapunovExponents(new LyapunovOptions { Batches = 2 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => model.LyapunovExponents(new LyapunovOptions { RelativeTolerance = 1 }));
    }

    [Fact]
    public void The_estimation_stops_when_cancelled()
    {
        using var source = new CancellationTokenSource();
        source.Cancel();
        Assert.ThrowsAny<OperationCanceledException>(() => new Lorenz().LyapunovExponents(cancellationToken: source.Token));
    }
}
