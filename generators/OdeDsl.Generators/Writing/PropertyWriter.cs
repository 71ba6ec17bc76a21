using System.Collections.Generic;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>Prints the implementing parts of the model's partial properties, each over a field of its own.</summary>
internal static class PropertyWriter
{
    public static void Write(SourceWriter writer, PropertyDefinition property, string field, long defaultBits) =>
        Write(writer, property, field, Literals.Number(System.BitConverter.Int64BitsToDouble(defaultBits)));

    /// <param name="initial">The expression of the initial value, of the property's type.</param>
    public static void Write(SourceWriter writer, PropertyDefinition property, string field, string initial)
    {
        writer.Line(GeneratedMark.Code);
        writer.Line($"private {property.Type} {field} = {initial};");
        writer.Line();
        WriteOver(writer, property, property.Type, field);
    }

    /// <summary>The implementing part of a property over a field that is printed elsewhere.</summary>
    public static void WriteOver(SourceWriter writer, PropertyDefinition property, string type, string field)
    {
        writer.Line(GeneratedMark.Code);
        writer.Line(GeneratedMark.NotCovered);
        string modifiers = property.Modifiers.Length > 0 ? property.Modifiers + " " : "";
        writer.Open($"{modifiers}partial {type} {Identifiers.Escape(property.Name)}");
        foreach (string accessor in property.Accessors)
            writer.Line(IsGetter(accessor) ? $"{accessor} => {field};" : $"{accessor} => {field} = value;");
        writer.Close();
        writer.Line();
    }

    private static bool IsGetter(string accessor) => accessor == "get" || accessor.EndsWith(" get", System.StringComparison.Ordinal);
}
