using OdeDsl.Branches;
using Xunit;

namespace OdeDsl.Tests.Branches;

public class FollowTests
{
    /// <summary>Results that are located to rounding are compared relative to their size with this.</summary>
    private const double Tight = 1e-10;

    private static void Near(double expected, double actual, double relative = Tight) =>
        Assert.True(Math.Abs(actual - expected) <= relative * Math.Max(1, Math.Abs(expected)), $"expected {expected:R}, got {actual:R}");

    private static SpecialPoint Only(BranchResult branch, SpecialPointKind kind) => Assert.Single(branch.Special(kind));

    [Fact]
    public void The_normal_form_of_a_fold_is_followed_around_its_fold_and_back()
    {
        BranchResult branch = new FoldForm().Follow(form => form.P, from: -1, to: 1);
        SpecialPoint fold = Assert.Single(branch.SpecialPoints);
        Assert.Equal(SpecialPointKind.Fold, fold.Kind);
        Near(0, fold.Parameter, 1e-14);
        Near(0, fold.State[0]);
        Assert.Equal((0, 1), fold.UnstableCounts);
        Assert.True(fold.ChangesStability);
        Assert.Equal(BranchEnd.StartValueReached, branch.End);
        Assert.Equal(-1, branch.Points[^1].Parameter);
        Near(1, branch.Points[^1].State[0]);
        Assert.True(branch.Points[0].IsStable);
        Assert.False(branch.Points[^1].IsStable);
    }

    [Fact]
    public void Both_folds_of_a_hysteresis_are_located()
    {
        // p = x³/3 - x turns back where x² = 1, at p = ∓2/3.
        BranchResult branch = new Hysteresis().Follow(form => form.P, from: -3, to: 3);
        SpecialPoint[] folds = [.. branch.Special(SpecialPointKind.Fold)];
        Assert.Equal(2, folds.Length);
        Near(2.0 / 3, folds[0].Parameter, 1e-14);
        Near(-1, folds[0].State[0]);
        Near(-2.0 / 3, folds[1].Parameter, 1e-14);
        Near(1, folds[1].State[0]);
        Assert.Equal(BranchEnd.TargetReached, branch.End);
        Assert.Equal(3, branch.Points[^1].Parameter);
    }

    [Fact]
    public void The_harvest_that_ends_a_logistic_stock_is_a_quarter_of_growth_times_capacity()
    {
        // r x (1 - x/K) = h has a double root at x = K/2, h = r K/4 (C. W. Clark, Mathematical Bioeconomics, chapter 1, from memory).
        BranchResult branch = new Harvest().Follow(stock => stock.Catch, from: 0.5, to: 5);
        SpecialPoint fold = Only(branch, SpecialPointKind.Fold);
        Near(0.8 * 10 / 4, fold.Parameter, 1e-13);
        Near(5, fold.State[0]);
    }

    [Theory]
    [InlineData(1.0)]
    [InlineData(1.3)]
    [InlineData(0.4)]
    public void The_Brusselator_starts_to_oscillate_where_B_is_one_plus_A_squared(double a)
    {
        // Rest (A, B/A), trace B - 1 - A², determinant A²: pure imaginary ±iA at B = 1 + A² (Nicolis and Prigogine 1977).
        BranchResult branch = new Brusselator { A = a, X = a, Y = 0.5 / a }.Follow(model => model.B, from: 0.5, to: 4);
        SpecialPoint hopf = Assert.Single(branch.SpecialPoints);
        Assert.Equal(SpecialPointKind.HopfPoint, hopf.Kind);
        Near(1 + a * a, hopf.Parameter, 1e-12);
        Near(a, hopf.Frequency!.Value, 1e-12);
        Near(a, hopf.State[0]);
        Assert.Equal((0, 2), hopf.UnstableCounts);
    }

