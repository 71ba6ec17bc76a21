using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Tests.Emitted;

public sealed class BoundedRootTests
{
    /// <summary>Outflow of an empty tank: the root's slope is infinite where the bound holds it at zero, and yet nothing changes there.</summary>
    [Fact]
    public void A_root_of_a_quantity_held_at_zero_has_the_derivative_zero_there()
    {
        ModelBuilder model = new();
        ExpressionGraph g = model.Graph;
        int x = model.State("X");
        model.Rate(x, g.Unary(Operator.Negate, g.Unary(Operator.Sqrt, g.Binary(Operator.Max, x, g.Constant(0.0)))));
        IEmittedCalls calls = EmittedModel.Of(model.Build()).Calls;
        Assert.Equal(0.0, calls.StateJacobian(0, [-4.0], [], calls.Regime(0, [-4.0], []))[0]);
        Assert.Equal(-0.25, calls.StateJacobian(0, [4.0], [], calls.Regime(0, [4.0], []))[0], 15);
    }
}
