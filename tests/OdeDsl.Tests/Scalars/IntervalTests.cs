using OdeDsl.Scalars;
using Xunit;

namespace OdeDsl.Tests.Scalars;

public sealed class IntervalTests
{
    private const double Infinity = double.PositiveInfinity;

    [Theory]
    [InlineData(2, 1)]
    [InlineData(double.NaN, 1)]
    [InlineData(0, double.NaN)]
    [InlineData(Infinity, Infinity)]
    [InlineData(-Infinity, -Infinity)]
    public void Bounds_that_enclose_no_number_are_refused(double lower, double upper)
    {
        ArgumentException error = Assert.Throws<ArgumentException>(() => new Interval(lower, upper));
        Assert.Contains("lower must not exceed upper", error.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void An_interval_knows_its_bounds_and_sizes()
    {
        Interval interval = new(-1, 4);
        Assert.Equal((-1.0, 4.0), (interval.Lower, interval.Upper));
        Assert.Equal((1.5, 4.0, 0.0), (interval.Midpoint, interval.Magnitude, interval.Mignitude));
        Assert.True(interval.Width >= 5 && interval.Width <= Math.BitIncrement(5));
        Assert.Equal(2, new Interval(-3, -2).Mignitude);
        Assert.Equal(2, new Interval(2, 3).Mignitude);
        Assert.Equal(0, new Interval(3, 3).Width);
        Assert.True(interval.IsBounded && !interval.IsEmpty);
        Assert.Equal("[-1, 4]", interval.ToString());
        Assert.Equal("[0, 0]", (-Interval.Constant(0)).ToString());
    }

    [Theory]
    [InlineData(double.Epsilon, double.Epsilon)]
    [InlineData(double.MinValue, double.MaxValue)]
    [InlineData(1e308, double.MaxValue)]
    [InlineData(0, double.Epsilon)]
    [InlineData(-Infinity, 3)]
    [InlineData(3, Infinity)]
    [InlineData(-Infinity, Infinity)]
    public void The_midpoint_is_a_finite_number_inside(double lower, double upper)
    {
        Interval interval = new(lower, upper);
        Assert.True(double.IsFinite(interval.Midpoint) && interval.Contains(interval.Midpoint));
    }

    [Fact]
    public void Containment_includes_the_ends_and_the_interior_does_not()
    {
        Interval interval = new(0, 1);
        Assert.True(interval.Contains(0) && interval.Contains(1) && !interval.Contains(Math.BitIncrement(1)));
        Assert.False(interval.Contains(double.NaN));
        Assert.True(interval.Contains(new Interval(0, 1)) && !interval.Contains(new Interval(0.5, 1.5)));
        Assert.True(interval.ContainsInInterior(new Interval(0.1, 0.9)) && !interval.ContainsInInterior(new Interval(0, 0.9)));
        Assert.True(interval.Contains(Interval.Empty) && interval.ContainsInInterior(Interval.Empty));
        Assert.False(Interval.Empty.Contains(interval) || Interval.Empty.ContainsInInterior(interval) || Interval.Empty.Contains(0));
        Assert.True(Interval.Whole.ContainsInInterior(Interval.Whole));
        Assert.True(Interval.Whole.Contains(Infinity));
    }

    [Fact]
    public void Intersection_and_hull_behave_as_sets()
    {
        Interval a = new(0, 2), b = new(1, 3), apart = new(5, 6);
        Assert.Equal(new Interval(1, 2), Interval.Intersect(a, b));
        Assert.Equal(new Interval(2, 2), Interval.Intersect(a, new Interval(2, 9)));
        Assert.Equal(Interval.Empty, Interval.Intersect(a, apart));
        Assert.Equal(Interval.Empty, Interval.Intersect(a, Interval.Empty));
        Assert.Equal(new Interval(0, 6), Interval.Hull(a, apart));
        Assert.Equal(a, Interval.Hull(a, Interval.Empty));
        Assert.Equal(a, Interval.Hull(Interval.Empty, a));
        Assert.Equal(Interval.Whole, Interval.Hull(Interval.Whole, a));
        Assert.True(a != b && a == new Interval(-0.0, 2) && a.GetHashCode() == new Interval(-0.0, 2).GetHashCode());
    }

    [Fact]
    public void Constants_that_are_no_numbers_become_unbounded_or_empty()
    {
        Assert.Equal(new Interval(double.MaxValue, Infinity), Interval.Constant(Infinity));
        Assert.Equal(new Interval(-Infinity, double.MinValue), Interval.Constant(-Infinity));
        Assert.True(Interval.Constant(double.NaN).IsEmpty);
        Assert.Equal("empty", Interval.Empty.ToString());
        Assert.True(double.IsNaN(Interval.Empty.Midpoint) && double.IsNaN(Interval.Empty.Width) && double.IsNaN(Interval.Empty.Magnitude));
    }

    [Theory]
    [InlineData(-1, 1)]
    [InlineData(0, 1)]
    [InlineData(-1, 0)]
    [InlineData(0, 0)]
    public void A_denominator_that_contains_zero_gives_the_whole_line(double lower, double upper) =>
        Assert.Equal(Interval.Whole, new Interval(1, 2) / new Interval(lower, upper));

    [Fact]
    public void Zero_times_an_unbounded_interval_is_zero()
    {
        Interval zero = Interval.Constant(0);
        Assert.True((zero * Interval.Whole).Magnitude <= double.Epsilon);
        Assert.True((Interval.Whole * 0.0).Magnitude <= double.Epsilon);
        Interval half = new Interval(0, 1) * new Interval(2, Infinity);
        Assert.True(half.Lower <= 0 && half.Lower >= -double.Epsilon && half.Upper == Infinity);
        Assert.Equal(Interval.Whole, new Interval(-1, 1) * new Interval(2, Infinity));
    }

    [Fact]
    public void An_overflow_bounds_the_result_by_the_largest_double_on_the_near_side()
    {
        Interval large = new(1e308, 1.5e308);
        Interval sum = large + large, difference = -large - large, product = large * new Interval(-20, -10);
        Assert.True(sum.Upper == Infinity && sum.Lower <= double.MaxValue && sum.Lower >= 1.79e308);
        Assert.True(difference.Lower == -Infinity && difference.Upper >= double.MinValue && difference.Upper <= -1.79e308);
        Assert.True(product.Lower == -Infinity && product.Upper >= double.MinValue && product.Upper <= -1.79e308);
        Assert.True(Interval.Exp(new Interval(800, 900)) is { Upper: Infinity, Lower: <= double.MaxValue and > 1.79e308 });
    }

    [Fact]
    public void The_empty_interval_is_handed_on_by_every_operation_and_function()
    {
        Interval one = Interval.Constant(1), empty = Interval.Empty;
        foreach (FunctionTable.Unary function in FunctionTable.OfOne)
        {
            Assert.True(FunctionTable.One<Interval>(function.Name)(empty).IsEmpty, function.Name);
        }

        foreach (FunctionTable.Binary operation in FunctionTable.OfTwo)
        {
            Func<Interval, Interval, Interval> apply = FunctionTable.Two<Interval>(operation.Name);
            Assert.True(apply(empty, one).IsEmpty && apply(one, empty).IsEmpty && apply(empty, Interval.Whole).IsEmpty, operation.Name);
        }

        Assert.True((empty * 2.0).IsEmpty && (0.0 * empty).IsEmpty && (empty / 2.0).IsEmpty && Interval.Abs(empty).IsEmpty);
        Assert.True(Interval.FusedMultiplyAdd(one, empty, one).IsEmpty);
    }

    [Fact]
    public void Arguments_outside_the_domain_are_cut_off()
    {
        Interval root = Interval.Sqrt(new Interval(-4, 9));
        Assert.True(root.Lower == 0 && root.Upper >= 3 && root.Upper <= Math.BitIncrement(3));
        Assert.True(Interval.Sqrt(new Interval(-4, -1)).IsEmpty);
        Assert.True(Interval.Log(new Interval(-2, 1)) is { Lower: -Infinity, Upper: >= 0 and < 1e-300 });
        Assert.True(Interval.Log(new Interval(-2, 0)).IsEmpty && Interval.Log10(Interval.Constant(0)).IsEmpty);
        Assert.Equal(Interval.Asin(new Interval(-1, 1)), Interval.Asin(new Interval(-9, 9)));
        Assert.True(Interval.Acos(new Interval(2, 3)).IsEmpty);
        Assert.True(Interval.Acosh(new Interval(-5, 1)) is { Lower: 0, Upper: < 1e-300 } && Interval.Acosh(new Interval(0, 0.5)).IsEmpty);
        Assert.True(Interval.Atanh(new Interval(-1, 1)) == Interval.Whole && Interval.Atanh(new Interval(1, 4)).IsEmpty);
    }

    [Fact]
    public void Extrema_inside_the_argument_are_found()
    {
        Assert.Equal(1, Interval.Sin(new Interval(1.5, 1.6)).Upper);
        Assert.Equal(-1, Interval.Sin(new Interval(4.7, 4.8)).Lower);
        Assert.True(Interval.Sin(new Interval(1.5, 1.6)).Lower > 0.99);
        Assert.Equal(1, Interval.Cos(new Interval(-0.1, 0.2)).Upper);
        Assert.Equal(-1, Interval.Cos(new Interval(3, 3.2)).Lower);
        Assert.Equal(new Interval(-1, 1), Interval.Cos(new Interval(10, 17)));
        Assert.Equal(new Interval(-1, 1), Interval.Sin(Interval.Whole));
        Assert.Equal(new Interval(-1, 1), Interval.Sin(new Interval(1e17, 1e17)));
        Assert.Equal(Interval.Whole, Interval.Tan(new Interval(1.5, 1.6)));
        Assert.True(Interval.Tan(new Interval(1.6, 4.6)) is { IsBounded: true });
        Assert.True(Interval.Cosh(new Interval(-1, 2)) is { Lower: 1, Upper: > 3.76 and < 3.77 });
        Assert.Equal(0, Interval.Square(new Interval(-1, 2)).Lower);
        Assert.Equal(0, Interval.Pow(new Interval(-1, 2), Interval.Constant(4)).Lower);
    }

    [Fact]
    public void Powers_follow_the_kind_of_their_exponent()
    {
        Interval mixed = new(-2, 3);
        Assert.True(Close(Interval.Pow(mixed, Interval.Constant(3)), -8, 27));
        Assert.True(Close(Interval.Pow(mixed, Interval.Constant(4)), 0, 81));
        Assert.Equal(Interval.Whole, Interval.Pow(mixed, Interval.Constant(-1)));
        Assert.True(Interval.Pow(mixed, Interval.Constant(-2)) is { Upper: Infinity, Lower: > 0.111 and <= 1.0 / 9 });
        Assert.True(Close(Interval.Pow(new Interval(-3, -2), Interval.Constant(-1)), -0.5, -1.0 / 3));
        Assert.True(Close(Interval.Pow(mixed, Interval.Constant(0)), 1, 1));
        Assert.True(Close(Interval.Pow(mixed, Interval.Constant(0.5)), 0, Math.Sqrt(3)));
        Assert.True(Interval.Pow(new Interval(-3, -2), Interval.Constant(0.5)).IsEmpty);
        Assert.True(Close(Interval.Pow(new Interval(0.5, 2), new Interval(-1, 2)), 0.25, 4));
        Interval wholeInside = Interval.Pow(new Interval(-2, -2), new Interval(1.5, 3.5)); // 4 at exponent 2 and −8 at 3
        Assert.True(wholeInside.Contains(4) && wholeInside.Contains(-8));
    }

    [Fact]
    public void The_angle_of_a_rectangle_covers_its_corners_or_the_whole_turn()
    {
        Assert.True(Close(Interval.Atan2(new Interval(1, 2), new Interval(1, 2)), Math.Atan2(1, 2), Math.Atan2(2, 1)));
        Assert.True(Close(Interval.Atan2(new Interval(1, 2), new Interval(-1, 1)), Math.PI / 4, 3 * Math.PI / 4));
        Assert.True(Close(Interval.Atan2(new Interval(-1, 1), new Interval(-2, -1)), -Math.PI, Math.PI));
        Assert.True(Close(Interval.Atan2(new Interval(-1, 1), new Interval(1, 2)), -Math.PI / 4, Math.PI / 4));
        Assert.True(Close(Interval.Atan2(new Interval(1, Infinity), Interval.Whole), 0, Math.PI));
    }

    [Fact]
    public void Remainders_are_exact_within_one_quotient_and_bounded_else()
    {
        Assert.True(Close(new Interval(7.25, 7.5) % Interval.Constant(2), 1.25, 1.5));
        Assert.True(Close(new Interval(-7.5, -7.25) % Interval.Constant(2), -1.5, -1.25));
        Assert.True(Close(new Interval(7, 9) % Interval.Constant(2), 0, 2));
        Assert.True(Close(new Interval(0.5, 0.75) % new Interval(-1, 1), 0, 0.75));
        Assert.True(Close(Interval.IEEERemainder(new Interval(7.25, 7.5), Interval.Constant(2)), -0.75, -0.5));
        Assert.True(Close(Interval.IEEERemainder(new Interval(5, 9), Interval.Constant(2)), -1, 1));
        Assert.True(Close(Interval.CopySign(new Interval(-3, 2), new Interval(1, 2)), 0, 3));
        Assert.True(Close(Interval.CopySign(new Interval(1, 2), new Interval(-1, 2)), -2, 2));
        Assert.True(Close(Interval.CopySign(new Interval(1, 2), Interval.Constant(-1)), -2, -1));
    }

    // Contains the range and exceeds it by rounding only.
    private static bool Close(Interval actual, double lower, double upper) =>
        actual.Lower <= lower && upper <= actual.Upper && lower - actual.Lower <= 1e-14 * (1 + Math.Abs(lower))
        && actual.Upper - upper <= 1e-14 * (1 + Math.Abs(upper));
}
