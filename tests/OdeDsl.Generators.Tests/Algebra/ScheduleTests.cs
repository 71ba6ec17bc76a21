using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Tests.Algebra;

public sealed class ScheduleTests
{
    [Fact]
    public void Shared_values_are_computed_once_just_before_the_first_result_that_needs_them()
    {
        ExpressionGraph graph = new();
        int x = graph.Leaf(Operator.State, 0), time = graph.Leaf(Operator.Time);
        int sine = graph.Unary(Operator.Sin, x), cosine = graph.Unary(Operator.Cos, time);
        int first = graph.Binary(Operator.Multiply, sine, sine), second = graph.Binary(Operator.Add, cosine, graph.Unary(Operator.Exp, cosine));
        Schedule schedule = Schedule.Of(graph, [first, second, x], CancellationToken.None);
        Assert.Equal([new Step(sine, -1), new Step(first, 0), new Step(cosine, -1), new Step(second, 1), new Step(x, 2)], schedule.Steps);
        Assert.Equal(5, schedule.OperationCount);
    }

    [Fact]
    public void Long_sums_are_cut_into_lines_that_stay_readable()
    {
        ExpressionGraph graph = new();
        int sum = graph.Leaf(Operator.State, 0);
        for (int i = 1; i < 2000; i++) sum = graph.Binary(Operator.Add, sum, graph.Leaf(Operator.State, i));
        Schedule schedule = Schedule.Of(graph, [sum], CancellationToken.None);
        Assert.InRange(schedule.Steps.Count, 60, 120);
    }
}
