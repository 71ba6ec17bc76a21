using System;

namespace OdeDsl.Generators.Algebra;

/// <summary>
/// The derivative of each operation, given the derivatives of its operands. Formulas are the ones of any table of derivatives, in
/// the form that keeps small derivatives accurate and stays finite where the derivative is (each choice is noted at its rule).
/// </summary>
internal sealed class DerivativeRules(ExpressionGraph graph)
{
    public Simplifier Algebra { get; } = new(graph);

    /// <param name="index">The operation.</param>
    /// <param name="of">The derivative of an operand.</param>
    /// <returns>The derivative; zero for conditions, which have none.</returns>
    public int Derivative(int index, Func<int, int> of)
    {
        Node node = graph[index];
        if (graph.IsCondition(index) || node.IsLeaf) return Algebra.Zero;
        int a = node.First, b = node.Second;
        int da = of(a), db = b >= 0 ? of(b) : Algebra.Zero;
        return node.Operator switch
        {
            Operator.Add => Algebra.Add(da, db),
            Operator.Subtract => Algebra.Subtract(da, db),
            Operator.Negate => Algebra.Negate(da),
            Operator.Multiply => Product(a, da, b, db),
            Operator.Divide => Quotient(index, da, b, db),
            Operator.FusedMultiplyAdd => Algebra.Add(Product(a, da, b, db), of(node.Third)),
            Operator.Pow => Power(index, da, db),
            Operator.LogBase => Algebra.Divide(
                Algebra.Subtract(Algebra.Divide(da, a), Algebra.Divide(Algebra.Multiply(index, db), b)), Algebra.Call(Operator.Log, b)),
            Operator.Atan2 => Algebra.Divide(
                Algebra.Subtract(Algebra.Multiply(b, da), Algebra.Multiply(a, db)), Algebra.Add(Algebra.Square(a), Algebra.Square(b))),
            Operator.Conditional => Algebra.Conditional(a, db, of(node.Third)),
            Operator.Fold => Algebra.Add(da, Algebra.Sum(node.Symbol, db)), // What was added up before counts for nothing in a pass.
            Operator.Sum => Algebra.Sum(node.Symbol, da),
            Operator.Clamp => Clamped(node, da, db, of(node.Third)),
            Operator.Min => Algebra.Conditional(Greater(a, b), db, da),
            Operator.Max => Algebra.Conditional(Greater(b, a), db, da),
            Operator.MinMagnitude => Algebra.Conditional(Greater(Magnitude(a), Magnitude(b)), db, da),
            Operator.MaxMagnitude => Algebra.Conditional(Greater(Magnitude(b), Magnitude(a)), db, da),
            Operator.CopySign => Algebra.Multiply(da, Algebra.Multiply(SignOf(a), SignOf(b))),
            Operator.Remainder or Operator.IEEERemainder => Algebra.Subtract(da, Algebra.Multiply(WholeQuotient(index), db)),
            Operator.Sign or Operator.Floor or Operator.Ceiling or Operator.Truncate or Operator.Round or Operator.RoundAwayFromZero
                => Algebra.Zero,
            Operator.TableSegment or Operator.TablePositionSlope => Algebra.Zero,
            Operator.TableValue or Operator.TablePolynomial or Operator.TablePosition =>
                Algebra.IsZero(da) || TableNodes.Slope(graph, node) is not (>= 0 and var slope) ? Algebra.Zero : Algebra.Multiply(slope, da),
            _ => Algebra.IsZero(da) ? Algebra.Zero : OfFunction(node.Operator, index, a, da),
        };
    }

    /// <summary>Functions of one argument: f'(a) da, with the value f(a) reused where that is exact enough.</summary>
    private int OfFunction(Operator function, int value, int a, int da) => function switch
    {
        Operator.Sqrt => Algebra.Divide(da, Algebra.Multiply(Algebra.Number(2), value)),
        Operator.Cbrt => Algebra.Divide(da, Algebra.Multiply(Algebra.Number(3), Algebra.Square(value))),
        Operator.Exp => Algebra.Multiply(value, da),
        Operator.Log => Algebra.Divide(da, a),
        Operator.Log2 => Algebra.Divide(da, Algebra.Multiply(Algebra.Number(0.69314718055994530942), a)),
        Operator.Log10 => Algebra.Divide(da, Algebra.Multiply(Algebra.Number(2.30258509299404568402), a)),
        Operator.Sin => Algebra.Multiply(Algebra.Call(Operator.Cos, a), da),
        Operator.Cos => Algebra.Negate(Algebra.Multiply(Algebra.Call(Operator.Sin, a), da)),
        Operator.Tan => Algebra.Multiply(Algebra.Add(Algebra.One, Algebra.Square(value)), da),
        Operator.Asin => Algebra.Divide(da, Algebra.Call(Operator.Sqrt, OneMinusSquare(a))),
        Operator.Acos => Algebra.Negate(Algebra.Divide(da, Algebra.Call(Operator.Sqrt, OneMinusSquare(a)))),
        Operator.Atan => Algebra.Divide(da, Algebra.Add(Algebra.One, Algebra.Square(a))),
        Operator.Sinh => Algebra.Multiply(Algebra.Call(Operator.Cosh, a), da),
        Operator.Cosh => Algebra.Multiply(Algebra.Call(Operator.Sinh, a), da),
        // Not 1 − tanh²: that loses every digit of a small derivative.
        Operator.Tanh => Algebra.Divide(da, Algebra.Square(Algebra.Call(Operator.Cosh, a))),
        Operator.Asinh => Algebra.Divide(da, Algebra.Call(Operator.Sqrt, Algebra.Add(Algebra.Square(a), Algebra.One))),
        Operator.Acosh => Algebra.Divide(
            da, Algebra.Call(Operator.Sqrt, Algebra.Multiply(Algebra.Subtract(a, Algebra.One), Algebra.Add(a, Algebra.One)))),
        Operator.Atanh => Algebra.Divide(da, OneMinusSquare(a)),
        Operator.Abs => Algebra.Conditional(
            graph.Binary(Operator.GreaterOrEqual, a, Algebra.Zero), da, Algebra.Negate(da)),
        _ => throw new NotSupportedException($"No derivative is known for {function}."),
    };

