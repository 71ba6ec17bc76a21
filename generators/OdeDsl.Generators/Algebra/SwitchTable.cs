using System.Collections.Generic;
using System.Threading;

namespace OdeDsl.Generators.Algebra;

/// <summary>What asks for a switching function; see <see cref="SwitchingFunction"/>.</summary>
internal readonly record struct SwitchRequest(int Decision, int Source, bool IsRelation);

/// <summary>
/// The switching functions found so far. Conditions on the same surface share one switch: <c>a &lt; b</c>, <c>b &gt; a</c>,
/// <c>a &gt;= b</c>, <c>Math.Min(a, b)</c> are all decided by a − b. Relations that differ only in where equality belongs share too:
/// on the surface itself, a set without extent, the first of them decides for all.
/// </summary>
/// <remarks>Two switches of one surface would look to an integrator like a corner in which two surfaces meet.</remarks>
internal sealed class SwitchTable(ExpressionGraph free, ExpressionGraph locked, CancellationToken cancellationToken)
{
    private readonly List<SwitchingFunction> _functions = [];
    private readonly Dictionary<int, int> _relationOf = [];
    private readonly Dictionary<int, int> _wholeNumberOf = [];
    private readonly Dictionary<(int Table, int X), int> _segmentOf = [];

    public IReadOnlyList<SwitchingFunction> Functions => _functions;

    /// <summary>The switching function of a relation and how a positive value of it reads.</summary>
    private (int Value, bool IsNegated) SurfaceOf(int a, int b)
    {
        int value = Difference(a, b);
        if (_relationOf.ContainsKey(value)) return (value, false);
        int opposite = Difference(b, a);
        bool isNegated = _relationOf.ContainsKey(opposite) || (IsConstant(a) && !IsConstant(b));
        return isNegated ? (opposite, true) : (value, false);
    }

    /// <summary>The locked form of a relation between two locked expressions.</summary>
    public int Side(Operator relation, int a, int b, SwitchRequest request)
    {
        (int value, bool isNegated) = SurfaceOf(a, b);
        SwitchKind kind = KindOf(relation, isNegated);
        if (!_relationOf.TryGetValue(value, out int index))
        {
            index = Append(new SwitchingFunction(value, kind, request.Decision, request.Source, request.IsRelation));
            _relationOf.Add(value, index);
        }

        bool sameSide = IsPositive(_functions[index].Kind) == IsPositive(kind);
        if (request.IsRelation && !_functions[index].IsRelation) Fix(index, sameSide, kind, request);
        int side = locked.Leaf(Operator.Side, index);
        if (!sameSide) side = locked.Unary(Operator.Not, side);
        bool agreesOnSurface = _functions[index].Kind == (sameSide ? kind : Complement(kind));
        if (!request.IsRelation || agreesOnSurface) return side;
        int onSurface = locked.Constant(kind is SwitchKind.NotAbove or SwitchKind.NotBelow);
        return FlatZero.Choose(locked, value, onSurface, side, cancellationToken);
    }

    /// <summary>The regime entry ⌊value⌋.</summary>
    public int WholeNumber(int value, SwitchRequest request)
    {
        if (!_wholeNumberOf.TryGetValue(value, out int index))
        {
            index = Append(new SwitchingFunction(
                value, SwitchKind.WholeNumber, request.Decision, request.Source, request.IsRelation));
            _wholeNumberOf.Add(value, index);
        }

        return locked.Leaf(Operator.WholeNumber, index);
    }

    /// <summary>
    /// The regime entry that numbers a table's segment. Its switching function counts positions on the scale of that same segment: smooth
    /// across the knots, which are surfaces.
    /// </summary>
    public int Segment(int table, int x, SwitchRequest request)
    {
        if (_segmentOf.TryGetValue((table, x), out int known)) return known;
        int entry = locked.Leaf(Operator.WholeNumber, _functions.Count);
        Append(new SwitchingFunction(
            TableNodes.Position(locked, table, x, entry), SwitchKind.WholeNumber, request.Decision, request.Source, request.IsRelation) { Table = table });
        _segmentOf.Add((table, x), entry);
        return entry;
    }

    /// <summary>A switch made for a kink takes over the relation of the user that comes later: kinks do not mind.</summary>
    private void Fix(int index, bool sameSide, SwitchKind kind, SwitchRequest request) => _functions[index] = _functions[index] with
    {
        Kind = sameSide ? kind : Complement(kind),
        Decision = sameSide ? request.Decision : free.Unary(Operator.Not, request.Decision),
        Source = request.Source,
        IsRelation = true,
    };

    private int Append(SwitchingFunction function)
    {
        _functions.Add(function);
        return _functions.Count - 1;
    }

    /// <summary>a − b, which has the sign of the comparison for all finite numbers because differences underflow gradually.</summary>
    private int Difference(int a, int b) =>
        IsConstant(b) && locked[b].Constant == 0.0 ? a : locked.Binary(Operator.Subtract, a, b);

    private bool IsConstant(int index) => locked[index].Operator == Operator.Constant;

    private static SwitchKind KindOf(Operator relation, bool negated) => (relation, negated) switch
    {
        (Operator.Less, false) or (Operator.Greater, true) => SwitchKind.Below,
        (Operator.LessOrEqual, false) or (Operator.GreaterOrEqual, true) => SwitchKind.NotAbove,
        (Operator.Greater, false) or (Operator.Less, true) => SwitchKind.Above,
        _ => SwitchKind.NotBelow,
    };

    private static bool IsPositive(SwitchKind kind) => kind is SwitchKind.Above or SwitchKind.NotBelow;

    private static SwitchKind Complement(SwitchKind kind) => kind switch
    {
        SwitchKind.Below => SwitchKind.NotBelow,
        SwitchKind.NotAbove => SwitchKind.Above,
        SwitchKind.Above => SwitchKind.NotAbove,
        _ => SwitchKind.Below,
    };
}
