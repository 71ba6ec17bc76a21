using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Tests.Emitted;

namespace OdeDsl.Generators.Tests.Algebra;

public sealed class LockerTests
{
    private readonly ExpressionGraph _graph = new();

    private int X => _graph.Leaf(Operator.State, 0);

    private int Y => _graph.Leaf(Operator.State, 1);

    private int P => _graph.Leaf(Operator.Parameter, 0);

    [Fact]
    public void Conditions_on_the_same_difference_share_one_switch()
    {
        int[] roots =
        [
            _graph.Binary(Operator.Less, X, Y), _graph.Binary(Operator.Greater, Y, X), _graph.Binary(Operator.GreaterOrEqual, X, Y),
            _graph.Binary(Operator.LessOrEqual, X, Y), _graph.Binary(Operator.Min, X, Y), _graph.Binary(Operator.Max, Y, X),
        ];
        Locker locker = Lock(roots);
        SwitchingFunction function = Assert.Single(locker.Switches);
        Assert.Equal(SwitchKind.Below, function.Kind);
        Assert.Equal(locker[roots[0]], locker[roots[1]]);
        Assert.Equal(locker.Graph.Unary(Operator.Not, locker[roots[0]]), locker[roots[2]]);
    }

    [Fact]
    public void A_switch_made_for_a_kink_takes_the_relation_that_comes_later()
    {
        Locker locker = Lock(_graph.Unary(Operator.Abs, X), _graph.Binary(Operator.Greater, X, _graph.Constant(0.0)));
        Assert.Equal(SwitchKind.Above, Assert.Single(locker.Switches).Kind);
    }

    [Theory]
    [InlineData(Operator.Less, SwitchKind.Below)]
    [InlineData(Operator.LessOrEqual, SwitchKind.NotAbove)]
    [InlineData(Operator.Greater, SwitchKind.Above)]
    [InlineData(Operator.GreaterOrEqual, SwitchKind.NotBelow)]
    public void Each_relation_has_the_kind_that_decides_it_exactly(object relation, object kind) =>
        Assert.Equal((SwitchKind)kind, Assert.Single(Lock(_graph.Binary((Operator)relation, X, Y)).Switches).Kind);

    [Fact]
    public void A_comparison_with_zero_is_decided_by_the_value_itself()
    {
        Locker locker = Lock(_graph.Binary(Operator.Less, _graph.Constant(0.0), X));
        SwitchingFunction function = Assert.Single(locker.Switches);
        Assert.Equal((locker.Graph.Leaf(Operator.State, 0), SwitchKind.Above), (function.Value, function.Kind));
    }

    [Fact]
    public void Conditions_and_kinks_of_parameters_alone_own_no_switch()
    {
        int condition = _graph.Binary(Operator.Less, P, _graph.Constant(1.0));
        int chosen = _graph.Ternary(Operator.Conditional, condition, X, _graph.Unary(Operator.Abs, P));
        Locker locker = Lock(_graph.Binary(Operator.Add, chosen, _graph.Ternary(Operator.Clamp, P, _graph.Constant(0.0), _graph.Constant(2.0))));
        Assert.Empty(locker.Switches);
        Assert.DoesNotContain(locker.Graph.Nodes, static node => node.Operator == Operator.Side);
    }

    [Fact]
    public void Equality_of_numbers_owns_no_switch() =>
        Assert.Empty(Lock(_graph.Binary(Operator.Equal, X, Y), _graph.Binary(Operator.NotEqual, X, P)).Switches);

    [Fact]
    public void What_only_follows_other_switches_owns_none()
    {
        int relay = _graph.Ternary(
            Operator.Conditional, _graph.Binary(Operator.Less, X, _graph.Constant(0.0)), _graph.Constant(3.0), _graph.Constant(-2.0));
        int steps = _graph.Binary(Operator.Greater, _graph.Unary(Operator.Floor, Y), _graph.Constant(4.0));
        Assert.Equal(2, Lock(_graph.Unary(Operator.Abs, relay), _graph.Unary(Operator.Sign, relay), steps).Switches.Count);
    }

    [Fact]
    public void A_switching_function_only_looks_at_entries_before_its_own()
    {
        int size = _graph.Unary(Operator.Abs, _graph.Binary(Operator.Min, X, Y));
        Locker locker = Lock(_graph.Binary(Operator.Less, _graph.Unary(Operator.Floor, size), X), size);
        for (int i = 0; i < locker.Switches.Count; i++)
        {
            foreach (int index in Reach.Of(locker.Graph, [locker.Switches[i].Value]))
            {
                if (locker.Graph[index].Operator is Operator.Side or Operator.WholeNumber) Assert.True(locker.Graph[index].Index < i);
            }
        }

        Assert.Equal(4, locker.Switches.Count);
    }

