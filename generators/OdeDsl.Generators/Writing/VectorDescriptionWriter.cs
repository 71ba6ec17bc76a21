using System;
using System.Collections.Generic;
using System.Linq;
using System.Threading;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>Prints the description of a model with vectors: one for the default lengths, made once, and a way to make others.</summary>
internal sealed class VectorDescriptionWriter(SourceWriter writer, VectorEquations equations, CancellationToken cancellationToken)
{
    private const string Space = "global::OdeDsl.Modeling.";

    private readonly ModelDefinition _model = equations.Model;
    private readonly VectorPart _vectors = equations.Model.Vectors!;

    public void Write()
    {
        string defaults = string.Join(", ", _model.Parameters.Select(static parameter => Number(parameter.ValueBits)));
        writer.Line("/// <inheritdoc/>");
        writer.Line($"public static {Space}ModelDescription Description {{ get; }} = Describe([{defaults}]);");
        writer.Line();
        writer.Line("/// <inheritdoc/>");
        writer.Open($"public static {Space}ModelDescription DescriptionFor(global::System.ReadOnlySpan<double> parameters)");
        SymbolDefinition[] lengths = [.. _vectors.Symbols.Where(static symbol => symbol.IsLength)];
        foreach (SymbolDefinition length in lengths.Where(static length => length.Minimum != SymbolDefinition.NoMinimum))
            writer.Line($"{Space}VectorStorage.RequireLength({Literals.Text(length.Name)}, parameters[{Literals.Integer(length.Parameter)}], {Literals.Integer((int)length.Minimum)});");
        string isDefault = string.Join(" && ", lengths.Select(length =>
            $"parameters[{Literals.Integer(length.Parameter)}] == {Number(_model.Parameters[length.Parameter].ValueBits)}"));
        writer.Line($"return {(isDefault.Length == 0 ? "" : isDefault + " ? ")}Description{(isDefault.Length == 0 ? "" : " : Describe(parameters)")};");
        writer.Close();
        writer.Line();
        WriteDescribe();
        WritePattern("StateSparsityOf", Operator.StateElement);
        WritePattern("ParameterSparsityOf", Operator.ParameterElement);
    }

    private void WriteDescribe()
    {
        writer.Open($"private static {Space}ModelDescription Describe(global::System.ReadOnlySpan<double> parameters)");
        LoopBodyWriter body = NewBody();
        string[] states = [.. _vectors.States.Select((state, i) => Vector(body, state.Property.Name, isParameter: false, i))];
        string[] parameters = [.. _vectors.Parameters.Select((parameter, i) => Vector(body, parameter.Property.Name, isParameter: true, i))];
        TypeLink type = _model.Type.Types[_model.Type.Types.Count - 1];
        writer.Line($"return new {Space}ModelDescription");
        writer.Line("{");
        writer.Line($"    Name = {Literals.Text(type.Name.TrimStart('@'))},");
        writer.Line($"    Summary = {Literals.Text(_model.Summary)},");
        writer.Line($"    TimeUnit = {Literals.Text(_model.TimeUnit)},");
        List("States", "StateDescription", _model.States.Select(DescriptionWriter.StateText), [.. _vectors.States.Select((state, i) =>
            $"({states[i]}.Count, offset => {Element(state, states[i])})")]);
        List("Parameters", "ParameterDescription", _model.Parameters.Select(DescriptionWriter.ParameterText), [.. _vectors.Parameters.Select((parameter, i) =>
            $"({parameters[i]}.Count, offset => {Element(parameter, parameters[i])})")]);
        writer.Line($"    Observables = [{string.Join(", ", _model.Observables.Select(DescriptionWriter.ObservableText))}],");
        writer.Line($"    Tables = [{string.Join(", ", _model.Tables.Select(DescriptionWriter.TableText))}],");
        List("Switches", "SwitchDescription", [], [.. equations.Switches.Select(group => $"({body.Layout.Count(group)}, offset => {SwitchText(body, group)})")]);
        writer.Line($"    StateVectors = [{string.Join(", ", states)}],");
        writer.Line($"    ParameterVectors = [{string.Join(", ", parameters)}],");
        writer.Line("    StateSparsity = StateSparsityOf(parameters),");
        writer.Line("    ParameterSparsity = ParameterSparsityOf(parameters),");
        writer.Line($"    DependsOnTime = {(equations.DependsOnTime ? "true" : "false")},");
        writer.Line("};");
        writer.Close();
    }

    private LoopBodyWriter NewBody()
    {
        LoopBodyWriter body = new(writer, equations, equations.Locked, equations.Symbols, ModelNames.NewScopeOfArguments(), [], cancellationToken);
        body.WriteLengths();
        return body;
    }

    private string Vector(LoopBodyWriter body, string name, bool isParameter, int vector)
    {
        string local = body.Claim(Identifiers.Local(name));
        string lengths = string.Join(", ", body.Layout.LengthsOf(isParameter, vector).Select(body.Layout.Text));
        writer.Line($"{Space}VectorDescription {local} = new({Literals.Text(name)}, {body.Layout.Start(isParameter, vector)}, [{lengths}]);");
        return local;
    }

