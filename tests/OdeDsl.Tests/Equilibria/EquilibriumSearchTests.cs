using System.Collections.Immutable;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;
using Xunit;

namespace OdeDsl.Tests.Equilibria;

public class EquilibriumSearchTests
{
    private static void Near(double expected, double actual, double tolerance = 1e-12) =>
        Assert.True(Math.Abs(actual - expected) <= tolerance * Math.Max(1, Math.Abs(expected)), $"expected {expected:R}, got {actual:R}");

    [Fact]
    public void Lorenz_has_three_rests_with_the_published_coordinates_and_spectra()
    {
        // E. N. Lorenz, J. Atmos. Sci. 20 (1963), equations 33-36: origin and (±√(b(r-1)), ±√(b(r-1)), r - 1); at the origin
        // λ = -b and λ² + (σ+1)λ + σ(1-r) = 0; at the others λ³ + (σ+b+1)λ² + (r+σ)bλ + 2σb(r-1) = 0.
        (double sigma, double rho, double beta) = (10, 28, 8.0 / 3);
        EquilibriumSearchResult found = new Lorenz().FindEquilibria();
        Assert.Equal(3, found.Equilibria.Length);
        double offset = Math.Sqrt(beta * (rho - 1));
        foreach ((Equilibrium rest, double sign) in found.Equilibria.Zip([-1.0, 0.0, 1.0]))
        {
            Near(sign * offset, rest.State[0]);
            Near(sign * offset, rest.State[1]);
            Near(sign * sign * (rho - 1), rest.State[2]);
            Assert.Equal(EquilibriumKind.Saddle, rest.Kind);
            Assert.False(rest.IsStable);
        }

        Equilibrium origin = found.Equilibria[1];
        double root = Math.Sqrt((sigma + 1) * (sigma + 1) - 4 * sigma * (1 - rho));
        Near((root - sigma - 1) / 2, origin.Eigenvalues[0].Real);
        Near(-beta, origin.Eigenvalues[1].Real);
        Near((-root - sigma - 1) / 2, origin.Eigenvalues[2].Real);
        Assert.Equal(1, origin.UnstableCount);
        foreach (int side in new[] { 0, 2 })
        {
            Assert.Equal(2, found.Equilibria[side].UnstableCount);
            foreach (System.Numerics.Complex value in found.Equilibria[side].Eigenvalues)
            {
                System.Numerics.Complex characteristic = value * value * value + (sigma + beta + 1) * value * value
                    + (rho + sigma) * beta * value + 2 * sigma * beta * (rho - 1);
                Assert.True(System.Numerics.Complex.Abs(characteristic) <= 1e-9);
            }
        }
    }

    [Fact]
    public void All_twenty_five_roots_of_two_coupled_Chebyshev_polynomials_are_found()
    {
        // Both rates vanish only if T5(x) = T5(y) = 0; roots cos((2k-1)π/10): Abramowitz and Stegun, table 22.16.
        double[] roots = [.. Enumerable.Range(1, 5).Select(k => Math.Cos((2 * k - 1) * Math.PI / 10)).Order()];
        EquilibriumSearchResult found = new Grid().FindEquilibria();
        Assert.Equal(25, found.Equilibria.Length);
        foreach (double x in roots)
        {
            foreach (double y in roots)
                Assert.Single(found.Equilibria, rest => Math.Abs(rest.State[0] - x) <= 1e-12 && Math.Abs(rest.State[1] - y) <= 1e-12);
        }

        // T5' is ±5/sin there with alternating sign; the determinant is (1 + c²) T5'(x) T5'(y): negative at 12 of the 25 roots.
        Assert.Equal(12, found.Equilibria.Count(rest => rest.Kind == EquilibriumKind.Saddle));
        Assert.True(found.Starts >= 2 * found.LastNewStart);
    }

    [Fact]
    public void Rests_that_nearly_coincide_are_told_apart()
    {
        // Slopes of (x-1)(x-1-g)(x+2) at its roots: -3g and g(3+g), exactly.
        const double Gap = 1e-5;
        ImmutableArray<Equilibrium> rests = new NearbyRests { Gap = Gap }.FindEquilibria().Equilibria;
        Assert.Equal(3, rests.Length);
        Near(1, rests[1].State[0]);
        Near(1 + Gap, rests[2].State[0]);
        Near(-3 * Gap, rests[1].Eigenvalues[0].Real, 1e-9);
        Near(Gap * (3 + Gap), rests[2].Eigenvalues[0].Real, 1e-9);
        Assert.True(rests[1].IsStable);
        Assert.False(rests[2].IsStable);
    }

    [Fact]
    public void A_double_root_is_one_degenerate_rest()
    {
        Equilibrium rest = Assert.Single(new DoubleRoot().FindEquilibria().Equilibria);
        Assert.Equal(EquilibriumKind.Degenerate, rest.Kind);
        Assert.Equal(Stability.Undecided, rest.Stability);
        Assert.Null(rest.Set);
        Near(0.25, rest.State[0], 1e-7);
    }

