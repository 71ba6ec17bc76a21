using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Tests.Emitted;

public sealed class ConstantConditionTests
{
    /// <summary>Comparisons of constants and of a value with itself make the compiler warn when they are printed as they stand.</summary>
    [Fact]
    public void Conditions_that_do_not_depend_on_anything_compile_without_warnings()
    {
        ModelBuilder model = new();
        ExpressionGraph g = model.Graph;
        int x = model.State("X"), one = g.Constant(1.0), nan = g.Constant(double.NaN), sine = g.Unary(Operator.Sin, x);
        int number = g.Constant(0.0);
        foreach (Operator relation in new[] { Operator.Less, Operator.LessOrEqual, Operator.Greater, Operator.GreaterOrEqual, Operator.Equal, Operator.NotEqual })
        {
            int[] conditions =
            [
                g.Binary(relation, one, g.Constant(2.0)), g.Binary(relation, x, x), g.Binary(relation, nan, nan), g.Binary(relation, sine, sine),
                g.Binary(relation, sine, nan), g.Binary(Operator.And, g.Constant(false), g.Binary(relation, x, one)),
                g.Unary(Operator.Not, g.Binary(Operator.Or, g.Constant(true), g.Binary(relation, one, one))),
            ];
            foreach (int condition in conditions)
                number = g.Binary(Operator.Add, g.Binary(Operator.Multiply, number, g.Constant(2.0)), g.Ternary(Operator.Conditional, condition, one, g.Constant(0.0)));
        }

        model.Rate(x, number);
        EmittedModel emitted = EmittedModel.Of(model.Build());
        foreach (double value in new[] { 0.5, -0.5, double.NaN })
            Assert.Equal(new Interpreter(g, 0, [value], [])[number], emitted.Calls.Rates(0, [value], [])[0]);
    }
}
