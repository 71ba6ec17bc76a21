using System;
using System.Collections.Generic;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Writing;

/// <summary>
/// Prints expressions as C# on plain doubles, so that the compiler reads back exactly the tree of the graph: operands bind as
/// printed, never by luck of associativity.
/// </summary>
/// <param name="graph">The graph.</param>
/// <param name="names">The names of shared values.</param>
/// <param name="leaf">The text of a state, parameter, time, direction or regime entry.</param>
/// <param name="tables">The expressions that reach the tables.</param>
internal class ExpressionPrinter(
    ExpressionGraph graph, IReadOnlyDictionary<int, string> names, Func<Node, string> leaf, IReadOnlyList<string> tables)
{
    /// <summary>How tightly a printed form holds together; C#'s order of operators.</summary>
    protected enum Binding
    {
        Conditional,
        Or,
        And,
        Equality,
        Relation,
        Sum,
        Product,
        Unary,
        Primary,
    }

    protected ExpressionGraph Graph => graph;

    /// <summary>The type of the local that holds a value.</summary>
    public virtual string TypeOf(int index) => graph.IsCondition(index) ? "bool" : "double";

    /// <summary>An expression where nothing around it can pull it apart: behind <c>=</c> or inside parentheses.</summary>
    public string Print(int index) => Form(index).Text;

    /// <summary>The defining expression of a value that has a name.</summary>
    public string PrintDefinition(int index) => FormOf(index).Text;

    /// <summary>A value to deliver: a condition as 1 or 0.</summary>
    public virtual string PrintResult(int index) => graph.IsCondition(index) ? $"{Operand(index, Binding.Or)} ? 1d : 0d" : Print(index);

    private (string Text, Binding Binding) Form(int index) =>
        names.TryGetValue(index, out string? name) ? (name, Binding.Primary) : FormOf(index);

    /// <summary>An operand, in parentheses if it does not hold together at least this tightly.</summary>
    protected string Operand(int index, Binding least)
    {
        (string text, Binding binding) = Form(index);
        return binding >= least ? text : "(" + text + ")";
    }

    protected virtual (string Text, Binding Binding) FormOf(int index) => PlainForm(graph[index]);

    private (string Text, Binding Binding) PlainForm(Node node) => node.Operator switch
    {
        Operator.Constant => Constant(node.Constant),
        Operator.BooleanConstant => (node.Payload != 0 ? "true" : "false", Binding.Primary),
        Operator.Side => (leaf(node), Binding.Equality),
        Operator.State or Operator.Parameter or Operator.Time or Operator.Direction or Operator.WholeNumber
            or Operator.Mode or Operator.Input or Operator.InputSlope
            or Operator.StateElement or Operator.ParameterElement or Operator.DirectionElement => (leaf(node), Binding.Primary),
        Operator.IndexNumber => (leaf(node), Binding.Unary),
        Operator.Add => Infix(node, "+", Binding.Sum),
        Operator.Subtract => Infix(node, "-", Binding.Sum),
        Operator.Multiply => Infix(node, "*", Binding.Product),
        Operator.Divide => Infix(node, "/", Binding.Product),
        Operator.Remainder => Infix(node, "%", Binding.Product),
        Operator.Negate => ("-" + Operand(node.First, Binding.Primary), Binding.Unary),
        Operator.Less => Relation(node, "<", Binding.Relation),
        Operator.LessOrEqual => Relation(node, "<=", Binding.Relation),
        Operator.Greater => Relation(node, ">", Binding.Relation),
        Operator.GreaterOrEqual => Relation(node, ">=", Binding.Relation),
        Operator.Equal => Relation(node, "==", Binding.Equality),
        Operator.NotEqual => Relation(node, "!=", Binding.Equality),
        Operator.And => Infix(node, "&&", Binding.And),
        Operator.Or => Infix(node, "||", Binding.Or),
        Operator.Not => ("!" + Operand(node.First, Binding.Primary), Binding.Unary),
        Operator.Conditional => (
            $"{Operand(node.First, Binding.Or)} ? {Operand(node.Second, Binding.Or)} : {Operand(node.Third, Binding.Or)}", Binding.Conditional),
        Operator.Sign => ("(double)" + Call(node, "Sign"), Binding.Unary),
        Operator.RoundAwayFromZero => (
            $"global::System.Math.Round({Argument(node.First)}, global::System.MidpointRounding.AwayFromZero)", Binding.Primary),
        >= Operator.TableValue and <= Operator.TablePositionSlope => (TableCall(node), Binding.Primary),
        Operator.LogBase => (Call(node, "Log"), Binding.Primary),
        _ => (Call(node, node.Operator.ToString()), Binding.Primary),
    };

    private static (string Text, Binding Binding) Constant(double value)
    {
        string text = Literals.Number(value);
        return (text, text[0] == '-' ? Binding.Unary : Binding.Primary);
    }

    /// <summary>C# groups a chain of equal rank from the left, so a left operand may have the same rank, a right one may not.</summary>
    private (string Text, Binding Binding) Infix(Node node, string sign, Binding rank) =>
        ($"{Operand(node.First, rank)} {sign} {Operand(node.Second, rank + 1)}", rank);

    /// <summary>A comparison of a value with itself asks whether it is a number; written plainly the compiler warns.</summary>
    private (string Text, Binding Binding) Relation(Node node, string sign, Binding rank)
    {
        if (node.First != node.Second)
            return ($"{Operand(node.First, Binding.Sum)} {sign} {Operand(node.Second, Binding.Sum)}", rank);
        if (node.Operator is Operator.Less or Operator.Greater) return ("false", Binding.Primary);
        string isNaN = $"double.IsNaN({Argument(node.First)})";
        return node.Operator == Operator.NotEqual ? (isNaN, Binding.Primary) : ("!" + isNaN, Binding.Unary);
    }

    private string Call(Node node, string function)
    {
        string arguments = Argument(node.First);
        if (node.Second >= 0) arguments += ", " + Argument(node.Second);
        if (node.Third >= 0) arguments += ", " + Argument(node.Third);
        return $"global::System.Math.{function}({arguments})";
    }

    /// <summary>A member of a table, the arguments being printed already.</summary>
    protected string TableCall(Node node, string member, string arguments) => $"{tables[TableNodes.TableOf(node)]}.{member}({arguments})";

    private string TableCall(Node node)
    {
        int order = TableNodes.OrderOf(node);
        string arguments = Argument(node.First);
        if (node.Second >= 0) arguments += ", " + Argument(node.Second);
        string member = node.Operator switch
        {
            Operator.TableSegment => "Segment",
            Operator.TablePosition => "Position",
            Operator.TablePositionSlope => "PositionSlope",
            _ when order > 0 => "Derivative",
            _ => "At",
        };
        return TableCall(node, member, (order > 0 ? Literals.Integer(order) + ", " : "") + arguments);
    }

    /// <summary>Conditions inside arguments stand in parentheses: <c>f(a &lt; b, c &gt; (d))</c> would read as a generic call.</summary>
    private string Argument(int index) => Operand(index, Binding.Sum);
}
