using System;

namespace OdeDsl.Generators.Algebra;

/// <summary>
/// Builds the arithmetic of derivatives, shortened by rules that hold for real numbers. Never used on the user's own
/// expressions: the rules may change the last bit, and 0 · x = 0, x − x = 0 and a · (c / a) = c also where x or a is not finite or zero
/// (a derivative that is structurally zero stays zero there, which is what sparsity means).
/// </summary>
internal sealed class Simplifier(ExpressionGraph graph)
{
    public int Zero { get; } = graph.Constant(0.0);

    public int One { get; } = graph.Constant(1.0);

    public int Number(double value) => graph.Constant(value);

    public int Add(int a, int b)
    {
        if (IsZero(a)) return b;
        if (IsZero(b)) return a;
        if (TryConstants(a, b, out double x, out double y)) return graph.Constant(x + y);
        if (a == b) return Multiply(graph.Constant(2.0), a);
        if (Is(b, Operator.Negate)) return Subtract(a, graph[b].First);
        if (Is(a, Operator.Negate)) return Subtract(b, graph[a].First);
        if (TryCommonFactor(a, b, out int factor, out int restA, out int restB)) return Multiply(factor, Add(restA, restB));
        return Commutative(Operator.Add, a, b);
    }

    public int Subtract(int a, int b)
    {
        if (IsZero(b)) return a;
        if (IsZero(a)) return Negate(b);
        if (TryConstants(a, b, out double x, out double y)) return graph.Constant(x - y);
        if (a == b) return Zero;
        if (Is(b, Operator.Negate)) return Add(a, graph[b].First);
        if (Is(a, Operator.Negate)) return Negate(Add(graph[a].First, b));
        if (TryCommonFactor(a, b, out int factor, out int restA, out int restB)) return Multiply(factor, Subtract(restA, restB));
        return graph.Binary(Operator.Subtract, a, b);
    }

    public int Negate(int a)
    {
        Node node = graph[a];
        if (node.Operator == Operator.Constant) return graph.Constant(IsZero(a) ? 0.0 : -node.Constant);
        if (node.Operator == Operator.Negate) return node.First;
        if (node.Operator == Operator.Subtract && graph.Contains(new Node(Operator.Subtract, node.Second, node.First, -1, 0)))
            return graph.Binary(Operator.Subtract, node.Second, node.First);
        if (node.Operator is Operator.Multiply && Is(node.First, Operator.Constant))
            return Multiply(graph.Constant(-graph[node.First].Constant), node.Second);
        return graph.Unary(Operator.Negate, a);
    }

    public int Multiply(int a, int b)
    {
        if (IsZero(a) || IsZero(b)) return Zero;
        if (TryConstants(a, b, out double x, out double y)) return graph.Constant(x * y);
        if (HasZeroBranch(a)) return Conditional(graph[a].First, Multiply(graph[a].Second, b), Multiply(graph[a].Third, b));
        if (HasZeroBranch(b)) return Conditional(graph[b].First, Multiply(a, graph[b].Second), Multiply(a, graph[b].Third));
        if (Is(b, Operator.Constant)) (a, b) = (b, a);
        if (Is(a, Operator.Constant)) return Scale(a, b);
        if (Is(a, Operator.Negate)) return Negate(Multiply(graph[a].First, b));
        if (Is(b, Operator.Negate)) return Negate(Multiply(a, graph[b].First));
        if (Is(b, Operator.Divide) && graph[b].Second == a) return graph[b].First;
        if (Is(a, Operator.Divide) && graph[a].Second == b) return graph[a].First;
        if (IsScaled(a)) return Multiply(graph[a].First, Multiply(graph[a].Second, b));
        if (IsScaled(b)) return Multiply(graph[b].First, Multiply(a, graph[b].Second));
        return Commutative(Operator.Multiply, a, b);
    }

