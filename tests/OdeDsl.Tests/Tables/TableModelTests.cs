using OdeDsl;
using OdeDsl.Integration;
using OdeDsl.Modeling;
using Xunit;

namespace OdeDsl.Tests.Tables;

public sealed class TableModelTests
{
    private static readonly SimulationOptions Tight = new() { RelativeTolerance = 1e-10 };

    [Fact]
    public void Steps_end_at_the_knots_of_a_course_and_the_inflow_is_the_area_under_it()
    {
        Trajectory run = new Reservoir().Simulate(until: 10);
        Assert.Equal([2, 3, 7, 8], run.Crossings.Select(static crossing => crossing.Time));
        Assert.Equal([1, 2, 3, 4], run.Crossings.Select(static crossing => crossing.To));
        // Trapezia: 4 + 3 + 6 + 2, then 2 times 4.
        Assert.Equal(23, run.FinalState[0], 1e-13);
        Assert.Equal(4, run.At(2)[0], 1e-13);
        Assert.Equal("Course.At(time)", run.System.Description.Switches[0].Text);
        TableDescription table = Assert.Single(run.System.Description.Tables);
        Assert.Equal(("Course", "m3/s", "s"), (table.Name, table.Unit, table.ArgumentUnit));
    }

    [Theory]
    [InlineData(IntegrationMethod.DormandPrince54)]
    [InlineData(IntegrationMethod.RadauIIA5)]
    public void A_motion_along_straight_pieces_follows_their_exponentials(IntegrationMethod method)
    {
        Trajectory run = new Sliding().Simulate(until: 4, Tight with { Method = method });
        // Above 1: X' = -(2 X - 1), so X - 1/2 = 5/2 exp(-2 t) reaches 1/2 at ln(5)/2. Below: X' = -(X + 1)/2, so X + 1 = 2 exp(-s/2) reaches 1 after 2 ln 2.
        double first = Math.Log(5) / 2, second = first + 2 * Math.Log(2);
        Assert.Equal(2, run.Crossings.Count);
        // A hundred times the tolerance of a step: errors of many steps add up.
        Assert.Equal(first, run.Crossings[0].Time, 1e-8);
        Assert.Equal(second, run.Crossings[1].Time, 1e-8);
        Assert.Equal(0.5 + 2.5 * Math.Exp(-1), run.At(0.5)[0], 1e-8);
        Assert.Equal(-1 + 2 * Math.Exp(-(4 - first) / 2), run.FinalState[0], 1e-8);
        Assert.Equal(0.5 + 0.5 * run.FinalState[0], run["Reading"].At(4), 1e-12);
    }

    [Fact]
    public void Tangents_pass_knots_without_a_jump()
    {
        Flow flow = new(DynamicSystem.Of(new Sliding()));
        double[] state = [3], tangent = [1];
        flow.Advance(state, tangent, 1, 0, 2);
        // The rate is continuous: the tangent of an autonomous scalar motion is the ratio of the rates.
        Assert.Equal((0.5 + 0.5 * state[0]) / 5, tangent[0], 1e-8);
    }

    [Fact]
    public void A_run_that_leaves_a_table_without_extrapolation_ends_at_the_last_knot_and_says_so()
    {
        IntegrationException failure = Assert.Throws<IntegrationException>(() => new Leaving().Simulate(until: 100));
        Assert.Equal(IntegrationFailure.OutsideTable, failure.Reason);
        Assert.Contains("Curve.At(X)", failure.Message, StringComparison.Ordinal);
        Assert.Equal(2, failure.State[0], 1e-9);

        // Read only inside its knots, the table does no harm: from 1.5 on the speed is 1.
        Trajectory guarded = new Leaving { Guarded = 1 }.Simulate(until: 100);
        int condition = guarded.System.Description.Switches.Index().Single(static item => item.Item.Text == "X > 1.5").Index;
        double arrival = guarded.Crossings.Single(crossing => crossing.Switch == condition).Time;
        Assert.Equal(1.5 + 100 - arrival, guarded.FinalState[0], 1e-4);
    }
}
