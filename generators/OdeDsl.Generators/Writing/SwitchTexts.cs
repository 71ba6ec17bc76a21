using System.Collections.Generic;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>Names switching functions by the user's own text.</summary>
internal sealed class SwitchTexts
{
    private readonly Dictionary<int, string> _textOf = [];
    private readonly ExpressionGraph _free;

    public SwitchTexts(ModelDefinition model, ModelEquations equations)
    {
        _free = equations.Free;
        foreach (ConditionText text in model.ConditionTexts)
        {
            if (!_textOf.ContainsKey(text.Node)) _textOf.Add(text.Node, text.Text);
        }
    }

    /// <summary>The text of the condition or function that asked for the switch first, or at least the operation's name.</summary>
    public string this[SwitchingFunction function] =>
        _textOf.TryGetValue(function.Source, out string? text) ? text : _free[function.Source].Operator.ToString();
}
