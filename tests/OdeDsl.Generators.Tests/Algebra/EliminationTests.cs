using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Tests.Algebra;

public sealed class EliminationTests
{
    /// <summary>Random patterns with random numbers, diagonally dominant: the steps must give triangular factors whose product is the matrix.</summary>
    [Fact]
    public void Factors_of_random_matrices_multiply_to_the_matrix()
    {
        Random random = new(6);
        for (int trial = 0; trial < 400; trial++)
        {
            int n = random.Next(1, 14);
            double density = random.NextDouble();
            SparseMatrix pattern = Pattern(n, (i, j) => random.NextDouble() < density);
            Elimination elimination = Elimination.Of(pattern, int.MaxValue, CancellationToken.None)!;
            double[,] matrix = new double[n, n];
            double[] places = new double[elimination.Length];
            for (int k = 0; k < pattern.Entries.Count; k++)
                places[k] = matrix[pattern.Entries[k].Row, pattern.Entries[k].Column] = random.NextDouble() - 0.5;
            for (int i = 0; i < n; i++) matrix[i, i] = places[elimination.DiagonalPlaces[i]] += 2 * n;
            double[,] lower = new double[n, n], upper = new double[n, n];
            foreach (PivotStep step in elimination.Pivots)
            {
                double pivot = places[elimination.DiagonalPlaces[step.Row]];
                (lower[step.Row, step.Row], upper[step.Row, step.Row]) = (1, pivot);
                foreach (MatrixPlace entry in step.Right) upper[step.Row, entry.Column] = places[entry.Place];
                foreach (RowUpdate update in step.Updates)
                {
                    double factor = lower[update.Row, step.Row] = places[update.Multiplier] / pivot;
                    foreach ((int target, int source) in update.Entries) places[target] -= factor * places[source];
                }
            }

            for (int i = 0; i < n; i++)
            {
                for (int j = 0; j < n; j++)
                {
                    double product = Enumerable.Range(0, n).Sum(k => lower[i, k] * upper[k, j]);
                    Assert.True(Math.Abs(product - matrix[i, j]) <= 1e-13 * n, $"({i}, {j}): {product:R} instead of {matrix[i, j]:R}");
                }
            }
        }
    }

    [Fact]
    public void An_arrow_fills_in_nothing_when_its_head_comes_last()
    {
        const int n = 20;
        Elimination elimination = Elimination.Of(Pattern(n, static (i, j) => i == 0 || j == 0), int.MaxValue, CancellationToken.None)!;
        Assert.Equal(n + (2 * (n - 1)), elimination.Length);
        Assert.True(elimination.OperationCount <= 4 * n, $"{elimination.OperationCount} operations");
    }

    [Fact]
    public void A_band_takes_operations_in_proportion_to_its_length()
    {
        Elimination elimination = Elimination.Of(Pattern(100, static (i, j) => Math.Abs(i - j) <= 1), 1000, CancellationToken.None)!;
        Assert.Equal(298, elimination.Length);
        Assert.Equal(100 + (99 * 3), elimination.OperationCount);
    }

    [Fact]
    public void Dense_and_large_matrices_are_left_to_loops()
    {
        Assert.Null(Elimination.Of(Pattern(20, static (_, _) => true), 1000, CancellationToken.None));
        Assert.Null(Elimination.Of(Pattern(2000, static (i, j) => i == j), 1000, CancellationToken.None));
    }

    private static SparseMatrix Pattern(int n, Func<int, int, bool> contains) => new(n, n, [
        .. from row in Enumerable.Range(0, n) from column in Enumerable.Range(0, n) where contains(row, column) select new MatrixEntry(row, column, 0)]);
}
