using System.Linq;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>Prints what is added to the model class itself: property storage and access to the numbers as vectors.</summary>
internal sealed class ModelMembersWriter(SourceWriter writer, ModelDefinition model, NameScope members)
{
    private const string Input = "global::System.ReadOnlySpan<double>";
    private const string Output = "global::System.Span<double>";

    private readonly string[] _states = [.. model.States.Take(model.OwnStateCount).Select(state => members.Claim(FieldName(state.Property)))];
    private readonly string[] _parameters = [.. model.Parameters.Take(model.OwnParameterCount).Select(parameter => members.Claim(FieldName(parameter.Property)))];

    private readonly SubmodelWriter _submodels = new(writer, model, members);

    private readonly string[] _modes = [.. model.Modes.Select(mode => members.Claim(FieldName(mode.Property)))];
    private readonly string[] _inputs = [.. model.Inputs.Select(input => members.Claim(FieldName(input.Property)))];

    public void Write(string modelName, string equationsName)
    {
        for (int i = 0; i < _states.Length; i++) PropertyWriter.Write(writer, model.States[i].Property, _states[i], model.States[i].InitialBits);
        for (int i = 0; i < _parameters.Length; i++)
            PropertyWriter.Write(writer, model.Parameters[i].Property, _parameters[i], model.Parameters[i].ValueBits);
        for (int i = 0; i < _modes.Length; i++) PropertyWriter.Write(writer, model.Modes[i].Property, _modes[i], ModeValue(model.Modes[i]));
        for (int i = 0; i < _inputs.Length; i++) PropertyWriter.Write(writer, model.Inputs[i].Property, _inputs[i], model.Inputs[i].ValueBits);

        _submodels.WriteStorage(modelName);
        string contract = $"global::OdeDsl.Modeling.IOdeModel<{modelName}, {modelName}.{equationsName}>";
        Transfer($"void {contract}.ReadState({Output} state)", "ReadState", "state", _states, static (vector, field) => $"{vector} = {field};");
        Transfer($"void {contract}.WriteState({Input} state)", "WriteState", "state", _states, static (vector, field) => $"{field} = {vector};");
        Transfer(
            $"void {contract}.ReadParameters({Output} parameters)", "ReadParameters", "parameters", _parameters, static (vector, field) => $"{vector} = {field};");
        Transfer(
            $"void {contract}.WriteParameters({Input} parameters)", "WriteParameters", "parameters", _parameters, static (vector, field) => $"{field} = {vector};");
        if (_modes.Length > 0)
        {
            string[] values = [.. _modes.Select((field, i) => ModeNumber(model.Modes[i].Kind, field))];
            Transfer($"void {contract}.ReadModes({Output} modes)", "ReadModes", "modes", values, static (vector, value) => $"{vector} = {value};");
        }

        if (_inputs.Length > 0)
            Transfer($"void {contract}.ReadInputs({Output} inputs)", "ReadInputs", "inputs", _inputs, static (vector, field) => $"{vector} = {field};");
        _submodels.WriteCopy(modelName, contract);
    }

    private void Transfer(string signature, string method, string vector, string[] fields, System.Func<string, string, string> line)
    {
        writer.Line(GeneratedMark.Code);
        writer.Line(GeneratedMark.NotCovered);
        writer.Open(signature);
        int count = vector switch
        {
            "state" => model.States.Count,
            "parameters" => model.Parameters.Count,
            _ => fields.Length,
        };
        writer.Line($"{vector} = {vector}[..{Literals.Integer(count)}];");
        for (int i = 0; i < fields.Length; i++) writer.Line(line($"{vector}[{Literals.Integer(i)}]", fields[i]));
        if (vector is "state" or "parameters") _submodels.WriteTransfer(method, vector);
        writer.Close();
        writer.Line();
    }

    private static string ModeNumber(ModeKind kind, string field) => kind switch
    {
        ModeKind.Condition => $"{field} ? 1d : 0d",
        ModeKind.Enumeration => $"(double){field}",
        _ => field,
    };

    private static string ModeValue(ModeDefinition mode)
    {
        double value = System.BitConverter.Int64BitsToDouble(mode.InitialBits);
        return mode.Kind switch
        {
            ModeKind.Condition => value != 0 ? "true" : "false",
            ModeKind.WholeNumber => ((int)value).ToString(System.Globalization.CultureInfo.InvariantCulture),
            ModeKind.Enumeration => $"({mode.Property.Type})({value.ToString("0", System.Globalization.CultureInfo.InvariantCulture)})",
            _ => Literals.Number(value),
        };
    }

    private static string FieldName(PropertyDefinition property) => "_" + Identifiers.Local(property.Name);
}
