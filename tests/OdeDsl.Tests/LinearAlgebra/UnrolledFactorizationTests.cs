using System.Numerics;
using OdeDsl.LinearAlgebra;
using OdeDsl.Modeling;
using OdeDsl.Tests.Problems;
using Xunit;

namespace OdeDsl.Tests.LinearAlgebra;

public sealed class UnrolledFactorizationTests
{
    [Fact]
    public void Factors_of_the_public_problems_solve_as_well_as_pivoted_ones()
    {
        CompareWithPivoting<Lorenz63.Equations>();
        CompareWithPivoting<Robertson.Equations>();
        CompareWithPivoting<E5.Equations>();
        CompareWithPivoting<Hires.Equations>();
        CompareWithPivoting<Pollution.Equations>();
    }

    [Fact]
    public void Complex_factors_leave_small_residuals()
    {
        LeaveSmallResiduals<Lorenz63.Equations>();
        LeaveSmallResiduals<Hires.Equations>();
        LeaveSmallResiduals<Pollution.Equations>();
    }

    [Fact]
    public void Growth_and_vanishing_pivots_are_noticed()
    {
        UnrolledFactorization<LotkaVolterra.Equations, RealElement> factorization = new();
        // 1 − J for the matrices [ε 1; 1 1]: without pivoting the factors hold 1/ε.
        Assert.True(factorization.TryFactor(1, 1, [-1, -1, -1, -2]));
        Assert.False(factorization.TryFactor(1, 1, [1 - 1e-9, -1, -1, 1 - 1e-9]));
        Assert.False(factorization.TryFactor(1, 1, [1, -1, -1, 1]));
        Assert.False(factorization.TryFactor(1, 1, [0, -1, -1, 0])); // singular: the last pivot vanishes
        Assert.False(factorization.TryFactor(1, 1, [double.NaN, -1, -1, 0]));
        Assert.False(factorization.TryFactor(1, 1, [0, double.PositiveInfinity, -1, 0]));
        UnrolledFactorization<LotkaVolterra.Equations, ComplexElement> complex = new();
        Assert.True(complex.TryFactor(new Complex(1, 1), 1, [1, -1, -1, 1]));
        Assert.False(complex.TryFactor(new Complex(1, 1e-9), 1, [1, -1, -1, 1]));
    }

    [Fact]
    public void Equations_in_other_units_are_no_growth()
    {
        UnrolledFactorization<LotkaVolterra.Equations, RealElement> factorization = new();
        Assert.True(factorization.TryFactor(0, -1, [2e-12, 1e-12, 1, 3]));
        Assert.True(factorization.TryFactor(0, -1, [2, 1, 1e12, 3e12]));
    }

    [Fact]
    public void Nothing_is_allocated()
    {
        UnrolledFactorization<Pollution.Equations, RealElement> real = new();
        UnrolledFactorization<Pollution.Equations, ComplexElement> complex = new();
        double[] values = [.. Enumerable.Range(0, Pollution.Equations.Description.StateSparsity.EntryCount).Select(i => Math.Sin(i))];
        double[] vector = new double[20];
        Complex[] complexVector = new Complex[20];
        Run();
        long before = GC.GetAllocatedBytesForCurrentThread();
        Run();
        Assert.Equal(before, GC.GetAllocatedBytesForCurrentThread());

        void Run()
        {
            Assert.True(real.TryFactor(30, 1, values));
            real.Solve(vector);
            Assert.True(complex.TryFactor(new Complex(30, 20), 1, values));
            complex.Solve(complexVector);
        }
    }

