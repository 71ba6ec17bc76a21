using OdeDsl.Integration;
using OdeDsl.Modeling;
using OdeDsl.Tests.Cycles;
using Xunit;

namespace OdeDsl.Tests.Integration;

public class FlowStepLimitTests
{
    [Fact]
    public void The_permitted_steps_of_a_flow_count_anew_for_each_run()
    {
        var flow = new Flow(DynamicSystem.Of(new Brusselator()), new FlowOptions { MaximumSteps = 1000 });
        double[] state = [1.5, 3];
        while (flow.AcceptedSteps < 3000) flow.Advance(state, 0, 2);
        IntegrationException stopped = Assert.Throws<IntegrationException>(() => flow.Advance(state, 0, 1e4));
        Assert.Equal(IntegrationFailure.TooManySteps, stopped.Reason);
    }
}