    public int Divide(int a, int b)
    {
        if (IsZero(a)) return Zero;
        if (TryConstants(a, b, out double x, out double y)) return graph.Constant(x / y);
        if (HasZeroBranch(a)) return Conditional(graph[a].First, Divide(graph[a].Second, b), Divide(graph[a].Third, b));
        if (Is(b, Operator.Constant) && graph[b].Constant == 1.0) return a;
        if (Is(a, Operator.Negate)) return Negate(Divide(graph[a].First, b));
        if (Is(b, Operator.Negate)) return Negate(Divide(a, graph[b].First));
        if (IsScaled(a) && IsScaled(b) && IsSafe(graph[graph[a].First].Constant / graph[graph[b].First].Constant))
        {
            double factor = graph[graph[a].First].Constant / graph[graph[b].First].Constant;
            return Divide(Scale(graph.Constant(factor), graph[a].Second), graph[b].Second);
        }

        return graph.Binary(Operator.Divide, a, b);
    }

    public int Square(int a) => Multiply(a, a);

    public int Call(Operator function, int a) => graph.Unary(function, a);

    public int Conditional(int condition, int a, int b)
    {
        if (a == b) return a;
        if (Is(condition, Operator.BooleanConstant)) return graph[condition].Payload != 0 ? a : b;
        return graph.Ternary(Operator.Conditional, condition, a, b);
    }

    public int Sum(int symbol, int term) => IsZero(term) ? Zero : graph.Intern(new Node(Operator.Sum, term, -1, -1, Node.FoldPayload(symbol, 0)));

    /// <summary>
    /// Whether a choice is zero on one branch. Factors move inside it: where Math.Sqrt(Math.Max(level, 0)) rests on its bound, the
    /// slope of the root is infinite and its product with a zero would be no number.
    /// </summary>
    private bool HasZeroBranch(int index) =>
        Is(index, Operator.Conditional) && (IsZero(graph[index].Second) || IsZero(graph[index].Third));

    public bool IsZero(int index) => Is(index, Operator.Constant) && graph[index].Constant == 0.0;

    private int Scale(int constant, int b)
    {
        double factor = graph[constant].Constant;
        if (factor == 1.0) return b;
        if (factor == -1.0) return Negate(b);
        if (Is(b, Operator.Negate)) return Scale(graph.Constant(-factor), graph[b].First);
        if (IsScaled(b) && IsSafe(factor * graph[graph[b].First].Constant))
            return Multiply(graph.Constant(factor * graph[graph[b].First].Constant), graph[b].Second);
        return graph.Binary(Operator.Multiply, constant, b);
    }

    private bool Is(int index, Operator operation) => graph[index].Operator == operation;

    private bool IsScaled(int index) => Is(index, Operator.Multiply) && Is(graph[index].First, Operator.Constant);

    /// <summary>Whether merging two constant factors into this one neither overflows nor loses digits to underflow.</summary>
    private static bool IsSafe(double product) => Math.Abs(product) is > 1e-290 and < 1e290;

    private bool TryConstants(int a, int b, out double x, out double y)
    {
        bool both = Is(a, Operator.Constant) && Is(b, Operator.Constant);
        (x, y) = both ? (graph[a].Constant, graph[b].Constant) : (0.0, 0.0);
        return both;
    }

    /// <summary>Finds f in f · x ± f · y, where a term may be f itself.</summary>
    private bool TryCommonFactor(int a, int b, out int factor, out int restA, out int restB)
    {
        foreach ((int f, int x) in Factors(a))
        {
            foreach ((int g, int y) in Factors(b))
            {
                if (f != g) continue;
                (factor, restA, restB) = (f, x, y);
                return true;
            }
        }

        (factor, restA, restB) = (-1, -1, -1);
        return false;
    }

    private (int Factor, int Cofactor)[] Factors(int index)
    {
        Node node = graph[index];
        return node.Operator == Operator.Multiply ? [(node.First, node.Second), (node.Second, node.First)] : [(index, One)];
    }

    /// <summary>Reuses the swapped operation where it already exists: addition and multiplication do not depend on the order.</summary>
    private int Commutative(Operator operation, int a, int b)
    {
        Node swapped = new(operation, b, a, -1, 0);
        return graph.Contains(swapped) ? graph.Intern(swapped) : graph.Binary(operation, a, b);
    }
}
