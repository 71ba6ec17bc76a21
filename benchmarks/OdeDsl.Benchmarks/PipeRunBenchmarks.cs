using BenchmarkDotNet.Attributes;
using OdeDsl.Modeling;
using Tarnwater;

namespace OdeDsl.Benchmarks;

/// <summary>The rates of the buried pipe: the generated loop against one written by hand, and the Jacobian's entries.</summary>
public class PipeRunBenchmarks
{
    private double[] state = [], parameters = [], rates = [], values = [];

    [Params(1_000, 100_000)]
    public int Cells { get; set; }

    [GlobalSetup]
    public void Setup()
    {
        DynamicSystem system = DynamicSystem.Of(new PipeRun { Cells = Cells });
        parameters = system.Parameters.ToArray();
        state = [.. Enumerable.Range(0, Cells).Select(static i => 40 + 30 * Math.Sin(0.1 * i))];
        rates = new double[Cells];
        values = new double[system.Description.StateSparsity.EntryCount];
    }

    [Benchmark(Baseline = true)]
    public void ByHand()
    {
        double[] t = state, dt = rates;
        int n = t.Length;
        double length = parameters[1], v = parameters[2], d = parameters[3], k = parameters[4], inlet = parameters[5], ground = parameters[6];
        double dx = length / n;
        dt[0] = (v * inlet - d * (t[0] - inlet) / (dx / 2) - (v * (t[0] + t[1]) / 2 - d * (t[1] - t[0]) / dx)) / dx - k * (t[0] - ground);
        for (int i = 1; i < n - 1; i++)
        {
            dt[i] = (v * (t[i - 1] + t[i]) / 2 - d * (t[i] - t[i - 1]) / dx - (v * (t[i] + t[i + 1]) / 2 - d * (t[i + 1] - t[i]) / dx)) / dx
                - k * (t[i] - ground);
        }

        dt[n - 1] = (v * (t[n - 2] + t[n - 1]) / 2 - d * (t[n - 1] - t[n - 2]) / dx - v * t[n - 1]) / dx - k * (t[n - 1] - ground);
    }

    [Benchmark]
    public void Generated() => PipeRun.Equations.Rates(0, state, parameters, rates);

    [Benchmark]
    public void JacobianValues() => PipeRun.Equations.StateJacobianValues(0, state, parameters, [], values);
}
