using System.Numerics;
using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Reading;

/// <summary>What a model's own numbers stand for in expressions: states, and the vector of parameters, modes, inputs and inputs' slopes.</summary>
internal static class ModelLeaves
{
    /// <summary>Notes the leaves of a whole model in its scopes. Modes and inputs are the model's own: submodels with open ones are refused.</summary>
    public static void AddTo(ModelScope whole, ExpressionGraph graph)
    {
        int place = 0;
        foreach ((ModelScope scope, DeclaredState state) in whole.States())
            scope.Leaves.Add(state.Symbol, new NumberValue(graph.Leaf(Operator.State, place++)));
        place = 0;
        foreach ((ModelScope scope, DeclaredParameter parameter) in whole.Parameters())
            scope.Leaves.Add(parameter.Symbol, new NumberValue(graph.Leaf(Operator.Parameter, place++)));
        foreach (DeclaredMode mode in whole.Properties.Modes) whole.Leaves.Add(mode.Symbol, Mode(mode, graph, graph.Leaf(Operator.Mode, place++)));
        foreach (DeclaredInput input in whole.Properties.Inputs)
            whole.Leaves.Add(input.Symbol, new NumberValue(graph.Leaf(Operator.Input, place++)));
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
