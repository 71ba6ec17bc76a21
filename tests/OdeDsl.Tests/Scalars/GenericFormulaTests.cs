using OdeDsl.Scalars;
using Xunit;

namespace OdeDsl.Tests.Scalars;

/// <summary>One generic body, as the generator will print it, on every kind of number.</summary>
public sealed class GenericFormulaTests
{
    // A weir behind a gate with friction: literals, a locked condition, powers, a quotient and elementary functions.
    private static TScalar Rate<TScalar>(TScalar level, TScalar flow, TScalar width, bool overflowing)
        where TScalar : struct, IScalar<TScalar>
    {
        TScalar spill = overflowing ? 1.84 * width * TScalar.Pow(level - 2.0, TScalar.Constant(1.5)) : TScalar.Constant(0);
        TScalar friction = 0.02 * flow * TScalar.Sqrt(TScalar.Square(flow) + 0.01);
        return (flow - spill - friction + (0.5 * TScalar.Sin(level / 3.0))) / (width * (1.0 + TScalar.Exp(-level)));
    }

    private static Jet<TOrder> RateOfSeries<TOrder>(double level, double flow, double width, bool overflowing)
        where TOrder : struct, IJetOrder<TOrder> =>
        Rate(Jet<TOrder>.Variable(level, 1), Jet<TOrder>.Variable(flow, -1), Jet<TOrder>.Constant(width), overflowing);

    private static double Plain(double level, double flow, double width, bool overflowing)
    {
        double spill = overflowing ? 1.84 * width * Math.Pow(level - 2.0, 1.5) : 0;
        double friction = 0.02 * flow * Math.Sqrt((flow * flow) + 0.01);
        return (flow - spill - friction + (0.5 * Math.Sin(level / 3.0))) / (width * (1.0 + Math.Exp(-level)));
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void A_body_gives_plain_code_s_value_on_every_kind(bool overflowing)
    {
        Random random = new(61);
        for (int i = 0; i < 2_000; i++)
        {
            double x = Doubles.Between(random, 2.1, 5), q = Doubles.Between(random, -3, 9), w = Doubles.Between(random, 1, 4);
            double expected = Plain(x, q, w, overflowing);
            Assert.Equal(expected, Rate<ScalarDouble>(new(x), new(q), new(w), overflowing).Value);
            Assert.Equal(expected, RateOfSeries<Order3>(x, q, w, overflowing).Value);
            Assert.Equal(expected, RateOfSeries<Order8>(x, q, w, overflowing).Value);
            Assert.Equal(expected, Rate(Lanes4.Constant(x), Lanes4.Constant(q), Lanes4.Constant(w), overflowing)[2], 1e-11);
            Assert.Equal(expected, Rate(Lanes8.Constant(x), Lanes8.Constant(q), Lanes8.Constant(w), overflowing)[5], 1e-11);
            Interval point = Rate(Interval.Constant(x), Interval.Constant(q), Interval.Constant(w), overflowing);
            Assert.True(point.Contains(expected) && point.Width <= 1e-12);
        }
    }

    [Fact]
    public void A_body_on_intervals_contains_its_values_on_a_hundred_thousand_samples()
    {
        Random random = new(62);
        for (int i = 0; i < 2_000; i++)
        {
            double x = Doubles.Between(random, 2.1, 5), q = Doubles.Between(random, -3, 9), w = Doubles.Between(random, 1, 4);
            double radius = Math.ScaleB(1, -random.Next(30));
            DecoratedInterval enclosure = Rate<DecoratedInterval>(
                new(new Interval(x, x + radius)), new(new Interval(q, q + radius)), new(new Interval(w, w + radius)), overflowing: true);
            Assert.True(enclosure.IsContinuous);
            for (int k = 0; k < 50; k++)
            {
                double dx = radius * random.NextDouble(), dq = radius * random.NextDouble(), dw = radius * random.NextDouble();
                double value = Plain(x + dx, q + dq, w + dw, overflowing: true);
                if (!enclosure.Value.Contains(value)) Assert.Fail($"{value:R} outside {enclosure.Value}");
            }
        }
    }

    [Fact]
    public void No_kind_allocates()
    {
        CheckAllocation(new ScalarDouble(0.75), new ScalarDouble(1.25));
        CheckAllocation(Lanes4.Constant(0.75), Lanes4.Constant(1.25));
        CheckAllocation(Lanes8.Constant(0.75), Lanes8.Constant(1.25));
        CheckAllocation(new Interval(0.5, 0.75), new Interval(1.25, 1.5));
        CheckAllocation(new DecoratedInterval(new Interval(0.5, 0.75)), new DecoratedInterval(new Interval(1.25, 1.5)));
        CheckAllocation(Jet<Order3>.Variable(0.75, 1), Jet<Order3>.Variable(1.25, 1));
        CheckAllocation(Jet<Order8>.Variable(0.75, 1), Jet<Order8>.Variable(1.25, 1));
    }

    private static void CheckAllocation<TScalar>(TScalar x, TScalar y)
        where TScalar : struct, IScalar<TScalar>
    {
        Func<TScalar, TScalar>[] unary = [.. FunctionTable.OfOne.Select(f => FunctionTable.One<TScalar>(f.Name))];
        Func<TScalar, TScalar, TScalar>[] binary = [.. FunctionTable.OfTwo.Select(f => FunctionTable.Two<TScalar>(f.Name))];
        TScalar last = x;
        long before = 0;
        for (int round = 0; round < 20; round++)
        {
            if (round == 10) before = GC.GetAllocatedBytesForCurrentThread(); // everything is compiled and cached by now
            foreach (Func<TScalar, TScalar> function in unary) last = function(x);
            foreach (Func<TScalar, TScalar, TScalar> operation in binary) last = operation(x, y);
        }

        long allocated = GC.GetAllocatedBytesForCurrentThread() - before;
        Assert.True(allocated == 0, $"{typeof(TScalar).Name}: {allocated} bytes, last {last}");
    }
}
