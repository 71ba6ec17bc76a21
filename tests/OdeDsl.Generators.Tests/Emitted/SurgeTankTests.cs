using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Tests.Emitted;

public sealed class SurgeTankTests
{
    [Fact]
    public void Rates_and_derivatives_of_a_surge_tank_are_those_of_the_handbook_equations()
    {
        ModelBuilder b = new() { Name = "SurgeTank" };
        int level = b.State("Level", -2.0), velocity = b.State("Velocity", 2.2), area = b.Parameter("TankArea", 60), loss = b.Parameter("Loss", 0.5);
        ExpressionGraph g = b.Graph;
        int flow = g.Binary(Operator.Divide, g.Constant(3.0), g.Binary(Operator.Add, g.Constant(40.0), level));
        b.Rate(level, g.Binary(Operator.Divide, g.Binary(Operator.Subtract, velocity, flow), area), "(Velocity - Flow) / TankArea");
        int friction = g.Binary(Operator.Multiply, g.Binary(Operator.Multiply, loss, velocity), g.Unary(Operator.Abs, velocity));
        b.Rate(velocity, g.Unary(Operator.Negate, g.Binary(Operator.Add, level, friction)), "-(Level + Loss * Velocity * Math.Abs(Velocity))");
        EmittedModel emitted = EmittedModel.Of(b.Build());
        double z = -1.5, v = -0.7, a = 55, k = 0.4;
        double[] regime = emitted.Calls.Regime(0, [z, v], [a, k]);
        Assert.Equal([0.0], regime);
        Assert.Equal([(v - 3 / (40 + z)) / a, -(z + k * v * Math.Abs(v))], emitted.Calls.Rates(0, [z, v], [a, k]));
        Assert.Equal(emitted.Calls.Rates(0, [z, v], [a, k]), emitted.Calls.Rates(0, [z, v], [a, k], regime));
        double[] jacobian = emitted.Calls.StateJacobian(0, [z, v], [a, k], regime);
        Assert.Equal(3 / (40 + z) / (40 + z) / a, jacobian[0], 1e-15);
        Assert.Equal(1 / a, jacobian[1], 1e-15);
        Assert.Equal(-1, jacobian[2], 1e-15);
        Assert.Equal(2 * k * v, jacobian[3], 1e-15);
    }
}
