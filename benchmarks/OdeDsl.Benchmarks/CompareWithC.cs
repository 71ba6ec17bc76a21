using System.Diagnostics;
using System.Globalization;
using System.Runtime.InteropServices;
using OdeDsl.Modeling;
using OdeDsl.Tests.Problems;

namespace OdeDsl.Benchmarks;

/// <summary>
/// Emitted rates and Jacobians of the public problems beside the same in C, compiled by gcc -O3 -march=native when this starts: both in one
/// process, by turns, so that a busy machine slows both. Pin it to one core (taskset).
/// </summary>
internal static class CompareWithC
{
    private const int Rounds = 41;
    private const double RoundSeconds = 0.004;

    private delegate void Repeat(int problem, int calls, double[] state, double[] parameters, double[] result);

    public static void Write(TextWriter output)
    {
        nint library = Compile();
        Repeat rates = Function(library, "repeat_rates"), jacobian = Function(library, "repeat_jacobian");
        output.WriteLine("| problem | rates C#, ns | C | ratio | Jacobian C#, ns | C | ratio | by differences, ns | analytic faster |");
        output.WriteLine("|---|---|---|---|---|---|---|---|---|");
        Row<Lorenz63.Equations>(output, "Lorenz 63, n = 3", 0, rates, jacobian);
        Row<LotkaVolterra.Equations>(output, "Lotka-Volterra, n = 2", 1, rates, jacobian);
        Row<VanDerPol.Equations>(output, "van der Pol, n = 2", 2, rates, jacobian);
        Row<Arenstorf.Equations>(output, "Arenstorf orbit, n = 4", 3, rates, jacobian);
        Row<Pleiades.Equations>(output, "Pleiades, n = 28", 4, rates, jacobian);
        Row<Robertson.Equations>(output, "Robertson, n = 3", 5, rates, jacobian);
        Row<E5.Equations>(output, "E5, n = 4", 6, rates, jacobian);
        Row<Hires.Equations>(output, "HIRES, n = 8", 7, rates, jacobian);
        Row<Orego.Equations>(output, "Orego, n = 3", 8, rates, jacobian);
        Row<Pollution.Equations>(output, "POLLUTION, n = 20", 9, rates, jacobian);
    }

    private static void Row<TSystem>(TextWriter output, string name, int problem, Repeat rates, Repeat jacobian)
        where TSystem : struct, IOdeSystem
    {
        ModelDescription description = TSystem.Description;
        int n = description.States.Length;
        double[] state = [.. description.States.Select((item, i) => item.Initial + 0.01 * (i + 1))];
        double[] parameters = [.. description.Parameters.Select(item => item.Default)];
        double[] mine = new double[n * n], theirs = new double[n * n];
        (double ours, double c) = Measure(Emitted<TSystem>.Rates, rates, problem, n);
        (double oursJacobian, double cJacobian) = Measure(Emitted<TSystem>.Jacobian, jacobian, problem, n * n);
        (double differences, _) = Measure(Emitted<TSystem>.Differences, jacobian, problem, n * n, compare: false);
        output.WriteLine(string.Create(
            CultureInfo.InvariantCulture,
            $"| {name} | {ours:F1} | {c:F1} | {ours / c:F2} | {oursJacobian:F1} | {cJacobian:F1} | {oursJacobian / cJacobian:F2} | {differences:F1} | {differences / oursJacobian:F1} |"));
        output.Flush();

        (double, double) Measure(Repeat first, Repeat second, int index, int length, bool compare = true)
        {
            first(index, 1, state, parameters, mine);
            second(index, 1, state, parameters, theirs);
            if (compare) RequireSame(name, mine.AsSpan(0, length), theirs.AsSpan(0, length));
            int firstCalls = CallsFor(first), secondCalls = CallsFor(second);
            double[] firstTimes = new double[Rounds], secondTimes = new double[Rounds];
            for (int round = 0; round < Rounds; round++)
            {
                firstTimes[round] = NanosecondsPerCall(first, firstCalls);
                secondTimes[round] = NanosecondsPerCall(second, secondCalls);
            }

            Array.Sort(firstTimes);
            Array.Sort(secondTimes);
            return (firstTimes[Rounds / 2], secondTimes[Rounds / 2]);
        }

        int CallsFor(Repeat work)
        {
            NanosecondsPerCall(work, 10_000);
            return (int)Math.Max(1000, RoundSeconds * 1e9 / NanosecondsPerCall(work, 10_000));
        }

        double NanosecondsPerCall(Repeat work, int calls)
        {
            long start = Stopwatch.GetTimestamp();
            work(problem, calls, state, parameters, mine);
            return Stopwatch.GetElapsedTime(start).TotalNanoseconds / calls;
        }
    }