    [Fact]
    public void The_swing_equation_rests_once_in_synchronism_and_once_at_the_saddle_modulo_a_turn()
    {
        // sin δ = P/Pmax; at rest ω_n² = Pmax cos δ and 2ζω_n = D (P. Kundur, "Power System Stability and Control", section 2.6, for
        // the swing equation linearised).
        ImmutableArray<Equilibrium> rests = new Machine().FindEquilibria().Equilibria;
        Assert.Equal(2, rests.Length);
        double angle = Math.Asin(0.5);
        Near(angle, rests[0].State[0]);
        Near(Math.PI - angle, rests[1].State[0]);
        Assert.Equal((EquilibriumKind.Focus, true), (rests[0].Kind, rests[0].IsStable));
        LinearMode swing = Assert.Single(rests[0].Modes);
        double frequency = Math.Sqrt(Math.Cos(angle));
        Near(frequency, swing.NaturalFrequency);
        Near(0.1 / (2 * frequency), swing.DampingRatio);
        Near(2 / 0.1, swing.TimeConstant);
        Near(Math.Tau / Math.Sqrt(frequency * frequency - 0.05 * 0.05), swing.Period);
        Assert.Equal((EquilibriumKind.Saddle, 1), (rests[1].Kind, rests[1].UnstableCount));
    }

    [Fact]
    public void Without_damping_the_synchronous_rest_is_a_linear_centre()
    {
        Equilibrium rest = new Machine { Damping = 0 }.FindEquilibria().Equilibria[0];
        Assert.Equal((EquilibriumKind.Centre, Stability.Undecided), (rest.Kind, rest.Stability));
    }

    [Fact]
    public void A_machine_driven_beyond_its_line_has_no_rest_and_none_is_invented()
    {
        EquilibriumSearchResult found = new Machine { Drive = 1.001 }.FindEquilibria();
        Assert.Empty(found.Equilibria);
        Assert.Equal((0, 1.0), (found.LastNewStart, found.UnseenShare));
        Assert.Empty(new NoRest().FindEquilibria().Equilibria);
    }

    [Fact]
    public void A_closed_vessel_rests_on_a_line_reported_once_at_the_initial_contents()
    {
        // 2A = B² is the line; A + B/2 stays 1.25, so B² + B = 2.5.
        Equilibrium rest = Assert.Single(new ClosedVessel().FindEquilibria().Equilibria);
        double b = (Math.Sqrt(11) - 1) / 2;
        Near(b, rest.State[1], 1e-9);
        Near(b * b / 2, rest.State[0], 1e-9);
        Assert.Equal((EquilibriumKind.Degenerate, Stability.Stable), (rest.Kind, rest.Stability));
        Assert.Equal(1, rest.Set!.Dimension);
        Near(-2 - 4 * b, rest.Eigenvalues[^1].Real, 1e-9);
        // The line leaves the bounds at the origin and at B = √8, A = 4.
        double[] ends = [.. new[] { rest.Set.Points[0][1], rest.Set.Points[^1][1] }.Order()];
        Near(0, ends[0], 1e-6);
        Near(Math.Sqrt(8), ends[1], 1e-6);
        Assert.All(rest.Set.Points, point => Near(point[1] * point[1], 2 * point[0], 1e-9));
    }

    [Fact]
    public void Dry_friction_holds_the_block_anywhere_within_friction_over_stiffness()
    {
        // Coulomb's law: the block sticks where |stiffness x| ≤ friction.
        Equilibrium stick = Assert.Single(new Block().FindEquilibria().Equilibria);
        Assert.True(stick.IsSliding);
        Assert.Equal(0, stick.Surface);
        Assert.Equal((EquilibriumKind.Degenerate, Stability.Stable), (stick.Kind, stick.Stability));
        double[] ends = [.. new[] { stick.Set!.Points[0][0], stick.Set.Points[^1][0] }.Order()];
        Near(-0.3, ends[0], 1e-9);
        Near(0.3, ends[1], 1e-9);
        Assert.All(stick.Set.Points, point => Near(0, point[1], 1e-9));
    }

    [Fact]
    public void Without_dry_friction_the_block_rests_at_one_point()
    {
        Equilibrium rest = Assert.Single(new Block { Friction = 0 }.FindEquilibria().Equilibria);
        Assert.False(rest.IsSliding);
        Near(0, rest.State[0]);
        Assert.Equal((EquilibriumKind.Focus, true), (rest.Kind, rest.IsStable));
    }

    [Fact]
    public void A_valve_that_opens_at_a_level_holds_the_level_by_sliding()
    {
        // Filippov 1988, §4: at Level = 1 the mean of 0.6 - 0 and 0.6 - 1.5 with weight 0.4 vanishes; within the surface only
        // Inflow' = 0.6 - Inflow remains.
        Equilibrium rest = Assert.Single(new SlidingTank().FindEquilibria().Equilibria);
        Assert.True(rest.IsSliding);
        Near(1, rest.State[0]);
        Near(0.6, rest.State[1]);
        Assert.Equal((EquilibriumKind.Node, true), (rest.Kind, rest.IsStable));
        Near(-1, Assert.Single(rest.Eigenvalues).Real);
    }