    private static void CompareWithPivoting<TSystem>()
        where TSystem : struct, IOdeSystem
    {
        SparsityPattern pattern = TSystem.Description.StateSparsity;
        int n = pattern.RowCount, good = 0;
        UnrolledFactorization<TSystem, RealElement> factorization = new();
        RealFactorization pivoted = new(n);
        Random random = new(1);
        for (int trial = 0; trial < 2000; trial++)
        {
            double a = Math.Pow(10, 4 * random.NextDouble() - 2), b = random.NextDouble();
            double[] values = [.. pattern.Columns.Select(_ => Math.Pow(10, 4 * random.NextDouble() - 2) * (random.NextDouble() - 0.5))];
            double[] x = [.. Enumerable.Range(0, n).Select(_ => random.NextDouble() - 0.5)];
            double[] mine = [.. x], other = [.. x];
            double[,] matrix = Matrix(pattern, a, b, values);
            for (int i = 0; i < n; i++)
            {
                for (int j = 0; j < n; j++) pivoted[i, j] = matrix[i, j];
            }

            if (!factorization.TryFactor(a, b, values)) continue;
            good++;
            Assert.True(pivoted.Factor());
            factorization.Solve(mine);
            pivoted.Solve(other);
            // Higham's bound with the growth that was allowed; the pivoted solution must not be needed to be that good.
            (double residual, double size) = Residual(matrix, mine, x);
            Assert.True(residual <= 1000 * 3 * n * 1.2e-16 * size, $"{residual:R} against {size:R}");
            (double pivotedResidual, _) = Residual(matrix, other, x);
            Assert.True(pivotedResidual <= 1000 * 3 * n * 1.2e-16 * size);
        }

        Assert.True(good >= 200, $"only {good} matrices were factored");
    }

    private static void LeaveSmallResiduals<TSystem>()
        where TSystem : struct, IOdeSystem
    {
        SparsityPattern pattern = TSystem.Description.StateSparsity;
        int n = pattern.RowCount;
        UnrolledFactorization<TSystem, ComplexElement> factorization = new();
        Random random = new(2);
        int good = 0;
        for (int trial = 0; trial < 500; trial++)
        {
            Complex a = new(3 * random.NextDouble() + 1, 3 * random.NextDouble());
            double[] values = [.. pattern.Columns.Select(_ => random.NextDouble() - 0.5)];
            Complex[] right = [.. Enumerable.Range(0, n).Select(_ => new Complex(random.NextDouble(), random.NextDouble()))];
            Complex[] x = [.. right];
            if (!factorization.TryFactor(a, 1, values)) continue;
            good++;
            factorization.Solve(x);
            double[,] jacobian = Matrix(pattern, 0, -1, values);
            for (int i = 0; i < n; i++)
            {
                Complex sum = a * x[i] - right[i];
                double size = Complex.Abs(a * x[i]) + Complex.Abs(right[i]);
                for (int j = 0; j < n; j++)
                {
                    sum -= jacobian[i, j] * x[j];
                    size += Complex.Abs(jacobian[i, j] * x[j]);
                }

                Assert.True(Complex.Abs(sum) <= 1000 * 6 * n * 1.2e-16 * (size + x.Max(Complex.Abs)), $"{sum} against {size:R}");
            }
        }

        Assert.True(good >= 200, $"only {good} matrices were factored");
    }

    private static double[,] Matrix(SparsityPattern pattern, double a, double b, double[] values)
    {
        double[,] matrix = new double[pattern.RowCount, pattern.RowCount];
        for (int i = 0; i < pattern.RowCount; i++)
        {
            matrix[i, i] = a;
            for (int entry = pattern.RowStarts[i]; entry < pattern.RowStarts[i + 1]; entry++) matrix[i, pattern.Columns[entry]] -= b * values[entry];
        }

        return matrix;
    }

    /// <summary>The largest |A x − r| of a row over the row sum of |A|, and the largest |x|.</summary>
    private static (double Residual, double Size) Residual(double[,] matrix, double[] x, double[] right)
    {
        double worst = 0;
        for (int i = 0; i < x.Length; i++)
        {
            double sum = -right[i], norm = Math.Abs(right[i]);
            for (int j = 0; j < x.Length; j++)
            {
                sum += matrix[i, j] * x[j];
                norm += Math.Abs(matrix[i, j]);
            }

            worst = Math.Max(worst, Math.Abs(sum) / norm);
        }

        return (worst, Math.Max(1, x.Max(Math.Abs)));
    }
}
