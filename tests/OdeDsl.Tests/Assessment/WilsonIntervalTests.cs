using OdeDsl.Assessment;
using Xunit;

namespace OdeDsl.Tests.Assessment;

public class WilsonIntervalTests
{
    // R. G. Newcombe, Statistics in Medicine 17 (1998) 857, table I, method 3 (from memory).
    [Theory]
    [InlineData(81, 263, 0.2553, 0.3662)]
    [InlineData(15, 148, 0.0624, 0.1605)]
    [InlineData(0, 20, 0, 0.1611)]
    [InlineData(1, 29, 0.0061, 0.1718)]
    public void The_interval_agrees_with_the_published_examples(int count, int sample, double lower, double upper)
    {
        (double low, double high) = WilsonInterval.Of(count, sample);
        Assert.True(Math.Abs(low - lower) <= 5e-5 && Math.Abs(high - upper) <= 5e-5, $"{low} {high}");
    }

    [Fact]
    public void All_of_a_sample_reaches_one() => Assert.True(Math.Abs(WilsonInterval.Of(12, 12).Upper - 1) <= 1e-15);
}
