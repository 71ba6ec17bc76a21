using OdeDsl.Integration;
using Xunit;
using D = OdeDsl.Integration.DormandPrince54Tableau;
using R = OdeDsl.Integration.RadauIIA5Coefficients;

namespace OdeDsl.Tests.Integration;

public class CoefficientTests
{
    private const double Rounding = 1e-14;

    private static readonly double[,] A =
    {
        { 0, 0, 0, 0, 0, 0, 0 },
        { D.A21, 0, 0, 0, 0, 0, 0 },
        { D.A31, D.A32, 0, 0, 0, 0, 0 },
        { D.A41, D.A42, D.A43, 0, 0, 0, 0 },
        { D.A51, D.A52, D.A53, D.A54, 0, 0, 0 },
        { D.A61, D.A62, D.A63, D.A64, D.A65, 0, 0 },
        { D.B1, 0, D.B3, D.B4, D.B5, D.B6, 0 },
    };

    private static readonly double[] B = [D.B1, 0, D.B3, D.B4, D.B5, D.B6, 0];
    private static readonly double[] C = [0, D.C2, D.C3, D.C4, D.C5, 1, 1];

    [Fact]
    public void There_are_as_many_rooted_trees_as_published()
    {
        // E. Hairer, S. P. Norsett, G. Wanner, Solving ODEs I, table II.2.3: 1, 1, 2, 4, 9, 20.
        Assert.Equal([1, 1, 2, 4, 9, 20], Enumerable.Range(1, 6).Select(order => ButcherTrees.OfOrder(order).Count()));
    }

    [Fact]
    public void Rows_of_Dormand_and_Princes_matrix_sum_to_the_nodes()
    {
        for (int i = 0; i < 7; i++)
            Assert.True(Math.Abs(Enumerable.Range(0, 7).Sum(j => A[i, j]) - C[i]) <= Rounding);
    }

    [Fact]
    public void Dormand_and_Princes_weights_have_order_five_and_not_six()
    {
        Assert.True(ButcherTrees.LargestMisfit(A, B, order: 5) <= Rounding);
        Assert.True(ButcherTrees.LargestMisfit(A, B, order: 6) > 1e-4);
    }

    [Fact]
    public void The_embedded_weights_have_order_four_and_not_five()
    {
        double[] e = [D.E1, 0, D.E3, D.E4, D.E5, D.E6, D.E7];
        double[] embedded = [.. B.Zip(e, static (b, difference) => b - difference)];
        Assert.True(ButcherTrees.LargestMisfit(A, embedded, order: 4) <= Rounding);
        Assert.True(ButcherTrees.LargestMisfit(A, embedded, order: 5) > 1e-5);
    }

    [Theory]
    [InlineData(0.1)]
    [InlineData(0.37)]
    [InlineData(0.5)]
    [InlineData(0.83)]
    public void The_continuous_extension_has_order_four_at_every_place(double theta)
    {
        // The weights at a place: the stepper's own coefficients applied to unit stages.
        var weights = new double[7];
        double[] last = [D.P1, 0, D.P3, D.P4, D.P5, D.P6, D.P7];
        for (int i = 0; i < 7; i++)
        {
            double d2 = (i == 0 ? 1 : 0) - B[i], d3 = B[i] - (i == 6 ? 1 : 0) - d2;
            weights[i] = DenseStep.Value(theta, 0, B[i], d2, d3, last[i]);
        }

        Assert.True(ButcherTrees.LargestMisfit(A, weights, order: 4, theta) <= Rounding);
    }

    [Fact]
    public void Radau_IIA_fulfils_the_simplifying_assumptions_of_its_order()
    {
        // E. Hairer, G. Wanner, Solving ODEs II, section IV.5: B(5), C(3), D(2).
        double[] c = [R.C1, R.C2, 1];
        double[] b = [R.A[2, 0], R.A[2, 1], R.A[2, 2]];
        for (int q = 1; q <= 5; q++) Assert.True(Math.Abs(Sum(i => b[i] * Math.Pow(c[i], q - 1)) - 1.0 / q) <= Rounding);
        for (int q = 1; q <= 3; q++)
        {
            for (int i = 0; i < 3; i++)
                Assert.True(Math.Abs(Sum(j => R.A[i, j] * Math.Pow(c[j], q - 1)) - Math.Pow(c[i], q) / q) <= Rounding);
        }

        for (int q = 1; q <= 2; q++)
        {
            for (int j = 0; j < 3; j++)
                Assert.True(Math.Abs(Sum(i => b[i] * Math.Pow(c[i], q - 1) * R.A[i, j]) - b[j] / q * (1 - Math.Pow(c[j], q))) <= Rounding);
        }

        Assert.True(ButcherTrees.LargestMisfit(R.A, b, order: 5) <= Rounding);
        static double Sum(Func<int, double> term) => term(0) + term(1) + term(2);
    }

    [Fact]
    public void The_transformation_splits_the_inverse_of_Radaus_matrix_into_its_eigenvalues()
    {
        // A T diag(γ, [α −β; β α]) = T.
        double[,] blocks = { { R.Gamma, 0, 0 }, { 0, R.Alpha, -R.Beta }, { 0, R.Beta, R.Alpha } };
        double[,] product = Multiply(R.A, Multiply(R.T, blocks));
        double[,] identity = Multiply(R.T, R.InverseT);
        for (int i = 0; i < 3; i++)
        {
            for (int j = 0; j < 3; j++)
            {
                Assert.True(Math.Abs(product[i, j] - R.T[i, j]) <= Rounding);
                Assert.True(Math.Abs(identity[i, j] - (i == j ? 1 : 0)) <= Rounding);
            }
        }

        // The real eigenvalue as printed in Solving ODEs II, section IV.8 (from memory): 3.637834252744496.
        Assert.True(Math.Abs(R.Gamma - 3.637834252744496) <= Rounding);
    }

    [Fact]
    public void The_error_weights_of_Radau_IIA_agree_to_order_three()
    {
        // With e = γ₀(E₁, E₂, E₃) and z = A f: ŷ − y = γ₀ h f₀ + Σ eᵢ zᵢ vanishes for solutions of degree three or less
        // (Solving ODEs II, equation IV.8.18): for f = t^(q−1), zᵢ = cᵢ^q / q, and f₀ = 1 only for q = 1.
        double[] c = [R.C1, R.C2, 1], e = [R.E1, R.E2, R.E3];
        for (int q = 1; q <= 3; q++)
        {
            double estimate = (q == 1 ? 1 : 0) + Enumerable.Range(0, 3).Sum(i => e[i] * Math.Pow(c[i], q) / q);
            Assert.True(Math.Abs(estimate) <= 10 * Rounding, $"order {q}: {estimate}");
        }
    }

    private static double[,] Multiply(double[,] a, double[,] b)
    {
        var product = new double[3, 3];
        for (int i = 0; i < 3; i++)
        {
            for (int j = 0; j < 3; j++)
            {
                for (int k = 0; k < 3; k++) product[i, j] += a[i, k] * b[k, j];
            }
        }

        return product;
    }
}
