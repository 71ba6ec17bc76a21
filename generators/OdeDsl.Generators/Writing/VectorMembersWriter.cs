using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>Prints what is added to a model class with vectors: property storage and access to the numbers as vectors.</summary>
internal sealed class VectorMembersWriter
{
    private const string Input = "global::System.ReadOnlySpan<double>";
    private const string Output = "global::System.Span<double>";
    private const string Storage = "global::OdeDsl.Modeling.VectorStorage.";

    private readonly SourceWriter _writer;
    private readonly ModelDefinition _model;
    private readonly VectorPart _vectors;
    private readonly VectorLayout _layout;
    private readonly string[] _states;
    private readonly string[] _parameters;
    private readonly string[] _vectorStates;
    private readonly string[] _vectorParameters;

    public VectorMembersWriter(SourceWriter writer, ModelDefinition model, NameScope members)
    {
        _writer = writer;
        _model = model;
        _vectors = model.Vectors!;
        _states = [.. model.States.Select(state => Field(members, state.Property))];
        _parameters = [.. model.Parameters.Select(parameter => Field(members, parameter.Property))];
        _vectorStates = [.. _vectors.States.Select(state => Field(members, state.Property))];
        _vectorParameters = [.. _vectors.Parameters.Select(parameter => Field(members, parameter.Property))];
        Dictionary<int, string> lengths = [];
        for (int symbol = 0; symbol < _vectors.Symbols.Count; symbol++)
        {
            if (_vectors.Symbols[symbol].IsLength) lengths[symbol] = _parameters[_vectors.Symbols[symbol].Parameter];
        }

        _layout = new(model, lengths);
    }

    public void Write(string modelName, string equationsName)
    {
        for (int i = 0; i < _states.Length; i++) PropertyWriter.Write(_writer, _model.States[i].Property, _states[i], _model.States[i].InitialBits);
        for (int i = 0; i < _parameters.Length; i++) WriteParameter(i);
        for (int i = 0; i < _vectorStates.Length; i++)
            WriteVector(_vectors.States[i].Property, _vectorStates[i], _vectors.States[i].InitialBits, _vectors.States[i].Lengths);
        for (int i = 0; i < _vectorParameters.Length; i++)
            WriteVector(_vectors.Parameters[i].Property, _vectorParameters[i], _vectors.Parameters[i].ValueBits, _vectors.Parameters[i].Lengths);

        string contract = $"global::OdeDsl.Modeling.IOdeModel<{modelName}, {modelName}.{equationsName}>";
        Line($"int {contract}.StateCount => {_layout.StateCount};");
        Line($"int {contract}.ParameterCount => {_layout.ParameterCount};");
        Open($"void {contract}.ReadState({Output} state)");
        for (int i = 0; i < _states.Length; i++) _writer.Line($"state[{Literals.Integer(i)}] = {_states[i]};");
        WriteVectors("state", _vectors.States.Select(static state => state.Property), isParameter: false, reads: true);
        Open($"void {contract}.WriteState({Input} state)");
        for (int i = 0; i < _states.Length; i++) _writer.Line($"{_states[i]} = state[{Literals.Integer(i)}];");
        WriteVectors("state", _vectors.States.Select(static state => state.Property), isParameter: false, reads: false);
        Open($"void {contract}.ReadParameters({Output} parameters)");
        for (int i = 0; i < _parameters.Length; i++) _writer.Line($"parameters[{Literals.Integer(i)}] = {_parameters[i]};");
        WriteVectors("parameters", _vectors.Parameters.Select(static parameter => parameter.Property), isParameter: true, reads: true);
        Open($"void {contract}.WriteParameters({Input} parameters)");
        for (int i = 0; i < _parameters.Length; i++)
        {
            ParameterDefinition parameter = _model.Parameters[i];
            _writer.Line(parameter.IsWhole
                ? $"{Storage}RequireSame({Literals.Text(parameter.Property.Name)}, {_parameters[i]}, parameters[{Literals.Integer(i)}]);"
                : $"{_parameters[i]} = parameters[{Literals.Integer(i)}];");
        }

        WriteVectors("parameters", _vectors.Parameters.Select(static parameter => parameter.Property), isParameter: true, reads: false);
        Open($"{modelName} {contract}.Copy()");
        _writer.Line($"{modelName} copy = ({modelName})base.MemberwiseClone();");
        foreach ((string field, string type) in _vectorStates.Zip(_vectors.States, static (field, state) => (field, state.Property.Type))
            .Concat(_vectorParameters.Zip(_vectors.Parameters, static (field, parameter) => (field, parameter.Property.Type))))
            _writer.Line($"copy.{field} = ({type}?){field}?.Clone();");
        _writer.Line("return copy;");
        _writer.Close();
        _writer.Line();
    }