    [Fact]
    public void The_Lorenz_rest_at_the_origin_loses_stability_where_two_others_branch_off()
    {
        // Eigenvalues of the upper block: λ² + (σ+1) λ + σ(1-ρ), zero at ρ = 1 (Lorenz 1963).
        BranchResult branch = new Lorenz { X = 0, Y = 0, Z = 0 }.Follow(model => model.Rho, from: 0.2, to: 30);
        SpecialPoint crossing = Assert.Single(branch.SpecialPoints);
        Assert.Equal(SpecialPointKind.BranchPoint, crossing.Kind);
        Near(1, crossing.Parameter, 1e-12);
        Assert.Equal((0, 1), crossing.UnstableCounts);
    }

    [Fact]
    public void The_Lorenz_convection_rests_lose_stability_by_oscillation_at_the_classical_value()
    {
        // ρ = σ (σ+β+3)/(σ-β-1) and there λ² = -β (σ+ρ): C. Sparrow, The Lorenz Equations, 1982, section 2.3 (from memory).
        const double Sigma = 10, Beta = 8.0 / 3;
        double rho = Sigma * (Sigma + Beta + 3) / (Sigma - Beta - 1);
        double x = Math.Sqrt(Beta * 9);
        BranchResult branch = new Lorenz { X = x, Y = x, Z = 9 }.Follow(model => model.Rho, from: 10, to: 30);
        SpecialPoint hopf = Assert.Single(branch.SpecialPoints);
        Assert.Equal(SpecialPointKind.HopfPoint, hopf.Kind);
        Near(rho, hopf.Parameter, 1e-12);
        Near(Math.Sqrt(Beta * (Sigma + rho)), hopf.Frequency!.Value, 1e-12);
        Near(rho - 1, hopf.State[2]);
    }

    [Fact]
    public void The_side_branch_of_a_pitchfork_passes_the_crossing_and_is_not_called_a_fold()
    {
        BranchResult branch = new Pitchfork().Follow(form => form.P, from: 1, to: -1);
        SpecialPoint crossing = Assert.Single(branch.SpecialPoints);
        Assert.Equal(SpecialPointKind.BranchPoint, crossing.Kind);
        Near(0, crossing.Parameter, 1e-9);
        Assert.Equal(BranchEnd.StartValueReached, branch.End);
        Near(-1, branch.Points[^1].State[0]);
    }

    [Fact]
    public void A_machine_loses_its_rest_at_the_largest_power_of_the_line()
    {
        // P = Pmax sin δ: stable below δ = π/2 (P. Kundur, Power System Stability and Control, static limit of the power angle curve; from memory).
        BranchResult branch = new Machine().Follow(machine => machine.Power, from: 0.5, to: 3);
        SpecialPoint fold = Only(branch, SpecialPointKind.Fold);
        Near(1.2, fold.Parameter, 1e-13);
        Near(Math.PI / 2, fold.State[0]);
        Assert.Equal(BranchEnd.StartValueReached, branch.End);
        Near(Math.PI - Math.Asin(0.5 / 1.2), branch.Points[^1].State[0]);
    }

    [Fact]
    public void Ignition_and_extinction_of_a_stirred_reactor_lie_on_their_exact_parametric_curve()
    {
        // At rest x = y (1+β)/B and Da = x e^(-y) / (1-x); dDa/dy = 0 gives x(1-x) B/(1+β) = 1 (Uppal, Ray and Poore 1974).
        const double Heat = 11, Cooling = 1.5;
        double ratio = Heat / (1 + Cooling);
        double root = Math.Sqrt(0.25 - 1 / ratio);
        BranchResult branch = new StirredReactor().Follow(
            reactor => reactor.Damkohler, from: 0.01, to: 0.4, new BranchOptions { RespectStateBounds = false });
        SpecialPoint[] folds = [.. branch.Special(SpecialPointKind.Fold)];
        Assert.Equal(2, folds.Length);
        foreach ((SpecialPoint fold, double x) in folds.Zip([0.5 - root, 0.5 + root]))
        {
            double y = ratio * x;
            Near(x, fold.State[0]);
            Near(y, fold.State[1]);
            Near(x * Math.Exp(-y) / (1 - x), fold.Parameter, 1e-12);
        }
    }

