using System.Numerics;
using CsCheck;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;
using Xunit;

namespace OdeDsl.Tests.Equilibria;

public class ClassificationTests
{
    private static Equilibrium OriginOf(double a, double b, double c, double d) =>
        EquilibriumAnalysis.Describe(DynamicSystem.Of(new Linear { A = a, B = b, C = c, D = d }), [0, 0]);

    [Fact]
    public void Random_plane_systems_are_classified_as_trace_and_determinant_say()
    {
        // S. H. Strogatz, "Nonlinear Dynamics and Chaos", section 5.2: saddle for Δ < 0, node for τ² > 4Δ, focus for τ² < 4Δ,
        // centre for τ = 0 < Δ; stable for τ < 0.
        Gen<double> entry = Gen.Double[-5, 5];
        Gen.Select(entry, entry, entry, entry).Sample(
            (a, b, c, d) =>
            {
                double trace = a + d, determinant = a * d - b * c, discriminant = trace * trace - 4 * determinant;
                if (Math.Abs(determinant) < 1e-6 || Math.Abs(discriminant) < 1e-6 || Math.Abs(trace) < 1e-6) return true;
                Equilibrium rest = OriginOf(a, b, c, d);
                EquilibriumKind expected = determinant < 0
                    ? EquilibriumKind.Saddle
                    : discriminant > 0 ? EquilibriumKind.Node : EquilibriumKind.Focus;
                bool stable = determinant > 0 && trace < 0;
                int unstable = determinant < 0 ? 1 : trace > 0 ? 2 : 0;
                Complex sum = rest.Eigenvalues[0] + rest.Eigenvalues[1], product = rest.Eigenvalues[0] * rest.Eigenvalues[1];
                return rest.Kind == expected && rest.IsStable == stable && rest.UnstableCount == unstable
                    && Complex.Abs(sum - trace) <= 1e-12 && Complex.Abs(product - determinant) <= 1e-11;
            });
    }

    [Fact]
    public void Random_centres_are_centres_whatever_their_shape()
    {
        // Zero trace and positive determinant: [a, b; c, -a] with -a² - bc > 0.
        Gen.Select(Gen.Double[-3, 3], Gen.Double[0.1, 5], Gen.Double[0.01, 5]).Sample(
            (a, b, excess) =>
                OriginOf(a, b, -(a * a + excess) / b, -a) is { Kind: EquilibriumKind.Centre, Stability: Stability.Undecided });
    }

    [Fact]
    public void A_damping_ratio_of_one_in_a_million_is_a_focus_and_no_centre()
    {
        Equilibrium rest = OriginOf(0, 1, -1, -2e-6);
        Assert.Equal((EquilibriumKind.Focus, true), (rest.Kind, rest.IsStable));
        Assert.True(Math.Abs(rest.Modes[0].DampingRatio - 1e-6) <= 1e-14);
    }

    [Fact]
    public void Modes_follow_the_second_order_lag()
    {
        // x'' + 2ζω x' + ω² x = 0 with ζ = 0.2, ω = 3 (any handbook of control engineering).
        Equilibrium rest = OriginOf(0, 1, -9, -1.2);
        LinearMode mode = Assert.Single(rest.Modes);
        Assert.True(Math.Abs(mode.DampingRatio - 0.2) <= 1e-14);
        Assert.True(Math.Abs(mode.NaturalFrequency - 3) <= 1e-14);
        Assert.True(Math.Abs(mode.TimeConstant - 1 / 0.6) <= 1e-14);
        Assert.True(Math.Abs(mode.Period - Math.Tau / (3 * Math.Sqrt(1 - 0.04))) <= 1e-13);
    }

    [Fact]
    public void Two_real_modes_are_two_lags_the_slower_first()
    {
        Equilibrium rest = OriginOf(-0.5, 0, 7, -20);
        Assert.Equal([2.0, 0.05], rest.Modes.Select(mode => Math.Round(mode.TimeConstant, 12)));
        Assert.Equal([1.0, 1.0], rest.Modes.Select(mode => mode.DampingRatio));
        Assert.All(rest.Modes, mode => Assert.False(mode.Oscillates));
    }

    [Fact]
    public void Badly_scaled_states_keep_accurate_eigenvalues()
    {
        // [[-1, 1e12], [-1e-12, -1]] is similar to [[-1, 1], [-1, -1]]: eigenvalues -1 ± i.
        Equilibrium rest = OriginOf(-1, 1e12, -1e-12, -1);
        Assert.Equal(EquilibriumKind.Focus, rest.Kind);
        Assert.True(Complex.Abs(rest.Eigenvalues[0] - new Complex(-1, 1)) <= 1e-14);
    }

    [Fact]
    public void A_degenerate_node_stays_a_node()
    {
        Assert.Equal(EquilibriumKind.Node, OriginOf(-1, 1, 0, -1).Kind);
        Assert.Equal(EquilibriumKind.Node, OriginOf(-2, 1, -1, 0).Kind);
    }
}
