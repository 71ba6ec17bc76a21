namespace OdeDsl.Generators.Algebra;

/// <summary>
/// Tables in expressions. As written a table is one operation; locked it is the polynomial of the segment that a regime entry numbers,
/// with exact derivatives, and that entry's switching function is the position of the argument among the knots.
/// </summary>
internal static class TableNodes
{
    /// <summary>A cubic has no derivative beyond this order.</summary>
    private const int HighestOrder = 3;

    private const int OrderShift = 32;

    public static int Value(ExpressionGraph graph, int table, int x) => graph.Intern(new Node(Operator.TableValue, x, -1, -1, table));

    public static int Segment(ExpressionGraph graph, int table, int x) => graph.Intern(new Node(Operator.TableSegment, x, -1, -1, table));

    public static int Polynomial(ExpressionGraph graph, int table, int order, int x, int segment) =>
        graph.Intern(new Node(Operator.TablePolynomial, x, segment, -1, ((long)order << OrderShift) | (uint)table));

    public static int Position(ExpressionGraph graph, int table, int x, int segment) =>
        graph.Intern(new Node(Operator.TablePosition, x, segment, -1, table));

    /// <summary>The table of a node: the lower half of its payload.</summary>
    public static int TableOf(Node node) => node.Index;

    /// <summary>The order of the derivative that a polynomial node stands for.</summary>
    public static int OrderOf(Node node) => (int)(node.Payload >> OrderShift);

    /// <summary>The value without an exception outside the knots of a table that does not extrapolate: NaN there.</summary>
    public static int Quiet(ExpressionGraph graph, Node value)
    {
        int table = TableOf(value);
        return Polynomial(graph, table, 0, value.First, Segment(graph, table, value.First));
    }

    /// <summary>The derivative by the argument of a value, a polynomial or a position; -1 where it is zero everywhere.</summary>
    public static int Slope(ExpressionGraph graph, Node node) => node.Operator switch
    {
        Operator.TableValue => Polynomial(graph, TableOf(node), 1, node.First, Segment(graph, TableOf(node), node.First)),
        Operator.TablePolynomial when OrderOf(node) < HighestOrder =>
            Polynomial(graph, TableOf(node), OrderOf(node) + 1, node.First, node.Second),
        Operator.TablePosition => graph.Intern(new Node(Operator.TablePositionSlope, node.Second, -1, -1, TableOf(node))),
        _ => -1,
    };
}
