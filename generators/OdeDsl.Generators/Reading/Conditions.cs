using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Reading;

/// <summary>Builds conditions and choices; constant conditions decide at once, so that code that never runs leaves no trace.</summary>
internal sealed class Conditions(ExpressionGraph graph)
{
    public int True { get; } = graph.Constant(true);

    public int False { get; } = graph.Constant(false);

    public bool IsConstant(int condition) => condition == True || condition == False;

    public int Not(int condition)
    {
        if (condition == True) return False;
        if (condition == False) return True;
        Node node = graph[condition];
        return node.Operator == Operator.Not ? node.First : graph.Unary(Operator.Not, condition);
    }

    public int And(int first, int second)
    {
        if (first == False || second == False) return False;
        if (first == True || first == second) return second;
        if (AreOpposite(first, second)) return False;
        return second == True ? first : graph.Binary(Operator.And, first, second);
    }

    public int Or(int first, int second)
    {
        if (first == True || second == True) return True;
        if (first == False || first == second) return second;
        if (AreOpposite(first, second)) return True;
        return second == False ? first : graph.Binary(Operator.Or, first, second);
    }

    private bool AreOpposite(int first, int second) => Not(first) == second;

    public int Equal(int first, int second) => Choose(first, second, Not(second));

    /// <summary>A condition that is <paramref name="whenTrue"/> or <paramref name="whenFalse"/>.</summary>
    public int Choose(int condition, int whenTrue, int whenFalse)
    {
        if (condition == True || whenTrue == whenFalse) return whenTrue;
        if (condition == False) return whenFalse;
        if (whenTrue == True) return Or(condition, whenFalse);
        if (whenTrue == False) return And(Not(condition), whenFalse);
        if (whenFalse == False) return And(condition, whenTrue);
        if (whenFalse == True) return Or(Not(condition), whenTrue);
        return graph.Ternary(Operator.Conditional, condition, whenTrue, whenFalse);
    }

    /// <summary>A number that is <paramref name="whenTrue"/> or <paramref name="whenFalse"/>.</summary>
    public int ChooseNumber(int condition, int whenTrue, int whenFalse)
    {
        if (condition == True || whenTrue == whenFalse) return whenTrue;
        return condition == False ? whenFalse : graph.Ternary(Operator.Conditional, condition, whenTrue, whenFalse);
    }
}
