using OdeDsl.Modeling;

namespace OdeDsl.Tests.Integration;

/// <summary>
/// Equations written by hand for a test, without conditions: a system states its description and rates, and gets a Jacobian by central
/// differences. No observables.
/// </summary>
internal interface IHandWritten<TSelf> : IOdeSystem
    where TSelf : struct, IHandWritten<TSelf>
{
    static abstract void F(double time, ReadOnlySpan<double> x, ReadOnlySpan<double> p, Span<double> dx);

    static ModelDescription Describe(string name, params double[] initial) => Describe(name, initial, []);

    static ModelDescription Describe(string name, double[] initial, double[] parameters) => new()
    {
        Name = name,
        States = [.. initial.Select((value, i) =>
            new StateDescription("X" + i, "", value, double.NegativeInfinity, double.PositiveInfinity, null, ""))],
        Parameters = [.. parameters.Select((value, i) =>
            new ParameterDescription("P" + i, "", value, double.NegativeInfinity, double.PositiveInfinity))],
        StateSparsity = Dense(initial.Length, initial.Length),
        ParameterSparsity = Dense(initial.Length, parameters.Length),
        DependsOnTime = true,
    };

    static SparsityPattern Dense(int rows, int columns) => new(
        rows,
        columns,
        [.. Enumerable.Range(0, rows + 1).Select(row => row * columns)],
        [.. Enumerable.Range(0, rows * columns).Select(entry => entry % columns)]);

    static void IOdeSystem.Rates(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, Span<double> rates) =>
        TSelf.F(time, state, parameters, rates);

    static void IOdeSystem.Rates(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> rates) =>
        TSelf.F(time, state, parameters, rates);

    static void IOdeSystem.StateJacobian(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> jacobian)
    {
        int n = TSelf.Description.States.Length;
        double[] x = state.ToArray(), plus = new double[n], minus = new double[n];
        for (int j = 0; j < n; j++)
        {
            double h = 1e-6 * Math.Max(1, Math.Abs(x[j]));
            x[j] = state[j] + h;
            TSelf.F(time, x, parameters, plus);
            x[j] = state[j] - h;
            TSelf.F(time, x, parameters, minus);
            x[j] = state[j];
            for (int i = 0; i < n; i++) jacobian[i * n + j] = (plus[i] - minus[i]) / (2 * h);
        }
    }

    static void IOdeSystem.StateJacobianValues(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> values) =>
        TSelf.StateJacobian(time, state, parameters, regime, values);

    static void IOdeSystem.ParameterJacobian(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> jacobian)
    {
    }

    static void IOdeSystem.ParameterJacobianValues(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> values)
    {
    }

    static void IOdeSystem.TimeDerivative(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> derivative)
    {
        int n = TSelf.Description.States.Length;
        double h = 1e-6 * Math.Max(1, Math.Abs(time));
        var earlier = new double[n];
        TSelf.F(time + h, state, parameters, derivative);
        TSelf.F(time - h, state, parameters, earlier);
        for (int i = 0; i < n; i++) derivative[i] = (derivative[i] - earlier[i]) / (2 * h);
    }

    static void IOdeSystem.JacobianVectorProduct(
        double time,
        ReadOnlySpan<double> state,
        ReadOnlySpan<double> parameters,
        ReadOnlySpan<double> regime,
        ReadOnlySpan<double> direction,
        Span<double> product)
    {
        int n = TSelf.Description.States.Length;
        var jacobian = new double[n * n];
        TSelf.StateJacobian(time, state[..n], parameters, regime, jacobian);
        for (int i = 0; i < n; i++)
        {
            product[i] = 0;
            for (int j = 0; j < n; j++) product[i] += jacobian[i * n + j] * direction[j];
        }
    }

    static void IOdeSystem.Observables(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, Span<double> values)
    {
    }

    static void IOdeSystem.SwitchingFunctions(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> values)
    {
    }

    static void IOdeSystem.SwitchingJacobian(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> jacobian)
    {
    }

    static void IOdeSystem.SwitchingTimeDerivative(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> derivative)
    {
    }

    static void IOdeSystem.Regime(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, Span<double> regime)
    {
    }
}
