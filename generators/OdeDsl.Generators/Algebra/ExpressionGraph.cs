using System;
using System.Collections.Generic;

namespace OdeDsl.Generators.Algebra;

/// <summary>
/// Expressions as a growing list of operations in which equal operations are one node: sharing never changes a value because
/// equal operations on equal operands give equal bits. Operands always stand before the node that uses them.
/// </summary>
/// <remarks>Builds exactly what it is told: no simplification here (that is another file), so user expressions keep their bits.</remarks>
internal sealed class ExpressionGraph
{
    private readonly List<Node> _nodes = [];
    private readonly Dictionary<Node, int> _indexOf = [];

    public ExpressionGraph()
    {
    }

    public ExpressionGraph(IEnumerable<Node> nodes)
    {
        foreach (Node node in nodes) Intern(node);
    }

    public IReadOnlyList<Node> Nodes => _nodes;

    public int Count => _nodes.Count;

    public Node this[int index] => _nodes[index];

    public int Constant(double value) => Intern(new Node(Operator.Constant, -1, -1, -1, BitConverter.DoubleToInt64Bits(value)));

    public int Constant(bool value) => Intern(new Node(Operator.BooleanConstant, -1, -1, -1, value ? 1 : 0));

    public int Leaf(Operator leaf, int index = 0) => Intern(new Node(leaf, -1, -1, -1, index));

    public int Unary(Operator operation, int operand) => Intern(new Node(operation, operand, -1, -1, 0));

    public int Binary(Operator operation, int first, int second) => Intern(new Node(operation, first, second, -1, 0));

    public int Ternary(Operator operation, int first, int second, int third) => Intern(new Node(operation, first, second, third, 0));

    /// <summary>Whether a node is a condition rather than a number.</summary>
    public bool IsCondition(int index)
    {
        while (_nodes[index].Operator == Operator.Conditional) index = _nodes[index].Second;
        return _nodes[index].Operator is Operator.BooleanConstant or Operator.Side
            or (>= Operator.Less and <= Operator.Not);
    }

    public bool Contains(Node node) => _indexOf.ContainsKey(node);

    public int Intern(Node node)
    {
        if (_indexOf.TryGetValue(node, out int index)) return index;
        if (node.First >= _nodes.Count || node.Second >= _nodes.Count || node.Third >= _nodes.Count)
            throw new ArgumentException("An operand must stand before its user.", nameof(node));
        index = _nodes.Count;
        _nodes.Add(node);
        _indexOf.Add(node, index);
        return index;
    }
}
