using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>Names switching functions by the user's own text.</summary>
internal static class SwitchTexts
{
    public static string Of(ModelDefinition model, ModelEquations equations, SwitchingFunction function)
    {
        foreach (ConditionText text in model.ConditionTexts)
        {
            if (text.Node == function.Source) return text.Text;
        }

        return equations.Free[function.Source].Operator.ToString();
    }
}
