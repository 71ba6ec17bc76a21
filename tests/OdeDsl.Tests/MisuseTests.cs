using OdeDsl.Branches;
using OdeDsl.Integration;
using OdeDsl.Tests.Problems;
using Xunit;

namespace OdeDsl.Tests;

/// <summary>Slips of the caller that would otherwise give an answer to another question.</summary>
public sealed class MisuseTests
{
    [Fact]
    public void A_series_is_named_by_a_member_and_not_by_a_computation()
    {
        var model = new VanDerPol();
        Trajectory run = model.Simulate(until: 1);
        Assert.Equal("X", run[model.X].Name);
        Assert.Throws<ArgumentException>(() => run[2 * model.X]);
        Assert.Throws<ArgumentException>(() => run[model.V * model.X]);
        Assert.Throws<ArgumentException>(() => run[-model.X]);
        Assert.Throws<ArgumentNullException>(() => run[(string)null!]);
    }

    [Fact]
    public void A_tolerance_that_permits_errors_as_large_as_the_state_is_refused() =>
        Assert.Throws<ArgumentOutOfRangeException>(() => new VanDerPol().Simulate(until: 1, new SimulationOptions { RelativeTolerance = 1 }));

    [Fact]
    public void A_selector_that_chooses_between_parameters_is_refused()
    {
        var model = new Chooser();
        Assert.Throws<ArgumentException>(() => model.Follow(m => m.Area > 50 ? m.Length : m.Area, from: 60, to: 200));
        Assert.Throws<ArgumentException>(() => model.Follow(m => m.Length > 100 ? m.Length : m.Area, from: 60, to: 200));
        Assert.Throws<ArgumentException>(() => model.Follow(m => Math.Min(m.Length, m.Area), from: 60, to: 200));
        Assert.Equal("Area", model.Follow(m => m.Area, from: 60, to: 200).Parameter.Name);
    }

    [Fact]
    public void Following_a_model_that_only_rests_by_sliding_says_so()
    {
        var refused = Assert.Throws<InvalidOperationException>(() => new SlidingRest().Follow(m => m.Push, from: 2, to: 0.7));
        Assert.Contains("slide", refused.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Results_print_as_a_few_readable_lines()
    {
        var model = new Chooser();
        string branch = model.Follow(m => m.Area, from: 60, to: 200).ToString();
        Assert.Contains("along Area", branch, StringComparison.Ordinal);
        Assert.StartsWith("X: 1 to ", model.Simulate(until: 5)["X"].ToString(), StringComparison.Ordinal);
    }
}

[OdeModel]
internal sealed partial class Chooser
{
    [State(Initial = 1, Lower = 0, Upper = 1000)] public partial double X { get; set; }

    [Parameter(60, Lower = 1, Upper = 300)] public partial double Area { get; set; }
    [Parameter(400, Lower = 1, Upper = 900)] public partial double Length { get; set; }

    [Rate(nameof(X))] private double XRate => Area + Length - X;
}

[OdeModel]
internal sealed partial class SlidingRest
{
    [State(Initial = 1, Lower = -3, Upper = 3)] public partial double X { get; set; }
    [State(Initial = 1, Lower = -3, Upper = 3)] public partial double Y { get; set; }

    [Parameter(2, Lower = 0.6, Upper = 5)] public partial double Push { get; set; }

    [Rate(nameof(X))] private double XRate => -Push * Math.Sign(X) + 0.5;
    [Rate(nameof(Y))] private double YRate => -Y + X + (X > 0 ? 1 : -1);
}