    [Fact]
    public void A_root_of_a_formula_counts_only_where_the_formula_holds()
    {
        EquilibriumSearchResult found = new Stretches().FindEquilibria();
        ImmutableArray<Equilibrium> ordinary = [.. found.Equilibria.Where(rest => !rest.IsSliding)];
        Assert.Equal([0.25, 1.5, 2.75], ordinary.Select(rest => Math.Round(rest.State[0], 12)));
        Assert.Equal([true, false, true], ordinary.Select(rest => rest.IsStable));
        // At X = 1 and X = 2 both neighbours point the same way or away; at 4 the stretch from below rises and the one above falls.
        Equilibrium held = Assert.Single(found.Equilibria, rest => rest.IsSliding && rest.IsStable);
        Near(4, held.State[0]);
        Assert.Equal(5, found.RegimesSearched);
    }

    [Fact]
    public void A_rest_on_a_kink_is_found_and_left_undecided()
    {
        Equilibrium rest = Assert.Single(new Kinked().FindEquilibria().Equilibria);
        Near(0, rest.State[0]);
        Assert.Equal((EquilibriumKind.Degenerate, Stability.Undecided), (rest.Kind, rest.Stability));
    }

    [Fact]
    public void Rates_of_very_different_size_do_not_hide_a_rest()
    {
        // At rest A + B + C = 1 (sum of the rates), C = 3e9 B² and 0.05 A = 0.01 + 1e4 B C.
        Equilibrium rest = Assert.Single(new OpenRobertson().FindEquilibria().Equilibria);
        (double a, double b, double c) = (rest.State[0], rest.State[1], rest.State[2]);
        Near(1, a + b + c);
        Near(c, 3e9 * b * b, 1e-11);
        Near(0.05 * a, 0.01 + 1e4 * b * c, 1e-11);
        Assert.True(rest.IsStable);
        Assert.Equal(EquilibriumKind.Node, rest.Kind);
    }

    [Fact]
    public void Equal_seeds_give_equal_results_and_other_seeds_the_same_rests()
    {
        EquilibriumSearchResult first = new Grid().FindEquilibria(), second = new Grid().FindEquilibria();
        Assert.Equal(
            first.Equilibria.SelectMany(rest => rest.State.Append(rest.Landings)),
            second.Equilibria.SelectMany(rest => rest.State.Append(rest.Landings)));
        EquilibriumSearchResult other = new Grid().FindEquilibria(new EquilibriumSearchOptions { Seed = 7 });
        Assert.NotEqual(first.Equilibria.Select(rest => rest.Landings), other.Equilibria.Select(rest => rest.Landings));
        Assert.Equal(25, other.Equilibria.Length);
    }

    [Fact]
    public void The_completeness_statement_tells_the_work_and_claims_no_proof()
    {
        EquilibriumSearchResult found = new Lorenz().FindEquilibria();
        Assert.Contains($"{found.Starts} starts", found.Completeness, StringComparison.Ordinal);
        Assert.Contains("not a proof", found.Completeness, StringComparison.Ordinal);
        Assert.Equal(found.Landed, found.Equilibria.Sum(rest => rest.Landings));
    }

    [Fact]
    public void A_model_that_depends_on_time_is_refused_with_a_way_out()
    {
        var refused = Assert.Throws<InvalidOperationException>(() => new Driven().FindEquilibria());
        Assert.Contains("Driven", refused.Message, StringComparison.Ordinal);
        Assert.Contains("depend on time", refused.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Extra_starts_are_checked()
    {
        var wrongLength = new EquilibriumSearchOptions { ExtraStarts = [[1.0, 2.0]] };
        Assert.Throws<ArgumentException>(() => new Lorenz().FindEquilibria(wrongLength));
        var notFinite = new EquilibriumSearchOptions { ExtraStarts = [[1.0, double.NaN, 2.0]] };
        Assert.Throws<ArgumentException>(() => new Lorenz().FindEquilibria(notFinite));
        Assert.Throws<ArgumentException>(() => new Lorenz().FindEquilibria(new EquilibriumSearchOptions { MaximumStarts = 0 }));
    }

    [Fact]
    public void A_cancelled_search_ends()
    {
        using var source = new CancellationTokenSource();
        source.Cancel();
        Assert.Throws<OperationCanceledException>(() => new Lorenz().FindEquilibria(cancellationToken: source.Token));
    }

    [Fact]
    public void A_guess_is_refined_to_rounding()
    {
        DynamicSystem system = DynamicSystem.Of(new Machine());
        double[] state = [0.4, 0.1];
        Assert.True(EquilibriumAnalysis.TryRefine(system, state, out double residual));
        Near(Math.PI / 6, state[0], 1e-15);
        Assert.True(residual <= 1e-15);
        double[] nowhere = [0.4, 0.1];
        Assert.False(EquilibriumAnalysis.TryRefine(DynamicSystem.Of(new Machine { Drive = 2 }), nowhere, out _));
        Assert.Throws<ArgumentException>(() => EquilibriumAnalysis.TryRefine(system, new double[3], out _));
    }
}
