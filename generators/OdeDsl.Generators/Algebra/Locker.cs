using System.Collections.Generic;
using System.Linq;
using System.Threading;

namespace OdeDsl.Generators.Algebra;

/// <summary>
/// Turns expressions as written into their locked form: each relation that can change during a run, and each function with a kink
/// or a jump, looks at a regime entry instead, and owns (or shares) the switching function behind that entry.
/// </summary>
/// <remarks>
/// Operands are locked before their users, so a switching function only ever looks at entries before its own. The table of
/// locked forms is in docs/architecture.md.
/// </remarks>
internal sealed class Locker
{
    private readonly ExpressionGraph _free;
    private readonly Dictionary<int, int> _locked = [];
    private readonly Dictionary<int, bool> _varies = [];
    private readonly SwitchTable _switches;
    private readonly CancellationToken _cancellationToken;

    private Locker(ExpressionGraph free, CancellationToken cancellationToken)
    {
        _free = free;
        _switches = new SwitchTable(free, Graph, cancellationToken);
        _cancellationToken = cancellationToken;
    }

    public ExpressionGraph Graph { get; } = new();

    public IReadOnlyList<SwitchingFunction> Switches => _switches.Functions;

    /// <summary>The locked form of a node that was among the roots or below them.</summary>
    public int this[int free] => _locked[free];

    /// <param name="free">The graph of expressions as written; the decisions of the switches are appended to it.</param>
    /// <param name="roots">The expressions to lock.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    public static Locker Lock(ExpressionGraph free, IEnumerable<int> roots, CancellationToken cancellationToken)
    {
        Locker locker = new(free, cancellationToken);
        foreach (int index in Reach.Of(free, roots))
        {
            cancellationToken.ThrowIfCancellationRequested();
            int locked = locker.Translate(index);
            locker._locked[index] = locked;
            locker.Varies(locked); // Notes it, so that no later question has to look deep.
        }

        return locker;
    }

    private int Translate(int index)
    {
        Node node = _free[index];
        int a = At(node.First), b = At(node.Second), c = At(node.Third);
        int asWritten = Graph.Intern(node with { First = a, Second = b, Third = c });
        if (!Graph[asWritten].Operands.Any(Varies)) return Quiet.Form(Graph, asWritten);
        return node.Operator switch
        {
            Operator.Less or Operator.LessOrEqual or Operator.Greater or Operator.GreaterOrEqual => _switches.Side(
                node.Operator, a, b, new SwitchRequest(index, index, IsRelation: true)),
            Operator.Abs => Graph.Ternary(Operator.Conditional, NotNegative(index, node.First), a, Negated(a)),
            Operator.Sign => Sign(index, node.First),
            Operator.Min => Extremum(index, Operator.Less, node.First, node.Second),
            Operator.Max => Extremum(index, Operator.Greater, node.First, node.Second),
            Operator.MinMagnitude => ExtremeMagnitude(index, Operator.Less),
            Operator.MaxMagnitude => ExtremeMagnitude(index, Operator.Greater),
            Operator.Clamp => Graph.Ternary(
                Operator.Conditional,
                Kink(index, Operator.Less, node.First, node.Second),
                b,
                Graph.Ternary(Operator.Conditional, Kink(index, Operator.Greater, node.First, node.Third), c, a)),
            Operator.CopySign => CopySign(index, a),
            Operator.Floor => Whole(index, a, _free.Unary(Operator.Floor, node.First)),
            Operator.Ceiling => Negated(Whole(index, Negated(a), _free.Unary(Operator.Floor, _free.Unary(Operator.Negate, node.First)))),
            Operator.Truncate => Truncated(Whole(index, a, _free.Unary(Operator.Floor, node.First)), a),
            Operator.Round or Operator.RoundAwayFromZero => Whole(index, PlusHalf(a), index),
            Operator.Remainder => Remainder(index, a, b),
            Operator.TableValue => TableNodes.Polynomial(Graph, node.Index, 0, a, _switches.Segment(
                node.Index, a, new SwitchRequest(TableNodes.Segment(_free, node.Index, node.First), index, IsRelation: false))),
            Operator.IEEERemainder => MinusMultiple(a, Whole(index, PlusHalf(Graph.Binary(Operator.Divide, a, b)), Quotient(index)), b),
            _ => asWritten,
        };
    }

    private int Zero => _free.Constant(0.0);

    private int At(int free) => free < 0 ? free : _locked[free];

    /// <summary>The locked form of a free node that may have been appended for the occasion.</summary>
    private int LockedOf(int free)
    {
        if (_locked.TryGetValue(free, out int known)) return known;
        Node node = _free[free];
        return Graph.Intern(node with { First = LockedOrNone(node.First), Second = LockedOrNone(node.Second), Third = LockedOrNone(node.Third) });
    }

    private int LockedOrNone(int free) => free < 0 ? free : LockedOf(free);

    /// <summary>The side of a kink: which relation decides on the surface itself does not matter, so any switch of that surface will do.</summary>
    private int Kink(int source, Operator relation, int a, int b, int? decision = null, bool isRelation = false)
    {
        int condition = decision ?? _free.Binary(relation, a, b);
        return Varies(LockedOf(a)) || Varies(LockedOf(b))
            ? _switches.Side(relation, LockedOf(a), LockedOf(b), new SwitchRequest(condition, source, isRelation))
            : LockedOf(condition);
    }

    private int NotNegative(int source, int a) => Kink(source, Operator.GreaterOrEqual, a, Zero);

