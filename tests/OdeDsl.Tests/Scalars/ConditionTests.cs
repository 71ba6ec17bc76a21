using OdeDsl.Scalars;
using Xunit;

namespace OdeDsl.Tests.Scalars;

/// <summary>Comparisons, choices and functions with kinks on every kind of number.</summary>
public sealed class ConditionTests
{
    private static readonly double[] Numbers =
        [-2.5, -1, -0.5, -0.0, 0.0, 0.5, 1, 2.5, double.NaN, double.PositiveInfinity, double.NegativeInfinity, 4503599627370497.5];

    [Fact]
    public void Doubles_lanes_and_series_decide_as_CSharp_does()
    {
        foreach (double x in Numbers)
        {
            foreach (double y in Numbers)
            {
                double[] expected = [x < y ? x : y, x <= y ? 1 : 2, x == y ? 1 : 2, Math.Min(x, y), Math.Max(x, y), Math.Floor(x), x < y && y < 1 ? 1 : 2];
                Assert.Equal(Bits(expected), Bits(Evaluate(new ScalarDouble(x), new ScalarDouble(y)).Select(v => v.Value)));
                Assert.Equal(Bits(expected), Bits(Evaluate(Lanes4.Constant(x), Lanes4.Constant(y)).Select(v => v[3])));
                Assert.Equal(Bits(expected), Bits(Evaluate(Lanes8.Constant(x), Lanes8.Constant(y)).Select(v => v[7])));
                Assert.Equal(Bits(expected), Bits(Evaluate(Jet<Order3>.Constant(x), Jet<Order3>.Constant(y)).Select(v => v.Value)));
                Assert.Equal(Bits(expected), Bits(Evaluate(Jet<Order8>.Constant(x), Jet<Order8>.Constant(y)).Select(v => v.Value)));
            }
        }
    }

    [Fact]
    public void Lanes_choose_lane_by_lane()
    {
        Lanes4 x = new([1, 2, 3, double.NaN]), limit = Lanes4.Constant(2);
        Lanes4 chosen = Lanes4.Choose(Lanes4.LessOrEqual(x, limit), x, Lanes4.Constant(-1));
        Assert.Equal([1, 2, -1, -1], Enumerable.Range(0, 4).Select(lane => chosen[lane]));
    }

    [Fact]
    public void Series_keep_the_terms_of_the_branch_taken()
    {
        Jet<Order3> rising = Jet<Order3>.Variable(1, 2), falling = Jet<Order3>.Variable(3, -4);
        Assert.Equal(rising, Jet<Order3>.Min(rising, falling));
        Assert.Equal(falling, Jet<Order3>.Max(rising, falling));
        Assert.Equal(falling, Jet<Order3>.Choose(Jet<Order3>.Less(falling, rising), rising, falling));
        Assert.True(Jet<Order3>.Floor(falling).IsConstant);
    }

    [Fact]
    public void Intervals_contain_what_their_points_give_and_are_tight_where_a_condition_is_decided()
    {
        Random random = new(8);
        for (int trial = 0; trial < 20_000; trial++)
        {
            (double a, double b) = (4 * random.NextDouble() - 2, 4 * random.NextDouble() - 2);
            (double wide, double narrow) = (random.NextDouble(), random.NextDouble());
            Interval[] results = Evaluate(new Interval(a, a + wide), new Interval(b, b + narrow));
            for (int k = 0; k < 10; k++)
            {
                ScalarDouble x = new(a + wide * random.NextDouble()), y = new(b + narrow * random.NextDouble());
                ScalarDouble[] values = Evaluate(x, y);
                for (int i = 0; i < values.Length; i++) Assert.True(results[i].Contains(values[i].Value), $"{i}: {values[i]} in {results[i]}");
            }
        }

        Assert.Equal(new Interval(1, 2), Interval.Min(new Interval(1, 2), new Interval(3, 4)));
        Assert.Equal(Interval.Constant(5), Interval.Choose(
            Interval.Less(new Interval(1, 2), new Interval(3, 4)), Interval.Constant(5), Interval.Constant(6)));
        Assert.Equal(new Interval(5, 6), Interval.Choose(
            Interval.Less(new Interval(1, 3), new Interval(2, 4)), Interval.Constant(5), Interval.Constant(6)));
    }

    [Fact]
    public void A_choice_left_open_is_not_called_continuous()
    {
        DecoratedInterval five = DecoratedInterval.Constant(5), six = DecoratedInterval.Constant(6), zero = DecoratedInterval.Constant(0);
        DecoratedInterval across = new(new Interval(-1, 1)), above = new(new Interval(1, 2));
        Assert.False(DecoratedInterval.Choose(DecoratedInterval.Less(across, zero), five, six).IsContinuous);
        Assert.True(DecoratedInterval.Choose(DecoratedInterval.Less(above, zero), five, six).IsContinuous);
        Assert.False(DecoratedInterval.Floor(across).IsContinuous);
        Assert.True(DecoratedInterval.Min(across, above).IsContinuous);
    }

    private static T[] Evaluate<T>(T x, T y)
        where T : struct, IScalar<T>
    {
        (T one, T two) = (T.Constant(1), T.Constant(2));
        T both = T.Choose(T.Less(x, y), T.Less(y, one), T.Condition(false));
        return
        [
            T.Choose(T.Less(x, y), x, y), T.Choose(T.LessOrEqual(x, y), one, two), T.Choose(T.Equal(x, y), one, two),
            T.Min(x, y), T.Max(x, y), T.Floor(x), T.Choose(both, one, two),
        ];
    }

    private static string[] Bits(IEnumerable<double> values) =>
        [.. values.Select(value => double.IsNaN(value) ? "NaN" : $"{BitConverter.DoubleToInt64Bits(value):X16}")];
}