    private void List(string property, string type, IEnumerable<string> items, string[] vectors)
    {
        writer.Line($"    {property} = {Space}DescriptionList.Create<{Space}{type}>(");
        writer.Line("        [");
        foreach (string item in items) writer.Line($"            {item},");
        writer.Line(vectors.Length == 0 ? "        ])," : "        ],");
        for (int i = 0; i < vectors.Length; i++) writer.Line($"        {vectors[i]}{(i == vectors.Length - 1 ? ")," : ",")}");
    }

    private static string Element(VectorStateDefinition state, string vector) =>
        $"new {Space}StateDescription({vector}.NameOf(offset), {Literals.Text(state.Unit)}, {Number(state.InitialBits)}, {Number(state.LowerBits)}, "
        + $"{Number(state.UpperBits)}, {(state.AnglePeriodBits is { } period ? Number(period) : "null")}, {Literals.Text(state.RateText)}, {Literals.Text(state.Property.Summary)})";

    private static string Element(VectorParameterDefinition parameter, string vector) =>
        $"new {Space}ParameterDescription({vector}.NameOf(offset), {Literals.Text(parameter.Unit)}, {Number(parameter.ValueBits)}, "
        + $"{Number(parameter.LowerBits)}, {Number(parameter.UpperBits)}, {Literals.Text(parameter.Property.Summary)})";

    /// <summary>The user's text, with the index for one of many.</summary>
    private string SwitchText(LoopBodyWriter body, RowGroup group)
    {
        Dependence dependence = equations.FreeDependences[group.Free];
        string text = Literals.Text(group.Text);
        if (group.Ranges.Count == 1)
        {
            string index = _vectors.Symbols[group.Ranges[0].Symbol].Name;
            text = $"{Literals.Text($"{group.Text} ({index} = ")} + ({VectorLayout.Plus("offset", body.Layout.Text(group.Ranges[0].Lower))}) + \")\"";
        }
        else if (group.Ranges.Count > 1)
        {
            text = $"{Literals.Text(group.Text + " (place ")} + offset + \")\"";
        }

        SwitchingFunction function = equations.SwitchFunctions[group.Index];
        return $"new {Space}SwitchDescription({text}, {Space}SwitchKind.{function.Kind}, "
            + $"{((dependence & Dependence.State) != 0 ? "true" : "false")}, {((dependence & Dependence.Time) != 0 ? "true" : "false")})"
            + (function.Table is { } table ? $" {{ Table = {_model.Tables[table].Access} }}" : "");
    }

    private void WritePattern(string method, Operator element)
    {
        bool isParameter = element == Operator.ParameterElement;
        Dictionary<RowGroup, JacobianRow> rows = equations.Rates.ToDictionary(static group => group, group => equations.Row(group, element, cancellationToken));
        writer.Line();
        writer.Open($"private static {Space}SparsityPattern {method}(global::System.ReadOnlySpan<double> parameters)");
        LoopBodyWriter body = NewBody();
        string starts = body.Claim("starts"), columns = body.Claim("columns"), row = body.Claim("row"), place = body.Claim("place");
        writer.Line($"int[] {starts} = new int[{VectorLayout.Plus(body.Layout.StateCount, "1")}];");
        string total = VectorLayout.Sum(0, equations.Rates.Select(group =>
            VectorLayout.Times(body.Layout.Count(group), EntryCount(body.Layout, rows[group], isParameter))));
        writer.Line($"int[] {columns} = new int[{total}];");
        writer.Line($"int {row} = 0, {place} = 0;");
        body.WriteRows(equations.Rates, static _ => [], group =>
        {
            foreach ((int column, int _) in rows[group].Scalars) writer.Line($"{columns}[{place}++] = {Literals.Integer(column)};");
            foreach (VectorColumns vector in rows[group].Vectors)
            {
                if (vector.IsDense)
                {
                    string counter = body.Claim("column");
                    writer.Line($"for (int {counter} = 0; {counter} < {body.Layout.Count(body.Layout.LengthsOf(isParameter, vector.Vector))}; {counter}++) "
                        + $"{columns}[{place}++] = {VectorLayout.Plus(body.Layout.Start(isParameter, vector.Vector), counter)};");
                }
                else
                {
                    foreach (ElementEntry entry in vector.Entries) writer.Line($"{columns}[{place}++] = {body.Column(entry, isParameter)};");
                }
            }

            writer.Line($"{starts}[++{row}] = {place};");
        });
        string width = isParameter ? body.Layout.ParameterCount : body.Layout.StateCount;
        writer.Line($"return new {Space}SparsityPattern({body.Layout.StateCount}, {width}, "
            + $"global::System.Runtime.InteropServices.ImmutableCollectionsMarshal.AsImmutableArray({starts}), "
            + $"global::System.Runtime.InteropServices.ImmutableCollectionsMarshal.AsImmutableArray({columns}));");
        writer.Close();
    }

    /// <summary>The number of entries of a row.</summary>
    public static string EntryCount(VectorLayout layout, JacobianRow row, bool isParameter) => VectorLayout.Sum(
        row.Scalars.Count,
        row.Vectors.Select(vector => vector.IsDense ? layout.Count(layout.LengthsOf(isParameter, vector.Vector)) : Literals.Integer(vector.Entries.Count)));

    private static string Number(long bits) => Literals.Number(BitConverter.Int64BitsToDouble(bits));
}
