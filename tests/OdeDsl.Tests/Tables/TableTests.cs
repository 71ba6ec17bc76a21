using CsCheck;
using OdeDsl;
using Xunit;

namespace OdeDsl.Tests.Tables;

public sealed class TableTests
{
    // The radiochemical data of F. N. Fritsch and R. E. Carlson (SIAM Journal on Numerical Analysis 17, 1980, table 1; from memory), on which
    // cubic splines overshoot.
    private static readonly double[] FritschCarlsonKnots = [7.99, 8.09, 8.19, 8.7, 9.2, 10, 12, 15, 20];
    private static readonly double[] FritschCarlsonValues = [0, 2.76429e-5, 4.37498e-2, 0.169183, 0.469428, 0.943740, 0.998636, 0.999919, 0.999994];

    private static readonly Gen<double[]> Ascending = Gen.Double[0.01, 3].Array[3, 12].Select(static steps =>
    {
        for (int i = 1; i < steps.Length; i++) steps[i] += steps[i - 1];
        return steps;
    });

    // The formulas of C. B. Moler, Numerical Computing with MATLAB (2004), section 3.6, evaluated in rational arithmetic with Hermite's basis.
    [Theory]
    [InlineData(8.0, 2.767433863187347e-07)]
    [InlineData(8.15, 0.023528278365785697)]
    [InlineData(8.4, 0.09666880560766491)]
    [InlineData(9.0, 0.3375343268461977)]
    [InlineData(9.7, 0.8285693786523166)]
    [InlineData(11, 0.9860433625350503)]
    [InlineData(13, 0.9993618220922759)]
    [InlineData(17, 0.9999680257722139)]
    [InlineData(19.5, 0.9999933141107634)]
    public void The_shape_preserving_cubic_of_Fritsch_and_Carlsons_data_has_the_values_of_rational_arithmetic(double x, double expected)
    {
        Table table = new(FritschCarlsonKnots, FritschCarlsonValues, Interpolation.ShapePreservingCubic, Extrapolation.Fail);
        Assert.True(Math.Abs(table.At(x) - expected) <= 4e-15, $"{table.At(x):R}");
    }

    [Fact]
    public void The_slopes_of_a_shape_preserving_cubic_lie_in_the_region_of_monotony_of_Fritsch_and_Carlson() =>
        Gen.Select(Ascending, Gen.Double[-2, 2].Array[12]).Sample(static (knots, values) =>
        {
            Table table = new(knots, values.AsSpan(0, knots.Length), Interpolation.ShapePreservingCubic, Extrapolation.Hold);
            for (int i = 0; i + 1 < knots.Length; i++)
            {
                double chord = (values[i + 1] - values[i]) / (knots[i + 1] - knots[i]);
                if (chord == 0)
                {
                    Assert.Equal((0, 0), (table.Derivative(1, knots[i], i), table.Derivative(1, knots[i + 1], i)));
                    continue;
                }

                double alpha = table.Derivative(1, knots[i], i) / chord, beta = table.Derivative(1, knots[i + 1], i) / chord;
                // The paper's sufficient square: 0 to 3 for both.
                Assert.True(alpha >= -1e-9 && alpha <= 3 + 1e-9 && beta >= -1e-9 && beta <= 3 + 1e-9, $"{alpha:R} {beta:R}");
            }
        });

    [Theory]
    [InlineData(Interpolation.Linear)]
    [InlineData(Interpolation.ShapePreservingCubic)]
    public void A_table_gives_its_values_at_its_knots_exactly_and_continuously(Interpolation interpolation)
    {
        Table table = new(FritschCarlsonKnots, FritschCarlsonValues, interpolation, Extrapolation.Fail);
        for (int i = 0; i < FritschCarlsonKnots.Length; i++)
        {
            double x = FritschCarlsonKnots[i];
            Assert.Equal(FritschCarlsonValues[i], table.At(x));
            Assert.True(Math.Abs(table.At(x, i - 1) - FritschCarlsonValues[i]) <= 1e-15 || i == 0);
            Assert.Equal(i, table.Position(x, i));
            if (i > 0) Assert.Equal(i, table.Position(x, i - 1), 14);
            if (interpolation == Interpolation.ShapePreservingCubic && i > 0 && i + 1 < FritschCarlsonKnots.Length)
                Assert.Equal(table.Derivative(1, x, i), table.Derivative(1, x, i - 1), 12);
        }
    }

    [Fact]
    public void A_straight_line_is_reproduced_by_both_interpolations_and_continued_beyond_the_knots()
    {
        double[] knots = [-1, 0.5, 2, 7];
        foreach (Interpolation interpolation in Enum.GetValues<Interpolation>())
        {
            Table table = new(knots, Array.ConvertAll(knots, static x => 3 - 2 * x), interpolation, Extrapolation.ContinueLine);
            foreach (double x in (double[])[-4, -1, -0.3, 0.5, 1, 3, 6.9, 7, 30]) Assert.Equal(3 - 2 * x, table.At(x), 12);
        }
    }

