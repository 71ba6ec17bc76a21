using System.Collections.Immutable;
using OdeDsl.LinearAlgebra;
using OdeDsl.Modeling;
using Xunit;

namespace OdeDsl.Tests.LinearAlgebra;

public class JacobianStructureTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    public void Random_banded_and_sparse_systems_are_solved_to_a_small_residual(int seed)
    {
        var random = new Random(seed);
        foreach (int n in new[] { 6, 23, 90, 450 })
        {
            AssertSolves(Band(n, 1, 1), random, mostlyDiagonal: false);
            AssertSolves(Band(n, 2, 1), random, mostlyDiagonal: false);
            AssertSolves(Scattered(n, 2 * n, random), random, mostlyDiagonal: n > 400);
            AssertSolves(Arrow(n), random, mostlyDiagonal: n > 400);
        }

        AssertSolves(Grid(30), random, mostlyDiagonal: true);
    }

    [Fact]
    public void The_structure_follows_the_pattern()
    {
        Assert.True(JacobianStructure.Of(Band(100, 1, 1)).IsBanded);
        Assert.Null(JacobianStructure.Of(Band(5, 1, 1)).Pattern);
        JacobianStructure arrow = JacobianStructure.Of(Arrow(100));
        Assert.False(arrow.IsBanded);
        Assert.NotNull(arrow.Pattern);
    }

    [Fact]
    public void An_arrow_fills_no_place_in_either_order_of_elimination()
    {
        // Eliminating the hub first would fill the matrix; last, it fills nothing: 2 (n − 1) entries and two vectors.
        foreach (int n in new[] { 100, 3000 }) Assert.Equal(2 * (n - 1) + 2 * n, JacobianStructure.Of(Arrow(n)).MakeReal().FactorEntries);
    }

    [Fact]
    public void A_chain_in_scrambled_order_fills_no_place()
    {
        const int N = 20_000;
        int[] places = [.. Enumerable.Range(0, N)];
        new Random(5).Shuffle(places);
        SparsityPattern pattern = Pattern(N, [.. Enumerable.Range(0, N - 1).SelectMany(i => new[] { (places[i], places[i + 1]), (places[i + 1], places[i]) })]);
        Assert.Equal(2 * (N - 1) + 2 * N, JacobianStructure.Of(pattern).MakeReal().FactorEntries);
    }

    [Fact]
    public void The_fill_of_a_grid_grows_little_faster_than_its_size()
    {
        // No order does better than n log n on a square grid (A. George, SIAM Journal on Numerical Analysis 10, 1973).
        long small = JacobianStructure.Of(Grid(50)).MakeReal().FactorEntries, large = JacobianStructure.Of(Grid(100)).MakeReal().FactorEntries;
        Assert.True(large <= 4 * 1.6 * small, $"{small} for 2500, {large} for 10000");
    }

    [Fact]
    public void A_singular_matrix_is_refused_and_one_that_needs_exchanges_is_solved()
    {
        SparsityPattern pattern = Arrow(40);
        JacobianStructure structure = JacobianStructure.Of(pattern);
        var zero = new double[pattern.EntryCount];
        Assert.False(structure.MakeReal().Factor(zero, 0));
        Assert.False(structure.MakeComplex().Factor(zero, 0, 0));
        // σ = 1 cancels the whole diagonal but the hub's: without exchanges there is no pivot.
        SparsityPattern pairs = Pattern(8, [.. Enumerable.Range(0, 8).Select(i => (i, i ^ 1))]);
        JacobianStructure swapped = JacobianStructure.Of(pairs);
        double[] values = [.. Enumerable.Range(0, pairs.EntryCount).Select(_ => 1.0)];
        ShiftedSolver solver = swapped.MakeReal();
        Assert.True(solver.Factor(values, 1e-13));
        double[] x = [1, 2, 3, 4, 5, 6, 7, 8];
        solver.Solve(x);
        AssertResidual(pairs, values, 1e-13, x, [1, 2, 3, 4, 5, 6, 7, 8]);
    }

    [Fact]
    public void Factoring_and_solving_allocate_nothing()
    {
        foreach (SparsityPattern pattern in new[] { Band(50, 1, 1), Arrow(50) })
        {
            JacobianStructure structure = JacobianStructure.Of(pattern);
            ShiftedSolver real = structure.MakeReal();
            ComplexShiftedSolver complex = structure.MakeComplex();
            double[] values = new double[pattern.EntryCount], x = new double[50], y = new double[50];
            Work();
            long before = GC.GetAllocatedBytesForCurrentThread();
            Work();
            Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);

            void Work()
            {
                real.Factor(values, 2);
                complex.Factor(values, 2, 1);
                real.Solve(x);
                complex.Solve(x, y);
            }
        }
    }

    private static void AssertSolves(SparsityPattern pattern, Random random, bool mostlyDiagonal)
    {
        int n = pattern.RowCount;
        JacobianStructure structure = JacobianStructure.Of(pattern);
        double[] values = [.. Enumerable.Range(0, pattern.EntryCount).Select(_ => 2 * random.NextDouble() - 1)];
        double shift = mostlyDiagonal ? 8 : 1.3;
        double[] b = [.. Enumerable.Range(0, n).Select(_ => random.NextDouble())], x = [.. b];
        double[] held = structure.Pattern is null ? Whole(pattern, values) : values;
        ShiftedSolver real = structure.MakeReal();
        Assert.True(real.Factor(held, shift));
        real.Solve(x);
        AssertResidual(pattern, values, shift, x, b);

        // A complex shift σ + iτ with x = u + iv: (σ − J) u − τ v and (σ − J) v + τ u.
        ComplexShiftedSolver complex = structure.MakeComplex();
        Assert.True(complex.Factor(held, shift, 0.7));
        double[] re = [.. b], im = [.. b.Select(static value => 1 - value)];
        complex.Solve(re, im);
        AssertResidual(pattern, values, shift, re, [.. b.Zip(im, static (value, v) => value + 0.7 * v)]);
        AssertResidual(pattern, values, shift, im, [.. b.Zip(re, static (value, u) => 1 - value - 0.7 * u)]);
    }

    private static void AssertResidual(SparsityPattern pattern, double[] values, double shift, double[] x, double[] b)
    {
        double largest = x.Max(Math.Abs) + 1;
        for (int i = 0; i < x.Length; i++)
        {
            double residual = shift * x[i] - b[i];
            for (int entry = pattern.RowStarts[i]; entry < pattern.RowStarts[i + 1]; entry++) residual -= values[entry] * x[pattern.Columns[entry]];
            // Growth without exchanges is larger than with them, yet bounded by the watched pivots.
            Assert.True(Math.Abs(residual) <= 1e-9 * largest, $"row {i} of {x.Length}: {residual}");
        }
    }

    private static double[] Whole(SparsityPattern pattern, double[] values)
    {
        var whole = new double[pattern.RowCount * pattern.RowCount];
        values.CopyTo(whole, 0);
        pattern.Expand(whole);
        return whole;
    }

    private static SparsityPattern Band(int n, int below, int above) =>
        Pattern(n, [.. Enumerable.Range(0, n).SelectMany(i => Enumerable.Range(i - below, below + above + 1).Where(j => j >= 0 && j < n).Select(j => (i, j)))]);

    private static SparsityPattern Arrow(int n) =>
        Pattern(n, [.. Enumerable.Range(1, n - 1).SelectMany(static i => new[] { (0, i), (i, 0), (i, i) })]);

    private static SparsityPattern Scattered(int n, int count, Random random) =>
        Pattern(n, [.. Enumerable.Range(0, count).Select(_ => (random.Next(n), random.Next(n)))]);

    private static SparsityPattern Grid(int side)
    {
        List<(int, int)> entries = [];
        for (int i = 0; i < side * side; i++)
        {
            entries.Add((i, i));
            if (i % side != side - 1) entries.AddRange([(i, i + 1), (i + 1, i)]);
            if (i + side < side * side) entries.AddRange([(i, i + side), (i + side, i)]);
        }

        return Pattern(side * side, [.. entries]);
    }

    private static SparsityPattern Pattern(int n, (int Row, int Column)[] entries)
    {
        (int Row, int Column)[] sorted = [.. entries.Distinct().Order()];
        var starts = new int[n + 1];
        foreach ((int row, _) in sorted) starts[row + 1]++;
        for (int i = 0; i < n; i++) starts[i + 1] += starts[i];
        return new SparsityPattern(n, n, ImmutableArray.Create(starts), [.. sorted.Select(static entry => entry.Column)]);
    }
}
