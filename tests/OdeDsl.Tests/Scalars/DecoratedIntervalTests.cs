using OdeDsl.Scalars;
using Xunit;

namespace OdeDsl.Tests.Scalars;

public sealed class DecoratedIntervalTests
{
    // An argument on which the function is defined and continuous, and one on which it is not.
    [Theory]
    [InlineData("Sqrt", 0, 4, -1, 4)]
    [InlineData("Log", 0.5, 4, 0, 4)]
    [InlineData("Log2", 0.5, 4, 0, 4)]
    [InlineData("Log10", 0.5, 4, 0, 4)]
    [InlineData("Asin", -1, 1, -1, 1.5)]
    [InlineData("Acos", -1, 1, -1.5, 1)]
    [InlineData("Acosh", 1, 3, 0.5, 3)]
    [InlineData("Atanh", -0.5, 0.5, -0.5, 1)]
    [InlineData("Tan", -1, 1, 1, 2)]
    public void A_function_is_continuous_within_its_domain_only(
        string name, double lower, double upper, double beyondLower, double beyondUpper)
    {
        Func<DecoratedInterval, DecoratedInterval> function = FunctionTable.One<DecoratedInterval>(name);
        Assert.True(function(Of(lower, upper)).IsContinuous);
        Assert.False(function(Of(beyondLower, beyondUpper)).IsContinuous);
        Assert.False(function(Of(lower, upper) with { IsContinuous = false }).IsContinuous);
    }

    [Fact]
    public void Values_are_those_of_the_plain_intervals()
    {
        Interval x = new(0.25, 0.5), y = new(1.5, 2.5);
        foreach (FunctionTable.Unary function in FunctionTable.OfOne)
        {
            Interval expected = FunctionTable.One<Interval>(function.Name)(x);
            Assert.Equal(expected, FunctionTable.One<DecoratedInterval>(function.Name)(new(x)).Value);
        }

        foreach (FunctionTable.Binary operation in FunctionTable.OfTwo)
        {
            DecoratedInterval actual = FunctionTable.Two<DecoratedInterval>(operation.Name)(new(x), new(y));
            Assert.Equal(FunctionTable.Two<Interval>(operation.Name)(x, y), actual.Value);
            Assert.True(actual.IsContinuous, operation.Name);
        }

        foreach (string name in (string[])["Add", "Subtract", "Multiply", "Divide"])
        {
            (Func<DecoratedInterval, double, DecoratedInterval> right, Func<double, DecoratedInterval, DecoratedInterval> left) =
                FunctionTable.Mixed<DecoratedInterval>(name);
            Assert.Equal(FunctionTable.Two<Interval>(name)(x, Interval.Constant(3)), right(new(x), 3).Value);
            Assert.Equal(FunctionTable.Two<Interval>(name)(Interval.Constant(3), x), left(3, new(x)).Value);
        }

        Assert.Equal((x * y) + x, DecoratedInterval.FusedMultiplyAdd(new(x), new(y), new(x)).Value);
    }

    [Fact]
    public void Jumps_and_poles_of_two_arguments_are_noticed()
    {
        Assert.False((Of(1, 2) / Of(0, 1)).IsContinuous);
        Assert.False((1.0 / Of(-1, 1)).IsContinuous);
        Assert.False(DecoratedInterval.Atan2(Of(-1, 1), Of(-2, -1)).IsContinuous);
        Assert.True(DecoratedInterval.Atan2(Of(-1, 1), Of(1, 2)).IsContinuous);
        Assert.False(DecoratedInterval.CopySign(Of(1, 2), Of(0, 1)).IsContinuous);
        Assert.False((Of(1, 3) % Of(2, 2)).IsContinuous);
        Assert.False(DecoratedInterval.IEEERemainder(Of(0, 2), Of(2, 2)).IsContinuous);
        Assert.True((Of(2.5, 3) % Of(2, 2)).IsContinuous);
        Assert.False(DecoratedInterval.Log(Of(2, 3), Of(0.5, 2)).IsContinuous);
    }

    [Fact]
    public void A_power_is_continuous_where_it_is_defined()
    {
        Assert.True(DecoratedInterval.Pow(Of(0, 2), Of(1.5, 1.5)).IsContinuous);
        Assert.False(DecoratedInterval.Pow(Of(-1, 2), Of(1.5, 1.5)).IsContinuous);
        Assert.True(DecoratedInterval.Pow(Of(-1, 2), Of(3, 3)).IsContinuous);
        Assert.False(DecoratedInterval.Pow(Of(-1, 2), Of(-1, -1)).IsContinuous);
        Assert.True(DecoratedInterval.Pow(Of(-2, -1), Of(-1, -1)).IsContinuous);
        Assert.True(DecoratedInterval.Pow(Of(1, 2), Of(-1, 1)).IsContinuous);
        Assert.False(DecoratedInterval.Pow(Of(0, 2), Of(0, 1)).IsContinuous);
    }

    // 10 x + x^1.5 + 1 has no zero where it is defined, yet its enclosure over [-1, 4] contains zero and its derivative's does not:
    // only the decoration keeps a proof by continuity from finding one.
    [Fact]
    public void A_cut_argument_cannot_pass_for_a_proof()
    {
        DecoratedInterval x = Of(-1, 4);
        DecoratedInterval value = (10.0 * x) + DecoratedInterval.Pow(x, DecoratedInterval.Constant(1.5)) + 1.0;
        Assert.True(value.Value.Contains(0));
        Assert.False(value.IsContinuous);
    }

    [Fact]
    public void An_empty_argument_is_not_continuous()
    {
        Assert.False(new DecoratedInterval(Interval.Empty).IsContinuous);
        Assert.False(DecoratedInterval.Constant(double.NaN).IsContinuous);
    }

    private static DecoratedInterval Of(double lower, double upper) => new(new Interval(lower, upper));
}
