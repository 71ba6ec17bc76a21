using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Tests.Emitted;

namespace OdeDsl.Generators.Tests.Algebra;

public sealed class BranchGuardTests
{
    private readonly ExpressionGraph _graph = new();

    private int X => _graph.Leaf(Operator.State, 0);

    [Fact]
    public void What_is_always_evaluated_stays_as_it_is()
    {
        int sign = _graph.Unary(Operator.Sign, X);
        int chosen = _graph.Ternary(Operator.Conditional, Positive(X), sign, _graph.Unary(Operator.Negate, sign));
        Assert.Equal([chosen], BranchGuard.Apply(_graph, [chosen]));
        int other = _graph.Ternary(Operator.Conditional, Positive(X), sign, X);
        Assert.Equal([other, sign], BranchGuard.Apply(_graph, [other, sign]));
    }

    [Fact]
    public void Every_operation_of_a_guarded_expression_can_be_evaluated_where_the_branch_is_not_taken()
    {
        int crossed = _graph.Ternary(Operator.Clamp, X, _graph.Constant(2.0), _graph.Constant(1.0));
        int inner = _graph.Ternary(Operator.Conditional, Positive(crossed), _graph.Unary(Operator.Sign, _graph.Unary(Operator.Log, X)), crossed);
        int root = _graph.Ternary(Operator.Conditional, Positive(X), inner, X);
        int guarded = Assert.Single(BranchGuard.Apply(_graph, [root]));
        Interpreter values = new(_graph, 0, [-1.0], []);
        foreach (int index in Reach.Of(_graph, [guarded])) _ = values[index];
        Assert.Equal(-1.0, values[guarded]);
        Assert.Throws<ArgumentException>(() => new Interpreter(_graph, 0, [1.0], [])[guarded]);
    }

    [Fact]
    public void A_value_changed_in_many_branches_is_guarded_once()
    {
        int value = _graph.Unary(Operator.Sign, X);
        int root = _graph.Ternary(Operator.Conditional, Positive(_graph.Leaf(Operator.Time)), Changed(value, 40), X);
        int count = _graph.Count;
        int guarded = Assert.Single(BranchGuard.Apply(_graph, [root]));
        Assert.True(_graph.Count - count <= 40 * 10, $"{_graph.Count - count} nodes added");
        Assert.Single(Reach.Of(_graph, [guarded]), index => _graph[index].Operator == Operator.Sign);
    }

    /// <summary>if (c1) v += 1; else v *= 2; and so on: both branches use v, so paths must not multiply.</summary>
    private int Changed(int value, int times)
    {
        for (int i = 0; i < times; i++)
        {
            value = _graph.Ternary(
                Operator.Conditional,
                Positive(_graph.Binary(Operator.Subtract, X, _graph.Constant(i))),
                _graph.Binary(Operator.Add, value, _graph.Constant(1.0)),
                _graph.Binary(Operator.Multiply, value, _graph.Constant(2.0)));
        }

        return value;
    }

    private int Positive(int value) => _graph.Binary(Operator.Greater, value, _graph.Constant(0.0));
}
