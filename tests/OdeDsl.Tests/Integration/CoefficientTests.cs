using OdeDsl.Integration;
using Xunit;

namespace OdeDsl.Tests.Integration;

public class CoefficientTests
{
    private const double Rounding = 3e-14;

    // Coefficients are as large as 90; the sums over trees round accordingly.
    private const double RoundingOfLargeCoefficients = 2e-13;

    public static TheoryData<IntegrationMethod> Pairs => [.. TestMethods.Explicit];

    public static TheoryData<IntegrationMethod> RosenbrockMethods => [IntegrationMethod.Rodas4, IntegrationMethod.Rodas5P];

    public static TheoryData<int> RadauStages => [3, 5, 7];

    [Fact]
    public void There_are_as_many_rooted_trees_as_published()
    {
        // E. Hairer, S. P. Norsett, G. Wanner, Solving ODEs I, table II.2.3: 1, 1, 2, 4, 9, 20, 48, 115.
        Assert.Equal([1, 1, 2, 4, 9, 20, 48, 115], Enumerable.Range(1, 8).Select(order => ButcherTrees.OfOrder(order).Count()));
    }

    [Theory]
    [MemberData(nameof(Pairs))]
    public void Rows_of_an_explicit_matrix_sum_to_the_nodes(IntegrationMethod method)
    {
        ExplicitTableau tableau = Tableau(method);
        double[,] a = Matrix(tableau);
        double[] c = [0, .. tableau.C, 1, .. tableau.ExtraC];
        for (int i = 0; i < c.Length; i++)
            Assert.True(Math.Abs(Enumerable.Range(0, c.Length).Sum(j => a[i, j]) - c[i]) <= RoundingOfLargeCoefficients, $"row {i}");
    }

    [Theory]
    [MemberData(nameof(Pairs))]
    public void Explicit_weights_have_their_order_and_no_higher_one(IntegrationMethod method)
    {
        ExplicitTableau tableau = Tableau(method);
        double[,] a = Matrix(tableau);
        double[] b = Padded(tableau.B, a);
        double misfit = ButcherTrees.LargestMisfit(a, b, tableau.Order);
        Assert.True(misfit <= Rounding, $"{misfit}");
        Assert.True(ButcherTrees.LargestMisfit(a, b, tableau.Order + 1) > 1e-6);
    }

    [Theory]
    [InlineData(IntegrationMethod.DormandPrince54, 4)]
    [InlineData(IntegrationMethod.Tsitouras54, 4)]
    [InlineData(IntegrationMethod.DormandPrince853, 5)]
    public void The_embedded_weights_have_their_order_and_no_higher_one(IntegrationMethod method, int order)
    {
        ExplicitTableau tableau = Tableau(method);
        double[,] a = Matrix(tableau);
        double[] embedded = [.. Padded(tableau.B, a).Zip(Padded(tableau.Error, a), static (b, e) => b - e)];
        double misfit = ButcherTrees.LargestMisfit(a, embedded, order);
        Assert.True(misfit <= Rounding, $"{misfit}");
        Assert.True(ButcherTrees.LargestMisfit(a, embedded, order + 1) > 1e-6);
    }

    [Fact]
    public void The_second_embedded_weights_of_the_method_of_order_eight_have_order_three_and_not_four()
    {
        ExplicitTableau tableau = Tableau(IntegrationMethod.DormandPrince853);
        double[,] a = Matrix(tableau);
        double[] embedded = [.. Padded(tableau.B, a).Zip(Padded(tableau.SecondError!, a), static (b, e) => b - e)];
        Assert.True(ButcherTrees.LargestMisfit(a, embedded, 3) <= Rounding);
        Assert.True(ButcherTrees.LargestMisfit(a, embedded, 4) > 1e-5);
    }

