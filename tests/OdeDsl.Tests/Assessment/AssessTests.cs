using OdeDsl.Assessment;
using OdeDsl.Cycles;
using OdeDsl.Equilibria;
using OdeDsl.Integration;
using OdeDsl.Tests.Branches;
using Xunit;

namespace OdeDsl.Tests.Assessment;

public class AssessTests
{
    /// <summary>Enough to answer, without timings.</summary>
    private static readonly AssessmentOptions Quick = new() { SampledStarts = 16, TimingRuns = 0, Tolerances = [1e-4, 1e-6] };

    private static ParameterMargin MarginOf(ModelAssessment assessment, string parameter) =>
        assessment.Margins.Parameters.Single(margin => margin.Parameter.Name == parameter);

    private static void Near(double expected, double? actual, double tolerance) =>
        Assert.True(Math.Abs(actual!.Value - expected) <= tolerance, $"expected {expected:R}, got {actual:R}");

    [Fact]
    public void A_surge_tank_above_its_Thoma_area_settles_and_its_margin_is_that_area()
    {
        ModelAssessment view = new SurgeTankModel().Assess(Quick);
        Equilibrium rest = view.Rests.Equilibria.Single(static equilibrium => equilibrium.IsStable);
        Assert.Equal(MotionKind.Settles, view.Motions.Working.Kind);
        Assert.Equal(rest, view.Rests.Equilibria[view.Motions.Working.Index!.Value]);
        Assert.DoesNotContain(view.Motions.Cycles, static cycle => cycle.IsStable);
        // Thoma 1910: A = f L / (2 g c H) with the net head H at this rest; derived for this model in FollowTests.
        double thoma = 12.0 * 4000 / (2 * 9.81 * 0.5 * (100 + rest.State[0]));
        MarginEdge down = MarginOf(view, "TankArea").Down;
        Assert.Equal(MarginEvent.HopfPoint, down.Event);
        Near(thoma, down.Value, 1e-9 * thoma);
        Near(100 * (thoma - 60) / 60, down.Percent, 1e-7);
        Assert.True(down.Frequency > 0);
        Assert.Equal(MarginEvent.None, MarginOf(view, "TankArea").Up.Event);
        Assert.Equal(view.Margins.Parameters.Min(static margin => margin.NearestPercent), view.Margins.Narrowest!.NearestPercent);
    }

    [Fact]
    public void A_self_sustained_oscillator_oscillates_from_every_start_until_its_drive_is_zero()
    {
        ModelAssessment view = new VanDerPol().Assess(Quick);
        Assert.Equal(MotionKind.Oscillates, view.Motions.Working.Kind);
        // Period at μ = 1: 6.66328686 (e.g. D. Viswanath 2003; from memory).
        Near(6.66328686, view.Motions.Cycles[view.Motions.Working.Index!.Value].Period, 1e-8);
        Outcome all = Assert.Single(view.Motions.Outcomes);
        Assert.Equal(1, all.Share);
        MarginEdge down = MarginOf(view, "Mu").Down;
        Assert.Equal(MarginEvent.HopfPoint, down.Event);
        Near(0, down.Value, 1e-12);
        Near(1, down.Frequency, 1e-12);
    }

    [Fact]
    public void Two_species_move_on_a_family_of_closed_orbits_and_no_limit_cycle_is_claimed()
    {
        ModelAssessment view = new LotkaVolterra().Assess(Quick);
        Assert.Equal(MotionKind.ClosedOrbits, view.Motions.Working.Kind);
        Assert.Empty(view.Motions.Cycles);
        OrbitFamily family = Assert.Single(view.Motions.Families);
        Assert.True(family.SecondMultiplierError <= 1e-6);
        Assert.All(view.Motions.Outcomes, static outcome => Assert.Equal(MotionKind.ClosedOrbits, outcome.Kind));
    }

    [Fact]
    public void An_undamped_machine_has_no_limit_cycle_and_stands_on_the_edge_of_its_damping()
    {
        ModelAssessment view = new Machine { Damping = 0, Power = 0 }.Assess(Quick);
        Assert.Equal(MotionKind.ClosedOrbits, view.Motions.Working.Kind);
        Assert.Empty(view.Motions.Cycles);
        Assert.NotEmpty(view.Motions.Families);
        ParameterMargin damping = MarginOf(view, "Damping");
        Assert.Equal(0, damping.Up.Distance);
        Assert.Equal(0, damping.NearestPercent);
        // Small swings: ω = √(Pmax/M) (P. Kundur, Power System Stability and Control, section 12.1; from memory).
        Near(Math.Sqrt(1.2 / 0.1), damping.Up.Frequency, 1e-9);
    }

