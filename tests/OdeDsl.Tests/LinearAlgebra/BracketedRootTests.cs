using OdeDsl.LinearAlgebra;
using Xunit;

namespace OdeDsl.Tests.LinearAlgebra;

public class BracketedRootTests
{
    [Fact]
    public void A_simple_root_is_found_to_the_last_bit_in_few_evaluations()
    {
        int evaluations = 0;
        double F(double x)
        {
            evaluations++;
            return Math.Cos(x) - x;
        }

        double root = BracketedRoot.Find(F, 0, 1, 1, Math.Cos(1) - 1);
        // The fixed point of the cosine (e.g. T. Miller, Am. Math. Monthly 9, 1890; OEIS A003957).
        Assert.True(Math.Abs(root - 0.7390851332151606) <= 2e-16, $"{root:R}");
        Assert.True(evaluations <= 12, $"{evaluations}");
    }

    [Theory]
    [InlineData(3)]
    [InlineData(9)]
    public void A_flat_root_is_bracketed_all_the_same(int power)
    {
        double root = BracketedRoot.Find(x => Math.Pow(x - 0.3, power), -1, Math.Pow(-1.3, power), 4, Math.Pow(3.7, power));
        Assert.True(Math.Abs(Math.Pow(root - 0.3, power)) <= 1e-30, $"{root:R}");
    }

    [Fact]
    public void A_root_at_an_end_is_returned_without_a_search()
    {
        Assert.Equal(1, BracketedRoot.Find(_ => throw new InvalidOperationException(), 1, 0, 2, 5));
        Assert.Equal(2, BracketedRoot.Find(_ => throw new InvalidOperationException(), 1, -5, 2, 0));
    }

    [Fact]
    public void The_tolerance_ends_the_search_early()
    {
        double root = BracketedRoot.Find(static x => x * x - 2, 0, -2, 2, 2, 1e-3);
        Assert.True(Math.Abs(root - Math.Sqrt(2)) <= 1e-3);
    }

    [Fact]
    public void A_value_that_is_not_a_number_ends_the_search()
    {
        Assert.True(double.IsFinite(BracketedRoot.Find(_ => double.NaN, 0, -1, 1, 1)));
    }
}