    [Theory]
    [InlineData(IntegrationMethod.DormandPrince54, 4)]
    [InlineData(IntegrationMethod.Tsitouras54, 4)]
    [InlineData(IntegrationMethod.DormandPrince853, 7)]
    public void An_explicit_continuation_has_its_order_at_every_place(IntegrationMethod method, int order)
    {
        ExplicitTableau tableau = Tableau(method);
        double[,] a = Matrix(tableau);
        double[] b = Padded(tableau.B, a);
        foreach (double theta in new[] { 0.1, 0.37, 0.5, 0.83 })
        {
            // The weights at a place: the stepper's own coefficients applied to unit stages.
            var weights = new double[b.Length];
            for (int i = 0; i < b.Length; i++)
            {
                double d2 = (i == 0 ? 1 : 0) - b[i], d3 = b[i] - (i == tableau.A.Length + 1 ? 1 : 0) - d2;
                double[] coefficients = [d2, d3, .. tableau.D.Select(row => Padded(row, a)[i])];
                weights[i] = DenseStep.Value(theta, 0, b[i], coefficients, 1, 0);
            }

            double misfit = ButcherTrees.LargestMisfit(a, weights, order, theta);
            Assert.True(misfit <= RoundingOfLargeCoefficients, $"{misfit} at {theta}");
        }
    }

    [Theory]
    [MemberData(nameof(RosenbrockMethods))]
    public void A_Rosenbrock_method_has_its_order_its_embedded_method_and_its_continuation_one_less(IntegrationMethod method)
    {
        RosenbrockTableau tableau = method == IntegrationMethod.Rodas4 ? Rodas4Tableau.Instance : Rodas5PTableau.Instance;
        int s = tableau.Places.Length;
        // Back from the form without products: Γ = (1/γ − C)⁻¹, α = A Γ, b = m Γ (Hairer and Wanner II, section IV.7, "Implementation").
        double[,] gamma = Invert(Lower(tableau.C, s, -1, 1 / tableau.Gamma)), alpha = Multiply(Lower(tableau.A, s, 1, 0), gamma);
        double[,] beta = new double[s, s];
        for (int i = 0; i < s; i++)
        {
            for (int j = 0; j < s; j++) beta[i, j] = alpha[i, j] + gamma[i, j];
            AssertSmall(Enumerable.Range(0, s).Sum(j => alpha[i, j]) - tableau.Places[i], "place " + i);
            AssertSmall(Enumerable.Range(0, s).Sum(j => gamma[i, j]) - tableau.TimeFactors[i], "time factor " + i);
        }

        AssertSmall(ButcherTrees.LargestMisfit(alpha, beta, Row(tableau.B), tableau.Order), "order");
        Assert.True(ButcherTrees.LargestMisfit(alpha, beta, Row(tableau.B), tableau.Order + 1) > 1e-6);
        double[] embedded = [.. tableau.B];
        embedded[^1] -= 1;
        AssertSmall(ButcherTrees.LargestMisfit(alpha, beta, Row(embedded), tableau.Order - 1), "embedded order");
        foreach (double theta in new[] { 0.2, 0.5, 0.9 })
        {
            double[] weights = [.. Enumerable.Range(0, s).Select(i => DenseStep.Value(theta, 0, tableau.B[i], [.. tableau.D.Select(row => row[i])], 1, 0))];
            AssertSmall(ButcherTrees.LargestMisfit(alpha, beta, Row(weights), tableau.Order - 1, theta), "continuation");
        }

        double[] Row(double[] m) => [.. Enumerable.Range(0, s).Select(j => Enumerable.Range(0, s).Sum(i => m[i] * gamma[i, j]))];

        // Coefficients are as large as 160.
        static void AssertSmall(double value, string what) => Assert.True(Math.Abs(value) <= 1e-12, $"{what}: {value}");
    }

