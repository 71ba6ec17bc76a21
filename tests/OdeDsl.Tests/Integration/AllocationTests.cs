using OdeDsl.Integration;
using OdeDsl.Modeling;
using OdeDsl.Tests.Problems;
using Xunit;

namespace OdeDsl.Tests.Integration;

public class AllocationTests
{
    [Theory]
    [MemberData(nameof(TestMethods.AllWithMultistep), MemberType = typeof(TestMethods))]
    public void Steps_allocate_nothing(IntegrationMethod method)
    {
        AssertNothing(DynamicSystem.Of(new Lorenz63()), method, tangentCount: 0, until: 20);
        IntegrationMethod stiff = TestMethods.Explicit.Contains(method) ? IntegrationMethod.Automatic : method;
        AssertNothing(DynamicSystem.Of(new VanDerPol { Mu = 1000 }), stiff, 0, 2000);
        AssertNothing(DynamicSystem.Of(new Pollution()), stiff, 0, 60);
        AssertNothing(DynamicSystem.Of(new VanDerPol()), method, tangentCount: 2, until: 20);
        AssertNothing(DynamicSystem.Of(new BouncingRelay()), method, tangentCount: 2, until: 50);
        AssertNothing(DynamicSystem.Of(new BeltBlock()), method, tangentCount: 0, until: 50);
    }

    [Fact]
    public void A_flow_that_was_used_before_allocates_nothing()
    {
        DynamicSystem system = DynamicSystem.Of(new VanDerPol());
        var flow = new Flow(system);
        var section = new Section([1, 0], 0, 1);
        double[] state = [2, 0], tangents = [1, 0, 0, 1];
        double time = 0;
        flow.AdvanceToSection(state, tangents, 2, ref time, 100, section);
        long before = GC.GetAllocatedBytesForCurrentThread();
        flow.AdvanceToSection(state, tangents, 2, ref time, 100, section);
        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
    }

    // The first run compiles the code and makes both methods; the second is measured.
    private static void AssertNothing(DynamicSystem system, IntegrationMethod method, int tangentCount, double until)
    {
        var motion = new Motion(system, new FlowOptions { Method = method, RelativeTolerance = 1e-6 }, tangentCount);
        var position = new double[system.StateCount * (1 + tangentCount)];
        position.AsSpan().Fill(0.5);
        system.InitialState.CopyTo(position);
        Run();
        long before = GC.GetAllocatedBytesForCurrentThread();
        long steps = Run();
        long allocated = GC.GetAllocatedBytesForCurrentThread() - before;
        Assert.True(steps > 10);
        Assert.Equal(0, allocated);

        long Run()
        {
            long count = 0;
            motion.Begin(0, position);
            while (motion.Time != until)
            {
                if (motion.Step(until) != StepStatus.Accepted) return -1;
                count++;
            }

            return count;
        }
    }
}
