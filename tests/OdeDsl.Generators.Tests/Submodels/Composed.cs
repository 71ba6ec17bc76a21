using OdeDsl.Generators.Tests.Emitted;

namespace OdeDsl.Generators.Tests.Submodels;

/// <summary>Compares two models whose numbers stand in the same order.</summary>
internal static class Composed
{
    public static void AssertSame(IEmittedCalls expected, IEmittedCalls actual, int seed, int points)
    {
        int n = expected.Description.States.Length, m = expected.Description.Parameters.Length;
        Assert.Equal(n, actual.Description.States.Length);
        Assert.Equal(m, actual.Description.Parameters.Length);
        Assert.Equal(expected.Description.StateSparsity.Columns.ToArray(), actual.Description.StateSparsity.Columns.ToArray());
        Assert.Equal(expected.Description.Switches.Length, actual.Description.Switches.Length);
        Random random = new(seed);
        for (int i = 0; i < points; i++)
        {
            double time = 4 * random.NextDouble() - 1;
            double[] state = [.. Enumerable.Range(0, n).Select(_ => 4 * random.NextDouble() - 1)];
            double[] parameters = [.. Enumerable.Range(0, m).Select(_ => 4 * random.NextDouble() - 1)];
            double[] regime = expected.Regime(time, state, parameters);
            Same(regime, actual.Regime(time, state, parameters));
            Same(expected.Rates(time, state, parameters), actual.Rates(time, state, parameters));
            Same(expected.Rates(time, state, parameters, regime), actual.Rates(time, state, parameters, regime));
            Same(expected.Observables(time, state, parameters), actual.Observables(time, state, parameters));
            Same(expected.StateJacobian(time, state, parameters, regime), actual.StateJacobian(time, state, parameters, regime));
            Same(expected.ParameterJacobian(time, state, parameters, regime), actual.ParameterJacobian(time, state, parameters, regime));
            Same(expected.TimeDerivative(time, state, parameters, regime), actual.TimeDerivative(time, state, parameters, regime));
            Same(expected.SwitchingFunctions(time, state, parameters, regime), actual.SwitchingFunctions(time, state, parameters, regime));
            Same(expected.SwitchingJacobian(time, state, parameters, regime), actual.SwitchingJacobian(time, state, parameters, regime));
        }
    }

    private static void Same(double[] expected, double[] actual) =>
        Assert.Equal(expected.Select(BitConverter.DoubleToInt64Bits), actual.Select(BitConverter.DoubleToInt64Bits));
}