    [Theory]
    [MemberData(nameof(RadauStages))]
    public void Radau_IIA_fulfils_the_simplifying_assumptions_of_its_order(int stages)
    {
        // E. Hairer, G. Wanner, Solving ODEs II, section IV.5: B(2s − 1), C(s), D(s − 1).
        RadauCoefficients method = Radau(stages);
        double[] c = method.C, b = [.. Enumerable.Range(0, stages).Select(j => method.A[stages - 1, j])];
        double[,] a = method.A;
        for (int q = 1; q < 2 * stages; q++) Assert.True(Math.Abs(Sum(i => b[i] * Math.Pow(c[i], q - 1)) - 1.0 / q) <= Rounding);
        for (int q = 1; q <= stages; q++)
        {
            for (int i = 0; i < stages; i++)
                Assert.True(Math.Abs(Sum(j => a[i, j] * Math.Pow(c[j], q - 1)) - Math.Pow(c[i], q) / q) <= Rounding);
        }

        for (int q = 1; q < stages; q++)
        {
            for (int j = 0; j < stages; j++)
                Assert.True(Math.Abs(Sum(i => b[i] * Math.Pow(c[i], q - 1) * a[i, j]) - b[j] / q * (1 - Math.Pow(c[j], q))) <= Rounding);
        }

        Assert.True(ButcherTrees.LargestMisfit(a, b, order: Math.Min(2 * stages - 1, 8)) <= Rounding);
        double Sum(Func<int, double> term) => Enumerable.Range(0, stages).Sum(term);
    }

    [Theory]
    [MemberData(nameof(RadauStages))]
    public void The_transformation_splits_the_inverse_of_Radaus_matrix_into_its_eigenvalues(int stages)
    {
        RadauCoefficients method = Radau(stages);
        // A T diag(γ, [α −β; β α], ...) = T.
        var blocks = new double[stages, stages];
        blocks[0, 0] = method.Gamma;
        for (int k = 0; k < method.Alpha.Length; k++)
        {
            int at = 2 * k + 1;
            (blocks[at, at], blocks[at, at + 1]) = (method.Alpha[k], -method.Beta[k]);
            (blocks[at + 1, at], blocks[at + 1, at + 1]) = (method.Beta[k], method.Alpha[k]);
        }

        double[,] product = Multiply(method.A, Multiply(method.T, blocks)), identity = Multiply(method.T, method.InverseT);
        double largest = method.T.Cast<double>().Max(Math.Abs), tolerance = RoundingOfLargeCoefficients * largest;
        for (int i = 0; i < stages; i++)
        {
            for (int j = 0; j < stages; j++)
            {
                Assert.True(Math.Abs(product[i, j] - method.T[i, j]) <= tolerance, $"{product[i, j] - method.T[i, j]}");
                Assert.True(Math.Abs(identity[i, j] - (i == j ? 1 : 0)) <= tolerance);
            }
        }

        // The real eigenvalue for three stages as printed in Solving ODEs II, section IV.8 (from memory): 3.637834252744496.
        if (stages == 3) Assert.True(Math.Abs(method.Gamma - 3.637834252744496) <= Rounding);
    }

    [Theory]
    [MemberData(nameof(RadauStages))]
    public void The_error_weights_of_Radau_IIA_agree_to_the_order_of_the_stages(int stages)
    {
        // f₀ + Σ eᵢ zᵢ / h vanishes for solutions of degree s or less: zᵢ = cᵢ^q / q for f = t^(q−1), and f₀ = 1 only for q = 1.
        RadauCoefficients method = Radau(stages);
        for (int q = 1; q <= stages; q++)
        {
            double estimate = (q == 1 ? 1 : 0) + Enumerable.Range(0, stages).Sum(i => method.ErrorWeights[i] * Math.Pow(method.C[i], q) / q);
            Assert.True(Math.Abs(estimate) <= RoundingOfLargeCoefficients, $"order {q}: {estimate}");
        }

        // Solving ODEs II, equation IV.8.19: −(13 + 7√6)/3, (−13 + 7√6)/3, −1/3.
        if (stages == 3) Assert.True(Math.Abs(method.ErrorWeights[2] + 1.0 / 3) <= Rounding && Math.Abs(method.ErrorWeights[0] + (13 + 7 * Math.Sqrt(6)) / 3) <= Rounding);
    }

