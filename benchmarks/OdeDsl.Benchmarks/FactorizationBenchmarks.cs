using BenchmarkDotNet.Attributes;
using OdeDsl.LinearAlgebra;
using OdeDsl.Modeling;
using OdeDsl.Tests.Problems;

namespace OdeDsl.Benchmarks;

/// <summary>Factoring a I − J and solving once: in straight lines without pivoting, and by loops over a dense matrix with pivoting.</summary>
[MemoryDiagnoser]
[GenericTypeArguments(typeof(Lorenz63.Equations))]
[GenericTypeArguments(typeof(Hires.Equations))]
[GenericTypeArguments(typeof(Pollution.Equations))]
[GenericTypeArguments(typeof(Pleiades.Equations))]
public class FactorizationBenchmarks<TSystem>
    where TSystem : struct, IOdeSystem
{
    private static readonly SparsityPattern Pattern = TSystem.Description.StateSparsity;

    private readonly UnrolledFactorization<TSystem, RealElement> unrolled = new();
    private readonly UnrolledFactorization<TSystem, ComplexElement> unrolledComplex = new();
    private readonly RealFactorization pivoted = new(Pattern.RowCount);
    private readonly ComplexFactorization pivotedComplex = new(Pattern.RowCount);
    private readonly double[] values = [.. Pattern.Columns.Select(static (_, i) => Math.Sin(i + 1))];
    private readonly double[] vector = new double[Pattern.RowCount];
    private readonly double[] imaginary = new double[Pattern.RowCount];
    private readonly System.Numerics.Complex[] complexVector = new System.Numerics.Complex[Pattern.RowCount];

    [Benchmark]
    public bool Unrolled()
    {
        bool isSound = unrolled.TryFactor(20, 1, values);
        unrolled.Solve(vector);
        return isSound;
    }

    [Benchmark(Baseline = true)]
    public bool Pivoted()
    {
        for (int i = 0; i < Pattern.RowCount; i++)
        {
            for (int j = 0; j < Pattern.RowCount; j++) pivoted[i, j] = i == j ? 20 : 0;
            for (int entry = Pattern.RowStarts[i]; entry < Pattern.RowStarts[i + 1]; entry++)
                pivoted[i, Pattern.Columns[entry]] = (i == Pattern.Columns[entry] ? 20 : 0) - values[entry];
        }

        bool isSound = pivoted.Factor();
        pivoted.Solve(vector);
        return isSound;
    }

    [Benchmark]
    public bool UnrolledComplex()
    {
        bool isSound = unrolledComplex.TryFactor(new System.Numerics.Complex(20, 10), 1, values);
        unrolledComplex.Solve(complexVector);
        return isSound;
    }

    [Benchmark]
    public bool PivotedComplex()
    {
        for (int i = 0; i < Pattern.RowCount; i++)
        {
            for (int j = 0; j < Pattern.RowCount; j++) pivotedComplex.Set(i, j, i == j ? 20 : 0, i == j ? 10 : 0);
            for (int entry = Pattern.RowStarts[i]; entry < Pattern.RowStarts[i + 1]; entry++)
            {
                bool isDiagonal = i == Pattern.Columns[entry];
                pivotedComplex.Set(i, Pattern.Columns[entry], (isDiagonal ? 20 : 0) - values[entry], isDiagonal ? 10 : 0);
            }
        }

        bool isSound = pivotedComplex.Factor();
        pivotedComplex.Solve(vector, imaginary);
        return isSound;
    }
}
