using System;
using System.Collections.Generic;
using System.Globalization;
using System.Linq;
using System.Threading;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <summary>A state as declared, before its rate is read.</summary>
internal sealed record DeclaredState(
    IPropertySymbol Symbol, PropertyDefinition Property, string Unit, double Initial, double Lower, double Upper, double? AnglePeriod);

/// <summary>A parameter as declared.</summary>
internal sealed record DeclaredParameter(IPropertySymbol Symbol, ParameterDefinition Definition);

/// <summary>Reads the states and parameters of a model, in the order of declaration.</summary>
internal sealed partial class PropertyReader(INamedTypeSymbol model, Compilation compilation, Problems problems, CancellationToken cancellation)
{
    private HashSet<string>? _implemented;

    public List<DeclaredState> States { get; } = [];

    public List<DeclaredParameter> Parameters { get; } = [];

    /// <summary>The numbers that a model around this one may give.</summary>
    public IEnumerable<ISymbol> Open =>
        Parameters.Select(static parameter => (ISymbol)parameter.Symbol).Concat(Inputs.Select(static input => input.Symbol));

    /// <summary>Properties that were meant to be states but cannot be: their rates are no further problem.</summary>
    public HashSet<string> FailedStates { get; } = [];

    public void Read()
    {
        foreach (ISymbol member in model.GetMembers())
        {
            cancellation.ThrowIfCancellationRequested();
            AttributeData? state = Attributes.Find(member, Attributes.State);
            AttributeData? parameter = Attributes.Find(member, Attributes.Parameter);
            AttributeData? angle = Attributes.Find(member, Attributes.Angle);
            if (angle is not null && state is null)
                problems.Report(Descriptors.AngleWithoutState, Attributes.Place(angle, member), member.Name);
            AttributeData? input = Attributes.Find(member, Attributes.Input) is { } mark && !Attributes.IsConnection(mark) ? mark : null;
            AttributeData? mode = Attributes.Find(member, Attributes.Mode);
            if (member is not IPropertySymbol property || (state ?? parameter ?? input ?? mode) is null) continue;
            if (!HasOneRole(property))
            {
                FailedStates.Add(member.Name);
                continue;
            }

            if (property.Type is IArrayTypeSymbol && (state ?? parameter) is not null) ReadVector(property, state, parameter, angle);
            else if (state is not null) ReadState(property, state, angle);
            else if (parameter is not null) ReadParameter(property, parameter);
            else if (input is not null) ReadInput(property, input);
            else ReadMode(property, mode!);
        }

        ResolveLengths();
    }

    private bool HasOneRole(IPropertySymbol property)
    {
        AttributeData[] roles = property.GetAttributes()
            .Where(static attribute => Attributes.OfMembers.Any(name => name != Attributes.Angle && Attributes.Is(attribute, name)))
            .ToArray();
        if (roles.Length < 2 || Role(roles[0]) == Role(roles[1])) return true;
        problems.Report(Descriptors.TwoRoles, Attributes.Place(roles[1], property), property.Name, Role(roles[0]), Role(roles[1]));
        return false;

        static string Role(AttributeData attribute) => Attributes.OfMembers.First(name => Attributes.Is(attribute, name));
    }

    private void ReadState(IPropertySymbol property, AttributeData attribute, AttributeData? angle)
    {
        PropertyDefinition? definition = ReadProperty(property, Attributes.State);
        if (definition is null) FailedStates.Add(property.Name);
        Location place = Attributes.Place(attribute, property);
        RefuseLengths(property, attribute);
        double? initial = Attributes.Named<double?>(attribute, "Initial", 0.0);
        (double lower, double upper, string unit) = ReadRange(property, attribute, Attributes.State, place, initial);
        double? period = angle is null ? null : ReadPeriod(property, angle);
        if (definition is not null) States.Add(new(property, definition, unit, initial ?? 0, lower, upper, period));
    }

    private void ReadParameter(IPropertySymbol property, AttributeData attribute)
    {
        PropertyDefinition? definition = ReadProperty(property, Attributes.Parameter);
        Location place = Attributes.Place(attribute, property);
        RefuseLengths(property, attribute);
        double? value = Attributes.First<double?>(attribute);
        (double lower, double upper, string unit) = ReadRange(property, attribute, Attributes.Parameter, place, value);
        bool isWhole = property.Type.SpecialType == SpecialType.System_Int32;
        if (definition is null || (isWhole && !IsFixedWhole(property, place, value))) return;
        Parameters.Add(new(property, new(definition, unit, Bits(value ?? 0), Bits(lower), Bits(upper)) { IsWhole = isWhole }));
    }

    private double? ReadPeriod(IPropertySymbol property, AttributeData angle)
    {
        double? period = Attributes.First<double?>(angle);
        if (period is > 0 and < double.PositiveInfinity) return period;
        Location place = Attributes.Place(angle, property);
        if (period is null) problems.Report(Descriptors.AttributeNotReadable, place, Attributes.Angle, property.Name);
        else problems.Report(Descriptors.AnglePeriodInvalid, place, property.Name, Shown(period.Value));
        return null;
    }

