using System;
using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>Prints the description of the model as a static property that is made once.</summary>
internal sealed class DescriptionWriter(SourceWriter writer, ModelDefinition model, ModelEquations equations, SwitchTexts texts)
{
    private const string Namespace = "global::OdeDsl.Modeling.";

    public void Write()
    {
        TypeLink type = model.Type.Types[model.Type.Types.Count - 1];
        writer.Line("/// <inheritdoc/>");
        writer.Line($"public static {Namespace}ModelDescription Description {{ get; }} = new {Namespace}ModelDescription");
        writer.Line("{");
        writer.Line($"    Name = {Literals.Text(type.Name.TrimStart('@'))},");
        writer.Line($"    Summary = {Literals.Text(model.Summary)},");
        writer.Line($"    TimeUnit = {Literals.Text(model.TimeUnit)},");
        List("States", model.States.Select(StateText));
        List("Parameters", model.Parameters.Select(ParameterText));
        if (model.Modes.Count > 0) List("Modes", model.Modes.Select(ModeText));
        if (model.Inputs.Count > 0) List("Inputs", model.Inputs.Select(InputText));
        List("Observables", model.Observables.Select(ObservableText));
        if (model.Tables.Count > 0) List("Tables", model.Tables.Select(TableText));
        if (model.Events.Count > 0) List("Events", model.Events.Select(EventText));
        List("Switches", equations.Switches.Select(SwitchText));
        writer.Line($"    StateSparsity = {Pattern(equations.StateJacobian)},");
        writer.Line($"    ParameterSparsity = {Pattern(equations.ParameterJacobian)},");
        writer.Line($"    DependsOnTime = {Bool(equations.DependsOnTime)},");
        writer.Line("};");
    }

    private void List(string property, IEnumerable<string> items)
    {
        writer.Line($"    {property} =");
        writer.Line("    [");
        foreach (string item in items) writer.Line($"        {item},");
        writer.Line("    ],");
    }

    internal static string StateText(StateDefinition state) =>
        $"new {Namespace}StateDescription({Literals.Text(state.Property.Name)}, {Literals.Text(state.Unit)}, {Number(state.InitialBits)}, "
        + $"{Number(state.LowerBits)}, {Number(state.UpperBits)}, {(state.AnglePeriodBits is { } period ? Number(period) : "null")}, "
        + $"{Literals.Text(state.RateText)}, {Literals.Text(state.Property.Summary)})";

    internal static string ParameterText(ParameterDefinition parameter) =>
        $"new {Namespace}ParameterDescription({Literals.Text(parameter.Property.Name)}, {Literals.Text(parameter.Unit)}, "
        + $"{Number(parameter.ValueBits)}, {Number(parameter.LowerBits)}, {Number(parameter.UpperBits)}, {Literals.Text(parameter.Property.Summary)})"
        + (parameter.IsWhole ? " { IsFixed = true }" : "");

    private static string ModeText(ModeDefinition mode) =>
        $"new {Namespace}ModeDescription({Literals.Text(mode.Property.Name)}, {Number(mode.InitialBits)}, {Literals.Text(mode.Property.Summary)})";

    private static string InputText(InputDefinition input) =>
        $"new {Namespace}InputDescription({Literals.Text(input.Property.Name)}, {Literals.Text(input.Unit)}, {Number(input.ValueBits)}, "
        + $"{Literals.Text(input.Property.Summary)})";

    internal static string ObservableText(ObservableDefinition observable) =>
        $"new {Namespace}ObservableDescription({Literals.Text(observable.Name)}, {Literals.Text(observable.Unit)}, "
        + $"{Literals.Text(observable.Text)}, {Literals.Text(observable.Summary)})";

    internal static string TableText(TableDefinition table) =>
        $"new {Namespace}TableDescription({Literals.Text(table.Name)}, {Literals.Text(table.Unit)}, {Literals.Text(table.ArgumentUnit)}, {table.Access})";

    private static string EventText(EventDefinition item) =>
        $"new {Namespace}EventDescription({Literals.Text(item.Name)}, {Literals.Text(item.Guard)}, (global::OdeDsl.GuardDirection){Literals.Integer(item.Direction)}, "
        + $"{Bool(item.IsTerminal)}, {Bool(item.IsCondition)}, {Literals.Text(item.Text)}, {Literals.Text(item.Summary)})";

    private string SwitchText(SwitchingFunction function)
    {
        Dependence dependence = equations.FreeDependences[function.Decision];
        return $"new {Namespace}SwitchDescription({Literals.Text(texts[function])}, "
            + $"{Namespace}SwitchKind.{function.Kind}, {Bool((dependence & Dependence.State) != 0)}, {Bool((dependence & Dependence.Time) != 0)})"
            + (function.Table is { } table ? $" {{ Table = {model.Tables[table].Access} }}" : "");
    }

    private static string Pattern(SparseMatrix matrix)
    {
        int[] starts = new int[matrix.Rows + 1];
        foreach (MatrixEntry entry in matrix.Entries) starts[entry.Row + 1]++;
        for (int row = 0; row < matrix.Rows; row++) starts[row + 1] += starts[row];
        return $"new {Namespace}SparsityPattern({Literals.Integer(matrix.Rows)}, {Literals.Integer(matrix.Columns)}, "
            + $"[{Join(starts)}], [{Join(matrix.Entries.Select(static entry => entry.Column))}])";
    }

    private static string Join(IEnumerable<int> numbers) => string.Join(", ", numbers.Select(Literals.Integer));

    private static string Number(long bits) => Literals.Number(BitConverter.Int64BitsToDouble(bits));

    private static string Bool(bool value) => value ? "true" : "false";
}
