using OdeDsl.Assessment;
using OdeDsl.Modeling;
using Xunit;

namespace OdeDsl.Tests.Assessment;

public class ParameterRangeTests
{
    private const double Inf = double.PositiveInfinity;

    [Theory]
    [InlineData(-Inf, Inf, 4, 0.4, 40)]
    [InlineData(-Inf, Inf, -4, -40, -0.4)]
    [InlineData(-Inf, Inf, 0, -10, 10)]
    [InlineData(1, Inf, 4, 1, 40)]
    [InlineData(-Inf, 5, 4, 0.4, 5)]
    [InlineData(1, 5, 4, 1, 5)]
    [InlineData(1, 5, 7, 1, 7)]
    public void Bounds_count_and_infinite_ones_are_replaced_by_the_factor(double lower, double upper, double value, double from, double to)
    {
        ParameterRange range = ParameterRange.Of(new ParameterDescription("P", "", value, lower, upper), value, 10);
        Assert.Equal((from, to), (range.Lower, range.Upper));
    }
}