    /// <summary>Sign is 0 on the surface, which only matters where the argument stays zero.</summary>
    private int Sign(int source, int operand)
    {
        int positive = Kink(source, Operator.Greater, operand, Zero);
        int sign = Graph.Ternary(Operator.Conditional, positive, Graph.Constant(1.0), Graph.Constant(-1.0));
        return FlatZero.Choose(Graph, LockedOf(operand), Graph.Constant(0.0), sign, _cancellationToken);
    }

    /// <summary>Min and Max return NaN if either operand is: a NaN on the left counts as chosen.</summary>
    private int Extremum(int source, Operator relation, int a, int b)
    {
        int decision = _free.Binary(Operator.Or, _free.Binary(relation, a, b), _free.Binary(Operator.NotEqual, a, a));
        return Graph.Ternary(Operator.Conditional, Kink(source, relation, a, b, decision), LockedOf(a), LockedOf(b));
    }

    /// <summary>|a| − |b| has kinks of its own; (a − b)(a + b) has the same sign and none.</summary>
    private int ExtremeMagnitude(int source, Operator relation)
    {
        (int a, int b) = (_free[source].First, _free[source].Second);
        int decision = _free.Binary(
            Operator.Or,
            _free.Binary(relation, _free.Unary(Operator.Abs, a), _free.Unary(Operator.Abs, b)),
            _free.Binary(Operator.NotEqual, a, a));
        int difference = _free.Binary(Operator.Multiply, _free.Binary(Operator.Subtract, a, b), _free.Binary(Operator.Add, a, b));
        return Graph.Ternary(Operator.Conditional, Kink(source, relation, difference, Zero, decision), LockedOf(a), LockedOf(b));
    }

    private int CopySign(int source, int a)
    {
        Node node = _free[source];
        int positive = NotNegative(source, node.First);
        int size = Graph.Ternary(Operator.Conditional, positive, a, Negated(a));
        int opposite = Graph.Ternary(Operator.Conditional, positive, Negated(a), a);
        int same = Varies(LockedOf(node.Second))
            ? Kink(source, Operator.GreaterOrEqual, node.Second, Zero, isRelation: true)
            : SignBitIsClear(LockedOf(node.Second));
        return Graph.Ternary(Operator.Conditional, same, size, opposite);
    }

    /// <summary>A regime entry can stay at −0, whose sign counts although no comparison with zero sees it.</summary>
    private int SignBitIsClear(int a) =>
        Graph.Binary(Operator.Greater, Graph.Binary(Operator.CopySign, Graph.Constant(1.0), a), Graph.Constant(0.0));

    private int Negated(int a) => Graph.Unary(Operator.Negate, a);

    private int PlusHalf(int a) => Graph.Binary(Operator.Add, a, Graph.Constant(0.5));

    private int Whole(int source, int value, int decision) =>
        _switches.WholeNumber(value, new SwitchRequest(decision, source, IsRelation: false));

    /// <summary>
    /// Truncated x from n = ⌊x⌋: n where x is positive or stays whole, else the next number, written −(−1 − n) so that the one after
    /// −1 is −0 as <c>Math.Truncate</c> says.
    /// </summary>
    private int Truncated(int n, int x)
    {
        int following = Negated(Graph.Binary(Operator.Subtract, Graph.Constant(-1.0), n));
        int negative = FlatZero.Choose(Graph, Graph.Binary(Operator.Subtract, x, n), n, following, _cancellationToken);
        return Graph.Ternary(Operator.Conditional, Graph.Binary(Operator.GreaterOrEqual, n, Graph.Constant(0.0)), n, negative);
    }

    private int Remainder(int source, int a, int b)
    {
        int quotient = Graph.Binary(Operator.Divide, a, b);
        return MinusMultiple(a, Truncated(Whole(source, quotient, FloorOfQuotient(source)), quotient), b);
    }

    /// <summary>a − n b with one rounding: exact, because remainders are exact.</summary>
    private int MinusMultiple(int a, int n, int b) => Graph.Ternary(Operator.FusedMultiplyAdd, Negated(n), b, a);

    /// <summary>The whole number n in remainder = a − n b, from the remainder itself: a / b alone may round across a whole number.</summary>
    private int Quotient(int remainder)
    {
        Node node = _free[remainder];
        return _free.Unary(Operator.Round, _free.Binary(Operator.Divide, _free.Binary(Operator.Subtract, node.First, remainder), node.Second));
    }

    /// <summary>⌊a / b⌋: one less than the truncated quotient where the remainder and b have opposite signs.</summary>
    private int FloorOfQuotient(int remainder)
    {
        int divisor = _free[remainder].Second, quotient = Quotient(remainder);
        int opposite = _free.Binary(
            Operator.Or,
            _free.Binary(Operator.And, _free.Binary(Operator.Less, remainder, Zero), _free.Binary(Operator.Greater, divisor, Zero)),
            _free.Binary(Operator.And, _free.Binary(Operator.Greater, remainder, Zero), _free.Binary(Operator.Less, divisor, Zero)));
        return _free.Ternary(Operator.Conditional, opposite, _free.Binary(Operator.Subtract, quotient, _free.Constant(1.0)), quotient);
    }

    /// <summary>
    /// Whether a locked expression can change within a regime. What only looks at regime entries and parameters needs no switch of
    /// its own: it changes when they do.
    /// </summary>
    private bool Varies(int locked)
    {
        if (_varies.TryGetValue(locked, out bool known)) return known;
        Node node = Graph[locked];
        bool varies = node.Operator is Operator.State or Operator.StateElement or Operator.Time or Operator.Input || node.Operands.Any(Varies);
        _varies.Add(locked, varies);
        return varies;
    }
}
