using System;
using System.Collections.Generic;
using System.Linq;
using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <summary>A vector-valued state or parameter as declared.</summary>
/// <param name="Attribute">The attribute, which names its lengths.</param>
/// <param name="Start">The value of each element of a new model.</param>
internal sealed record DeclaredVector(
    IPropertySymbol Symbol,
    AttributeData Attribute,
    PropertyDefinition Property,
    string Unit,
    double Start,
    double Lower,
    double Upper,
    double? AnglePeriod)
{
    /// <summary>Its length, or rows and columns.</summary>
    public EquatableArray<Affine> Lengths { get; init; }
}

/// <content>Vectors and their lengths.</content>
internal sealed partial class PropertyReader
{
    private static readonly string[] LengthNames = ["Length", "Rows", "Columns"];

    public List<DeclaredVector> VectorStates { get; } = [];

    public List<DeclaredVector> VectorParameters { get; } = [];

    public VectorTables Tables { get; } = new();

    /// <summary>Whether anything in the model needs loops or lengths.</summary>
    public bool HasVectors =>
        VectorStates.Count + VectorParameters.Count > 0 || Parameters.Any(static parameter => parameter.Definition.IsWhole);

    private static bool HasUsableType(IPropertySymbol property, string role) => property.Type switch
    {
        IArrayTypeSymbol array => array is { Rank: 1 or 2, ElementType.SpecialType: SpecialType.System_Double },
        { SpecialType: SpecialType.System_Double } => true,
        { SpecialType: SpecialType.System_Int32 } => role == Attributes.Parameter,
        _ => false,
    };

    private static string VectorTypeName(ITypeSymbol type) => type is IArrayTypeSymbol { Rank: 2 } ? "double[,]" : type.ToDisplayString();

    private void ReadVector(IPropertySymbol property, AttributeData? state, AttributeData? parameter, AttributeData? angle)
    {
        string role = state is null ? Attributes.Parameter : Attributes.State;
        AttributeData attribute = state ?? parameter!;
        PropertyDefinition? definition = ReadProperty(property, role);
        if (definition is null && state is not null) FailedStates.Add(property.Name);
        Location place = Attributes.Place(attribute, property);
        double? start = state is null ? Attributes.First<double?>(attribute) : Attributes.Named<double?>(attribute, "Initial", 0.0);
        (double lower, double upper, string unit) = ReadRange(property, attribute, role, place, start);
        double? period = angle is null ? null : ReadPeriod(property, angle);
        if (definition is null) return;
        (state is null ? VectorParameters : VectorStates).Add(new(property, attribute, definition, unit, start ?? 0, lower, upper, period));
    }

    /// <summary>Whether a parameter of type int is what it must be: a whole number that does not change after the model is made.</summary>
    private bool IsFixedWhole(IPropertySymbol property, Location place, double? value)
    {
        if (value is { } number && (number != Math.Floor(number) || Math.Abs(number) > int.MaxValue))
            problems.Report(Descriptors.LengthInvalid, place, property.Name, "its value is " + Shown(number));
        else if (property.SetMethod is { IsInitOnly: false })
            problems.Report(Descriptors.WholeParameterChangeable, property.Locations[0], property.Name);
        else return true;
        return false;
    }

    /// <summary>Tells of lengths given to what is no vector.</summary>
    private void RefuseLengths(IPropertySymbol property, AttributeData attribute)
    {
        if (LengthNames.FirstOrDefault(name => IsGiven(attribute, name)) is { } given && HasUsableType(property, Attributes.Parameter))
            problems.Report(Descriptors.LengthOfScalar, Attributes.Place(attribute, property), property.Name, given);
    }

    private static bool IsGiven(AttributeData attribute, string name) => attribute.NamedArguments.Any(argument => argument.Key == name);

    /// <summary>Finds what the lengths of vectors are, once all parameters are known.</summary>
    private void ResolveLengths()
    {
        for (int i = 0; i < Parameters.Count; i++)
        {
            if (Parameters[i].Definition.IsWhole) Tables.Lengths.Add(Parameters[i].Symbol, Tables.AddLength(Parameters[i].Symbol.Name, i));
        }

        Resolve(VectorStates, isParameter: false);
        Resolve(VectorParameters, isParameter: true);
    }

    private void Resolve(List<DeclaredVector> vectors, bool isParameter)
    {
        for (int i = vectors.Count - 1; i >= 0; i--)
        {
            if (LengthsOf(vectors[i]) is { } lengths)
            {
                vectors[i] = vectors[i] with { Lengths = lengths };
                continue;
            }

            FailedStates.Add(vectors[i].Property.Name);
            vectors.RemoveAt(i);
        }

        for (int i = 0; i < vectors.Count; i++)
            Tables.Vectors.Add(vectors[i].Symbol, new(isParameter, i, vectors[i].Property.Name, vectors[i].Lengths));
    }

    private EquatableArray<Affine>? LengthsOf(DeclaredVector vector)
    {
        int rank = ((IArrayTypeSymbol)vector.Symbol.Type).Rank;
        string[] wanted = rank == 1 ? ["Length"] : ["Rows", "Columns"];
        Location place = Attributes.Place(vector.Attribute, vector.Symbol);
        if (LengthNames.Any(name => IsGiven(vector.Attribute, name) != wanted.Contains(name)))
        {
            string what = rank == 1 ? "Length" : "Rows and Columns";
            problems.Report(Descriptors.LengthMissing, place, vector.Property.Name, what, vector.Property.Type);
            return null;
        }

        Affine?[] lengths = [.. wanted.Select(name => LengthOf(vector, Attributes.Named<object>(vector.Attribute, name, ""), place))];
        return lengths.All(static length => length is not null) ? new([.. lengths.Select(static length => length!)]) : null;
    }

    private Affine? LengthOf(DeclaredVector vector, object? given, Location place)
    {
        if (given is int number and >= 1) return Affine.Of(number);
        if (given is string name)
        {
            IPropertySymbol? parameter = Tables.Lengths.Keys.OfType<IPropertySymbol>().FirstOrDefault(known => known.Name == name);
            if (parameter is not null && Tables.Require(Affine.OfSymbol(Tables.Lengths[parameter]).Plus(-1)))
                return Affine.OfSymbol(Tables.Lengths[parameter]);
            bool isFailed = model.GetMembers(name).OfType<IPropertySymbol>().Any(static member =>
                member.Type.SpecialType == SpecialType.System_Int32 && Attributes.Find(member, Attributes.Parameter) is not null);
            if (isFailed) return null; // Its own declaration has a problem that is reported there.
        }

        string what = given is string text ? $"'{text}' is no [Parameter] of type int" : given is int n ? $"it is {Shown(n)}" : "it is neither";
        problems.Report(Descriptors.LengthInvalid, place, vector.Property.Name, what);
        return null;
    }
}
