using BenchmarkDotNet.Attributes;
using OdeDsl.Modeling;
using OdeDsl.Tests.Problems;

namespace OdeDsl.Benchmarks;

/// <summary>One evaluation of emitted equations: rates, the analytic Jacobian, and the Jacobian by forward differences of the rates.</summary>
[MemoryDiagnoser]
[GenericTypeArguments(typeof(Lorenz63.Equations))]
[GenericTypeArguments(typeof(Hires.Equations))]
[GenericTypeArguments(typeof(Pollution.Equations))]
public class EquationBenchmarks<TSystem>
    where TSystem : struct, IOdeSystem
{
    private static readonly int Count = TSystem.Description.States.Length;

    private readonly double[] state = [.. TSystem.Description.States.Select(static state => state.Initial)];
    private readonly double[] parameters = [.. TSystem.Description.Parameters.Select(static parameter => parameter.Default)];
    private readonly double[] regime = new double[TSystem.Description.Switches.Length];
    private readonly double[] rates = new double[Count];
    private readonly double[] displaced = new double[Count];
    private readonly double[] jacobian = new double[Count * Count];

    [Benchmark]
    public void Rates() => TSystem.Rates(0, state, parameters, regime, rates);

    [Benchmark]
    public void Jacobian() => TSystem.StateJacobian(0, state, parameters, regime, jacobian);

    [Benchmark]
    public void JacobianByDifferences()
    {
        TSystem.Rates(0, state, parameters, regime, rates);
        for (int j = 0; j < Count; j++)
        {
            double value = state[j], step = 1.5e-8 * Math.Max(1, Math.Abs(value));
            state[j] = value + step;
            TSystem.Rates(0, state, parameters, regime, displaced);
            for (int i = 0; i < Count; i++) jacobian[i * Count + j] = (displaced[i] - rates[i]) / step;
            state[j] = value;
        }
    }
}