    /// <summary>Reads bounds and unit and checks them together with the starting value. Reports one problem at most.</summary>
    private (double Lower, double Upper, string Unit) ReadRange(
        IPropertySymbol property, AttributeData attribute, string role, Location place, double? start)
    {
        double? lower = Attributes.Named<double?>(attribute, "Lower", double.NegativeInfinity);
        double? upper = Attributes.Named<double?>(attribute, "Upper", double.PositiveInfinity);
        string? unit = Attributes.Named(attribute, "Unit", "");
        if (start is not { } value || lower is not { } low || upper is not { } high)
        {
            problems.Report(Descriptors.AttributeNotReadable, place, role, property.Name);
            return (double.NegativeInfinity, double.PositiveInfinity, unit ?? "");
        }

        if (double.IsNaN(value) || double.IsInfinity(value))
            problems.Report(Descriptors.ValueNotFinite, place, role, property.Name, Shown(value));
        else if (double.IsNaN(low) || double.IsNaN(high))
            problems.Report(Descriptors.BoundNotANumber, place, double.IsNaN(low) ? "Lower" : "Upper", property.Name);
        else if (low >= high)
            problems.Report(Descriptors.BoundsCrossed, place, property.Name, Shown(low), Shown(high));
        else if (value < low || value > high)
            problems.Report(Descriptors.ValueOutsideBounds, place, role, property.Name, Shown(value), Shown(low), Shown(high));
        return (low, high, unit ?? "");
    }

    private bool IsImplemented(IPropertySymbol property) =>
        (_implemented ??= Bodies.ImplementedPartialProperties(model, compilation, cancellation)).Contains(property.Name);

    /// <returns>What to generate, or null with a problem reported.</returns>
    private PropertyDefinition? ReadProperty(IPropertySymbol property, string role, bool anyType = false)
    {
        Location place = property.Locations[0];
        PropertyDeclarationSyntax? declaration = property.DeclaringSyntaxReferences
            .Select(reference => reference.GetSyntax(cancellation))
            .OfType<PropertyDeclarationSyntax>()
            .FirstOrDefault();
        string? overridable = property.IsAbstract ? "abstract" : property.IsVirtual ? "virtual" : property.IsOverride ? "override" : null;
        if (property.IsIndexer) problems.Report(Descriptors.PropertyIsIndexer, place, role, "this");
        else if (property.IsStatic) problems.Report(Descriptors.PropertyStatic, place, role, property.Name);
        else if (overridable is not null) problems.Report(Descriptors.PropertyOverridable, place, role, property.Name, overridable);
        else if (property.GetMethod is null) problems.Report(Descriptors.PropertyWithoutGetter, place, role, property.Name);
        else if ((!HasUsableType(property, role) && !anyType) || property.RefKind != RefKind.None)
        {
            Location typePlace = declaration?.Type.GetLocation() ?? place;
            problems.Report(Descriptors.PropertyNotDouble, typePlace, role, property.Name, TypeName(property));
        }
        else if (declaration is null || !Bodies.IsPartial(property, cancellation))
            problems.Report(Descriptors.PropertyNotPartial, place, role, property.Name);
        else if (IsImplemented(property) || declaration.Initializer is not null)
            problems.Report(Descriptors.PropertyImplemented, place, role, property.Name);
        else return Definition(property, cancellation);
        return null;
    }

    /// <summary>What to repeat in the implementing part of a partial property.</summary>
    public static PropertyDefinition Definition(IPropertySymbol property, CancellationToken cancellation)
    {
        PropertyDeclarationSyntax declaration = property.DeclaringSyntaxReferences
            .Select(reference => reference.GetSyntax(cancellation))
            .OfType<PropertyDeclarationSyntax>()
            .First();
        string modifiers = string.Join(" ", declaration.Modifiers
            .Where(static modifier => !modifier.IsKind(SyntaxKind.PartialKeyword))
            .Select(static modifier => modifier.Text));
        string[] accessors = (declaration.AccessorList?.Accessors ?? default)
            .Select(static accessor => string.Join(" ", accessor.Modifiers.Append(accessor.Keyword).Select(static token => token.Text)))
            .ToArray();
        return new(property.Name, Summaries.Of(property, cancellation), modifiers, new(accessors)) { Type = VectorTypeName(property.Type) };
    }

    private static string TypeName(IPropertySymbol property) =>
        (property.RefKind == RefKind.None ? "" : "ref ") + property.Type.ToDisplayString();

    private static string Shown(double value) => value.ToString("R", CultureInfo.InvariantCulture);

    public static long Bits(double value) => BitConverter.DoubleToInt64Bits(value);
}
