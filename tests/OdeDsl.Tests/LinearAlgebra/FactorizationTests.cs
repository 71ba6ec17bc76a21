using System.Numerics;
using CsCheck;
using OdeDsl.LinearAlgebra;
using Xunit;

namespace OdeDsl.Tests.LinearAlgebra;

public class FactorizationTests
{
    // Uniform entries: singular matrices do not occur.
    private static readonly Gen<(int Size, double[] Entries)> Matrices =
        Gen.Select(Gen.Int[1, 23], Gen.Int, static (n, seed) => (n, Uniform(new Random(seed), 2 * n * n + 2 * n)));

    [Fact]
    public void Random_real_systems_are_solved_to_a_small_residual() =>
        Matrices.Sample(
            sample =>
            {
                int n = sample.Size;
                var factors = new RealFactorization(n);
                for (int i = 0; i < n; i++)
                {
                    for (int j = 0; j < n; j++) factors[i, j] = sample.Entries[i * n + j];
                }

                Assert.True(factors.Factor());
                double[] x = sample.Entries[^n..];
                factors.Solve(x);
                for (int i = 0; i < n; i++)
                {
                    double residual = -sample.Entries[^(n - i)], size = 1;
                    for (int j = 0; j < n; j++)
                    {
                        residual += sample.Entries[i * n + j] * x[j];
                        size += Math.Abs(sample.Entries[i * n + j] * x[j]);
                    }

                    // Backward stability of elimination with partial pivoting; the growth of random matrices is small.
                    Assert.True(Math.Abs(residual) <= 1e-13 * size * n, $"{residual} against {size}");
                }
            },
            iter: 500);

    [Fact]
    public void Random_complex_systems_are_solved_to_a_small_residual() =>
        Matrices.Sample(
            sample =>
            {
                int n = sample.Size;
                var factors = new ComplexFactorization(n);
                for (int i = 0; i < n; i++)
                {
                    for (int j = 0; j < n; j++) factors.Set(i, j, sample.Entries[i * n + j], sample.Entries[n * n + i * n + j]);
                }

                Assert.True(factors.Factor());
                double[] re = sample.Entries[(2 * n * n)..(2 * n * n + n)], im = sample.Entries[^n..];
                Complex[] right = [.. re.Zip(im, static (a, b) => new Complex(a, b))];
                factors.Solve(re, im);
                for (int i = 0; i < n; i++)
                {
                    Complex residual = -right[i];
                    double size = 1;
                    for (int j = 0; j < n; j++)
                    {
                        Complex term = new Complex(sample.Entries[i * n + j], sample.Entries[n * n + i * n + j]) * new Complex(re[j], im[j]);
                        residual += term;
                        size += term.Magnitude;
                    }

                    Assert.True(residual.Magnitude <= 1e-13 * size * n, $"{residual} against {size}");
                }
            },
            iter: 500);

    [Fact]
    public void A_matrix_that_needs_row_exchanges_is_solved_exactly()
    {
        // 0 1 0 / 0 0 2 / 4 0 0: a permutation with scales.
        var factors = new RealFactorization(3);
        double[] entries = [0, 1, 0, 0, 0, 2, 4, 0, 0];
        for (int i = 0; i < 9; i++) factors[i / 3, i % 3] = entries[i];
        Assert.True(factors.Factor());
        double[] x = [5, 6, 8];
        factors.Solve(x);
        Assert.Equal([2.0, 5, 3], x);
    }

    [Theory]
    [InlineData(0.0)]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void Singular_and_not_finite_matrices_are_refused(double value)
    {
        var real = new RealFactorization(2);
        (real[0, 0], real[0, 1], real[1, 0], real[1, 1]) = (value, 2, value, 4);
        Assert.False(real.Factor());
        var complex = new ComplexFactorization(2);
        for (int i = 0; i < 4; i++) complex.Set(i / 2, i % 2, i % 2 == 0 ? value : 1 + i, 0);
        Assert.False(complex.Factor());
    }

    private static double[] Uniform(Random random, int count) => [.. Enumerable.Range(0, count).Select(_ => 2 * random.NextDouble() - 1)];
}