    [Fact]
    public void Lorenz_motion_is_irregular_with_its_exponent_and_no_cycle_is_invented()
    {
        ModelAssessment view = new Lorenz().Assess(Quick);
        Assert.Equal(MotionKind.Irregular, view.Motions.Working.Kind);
        Assert.DoesNotContain(view.Motions.Cycles, static cycle => cycle.IsStable);
        Assert.DoesNotContain(view.Rests.Equilibria, static rest => rest.IsStable);
        // 0.9056: J. C. Sprott 2003 (from memory). The interval is a 95 % one: twice its width fails once in some ten thousand.
        Assert.True(Math.Abs(view.Motions.Working.Exponent!.Value.Value - 0.9056) <= 2 * view.Motions.Working.Exponent!.Value.Uncertainty);
        Outcome all = Assert.Single(view.Motions.Outcomes);
        Assert.Equal(MotionKind.Irregular, all.Kind);
        MarginEdge down = MarginOf(view, "Rho").Down;
        Assert.Equal(MarginEvent.HopfPoint, down.Event);
        Near(10 * (10 + 8.0 / 3 + 3) / (10 - 8.0 / 3 - 1), down.Value, 1e-9);
    }

    [Fact]
    public void A_quantity_that_leaves_to_infinity_runs_away()
    {
        ModelAssessment view = new Runaway().Assess(Quick);
        Assert.Equal(MotionKind.RunsAway, view.Motions.Working.Kind);
        Assert.Empty(view.Rests.Equilibria);
        Assert.Equal(MotionKind.RunsAway, Assert.Single(view.Motions.Outcomes).Kind);
        // x = 1/(1 - t): the methods are compared before the end at t = 1.
        Assert.InRange(view.Method.Duration, 0.5, 1);
    }

    [Fact]
    public void The_shares_of_two_basins_agree_with_their_areas()
    {
        // The border x = 1/2 leaves 5/8 of the bounds to x = -1.
        ModelAssessment view = new Bistable().Assess(Quick with { SampledStarts = 200 });
        Assert.Equal(2, view.Motions.Outcomes.Count);
        Outcome left = view.Motions.Outcomes[0];
        Assert.Equal(MotionKind.Settles, left.Kind);
        Near(-1, view.Rests.Equilibria[left.Index!.Value].State[0], 1e-12);
        Assert.InRange(0.625, left.ShareLower, left.ShareUpper);
        Near(0.625, left.Share, 0.02);
        Near(1, view.Motions.Outcomes.Sum(static outcome => outcome.Share), 1e-12);
    }

    [Fact]
    public void A_damped_rotor_rests_and_rotates_side_by_side()
    {
        ModelAssessment view = new Machine().Assess(Quick);
        Assert.Equal(MotionKind.Settles, view.Motions.Working.Kind);
        Assert.Contains(view.Motions.Outcomes, static outcome => outcome.Kind == MotionKind.Settles);
        Assert.Contains(view.Motions.Outcomes, static outcome => outcome.Kind == MotionKind.Rotates);
        LimitCycle turning = Assert.Single(view.Motions.Cycles);
        Assert.True(turning.IsStable);
        // Mean torque balance on the turning solution: P - D Ω = 0 on average, so the period is 2π D/P; swings add a few per mille.
        Near(Math.Tau * 0.05 / 0.5, turning.Period, 0.01);
        ParameterMargin power = MarginOf(view, "Power");
        Assert.Equal(MarginEvent.Fold, power.Up.Event);
        Near(1.2, power.Up.Value, 1e-12);
        // Where turning ends for small damping: P = (4/π) D √(Pmax/M) to first order (the retrapping current of a junction: D. E. McCumber,
        // J. Appl. Phys. 39, 1968; from memory).
        Assert.Equal(MarginEvent.CycleLost, power.Down.Event);
        double first = 4 / Math.PI * 0.05 * Math.Sqrt(1.2 / 0.1);
        Near(first, power.Down.Value, 0.01 * first);
    }

