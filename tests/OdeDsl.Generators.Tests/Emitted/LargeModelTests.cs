using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;
using OdeDsl.Generators.Writing;

namespace OdeDsl.Generators.Tests.Emitted;

public sealed class LargeModelTests
{
    [Fact]
    public void A_model_of_200_states_is_cut_into_methods_and_stays_exact()
    {
        const int count = 200;
        ModelDefinition model = Network.Of(count);
        EmittedModel emitted = EmittedModel.Of(model);
        Assert.Contains("RatesPart2(", emitted.Source, StringComparison.Ordinal);
        Assert.Contains("stackalloc double[", emitted.Source, StringComparison.Ordinal);

        double[] state = [.. Enumerable.Range(0, count).Select(static i => 0.1 + 1.3 * Math.Abs(Math.Sin(i)))];
        double[] parameters = [.. Enumerable.Range(0, 10).Select(static i => 0.3 + 0.17 * i)];
        ExpressionGraph graph = new(model.Nodes);
        Interpreter values = new(graph, 0, state, parameters);
        double[] rates = [.. model.States.Select(s => values[s.Rate])];
        double[] regime = emitted.Calls.Regime(0, state, parameters);
        Assert.Equal(rates, emitted.Calls.Rates(0, state, parameters));
        Assert.Equal(rates, emitted.Calls.Rates(0, state, parameters, regime));
        Assert.Equal(0, emitted.Calls.AllocatedByEveryMember(0, state, parameters));

        double[] jacobian = emitted.Calls.StateJacobian(0, state, parameters, regime);
        double[] product = emitted.Calls.JacobianVectorProduct(0, state, parameters, regime, state);
        Assert.InRange(emitted.Calls.Description.StateSparsity.EntryCount, 3 * count, 4 * count); // itself, two neighbours, one far
        DualInterpreter along = new(graph, values, node => node.Operator == Operator.State ? state[node.Index] : 0);
        for (int row = 0; row < count; row++) Close(along[model.States[row].Rate], product[row]);
        for (int column = 0; column < count; column++)
        {
            DualInterpreter by = new(graph, values, node => node.Operator == Operator.State && node.Index == column ? 1 : 0);
            for (int row = 0; row < count; row++) Close(by[model.States[row].Rate], jacobian[(row * count) + column]);
        }
    }

    [Fact]
    public void Text_grows_with_the_model_and_not_faster()
    {
        int small = ModelWriter.Write(Network.Of(120), CancellationToken.None).Length;
        int large = ModelWriter.Write(Network.Of(1200), CancellationToken.None).Length;
        Assert.InRange(large, 9 * small, 11 * small);
    }

    private static void Close(Tangent expected, double actual) =>
        Assert.True(Math.Abs(actual - expected.Derivative) <= 1e-12 * expected.Scale, $"{actual:R} instead of {expected.Derivative:R}");
}