    private int Product(int a, int da, int b, int db) => Algebra.Add(Algebra.Multiply(da, b), Algebra.Multiply(a, db));

    /// <summary>(a / b)' = (da − (a / b) db) / b: one division more than the value, and no b² that could overflow.</summary>
    private int Quotient(int value, int da, int b, int db) => Algebra.Divide(Algebra.Subtract(da, Algebra.Multiply(value, db)), b);

    /// <summary>(1 − a)(1 + a), accurate near ±1 where 1 − a² is not.</summary>
    private int OneMinusSquare(int a) => Algebra.Multiply(Algebra.Subtract(Algebra.One, a), Algebra.Add(Algebra.One, a));

    private int Power(int value, int da, int db)
    {
        Node node = graph[value];
        int byBase = Algebra.IsZero(da) ? Algebra.Zero : Algebra.Multiply(PowerByBase(value, node.First, node.Second), da);
        if (Algebra.IsZero(db)) return byBase;

        // a^b ln a tends to 0 with a^b; the product itself would be 0 · ∞ at a = 0.
        int byExponent = Algebra.Conditional(
            graph.Binary(Operator.Equal, value, Algebra.Zero),
            Algebra.Zero,
            Algebra.Multiply(value, Algebra.Call(Operator.Log, node.First)));
        return Algebra.Add(byBase, Algebra.Multiply(byExponent, db));
    }

    /// <summary>∂(a^b)/∂a = b a^(b−1).</summary>
    private int PowerByBase(int value, int a, int b)
    {
        if (graph[b].Operator == Operator.Constant) return ConstantPowerByBase(value, a, graph[b].Constant);

        // An exponent of exactly 0 has derivative 0 also at a = 0, where the formula would say 0 · ∞.
        int power = graph.Binary(Operator.Pow, a, Algebra.Subtract(b, Algebra.One));
        return Algebra.Conditional(graph.Binary(Operator.Equal, b, Algebra.Zero), Algebra.Zero, Algebra.Multiply(b, power));
    }

    /// <summary>
    /// b a^(b−1) for a constant b: by products for exponents up to 4, by a square root for halves, else by one call more. A negative
    /// exponent reuses the value: b (a^b / a) is right at a = 0 too, where both are infinite.
    /// </summary>
    private int ConstantPowerByBase(int value, int a, double b)
    {
        if (b < 0) return Algebra.Multiply(Algebra.Number(b), Algebra.Divide(value, a));
        int? power = b switch
        {
            0 => Algebra.Zero,
            1 => Algebra.One,
            2 => a,
            3 => Algebra.Square(a),
            4 => Algebra.Multiply(Algebra.Square(a), a),
            0.5 => Algebra.Divide(Algebra.One, Algebra.Call(Operator.Sqrt, a)),
            1.5 => Algebra.Call(Operator.Sqrt, a),
            2.5 => Algebra.Multiply(a, Algebra.Call(Operator.Sqrt, a)),
            _ => null,
        };
        return Algebra.Multiply(Algebra.Number(b), power ?? graph.Binary(Operator.Pow, a, Algebra.Number(b - 1)));
    }

    private int Clamped(Node clamp, int dx, int dLower, int dUpper) => Algebra.Conditional(
        Greater(clamp.Second, clamp.First), dLower, Algebra.Conditional(Greater(clamp.First, clamp.Third), dUpper, dx));

    /// <summary>n in a − n b, from the remainder itself, which is exact.</summary>
    private int WholeQuotient(int remainder)
    {
        Node node = graph[remainder];
        return Algebra.Call(Operator.Round, Algebra.Divide(Algebra.Subtract(node.First, remainder), node.Second));
    }

    private int Greater(int a, int b) => graph.Binary(Operator.Greater, a, b);

    private int Magnitude(int a) => graph.Unary(Operator.Abs, a);

    private int SignOf(int a) => graph.Binary(Operator.CopySign, Algebra.One, a);
}