    [Fact]
    public void The_margins_of_the_Brusselator_lie_where_B_is_one_plus_A_squared()
    {
        ModelAssessment view = new Brusselator { B = 3 }.Assess(Quick);
        Assert.Equal(MotionKind.Oscillates, view.Motions.Working.Kind);
        Near(1 + 1.69, MarginOf(view, "B").Down.Value, 1e-10);
        Near(Math.Sqrt(2), MarginOf(view, "A").Up.Value, 1e-10);
        Assert.Contains("gains stability", MarginOf(view, "A").Up.Text, StringComparison.Ordinal);
    }

    [Fact]
    public void A_rest_that_appears_before_the_present_one_ends_is_the_nearer_change()
    {
        // One rest at p = -1; a second pair appears at -2/3, long before the first rest ends at +2/3.
        MarginEdge up = MarginOf(new Hysteresis { P = -1 }.Assess(Quick), "P").Up;
        Assert.Equal(MarginEvent.Fold, up.Event);
        Near(-2.0 / 3, up.Value, 1e-12);
        Assert.Contains("appears", up.Text, StringComparison.Ordinal);
    }

    [Fact]
    public void Inside_the_hysteresis_each_direction_loses_the_rest_on_its_own_side()
    {
        ModelAssessment view = new Hysteresis { P = 0.5, X = -1.4 }.Assess(Quick);
        ParameterMargin margin = MarginOf(view, "P");
        Near(2.0 / 3, margin.Up.Value, 1e-12);
        Near(-2.0 / 3, margin.Down.Value, 1e-12);
        Assert.Contains("disappear", margin.Up.Text, StringComparison.Ordinal);
        Near(100.0 / 3, margin.NearestPercent, 1e-9);
    }

    [Fact]
    public void Two_cycles_that_meet_are_the_end_of_the_stable_one()
    {
        ModelAssessment view = new TwoCycles().Assess(Quick);
        Assert.Equal(MotionKind.Oscillates, view.Motions.Working.Kind);
        Assert.Equal(2, view.Motions.Cycles.Count);
        ParameterMargin margin = MarginOf(view, "Mu");
        Assert.Equal(MarginEvent.CycleLost, margin.Down.Event);
        Near(-0.25, margin.Down.Value, 2 * margin.Down.Uncertainty);
        Assert.True(margin.Down.Uncertainty <= 1e-3);
        Assert.Equal(MarginEvent.HopfPoint, margin.Up.Event);
        Near(0, margin.Up.Value, 1e-10);
    }

    [Fact]
    public void A_cycle_that_lets_go_across_its_plane_loses_stability_where_its_multiplier_is_one()
    {
        ModelAssessment view = new SidewaysCycle().Assess(Quick);
        Assert.Equal(MotionKind.Oscillates, view.Motions.Working.Kind);
        MarginEdge up = MarginOf(view, "Mu").Up;
        Assert.Equal(MarginEvent.CycleStabilityLost, up.Event);
        Near(0, up.Value, 1e-5);
    }

    [Fact]
    public void A_stiff_model_gets_an_implicit_method_and_a_smooth_one_an_explicit_method()
    {
        MethodAnswer stiff = new StiffLag().Assess(Quick).Method;
        Assert.NotEqual(IntegrationMethod.DormandPrince54, stiff.Recommended);
        MethodAnswer smooth = new Lorenz().Assess(Quick with { SampledStarts = 0, Margins = false }).Method;
        Assert.NotEqual(IntegrationMethod.RadauIIA5, smooth.Recommended);
        foreach (MethodAnswer answer in (MethodAnswer[])[stiff, smooth])
        {
            MethodMeasurement chosen = answer.Measurements.Single(
                measurement => measurement.Method == answer.Recommended && measurement.RelativeTolerance == answer.RelativeTolerance);
            Assert.True(chosen.Error <= answer.WantedError);
            Assert.All(answer.Measurements, measurement => Assert.True(
                !(measurement.Error <= answer.WantedError) || measurement.Work >= chosen.Work));
        }
    }

