using OdeDsl.Integration;
using Xunit;

namespace OdeDsl.Tests.Integration;

public class DifferenceFormulaTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    [InlineData(5)]
    public void Differences_of_a_polynomial_convert_exactly_to_another_size(int order)
    {
        var matrix = new double[(order + 1) * (order + 1)];
        foreach (double ratio in new[] { 0.3, 1, 2.5 })
        {
            DifferenceFormulas.Convert(order, ratio, matrix);
            double[] before = Differences(order, 1), expected = Differences(order, ratio);
            for (int i = 0; i <= order; i++)
            {
                double converted = Enumerable.Range(0, order + 1).Sum(j => matrix[i * (order + 1) + j] * before[j]);
                Assert.True(Math.Abs(converted - expected[i]) <= 1e-9 * Math.Max(1, Math.Abs(expected[i])), $"{i}: {converted} against {expected[i]}");
            }
        }
    }

    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    [InlineData(5)]
    public void The_continuation_is_the_polynomial_through_the_points(int order)
    {
        double[] d = Differences(order, 1);
        double[] coefficients = [.. Enumerable.Range(0, order - 1).Select(k => Enumerable.Range(1, order).Sum(j => DifferenceFormulas.Nested[order][k, j - 1] * d[j]))];
        foreach (double theta in new[] { 0, 0.25, 0.6, 1 })
        {
            double value = DenseStep.Value(theta, d[0] - d[1], d[0], coefficients, 1, 0);
            Assert.True(Math.Abs(value - Polynomial(order, theta - 1)) <= 1e-10, $"{value} against {Polynomial(order, theta - 1)} at {theta}");
        }
    }

    [Fact]
    public void The_corrections_make_the_formulas_as_published()
    {
        // Shampine and Reichelt 1997, table 1: without correction of order 5, α is 137/60 and the error constant 1/6.
        Assert.True(Math.Abs(DifferenceFormulas.Alpha[5] - 137.0 / 60) <= 1e-14);
        Assert.True(Math.Abs(DifferenceFormulas.ErrorConstant[5] - 1.0 / 6) <= 1e-14);
    }

    private static double Polynomial(int degree, double t)
    {
        double value = 0;
        for (int k = degree; k >= 0; k--) value = value * t + 1.0 / (k + 1);
        return value;
    }

    // Backward differences at 0 of the polynomial's values at 0, −h, −2h, ...
    private static double[] Differences(int order, double h)
    {
        double[] values = [.. Enumerable.Range(0, order + 1).Select(i => Polynomial(order, -i * h))];
        var differences = new double[order + 1];
        for (int k = 0; k <= order; k++)
        {
            differences[k] = values[0];
            for (int i = 0; i + 1 < values.Length - k; i++) values[i] -= values[i + 1];
        }

        return differences;
    }
}
