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
    Input = 8,
    Mode = 16,
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
                Operator.Input => Dependence.Input,
                Operator.Mode => Dependence.Mode,
                _ => Dependence.None,
            };
            foreach (int operand in node.Operands) dependences[i] |= dependences[operand];
        }

        return dependences;
    }
}
