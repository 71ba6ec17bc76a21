using OdeDsl.Integration;
using Xunit;

namespace OdeDsl.Tests.Events;

/// <summary>Inputs, modes and events beside submodels.</summary>
public sealed class ComposedTests
{
    [Theory]
    [InlineData(IntegrationMethod.DormandPrince54)]
    [InlineData(IntegrationMethod.RadauIIA5)]
    [InlineData(IntegrationMethod.Rodas4)]
    public void A_model_with_a_part_runs_through_its_events_like_the_model_in_one_piece_bit_for_bit(IntegrationMethod method)
    {
        var options = new SimulationOptions { Method = method, RelativeTolerance = 1e-8 };
        var sun = Signal.Steps([0, 6, 11], [0.5, 1.5, 0.25]);
        Trajectory composed = new House().WithInput(nameof(House.Sun), sun).Simulate(20, options);
        Trajectory single = new HouseInOnePiece().WithInput(nameof(House.Sun), sun).Simulate(20, options);
        Assert.True(single.Events.Count > 4);
        Assert.Equal(single.Events.Select(static item => item.Time), composed.Events.Select(static item => item.Time));
        Assert.Equal(single.Times.ToArray(), composed.Times.ToArray());
        Assert.Equal(single.FinalState, composed.FinalState);
        Assert.Equal(["Temperature", "Wall.Warmth"], composed.System.Description.States.Select(static state => state.Name));
        Assert.Equal(["Power", "Wall.Lag"], composed.System.Description.Parameters.Select(static parameter => parameter.Name));
    }
}