    /// <summary>A faster wrong answer would not count.</summary>
    private static void RequireSame(string name, ReadOnlySpan<double> mine, ReadOnlySpan<double> theirs)
    {
        double scale = 0;
        foreach (double value in theirs) scale = Math.Max(scale, Math.Abs(value));
        for (int i = 0; i < mine.Length; i++)
        {
            if (!(Math.Abs(mine[i] - theirs[i]) <= 1e-13 * scale))
                throw new InvalidOperationException($"{name}: value {i} is {mine[i]:R} in C# and {theirs[i]:R} in C.");
        }
    }

    private static nint Compile()
    {
        string source = Path.Combine(AppContext.BaseDirectory, "C", "problems.c"), library = Path.Combine(Path.GetTempPath(), $"odedsl-{Environment.ProcessId}.so");
        using Process gcc = Process.Start("gcc", ["-O3", "-march=native", "-shared", "-fPIC", "-o", library, source, "-lm"]);
        gcc.WaitForExit();
        if (gcc.ExitCode != 0) throw new InvalidOperationException("gcc did not compile the C side.");
        nint handle = NativeLibrary.Load(library);
        File.Delete(library);
        return handle;
    }

    private static Repeat Function(nint library, string name) =>
        Marshal.GetDelegateForFunctionPointer<Repeat>(NativeLibrary.GetExport(library, name));

    /// <summary>The emitted members in a loop, each call really made: through a pointer, as in C.</summary>
    private static class Emitted<TSystem>
        where TSystem : struct, IOdeSystem
    {
        private static readonly int Count = TSystem.Description.States.Length;

        public static unsafe void Rates(int problem, int calls, double[] state, double[] parameters, double[] result)
        {
            delegate*<double, ReadOnlySpan<double>, ReadOnlySpan<double>, Span<double>, void> rates = &TSystem.Rates;
            for (int i = 0; i < calls; i++) rates(0, state, parameters, result);
        }

        public static unsafe void Jacobian(int problem, int calls, double[] state, double[] parameters, double[] result)
        {
            delegate*<double, ReadOnlySpan<double>, ReadOnlySpan<double>, ReadOnlySpan<double>, Span<double>, void> jacobian = &TSystem.StateJacobian;
            for (int i = 0; i < calls; i++) jacobian(0, state, parameters, [], result);
        }

        public static void Differences(int problem, int calls, double[] state, double[] parameters, double[] result)
        {
            Span<double> rates = stackalloc double[Count], displaced = stackalloc double[Count];
            for (int call = 0; call < calls; call++)
            {
                TSystem.Rates(0, state, parameters, rates);
                for (int j = 0; j < Count; j++)
                {
                    double value = state[j], step = 1.5e-8 * Math.Max(1, Math.Abs(value));
                    state[j] = value + step;
                    TSystem.Rates(0, state, parameters, displaced);
                    for (int i = 0; i < Count; i++) result[i * Count + j] = (displaced[i] - rates[i]) / step;
                    state[j] = value;
                }
            }
        }
    }
}