    [Fact]
    public void The_surge_tank_oscillates_at_the_area_that_its_exact_linearisation_gives()
    {
        // State z (level above the reservoir), v. With Q = P/(ρ g (H+z)) the rest satisfies f v = Q, z = -c v² (c the loss, v > 0).
        // Jacobian: z-row (Q/((H+z) A), f/A), v-row (-g/L, -2 g c v/L). Trace zero gives A = Q L / (2 g c v (H+z)); with Q = f v this is
        // A = f L / (2 g c (H+z)): Thoma's area (D. Thoma 1910; M. H. Chaudhry, Applied Hydraulic Transients, chapter 11; from memory) with
        // the net head H+z = H - c v² in place of the gross one. Determinant at that area: ω² = (g/(L A)) (f - 2 c v Q/(H+z)).
        var tank = new SurgeTankModel();
        double z = 0;
        for (int i = 0; i < 200; i++)
        {
            double velocity = 24e6 / (1000 * 9.81 * (100 + z)) / 12;
            z = -0.5 * velocity * velocity;
        }

        double flow = 24e6 / (1000 * 9.81 * (100 + z)), v = flow / 12;
        double thoma = 4000 * 12 / (2 * 9.81 * 0.5 * (100 + z));
        double frequency = Math.Sqrt(9.81 / (4000 * thoma) * (12 - 2 * 0.5 * v * flow / (100 + z)));
        BranchResult branch = tank.Follow(model => model.TankArea, from: 200, to: 20);
        SpecialPoint hopf = Assert.Single(branch.SpecialPoints);
        Assert.Equal(SpecialPointKind.HopfPoint, hopf.Kind);
        Near(thoma, hopf.Parameter, 1e-11);
        Near(frequency, hopf.Frequency!.Value, 1e-11);
        Assert.Equal((0, 2), hopf.UnstableCounts);
    }

    [Fact]
    public void A_branch_continues_with_another_slope_across_a_corner_of_the_rates()
    {
        BranchResult branch = new Corner().Follow(form => form.P, from: 2, to: -1);
        SpecialPoint contact = Assert.Single(branch.SpecialPoints);
        Assert.Equal(SpecialPointKind.SurfaceContact, contact.Kind);
        Near(0, contact.Parameter);
        Assert.Equal(BranchEnd.TargetReached, branch.End);
        Near(-0.5, branch.Points[^1].State[0]);
        Assert.False(contact.ChangesStability);
    }

    [Fact]
    public void Two_rests_that_meet_at_a_corner_are_one_branch_that_turns_back()
    {
        BranchResult branch = new CornerFold().Follow(form => form.P, from: -1, to: 1);
        SpecialPoint contact = Assert.Single(branch.SpecialPoints);
        Assert.Equal(SpecialPointKind.SurfaceContact, contact.Kind);
        Near(0, contact.Parameter);
        Assert.Equal((0, 1), contact.UnstableCounts);
        Assert.Equal(BranchEnd.StartValueReached, branch.End);
        Near(1, branch.Points[^1].State[0]);
    }

    [Fact]
    public void A_branch_ends_where_the_rates_jump_and_says_so()
    {
        BranchResult branch = new Jump().Follow(form => form.P, from: 0, to: 1.5);
        Assert.Equal(BranchEnd.SurfaceReached, branch.End);
        Near(0.7, branch.Points[^1].Parameter);
        Assert.Contains("X >= 0.7", branch.EndText, StringComparison.Ordinal);
    }

    [Fact]
    public void A_branch_ends_before_rates_that_are_not_numbers()
    {
        BranchResult branch = new SquareRootEnd().Follow(form => form.P, from: 1, to: -1);
        Assert.Equal(BranchEnd.NotFinite, branch.End);
        Assert.True(branch.Points[^1].Parameter is >= 0 and <= 1e-3);
    }