    private void WriteParameter(int i)
    {
        ParameterDefinition parameter = _model.Parameters[i];
        if (!parameter.IsWhole)
        {
            PropertyWriter.Write(_writer, parameter.Property, _parameters[i], parameter.ValueBits);
            return;
        }

        SymbolDefinition length = _vectors.Symbols.First(symbol => symbol.Parameter == i);
        string name = Literals.Text(parameter.Property.Name);
        _writer.Line(GeneratedMark.Code);
        _writer.Line($"private int {_parameters[i]} = {Literals.Integer((int)System.BitConverter.Int64BitsToDouble(parameter.ValueBits))};");
        _writer.Line();
        OpenProperty(parameter.Property);
        foreach (string accessor in parameter.Property.Accessors)
        {
            if (IsGetter(accessor))
            {
                _writer.Line($"{accessor} => {_parameters[i]};");
                continue;
            }

            _writer.Open(accessor);
            foreach ((string field, PropertyDefinition vector) in VectorsOf(length)) _writer.Line($"{Storage}RequireUnset({name}, {Literals.Text(vector.Name)}, {field});");
            string minimum = length.Minimum == SymbolDefinition.NoMinimum ? "" : Literals.Integer((int)length.Minimum);
            _writer.Line(minimum.Length == 0 ? $"{_parameters[i]} = value;" : $"{_parameters[i]} = {Storage}RequireLength({name}, value, {minimum});");
            _writer.Close();
        }

        _writer.Close();
        _writer.Line();
    }

    /// <summary>The vectors whose length a parameter is.</summary>
    private IEnumerable<(string Field, PropertyDefinition Vector)> VectorsOf(SymbolDefinition length) =>
        _vectorStates.Zip(_vectors.States, static (field, state) => (field, state.Property, state.Lengths))
            .Concat(_vectorParameters.Zip(_vectors.Parameters, static (field, parameter) => (field, parameter.Property, parameter.Lengths)))
            .Where(vector => vector.Lengths.Any(form => !form.IsConstant && _vectors.Symbols[form.LastSymbol].Parameter == length.Parameter))
            .Select(static vector => (vector.field, vector.Property));

    private void WriteVector(PropertyDefinition property, string field, long startBits, EquatableArray<Affine> lengths)
    {
        string shape = string.Join(", ", lengths.Select(_layout.Text));
        string start = Literals.Number(System.BitConverter.Int64BitsToDouble(startBits));
        _writer.Line(GeneratedMark.Code);
        _writer.Line($"private {property.Type}? {field};");
        _writer.Line();
        OpenProperty(property);
        foreach (string accessor in property.Accessors)
        {
            _writer.Line(IsGetter(accessor)
                ? $"{accessor} => {field} ??= {Storage}Filled({shape}, {start});"
                : $"{accessor} => {field} = {Storage}RequireShape({Literals.Text(property.Name)}, value, {shape});");
        }

        _writer.Close();
        _writer.Line();
    }

    private void WriteVectors(string flat, IEnumerable<PropertyDefinition> vectors, bool isParameter, bool reads)
    {
        int vector = 0;
        foreach (PropertyDefinition property in vectors)
        {
            string place = _layout.Start(isParameter, vector);
            string count = _layout.Count(_layout.LengthsOf(isParameter, vector++));
            string elements = $"{Storage}Elements({Identifiers.Escape(property.Name)})";
            _writer.Line(reads
                ? $"{elements}.CopyTo({flat}.Slice({place}, {count}));"
                : $"{flat}.Slice({place}, {count}).CopyTo({elements});");
        }

        _writer.Close();
        _writer.Line();
    }

    private void OpenProperty(PropertyDefinition property)
    {
        _writer.Line(GeneratedMark.Code);
        _writer.Line(GeneratedMark.NotCovered);
        string modifiers = property.Modifiers.Length > 0 ? property.Modifiers + " " : "";
        _writer.Open($"{modifiers}partial {property.Type} {Identifiers.Escape(property.Name)}");
    }

    private void Line(string line)
    {
        _writer.Line(GeneratedMark.Code);
        _writer.Line(GeneratedMark.NotCovered);
        _writer.Line(line);
        _writer.Line();
    }

    private void Open(string signature)
    {
        _writer.Line(GeneratedMark.Code);
        _writer.Line(GeneratedMark.NotCovered);
        _writer.Open(signature);
    }

    private static bool IsGetter(string accessor) => accessor == "get" || accessor.EndsWith(" get", System.StringComparison.Ordinal);

    private static string Field(NameScope members, PropertyDefinition property) => members.Claim("_" + Identifiers.Local(property.Name));
}
