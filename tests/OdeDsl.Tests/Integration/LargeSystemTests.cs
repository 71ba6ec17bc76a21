using System.Collections.Immutable;
using OdeDsl.Integration;
using OdeDsl.Modeling;
using Xunit;

namespace OdeDsl.Tests.Integration;

public class LargeSystemTests
{
    private interface ISize
    {
        static abstract int Count { get; }
    }

    private readonly struct Thousand : ISize
    {
        public static int Count => 1_000;
    }

    private readonly struct TenThousand : ISize
    {
        public static int Count => 10_000;
    }

    private readonly struct HundredThousand : ISize
    {
        public static int Count => 100_000;
    }

    /// <summary>
    /// Heat in a rod with ends held at zero: u' = (n + 1)² / π² (left − 2 u + right). From sin(π x) each value decays as exp(−λ t) with
    /// λ = 4 (n + 1)² / π² sin²(π / (2 (n + 1))), which is 1 to within (π / n)² / 12.
    /// </summary>
    private readonly struct Rod<TSize> : IHandWritten<Rod<TSize>>
        where TSize : struct, ISize
    {
        private static readonly int N = TSize.Count;
        private static readonly double Conductance = (N + 1.0) * (N + 1.0) / (Math.PI * Math.PI);

        public static ModelDescription Description { get; } = new()
        {
            Name = "Rod",
            States = [.. Enumerable.Range(1, N).Select(static i => new StateDescription(
                "X" + i, "", Math.Sin(Math.PI * i / (N + 1)), double.NegativeInfinity, double.PositiveInfinity, null, ""))],
            Parameters = [],
            StateSparsity = new SparsityPattern(
                N,
                N,
                [0, .. Enumerable.Range(1, N).Select(static i => Math.Min(3 * i - 1, 3 * N - 2))],
                [.. Enumerable.Range(0, N).SelectMany(static i => Enumerable.Range(i - 1, 3).Where(static j => j >= 0 && j < N))]),
            ParameterSparsity = new SparsityPattern(N, 0, [.. new int[N + 1]], []),
        };

        public static double Decay => 4 * Conductance * Math.Pow(Math.Sin(Math.PI / (2 * (N + 1.0))), 2);

        public static void F(double time, ReadOnlySpan<double> x, ReadOnlySpan<double> p, Span<double> dx)
        {
            for (int i = 0; i < N; i++)
                dx[i] = Conductance * ((i > 0 ? x[i - 1] : 0) - 2 * x[i] + (i + 1 < N ? x[i + 1] : 0));
        }

        static void IOdeSystem.StateJacobian(
            double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> jacobian) =>
            throw new NotSupportedException("The whole matrix has no room.");

        static void IOdeSystem.StateJacobianValues(
            double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> values)
        {
            int at = 0;
            for (int i = 0; i < N; i++)
            {
                if (i > 0) values[at++] = Conductance;
                values[at++] = -2 * Conductance;
                if (i + 1 < N) values[at++] = Conductance;
            }
        }

        static void IOdeSystem.JacobianVectorProduct(
            double time,
            ReadOnlySpan<double> state,
            ReadOnlySpan<double> parameters,
            ReadOnlySpan<double> regime,
            ReadOnlySpan<double> direction,
            Span<double> product) => F(time, direction, parameters, product);
    }

    [Theory]
    [InlineData(IntegrationMethod.RadauIIA5)]
    [InlineData(IntegrationMethod.Rodas4)]
    [InlineData(IntegrationMethod.BackwardDifferentiation)]
    [InlineData(IntegrationMethod.Automatic)]
    public void Memory_and_evaluations_grow_in_proportion_to_the_size_up_to_a_hundred_thousand_states(IntegrationMethod method)
    {
        (long bytesSmall, long evaluationsSmall) = Run<Thousand>(method);
        (long bytesMiddle, _) = Run<TenThousand>(method);
        (long bytesLarge, long evaluationsLarge) = Run<HundredThousand>(method);
        Assert.True(bytesMiddle <= 11 * bytesSmall, $"{bytesSmall} to {bytesMiddle} bytes");
        Assert.True(bytesLarge <= 11 * bytesMiddle, $"{bytesMiddle} to {bytesLarge} bytes");
        // The finer rod is stiffer and no harder.
        Assert.True(evaluationsLarge <= 2 * evaluationsSmall + 200, $"{evaluationsSmall} to {evaluationsLarge} evaluations");
    }

    [Fact]
    public void Tangents_of_a_large_system_need_no_whole_matrix()
    {
        DynamicSystem system = DynamicSystem.Of<Rod<TenThousand>>();
        double[] state = system.InitialState.ToArray(), tangents = [.. state];
        new Flow(system, new FlowOptions { Method = IntegrationMethod.RadauIIA5, RelativeTolerance = 1e-5 }).Advance(state, tangents, 1, 0, 1);
        double decay = Math.Exp(-Rod<TenThousand>.Decay);
        for (int i = 0; i < state.Length; i++) Assert.True(Math.Abs(tangents[i] - decay * system.InitialState[i]) <= 1e-4);
    }

    private static (long Bytes, long Evaluations) Run<TSize>(IntegrationMethod method)
        where TSize : struct, ISize
    {
        DynamicSystem system = DynamicSystem.Of<Rod<TSize>>();
        double[] state = system.InitialState.ToArray();
        long before = GC.GetAllocatedBytesForCurrentThread();
        var flow = new Flow(system, new FlowOptions { Method = method, RelativeTolerance = 1e-5 });
        flow.Advance(state, 0, 1);
        long bytes = GC.GetAllocatedBytesForCurrentThread() - before;
        double decay = Math.Exp(-Rod<TSize>.Decay);
        for (int i = 0; i < state.Length; i++) Assert.True(Math.Abs(state[i] - decay * system.InitialState[i]) <= 1e-4, $"{i}: {state[i]}");
        return (bytes, flow.RateEvaluations);
    }
}