    [Fact]
    public void Times_and_bytes_are_measured_on_request()
    {
        MethodAnswer method = new VanDerPol().Assess(Quick with { TimingRuns = 3, SampledStarts = 0, Margins = false }).Method;
        Assert.All(method.Measurements, static measurement => Assert.True(measurement.WallTime > TimeSpan.Zero));
        Assert.All(method.Measurements, static measurement => Assert.True(measurement.AllocatedBytes > 0));
        Assert.NotEqual("", method.TimingRemark);
        Assert.All(new VanDerPol().Assess(Quick with { SampledStarts = 0, Margins = false }).Method.Measurements, static measurement => Assert.Null(measurement.WallTime));
    }

    [Fact]
    public void A_model_driven_by_time_is_told_what_cannot_be_answered()
    {
        ModelAssessment view = new Driven().Assess(Quick);
        Assert.Contains(view.Remarks, static remark => remark.Contains("depend on time", StringComparison.Ordinal));
        Assert.Empty(view.Rests.Equilibria);
        Assert.Empty(view.Margins.Parameters);
        Assert.Equal(MotionKind.Undecided, view.Motions.Working.Kind);
        Assert.NotNull(view.Method.Recommended);
    }

    [Fact]
    public void Rates_that_are_not_numbers_at_the_own_state_are_reported()
    {
        ModelAssessment view = new SquareRootEnd { P = -1 }.Assess(Quick);
        Assert.Equal(MotionKind.Fails, view.Motions.Working.Kind);
        Assert.Contains(view.Remarks, static remark => remark.Contains("rate of X is NaN", StringComparison.Ordinal));
        Assert.Null(view.Method.Recommended);
    }

    [Fact]
    public void Rates_that_throw_are_reported()
    {
        ModelAssessment view = new Throwing().Assess(Quick);
        Assert.Equal(MotionKind.Fails, view.Motions.Working.Kind);
        Assert.Contains(view.Remarks, static remark => remark.Contains("throw", StringComparison.Ordinal));
    }

    [Fact]
    public void Progress_rises_from_nothing_to_all()
    {
        var seen = new List<AssessmentProgress>();
        new VanDerPol().Assess(Quick, new Recorder(seen));
        Assert.Equal(0, seen[0].Fraction);
        Assert.Equal(1, seen[^1].Fraction);
        Assert.All(seen.Zip(seen.Skip(1)), static pair => Assert.True(pair.Second.Fraction >= pair.First.Fraction));
        Assert.Equal(AssessmentStage.Rests, seen[0].Stage);
        Assert.Equal(AssessmentStage.Methods, seen[^1].Stage);
    }

    [Fact]
    public void A_cancelled_assessment_ends_with_the_cancellation()
    {
        using var source = new CancellationTokenSource();
        var stop = new Stopper(source, AssessmentStage.Margins);
        Assert.ThrowsAny<OperationCanceledException>(() => new VanDerPol().Assess(Quick, stop, source.Token));
        Assert.True(stop.Last < 1);
        using var early = new CancellationTokenSource();
        early.Cancel();
        Assert.ThrowsAny<OperationCanceledException>(() => new VanDerPol().Assess(Quick, null, early.Token));
    }

    [Fact]
    public void Options_without_meaning_are_refused()
    {
        var model = new VanDerPol();
        AssessmentOptions[] bad =
        [
            Quick with { SampledStarts = -1 },
            Quick with { MaximumStepsPerRun = 1 },
            Quick with { RangeFactor = 1 },
            Quick with { RangeFactor = double.NaN },
            Quick with { CycleSteps = 1 },
            Quick with { WantedError = 0 },
            Quick with { TimingRuns = -1 },
            Quick with { ExponentBatches = 1 },
            Quick with { Tolerances = [] },
            Quick with { Tolerances = [double.NaN] },
        ];
        Assert.All(bad, options => Assert.Throws<ArgumentOutOfRangeException>(() => model.Assess(options)));
    }

    private sealed class Recorder(List<AssessmentProgress> seen) : IProgress<AssessmentProgress>
    {
        public void Report(AssessmentProgress value) => seen.Add(value);
    }

    private sealed class Stopper(CancellationTokenSource source, AssessmentStage stage) : IProgress<AssessmentProgress>
    {
        public double Last { get; private set; }

        public void Report(AssessmentProgress value)
        {
            Last = value.Fraction;
            if (value.Stage == stage) source.Cancel();
        }
    }
}
