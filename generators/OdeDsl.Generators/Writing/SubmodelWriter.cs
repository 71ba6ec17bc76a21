using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>Prints what a model with submodels needs beside its own numbers: their storage, their part of each vector, and copies of them.</summary>
internal sealed class SubmodelWriter(SourceWriter writer, ModelDefinition model, NameScope members)
{
    private readonly string[] _storage = [.. model.Submodels.Select(submodel => members.Claim(StorageName(submodel)))];

    /// <summary>Prints a field for a partial property, and access to the compiler's field for another one, which a copy must replace.</summary>
    public void WriteStorage(string modelName)
    {
        for (int i = 0; i < _storage.Length; i++)
        {
            SubmodelDefinition submodel = model.Submodels[i];
            writer.Line(GeneratedMark.Code);
            if (submodel.Partial is { } property)
            {
                writer.Line($"private {submodel.TypeName} {_storage[i]} = new {submodel.TypeName}();");
                writer.Line();
                PropertyWriter.WriteOver(writer, property, submodel.TypeName, _storage[i]);
                continue;
            }

            const string Access = "global::System.Runtime.CompilerServices.UnsafeAccessor";
            writer.Line($"[{Access}({Access}Kind.Field, Name = \"<{submodel.Name}>k__BackingField\")]");
            writer.Line($"private static extern ref {submodel.TypeName} {_storage[i]}({modelName} model);");
            writer.Line();
        }
    }

    /// <summary>Prints the lines that pass the submodels' part of a vector on.</summary>
    /// <param name="method">The method that is printed.</param>
    /// <param name="vector">The whole's vector.</param>
    public void WriteTransfer(string method, string vector)
    {
        bool isState = vector == "state";
        int first = model.OwnStateCount;
        foreach (SubmodelDefinition submodel in model.Submodels)
        {
            int[] places = isState ? [.. Enumerable.Range(first, submodel.StateCount)] : [.. submodel.ParameterPlaces];
            first += submodel.StateCount;
            if (places.Length > 0) WriteTransfer(method, vector, $"(({Contract(submodel)}){Identifiers.Escape(submodel.Name)}).", places);
        }
    }

    /// <summary>Prints a copy with submodels of its own.</summary>
    public void WriteCopy(string modelName, string contract)
    {
        writer.Line(GeneratedMark.Code);
        writer.Line(GeneratedMark.NotCovered);
        if (model.Submodels.Count == 0)
        {
            writer.Line($"{modelName} {contract}.Copy() => ({modelName})base.MemberwiseClone();");
            writer.Line();
            return;
        }

        writer.Open($"{modelName} {contract}.Copy()");
        writer.Line($"{modelName} copy = ({modelName})base.MemberwiseClone();");
        for (int i = 0; i < _storage.Length; i++)
        {
            SubmodelDefinition submodel = model.Submodels[i];
            string target = submodel.Partial is null ? $"{_storage[i]}(copy)" : $"copy.{_storage[i]}";
            writer.Line($"{target} = (({Contract(submodel)}){Identifiers.Escape(submodel.Name)}).Copy();");
        }

        writer.Line("return copy;");
        writer.Close();
        writer.Line();
    }

    /// <summary>A submodel's numbers that stand together are passed on as they stand; where the whole gives some of them, the others are picked.</summary>
    private void WriteTransfer(string method, string vector, string receiver, int[] places)
    {
        bool isTogether = places.Select((place, i) => place - i).Distinct().Count() == 1 && places[0] >= 0;
        if (isTogether)
        {
            writer.Line($"{receiver}{method}({vector}.Slice({Literals.Integer(places[0])}, {Literals.Integer(places.Length)}));");
            return;
        }

        writer.Open("// The model gives some of these numbers by its equations.");
        writer.Line($"global::System.Span<double> part = stackalloc double[{Literals.Integer(places.Length)}];");
        writer.Line($"{receiver}Read{method.Replace("Read", "").Replace("Write", "")}(part);");
        IEnumerable<(int Place, int Index)> own = places.Select(static (place, i) => (place, i)).Where(static item => item.place >= 0);
        foreach ((int place, int index) in own)
        {
            string inner = $"part[{Literals.Integer(index)}]";
            string outer = $"{vector}[{Literals.Integer(place)}]";
            writer.Line(method[0] == 'R' ? $"{outer} = {inner};" : $"{inner} = {outer};");
        }

        if (method[0] == 'W') writer.Line($"{receiver}{method}(part);");
        writer.Close();
    }

    private static string Contract(SubmodelDefinition submodel) =>
        $"global::OdeDsl.Modeling.IOdeModel<{submodel.TypeName}, {submodel.TypeName}.Equations>";

    private static string StorageName(SubmodelDefinition submodel) =>
        "_" + Identifiers.Local(submodel.Name) + (submodel.Partial is null ? "Field" : "");
}
