using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Tests.Emitted;

/// <summary>
/// A flat model of any size: cells on a ring that exchange with neighbours through a saturating flux shared by both sides, with a
/// source that is cut off below a level, and a far connection so that the pattern is not a band.
/// </summary>
internal static class Network
{
    public static ModelDefinition Of(int count)
    {
        ModelBuilder model = new() { Name = "Network" + count };
        ExpressionGraph g = model.Graph;
        int[] x = [.. Enumerable.Range(0, count).Select(i => model.State("X" + i))];
        int[] k = [.. Enumerable.Range(0, 10).Select(i => model.Parameter("K" + i))];
        int[] flux = [.. x.Select((_, i) => Flux(g, x[i], x[(i + 1) % count], k[i % 10], k[(i + 3) % 10]))];
        for (int i = 0; i < count; i++)
        {
            int exchange = g.Binary(Operator.Subtract, flux[(i + count - 1) % count], flux[i]);
            int far = g.Binary(Operator.Multiply, g.Binary(Operator.Multiply, k[(i + 5) % 10], x[i]), x[(7 * i + 11) % count]);
            int dry = model.Text(g.Binary(Operator.Less, x[i], g.Constant(0.25)), $"X{i} < 0.25");
            int source = i % 50 == 0 ? g.Ternary(Operator.Conditional, dry, g.Constant(0.0), g.Unary(Operator.Exp, g.Unary(Operator.Negate, x[i]))) : g.Constant(1.5);
            model.Rate(i, g.Binary(Operator.Add, g.Binary(Operator.Subtract, exchange, far), source), $"cell {i}");
        }

        return model.Build();
    }

    private static int Flux(ExpressionGraph g, int from, int to, int rate, int half)
    {
        int difference = g.Binary(Operator.Subtract, from, to);
        int size = g.Unary(Operator.Sqrt, g.Binary(Operator.Add, half, g.Binary(Operator.Multiply, difference, difference)));
        return g.Binary(Operator.Divide, g.Binary(Operator.Multiply, rate, difference), size);
    }
}