    [Fact]
    public void Beyond_the_knots_a_table_holds_its_end_values_or_fails_as_chosen()
    {
        Table held = new([0, 1, 2], [5, 7, 4], Interpolation.Linear, Extrapolation.Hold);
        Assert.Equal(5, held.At(-3));
        Assert.Equal(4, held.At(1e300));
        Assert.True(double.IsNaN(held.At(double.NaN)));
        Table strict = new([0, 1, 2], [5, 7, 4], Interpolation.Linear, Extrapolation.Fail);
        Assert.Equal(4, strict.At(2));
        TableRangeException failure = Assert.Throws<TableRangeException>(() => strict.At(2.001));
        Assert.Equal((0, 2, 2.001), (failure.First, failure.Last, (double)failure.ActualValue!));
        Assert.Contains("from 0 to 2", failure.Message, StringComparison.Ordinal);
        Assert.Throws<TableRangeException>(() => strict.At(-1e-9));
        Assert.True(double.IsNaN(strict.At(2.001, 2)), "locked forms never throw");
        Assert.Equal(4, strict.At(2.0, 2));
    }

    [Fact]
    public void The_segment_is_the_last_knot_not_above_the_argument_for_even_and_uneven_knots() =>
        Gen.Select(Ascending, Gen.Double[-1, 40].Array[20], Gen.Bool).Sample(static (knots, arguments, even) =>
        {
            if (even) knots = [.. Enumerable.Range(0, knots.Length).Select(i => i * 0.1)];
            Table table = new(knots, knots, Interpolation.Linear, Extrapolation.Hold);
            foreach (double x in arguments.Concat(knots)) Assert.Equal(Array.FindLastIndex(knots, knot => knot <= x), table.Segment(x));
        });

    [Fact]
    public void Derivatives_agree_with_differences_of_the_order_below()
    {
        Table table = new(FritschCarlsonKnots, FritschCarlsonValues, Interpolation.ShapePreservingCubic, Extrapolation.ContinueLine);
        for (int segment = -1; segment < FritschCarlsonKnots.Length; segment++)
        {
            double x = 8.37, h = 1e-3;
            // A difference of a polynomial of degree three is exact but for h²/6 times its third derivative.
            double third = table.Derivative(3, x, segment);
            double first = (table.At(x + h, segment) - table.At(x - h, segment)) / (2 * h) - h * h * third / 6;
            double second = (table.Derivative(1, x + h, segment) - table.Derivative(1, x - h, segment)) / (2 * h);
            Assert.Equal(first, table.Derivative(1, x, segment), 1e-9 * (1 + Math.Abs(first)));
            Assert.Equal(second, table.Derivative(2, x, segment), 1e-9 * (1 + Math.Abs(second)));
            Assert.Equal((table.Derivative(2, x + h, segment) - table.Derivative(2, x - h, segment)) / (2 * h), third, 1e-8 * (1 + Math.Abs(third)));
        }
    }

    [Fact]
    public void Ill_formed_knots_are_refused_with_their_place()
    {
        static string Message(double[] knots, double[] values) =>
            Assert.Throws<ArgumentException>(() => new Table(knots, values, Interpolation.Linear, Extrapolation.Hold)).Message;
        Assert.Contains("at least two knots, but 1 were given", Message([1], [1]), StringComparison.Ordinal);
        Assert.Contains("3 knots, but 2 values", Message([1, 2, 3], [1, 2]), StringComparison.Ordinal);
        Assert.Contains("knot 2 (2) is not above knot 1 (2)", Message([1, 2, 2], [1, 2, 3]), StringComparison.Ordinal);
        Assert.Contains("Knot 1 is NaN", Message([1, double.NaN, 2], [1, 2, 3]), StringComparison.Ordinal);
        Assert.Contains("Value 2 is", Message([1, 2, 3], [1, 2, double.NegativeInfinity]), StringComparison.Ordinal);
        Assert.Contains("slope between knots 0 and 1", Message([0, double.Epsilon], [0, 1]), StringComparison.Ordinal);
        Assert.Throws<ArgumentOutOfRangeException>(() => new Table([0, 1], [0, 1], (Interpolation)9, Extrapolation.Hold));
        Assert.Throws<ArgumentOutOfRangeException>(() => new Table([0, 1], [0, 1], Interpolation.Linear, (Extrapolation)9));
    }

    [Fact]
    public void A_table_of_a_hundred_thousand_knots_is_read_without_allocation()
    {
        double[] knots = [.. Enumerable.Range(0, 100_000).Select(static i => i + 0.3 * Math.Sin(i))];
        Table table = new(knots, [.. knots.Select(Math.Sqrt)], Interpolation.ShapePreservingCubic, Extrapolation.Hold);
        double sum = table.At(17.3);
        long before = GC.GetAllocatedBytesForCurrentThread();
        for (int i = 0; i < 1000; i++) sum += table.At(i * 99.7) + table.Derivative(1, i * 99.7, i * 99);
        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
        Assert.True(double.IsFinite(sum));
    }
}
