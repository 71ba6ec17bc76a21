using System.Collections.Generic;

namespace OdeDsl.Generators.Algebra;

/// <summary>Finds what an expression is made of.</summary>
internal static class Reach
{
    /// <summary>All nodes that the roots are made of, the roots included, operands before users.</summary>
    public static List<int> Of(ExpressionGraph graph, IEnumerable<int> roots)
    {
        HashSet<int> seen = [];
        Stack<int> open = new();
        foreach (int root in roots)
        {
            if (seen.Add(root)) open.Push(root);
        }

        while (open.Count > 0)
        {
            foreach (int operand in graph[open.Pop()].Operands)
            {
                if (seen.Add(operand)) open.Push(operand);
            }
        }

        List<int> reached = [.. seen];
        reached.Sort();
        return reached;
    }
}
