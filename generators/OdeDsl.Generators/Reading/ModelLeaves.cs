using System.Collections.Generic;
using System.Numerics;
using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Reading;

/// <summary>What a model's own numbers stand for in expressions: states, and the vector of parameters, modes, inputs and inputs' slopes.</summary>
internal static class ModelLeaves
{
    public static Dictionary<ISymbol, Value> Of(PropertyReader properties, ExpressionGraph graph)
    {
        Dictionary<ISymbol, Value> leaves = new(SymbolEqualityComparer.Default);
        foreach (DeclaredState state in properties.States)
            leaves.Add(state.Symbol, new NumberValue(graph.Leaf(Operator.State, leaves.Count)));
        int place = 0;
        foreach (DeclaredParameter parameter in properties.Parameters)
            leaves.Add(parameter.Symbol, new NumberValue(graph.Leaf(Operator.Parameter, place++)));
        foreach (DeclaredMode mode in properties.Modes) leaves.Add(mode.Symbol, Mode(mode, graph, graph.Leaf(Operator.Mode, place++)));
        foreach (DeclaredInput input in properties.Inputs)
            leaves.Add(input.Symbol, new NumberValue(graph.Leaf(Operator.Input, place++)));
        return leaves;
    }

    private static Value Mode(DeclaredMode mode, ExpressionGraph graph, int leaf)
    {
        if (mode.Definition.Kind == ModeKind.Number) return new NumberValue(leaf);
        if (mode.Definition.Kind == ModeKind.Condition) return new ConditionValue(graph.Binary(Operator.NotEqual, leaf, graph.Constant(0.0)));
        Choice<BigInteger>? choice = null;
        foreach (long value in mode.Values)
        {
            ChoiceLeaf<BigInteger> one = new(new BigInteger(value));
            choice = choice is null ? one : Choice.Between(graph.Binary(Operator.Equal, leaf, graph.Constant((double)value)), one, choice);
        }

        return choice is null ? UnknownValue.Instance : new WholeValue(choice, leaf); // Without values the declaration has a problem.
    }
}
