using System.Collections.Generic;
using System.Linq;
using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <summary>An input as declared.</summary>
internal sealed record DeclaredInput(IPropertySymbol Symbol, InputDefinition Definition);

/// <summary>A mode as declared.</summary>
/// <param name="Values">The whole numbers it can be; empty for a number.</param>
internal sealed record DeclaredMode(IPropertySymbol Symbol, ModeDefinition Definition, IReadOnlyList<long> Values);

/// <content>Inputs and modes.</content>
internal sealed partial class PropertyReader
{
    private static readonly SymbolDisplayFormat TypeFormat = SymbolDisplayFormat.FullyQualifiedFormat
        .AddMiscellaneousOptions(SymbolDisplayMiscellaneousOptions.EscapeKeywordIdentifiers);

    public List<DeclaredInput> Inputs { get; } = [];

    public List<DeclaredMode> Modes { get; } = [];

    private void ReadInput(IPropertySymbol property, AttributeData attribute)
    {
        PropertyDefinition? definition = ReadProperty(property, Attributes.Input);
        Location place = Attributes.Place(attribute, property);
        double? value = Attributes.First<double?>(attribute);
        if (value is not { } constant) problems.Report(Descriptors.AttributeNotReadable, place, Attributes.Input, property.Name);
        else if (double.IsNaN(constant) || double.IsInfinity(constant))
            problems.Report(Descriptors.ValueNotFinite, place, Attributes.Input, property.Name, Shown(constant));
        if (definition is not null)
            Inputs.Add(new(property, new(definition, Attributes.Named(attribute, "Unit", "") ?? "", Bits(value ?? 0))));
    }

    private void ReadMode(IPropertySymbol property, AttributeData attribute)
    {
        Location place = Attributes.Place(attribute, property);
        if (KindOf(property.Type) is not { } kind)
        {
            problems.Report(Descriptors.ModeType, property.Locations[0], property.Name, property.Type.ToDisplayString());
            return;
        }

        if (ReadProperty(property, Attributes.Mode, anyType: true) is not { } definition) return;
        object? initial = attribute.ConstructorArguments.FirstOrDefault() is { IsNull: false, Kind: TypedConstantKind.Primitive or TypedConstantKind.Enum } given
            && IsOfType(property.Type, given) ? given.Value : null;
        if (initial is null)
        {
            problems.Report(Descriptors.ModeInitial, place, property.Name, property.Type.ToDisplayString());
            return;
        }

        long[] values = ValuesOf(property, attribute, kind);
        double number = kind == ModeKind.Condition ? ((bool)initial ? 1 : 0) : System.Convert.ToDouble(initial, System.Globalization.CultureInfo.InvariantCulture);
        if (kind == ModeKind.Number && (double.IsNaN(number) || double.IsInfinity(number)))
            problems.Report(Descriptors.ValueNotFinite, place, Attributes.Mode, property.Name, Shown(number));
        else if (kind is ModeKind.WholeNumber or ModeKind.Enumeration && (values.Length is 0 or > Choice.MaximumCount || !values.Contains((long)number)))
            problems.Report(Descriptors.ModeRange, place, property.Name, Choice.MaximumCount.ToString(System.Globalization.CultureInfo.InvariantCulture));
        Modes.Add(new(property, new(definition with { Type = property.Type.ToDisplayString(TypeFormat) }, kind, Bits(number)), values));
    }

    private static ModeKind? KindOf(ITypeSymbol type) => type switch
    {
        { SpecialType: SpecialType.System_Double } => ModeKind.Number,
        { SpecialType: SpecialType.System_Int32 } => ModeKind.WholeNumber,
        { SpecialType: SpecialType.System_Boolean } => ModeKind.Condition,
        INamedTypeSymbol { EnumUnderlyingType.SpecialType: not (SpecialType.System_Int64 or SpecialType.System_UInt64 or SpecialType.None) } => ModeKind.Enumeration,
        _ => null,
    };

    private static bool IsOfType(ITypeSymbol type, TypedConstant given) =>
        SymbolEqualityComparer.Default.Equals(type, given.Type)
        || (type.SpecialType == SpecialType.System_Double && given.Type?.SpecialType == SpecialType.System_Int32);

    private static long[] ValuesOf(IPropertySymbol property, AttributeData attribute, ModeKind kind)
    {
        if (kind == ModeKind.Enumeration)
        {
            return [.. property.Type.GetMembers().OfType<IFieldSymbol>().Where(static field => field.HasConstantValue)
                .Select(static field => System.Convert.ToInt64(field.ConstantValue, System.Globalization.CultureInfo.InvariantCulture)).Distinct()];
        }

        if (kind != ModeKind.WholeNumber) return [];
        int lower = Attributes.Named<int?>(attribute, "Lower", 0) ?? 0, upper = Attributes.Named<int?>(attribute, "Upper", 1) ?? 1;
        long count = (long)upper - lower + 1;
        return count is < 1 or > Choice.MaximumCount ? [] : [.. Enumerable.Range(lower, (int)count).Select(static value => (long)value)];
    }
}
