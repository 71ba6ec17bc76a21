using OdeDsl.Scalars;
using Xunit;

namespace OdeDsl.Tests.Scalars;

public sealed class ScalarDoubleTests
{
    private const int Cases = 20_000;

    public static TheoryData<string> Unary => FunctionTable.UnaryNames;

    public static TheoryData<string> Binary => FunctionTable.BinaryNames;

    [Theory]
    [MemberData(nameof(Unary))]
    public void A_function_equals_plain_code_bit_for_bit(string name)
    {
        Func<ScalarDouble, ScalarDouble> function = FunctionTable.One<ScalarDouble>(name);
        Func<double, double> plain = FunctionTable.One(name).Plain;
        Random random = new(1);
        for (int i = 0; i < Cases; i++)
        {
            double x = Doubles.Any(random);
            if (!(Doubles.SameBits(plain(x), function(new(x)).Value))) Assert.Fail($"{name}({x:R})");
        }
    }

    [Theory]
    [MemberData(nameof(Binary))]
    public void An_operation_on_two_numbers_equals_plain_code_bit_for_bit(string name)
    {
        Func<ScalarDouble, ScalarDouble, ScalarDouble> operation = FunctionTable.Two<ScalarDouble>(name);
        Func<double, double, double> plain = FunctionTable.Two(name).Plain;
        Random random = new(2);
        for (int i = 0; i < Cases; i++)
        {
            double x = Doubles.Any(random), y = Doubles.Any(random);
            if (!(Doubles.SameBits(plain(x, y), operation(new(x), new(y)).Value))) Assert.Fail($"{name}({x:R}, {y:R})");
        }
    }

    [Theory]
    [InlineData("Add")]
    [InlineData("Subtract")]
    [InlineData("Multiply")]
    [InlineData("Divide")]
    public void An_operator_with_a_literal_equals_plain_code_bit_for_bit(string name)
    {
        (Func<ScalarDouble, double, ScalarDouble> right, Func<double, ScalarDouble, ScalarDouble> left) =
            FunctionTable.Mixed<ScalarDouble>(name);
        Func<double, double, double> plain = FunctionTable.Two(name).Plain;
        Random random = new(3);
        for (int i = 0; i < Cases; i++)
        {
            double x = Doubles.Any(random), y = Doubles.Any(random);
            if (!(Doubles.SameBits(plain(x, y), right(new(x), y).Value))) Assert.Fail($"{name}({x:R}, literal {y:R})");
            if (!(Doubles.SameBits(plain(x, y), left(x, new(y)).Value))) Assert.Fail($"{name}(literal {x:R}, {y:R})");
        }
    }

    [Fact]
    public void A_fused_multiply_add_rounds_once()
    {
        Random random = new(4);
        for (int i = 0; i < Cases; i++)
        {
            double x = Doubles.Any(random), y = Doubles.Any(random), z = Doubles.Any(random);
            double expected = Math.FusedMultiplyAdd(x, y, z);
            double actual = ScalarDouble.FusedMultiplyAdd(new(x), new(y), new(z)).Value;
            if (!Doubles.SameBits(expected, actual)) Assert.Fail($"fma({x:R}, {y:R}, {z:R})");
        }
    }

    [Fact]
    public void A_constant_is_the_number() => Assert.Equal(0.1, ScalarDouble.Constant(0.1).Value);
}