    /// <summary>A dead band is zero on a region; there Sign is 0 and neither side of a "custom sign" holds.</summary>
    [Theory]
    [InlineData(0.1, 0.0)]
    [InlineData(0.9, 1.0)]
    [InlineData(-0.9, -1.0)]
    public void A_sign_of_a_dead_band_is_zero_inside_it(double x, double expected)
    {
        int zero = _graph.Constant(0.0);
        int inside = _graph.Binary(Operator.Less, _graph.Unary(Operator.Abs, X), _graph.Constant(0.5));
        int band = _graph.Ternary(Operator.Conditional, inside, zero, X);
        int custom = _graph.Ternary(
            Operator.Conditional, _graph.Binary(Operator.Greater, band, zero), _graph.Constant(1.0),
            _graph.Ternary(Operator.Conditional, _graph.Binary(Operator.Less, band, zero), _graph.Constant(-1.0), zero));
        foreach (int root in new[] { _graph.Unary(Operator.Sign, band), custom })
            Assert.Equal((expected, expected), FreeAndLocked(root, [x, 0], [0]));
    }

    [Theory]
    [InlineData(Operator.Sign)]
    [InlineData(Operator.Ceiling)]
    [InlineData(Operator.Truncate)]
    [InlineData(Operator.Floor)]
    [InlineData(Operator.Round)]
    [InlineData(Operator.Abs)]
    public void A_vanishing_gain_leaves_the_value_of_a_step_function_at_zero(object function)
    {
        int product = _graph.Binary(Operator.Multiply, P, X);
        Assert.Equal((0.0, 0.0), FreeAndLocked(_graph.Unary((Operator)function, product), [1.5, 0], [0]));
    }

    [Fact]
    public void Truncation_of_a_value_that_stays_whole_is_that_value()
    {
        int whole = _graph.Binary(Operator.Subtract, _graph.Binary(Operator.Multiply, P, X), _graph.Constant(2.0));
        Assert.Equal((-2.0, -2.0), FreeAndLocked(_graph.Unary(Operator.Truncate, whole), [1.5, 0], [0]));
    }

    /// <summary>Quotients that round across a whole number: the entry comes from the exact remainder, not from a / b.</summary>
    [Fact]
    public void Remainders_next_to_a_multiple_are_exact_when_locked()
    {
        int remainder = _graph.Binary(Operator.Remainder, X, Y), nearest = _graph.Binary(Operator.IEEERemainder, X, Y);
        foreach (double divisor in new[] { 0.1, 2 * Math.PI, -1.7 })
        {
            for (int n = -60; n <= 60; n++)
            {
                foreach (double x in new[] { Math.BitDecrement(n * divisor), Math.BitIncrement(n * divisor), (n + 0.37) * divisor })
                {
                    (double free, double locked) = FreeAndLocked(remainder, [x, divisor], [0]);
                    if (free != 0) Assert.Equal(free, locked);
                    (free, locked) = FreeAndLocked(nearest, [x, divisor], [0]);
                    if (free != 0) Assert.Equal(free, locked);
                }
            }
        }
    }

    [Fact]
    public void A_locked_kink_keeps_its_formula_on_the_other_side()
    {
        Locker locker = Lock(_graph.Unary(Operator.Abs, X));
        int locked = locker[_graph.Unary(Operator.Abs, X)];
        Assert.Equal(-3.0, new Interpreter(locker.Graph, 0, [-3.0], [], [1.0])[locked]);
        Assert.Equal(-3.0, new Interpreter(locker.Graph, 0, [3.0], [], [0.0])[locked]);
    }

    private (double Free, double Locked) FreeAndLocked(int root, double[] state, double[] parameters)
    {
        Locker locker = Lock(root);
        Interpreter free = new(_graph, 0, state, parameters);
        double[] regime = [.. locker.Switches.Select(function => free[function.Decision])];
        return (free[root], new Interpreter(locker.Graph, 0, state, parameters, regime)[locker[root]]);
    }

    private Locker Lock(params int[] roots) => Locker.Lock(_graph, roots, CancellationToken.None);
}
