using System;
using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Writing;

/// <summary>
/// Prints expressions over any kind of number, TScalar. What only looks at literals and at the regime stays plain: such a condition is one
/// bool for all lanes, the whole interval, the whole series, and such a number is a double.
/// </summary>
/// <param name="graph">The graph; no operation of it may be one that <see cref="GenericForms"/> replaces, unless it is plain.</param>
/// <param name="names">The names of shared values.</param>
/// <param name="leaf">The text of a state, parameter, time, direction or regime entry.</param>
/// <param name="tables">The expressions that reach the tables.</param>
/// <param name="loaded">Values that a cut method reads from its scratch vector; all of these are scalars.</param>
internal sealed class ScalarPrinter(
    ExpressionGraph graph, IReadOnlyDictionary<int, string> names, Func<Node, string> leaf, IReadOnlyList<string> tables, IEnumerable<int> loaded)
    : ExpressionPrinter(graph, names, leaf, tables)
{
    private const string Scalar = "TScalar";

    private readonly Dictionary<int, bool> _isScalar = loaded.ToDictionary(static node => node, static _ => true);

    public override string TypeOf(int index) => IsScalar(index) ? Scalar : base.TypeOf(index);

    public override string PrintResult(int index) => IsScalar(index) ? Print(index) : Lifted(index);

    /// <summary>Whether a value is of the kind TScalar: it depends on a number of the model. Asked of operands first, so never deep.</summary>
    private bool IsScalar(int index)
    {
        if (_isScalar.TryGetValue(index, out bool known)) return known;
        Node node = Graph[index];
        bool isScalar = node.IsLeaf
            ? node.Operator is (>= Operator.State and <= Operator.Direction)
            : node.Operands.Any(IsScalar);
        _isScalar.Add(index, isScalar);
        return isScalar;
    }

    protected override (string Text, Binding Binding) FormOf(int index)
    {
        Node node = Graph[index];
        if (node.IsLeaf || !IsScalar(index)) return base.FormOf(index);
        return node.Operator switch
        {
            Operator.Multiply when node.First == node.Second => Call("Square", Print(node.First)),
            Operator.Add or Operator.Subtract or Operator.Multiply or Operator.Divide or Operator.Negate => base.FormOf(index),
            Operator.Remainder => (
                $"{Parenthesised(node.First)} % {Parenthesised(node.Second)}", Binding.Product),
            Operator.Less or Operator.Greater when node.First == node.Second => Call("Condition", "false"),
            Operator.Less => Call("Less", node.First, node.Second),
            Operator.LessOrEqual => Call("LessOrEqual", node.First, node.Second),
            Operator.Greater => Call("Less", node.Second, node.First),
            Operator.GreaterOrEqual => Call("LessOrEqual", node.Second, node.First),
            Operator.Equal => Call("Equal", node.First, node.Second),
            Operator.NotEqual => Choice(Call("Equal", node.First, node.Second).Text, "Condition(false)", "Condition(true)"),
            Operator.And => Call("Choose", $"{Lifted(node.First)}, {Lifted(node.Second)}, {Scalar}.Condition(false)"),
            Operator.Or => Call("Choose", $"{Lifted(node.First)}, {Scalar}.Condition(true), {Lifted(node.Second)}"),
            Operator.Not => Choice(Lifted(node.First), "Condition(false)", "Condition(true)"),
            Operator.Conditional when IsScalar(node.First) => Call("Choose", [.. node.Operands]),
            Operator.Conditional => (
                $"{Operand(node.First, Binding.Or)} ? {Parenthesised(node.Second)} : {Parenthesised(node.Third)}", Binding.Conditional),
            Operator.TableValue => (TableCall(node, "AtOver", Lifted(node.First)), Binding.Primary),
            Operator.TablePosition => (TableCall(node, "PositionOver", $"{Lifted(node.First)}, {Print(node.Second)}"), Binding.Primary),
            Operator.TablePolynomial => (TableCall(
                node, "PolynomialOver", $"{Literals.Integer(TableNodes.OrderOf(node))}, {Lifted(node.First)}, {Print(node.Second)}"), Binding.Primary),
            Operator.LogBase => Call("Log", node.First, node.Second),
            _ => Call(node.Operator.ToString(), [.. node.Operands]),
        };
    }

    private (string Text, Binding Binding) Call(string function, params int[] arguments) =>
        Call(function, string.Join(", ", arguments.Select(Lifted)));

    private static (string Text, Binding Binding) Call(string function, string arguments) => ($"{Scalar}.{function}({arguments})", Binding.Primary);

    private static (string Text, Binding Binding) Choice(string condition, string whenTrue, string whenFalse) =>
        Call("Choose", $"{condition}, {Scalar}.{whenTrue}, {Scalar}.{whenFalse}");

    /// <summary>The text of a value as a TScalar.</summary>
    private string Lifted(int index)
    {
        if (IsScalar(index)) return Print(index);
        return $"{Scalar}.{(Graph.IsCondition(index) ? "Condition" : "Constant")}({Print(index)})";
    }

    /// <summary>The same as an operand of an operator.</summary>
    private string Parenthesised(int index) => IsScalar(index) ? Operand(index, Binding.Unary) : Lifted(index);
}
