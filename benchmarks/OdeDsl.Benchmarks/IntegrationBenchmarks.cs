using BenchmarkDotNet.Attributes;
using OdeDsl.Integration;
using OdeDsl.Tests.Problems;

namespace OdeDsl.Benchmarks;

/// <summary>Whole runs at a relative tolerance of 10⁻⁶ on a flow that is reused, as an analysis reuses it.</summary>
[MemoryDiagnoser]
public class IntegrationBenchmarks
{
    private Flow flow = null!;
    private double[] state = [];
    private PublicProblem problem = null!;

    [Params("Lorenz 63", "Pleiades", "HIRES", "POLLUTION")]
    public string Problem { get; set; } = "";

    [Params(IntegrationMethod.Automatic, IntegrationMethod.RadauIIA5)]
    public IntegrationMethod Method { get; set; }

    [GlobalSetup]
    public void SetUp()
    {
        problem = PublicProblem.Nonstiff.Concat(PublicProblem.Stiff).Single(candidate => candidate.Name == Problem);
        flow = new Flow(problem.System, new FlowOptions { Method = Method, RelativeTolerance = 1e-6, AbsoluteTolerance = 1e-6 * problem.AbsolutePart });
        state = new double[problem.System.StateCount];
    }

    [Benchmark]
    public double Run()
    {
        problem.System.InitialState.CopyTo(state);
        flow.Advance(state, 0, problem.Until);
        return state[0];
    }
}
