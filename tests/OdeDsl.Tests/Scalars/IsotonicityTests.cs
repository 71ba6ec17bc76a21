using CsCheck;
using OdeDsl.Scalars;
using Xunit;

namespace OdeDsl.Tests.Scalars;

/// <summary>Smaller arguments give a result inside: what branch-and-bound searches and fixed-point proofs rest on.</summary>
public sealed class IsotonicityTests
{
    // An interval and one inside it, by where its ends lie between the outer ends.
    private static readonly Gen<(Interval Outer, Interval Inner)> Nested =
        from centre in Gen.Double[-6, 6]
        from radius in Gen.OneOf(Gen.Double[0, 1e-9], Gen.Double[0, 3])
        from a in Gen.Double[0, 1]
        from b in Gen.Double[0, 1]
        let outer = new Interval(centre - radius, centre + radius)
        let first = Math.Clamp(centre - radius + (2 * radius * a), outer.Lower, outer.Upper)
        let second = Math.Clamp(centre - radius + (2 * radius * b), outer.Lower, outer.Upper)
        select (outer, new Interval(Math.Min(first, second), Math.Max(first, second)));

    public static TheoryData<string> Unary => FunctionTable.UnaryNames;

    [Theory]
    [InlineData("Add")]
    [InlineData("Subtract")]
    [InlineData("Multiply")]
    [InlineData("Divide")]
    [InlineData("CopySign")]
    public void An_operation_on_inner_intervals_lies_inside(string name)
    {
        Func<Interval, Interval, Interval> operation = FunctionTable.Two<Interval>(name);
        Gen.Select(Nested, Nested).Sample(
            (x, y) => operation(x.Outer, y.Outer).Contains(operation(x.Inner, y.Inner)),
            iter: 20_000,
            threads: 1);
    }

    [Theory]
    [InlineData("Pow")]
    [InlineData("Atan2")]
    [InlineData("Remainder")]
    [InlineData("IEEERemainder")]
    [InlineData("LogBase")]
    public void A_function_of_two_inner_intervals_lies_inside_up_to_the_library_s_rounding(string name)
    {
        Func<Interval, Interval, Interval> function = FunctionTable.Two<Interval>(name);
        Gen.Select(Nested, Nested).Sample(
            (x, y) => Relax(function(x.Outer, y.Outer)).Contains(function(x.Inner, y.Inner)),
            iter: 20_000,
            threads: 1);
    }

    [Theory]
    [MemberData(nameof(Unary))]
    public void A_function_of_an_inner_interval_lies_inside_up_to_the_library_s_rounding(string name)
    {
        Func<Interval, Interval> function = FunctionTable.One<Interval>(name);
        Nested.Sample(x => Relax(function(x.Outer)).Contains(function(x.Inner)), iter: 20_000, threads: 1);
    }

    // The library's functions may step back where the true ones rise, by their error at either point.
    private static Interval Relax(Interval x)
    {
        if (x.IsEmpty) return x;
        (double lower, double upper) = (x.Lower, x.Upper);
        for (int unit = 0; unit < 2 * Interval.FunctionError; unit++)
        {
            (lower, upper) = (Math.BitDecrement(lower), Math.BitIncrement(upper));
        }

        return new(lower, upper);
    }
}
