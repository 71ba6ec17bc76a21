using System;

namespace OdeDsl.Generators.Algebra;

/// <summary>What an expression changes with.</summary>
[Flags]
internal enum Dependence : byte
{
    None = 0,
    State = 1,
    Time = 2,
    Parameter = 4,
}

/// <summary>Finds what each expression of a graph changes with.</summary>
internal static class Dependences
{
    public static Dependence[] Of(ExpressionGraph graph)
    {
        Dependence[] dependences = new Dependence[graph.Count];
        for (int i = 0; i < dependences.Length; i++)
        {
            Node node = graph[i];
            dependences[i] = node.Operator switch
            {
                Operator.State or Operator.StateElement => Dependence.State,
                Operator.Time => Dependence.Time,
                Operator.Parameter or Operator.ParameterElement => Dependence.Parameter,
                _ => Dependence.None,
            };
            foreach (int operand in node.Operands) dependences[i] |= dependences[operand];
        }

        return dependences;
    }
}