    [Fact]
    public void A_branch_ends_exactly_at_a_state_bound()
    {
        BranchResult branch = new Corner().Follow(form => form.P, from: 2, to: 8);
        Assert.Equal(BranchEnd.StateBoundReached, branch.End);
        Near(5, branch.Points[^1].State[0], 1e-14);
        Near(5, branch.Points[^1].Parameter, 1e-14);
    }

    [Fact]
    public void An_undamped_machine_keeps_its_centre_without_false_Hopf_points()
    {
        BranchResult branch = new Machine { Damping = 0 }.Follow(machine => machine.Inertia, from: 0.05, to: 1);
        Assert.Empty(branch.SpecialPoints);
        Assert.All(branch.Points, point => Assert.Equal(0, point.UnstableCount));
        Assert.All(branch.Points, point => Assert.False(point.IsStable));
    }

    [Fact]
    public void Every_point_of_a_branch_is_an_equilibrium_with_its_own_eigenvalues()
    {
        BranchResult branch = new Brusselator().Follow(model => model.B, from: 0.5, to: 4);
        foreach (FollowedEquilibrium point in branch.Points)
        {
            Near(1.3, point.State[0], 1e-12);
            Near(point.Parameter / 1.3, point.State[1], 1e-12);
            Near(point.Parameter - 1 - 1.69, point.Eigenvalues.Sum(static value => value.Real), 1e-9);
            Near(1.69, (point.Eigenvalues[0] * point.Eigenvalues[1]).Real, 1e-9);
        }
    }

    [Fact]
    public void Asking_for_something_that_is_no_parameter_is_refused_with_the_names()
    {
        var tank = new SurgeTankModel();
        ArgumentException state = Assert.Throws<ArgumentException>(() => tank.Follow(model => model.Level, from: 1, to: 2));
        Assert.Contains("TankArea", state.Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentException>(() => tank.Follow(model => 2 * model.TankArea, from: 1, to: 2));
        Assert.Throws<ArgumentException>(() => tank.Follow(_ => 60, from: 1, to: 2));
    }

    [Fact]
    public void Values_and_options_without_meaning_are_refused()
    {
        var model = new Hysteresis();
        Assert.Throws<ArgumentOutOfRangeException>(() => model.Follow(form => form.P, from: 1, to: 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => model.Follow(form => form.P, from: double.NaN, to: 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => model.Follow(form => form.P, from: 0, to: double.PositiveInfinity));
        Assert.Throws<ArgumentOutOfRangeException>(() => model.Follow(form => form.P, from: 0, to: 1, new BranchOptions { MaximumStep = 0 }));
        Assert.Throws<ArgumentException>(() => model.Follow(form => form.P, from: 0, to: 1, new BranchOptions { Start = [1, 2] }));
        Assert.Throws<InvalidOperationException>(() => new Driven().Follow(form => form.P, from: 1, to: 2));
    }

    [Fact]
    public void No_equilibrium_at_the_start_value_is_said_with_what_was_searched()
    {
        InvalidOperationException none = Assert.Throws<InvalidOperationException>(() => new FoldForm().Follow(form => form.P, from: 1, to: 2));
        Assert.Contains("P = 1", none.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void The_limit_of_points_ends_a_branch()
    {
        BranchResult branch = new Hysteresis().Follow(form => form.P, from: -3, to: 3, new BranchOptions { MaximumPoints = 5 });
        Assert.Equal(BranchEnd.PointLimit, branch.End);
        Assert.Equal(5, branch.Points.Count);
    }

    [Fact]
    public void Following_stops_when_cancelled()
    {
        using var source = new CancellationTokenSource();
        source.Cancel();
        Assert.ThrowsAny<OperationCanceledException>(() => new Hysteresis().Follow(form => form.P, from: -3, to: 3, cancellationToken: source.Token));
    }
}