    [Theory]
    [MemberData(nameof(RadauStages))]
    public void The_collocation_polynomial_goes_through_the_stages_and_on_into_the_next_step(int stages)
    {
        RadauCoefficients method = Radau(stages);
        var random = new Random(stages);
        double[] z = [.. Enumerable.Range(0, stages).Select(_ => random.NextDouble())];
        double[] d = [.. Enumerable.Range(0, stages - 1).Select(k => Enumerable.Range(0, stages).Sum(i => method.Dense[k, i] * z[i]))];
        for (int i = 0; i < stages; i++) Assert.True(Math.Abs(DenseStep.Value(method.C[i], 0, z[^1], d, 1, 0) - z[i]) <= RoundingOfLargeCoefficients);
        foreach (int other in new[] { 3, 5, 7 })
        {
            RadauCoefficients next = Radau(other);
            var weights = new double[other * stages];
            method.Extrapolate(next, 0.7, weights);
            for (int i = 0; i < other; i++)
            {
                double value = Enumerable.Range(0, stages).Sum(j => weights[i * stages + j] * z[j]);
                double expected = DenseStep.Value(1 + 0.7 * next.C[i], 0, z[^1], d, 1, 0) - z[^1];
                Assert.True(Math.Abs(value - expected) <= 1e-9 * Math.Max(1, Math.Abs(expected)), $"{value} against {expected}");
            }
        }
    }

    private static ExplicitTableau Tableau(IntegrationMethod method) => method switch
    {
        IntegrationMethod.DormandPrince54 => DormandPrince54Tableau.Instance,
        IntegrationMethod.Tsitouras54 => Tsitouras54Tableau.Instance,
        _ => DormandPrince853Tableau.Instance,
    };

    private static RadauCoefficients Radau(int stages) =>
        stages == 3 ? RadauCoefficients.Three : stages == 5 ? RadauCoefficients.Five : RadauCoefficients.Seven;

    // All stages, the rates at the end after the weights' own, the extra stages last.
    private static double[,] Matrix(ExplicitTableau tableau)
    {
        double[][] rows = [[], .. tableau.A, tableau.B, .. tableau.ExtraA];
        var a = new double[rows.Length, rows.Length];
        for (int i = 0; i < rows.Length; i++)
        {
            for (int j = 0; j < rows[i].Length; j++) a[i, j] = rows[i][j];
        }

        return a;
    }

    private static double[] Padded(double[] weights, double[,] a) => [.. weights, .. new double[a.GetLength(0) - weights.Length]];

    private static double[,] Lower(double[][] rows, int size, double sign, double diagonal)
    {
        var m = new double[size, size];
        for (int i = 0; i < size; i++)
        {
            m[i, i] = diagonal;
            for (int j = 0; j < i; j++) m[i, j] = sign * rows[i - 1][j];
        }

        return m;
    }

    // Of a lower triangular matrix.
    private static double[,] Invert(double[,] m)
    {
        int n = m.GetLength(0);
        var inverse = new double[n, n];
        for (int j = 0; j < n; j++)
        {
            for (int i = j; i < n; i++)
            {
                double sum = i == j ? 1 : 0;
                for (int k = j; k < i; k++) sum -= m[i, k] * inverse[k, j];
                inverse[i, j] = sum / m[i, i];
            }
        }

        return inverse;
    }

    private static double[,] Multiply(double[,] a, double[,] b)
    {
        int n = a.GetLength(0);
        var product = new double[n, n];
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
            {
                for (int k = 0; k < n; k++) product[i, j] += a[i, k] * b[k, j];
            }
        }

        return product;
    }
}
