using System;
using System.Linq;
using Microsoft.CodeAnalysis;

namespace OdeDsl.Generators.Reading;

/// <summary>The modelling attributes and their arguments.</summary>
internal static class Attributes
{
    public const string Namespace = "OdeDsl";
    public const string ModelFullName = "OdeDsl.OdeModelAttribute";
    public const string Model = "OdeModel";
    public const string State = "State";
    public const string Parameter = "Parameter";
    public const string Rate = "Rate";
    public const string Observable = "Observable";
    public const string Angle = "Angle";
    public const string Submodel = "Submodel";
    public const string Table = "Table";
    public const string Input = "Input";
    public const string Mode = "Mode";
    public const string Event = "Event";

    /// <summary>The short names of the attributes of properties that the generator implements.</summary>
    public static readonly string[] OfNumbers = [State, Parameter, Input, Mode];

    /// <summary>The short names of all attributes that mark a member of a model.</summary>
    public static readonly string[] OfMembers = [State, Parameter, Input, Mode, Rate, Observable, Event, Angle, Submodel];

    public static AttributeData? Find(ISymbol member, string shortName) =>
        member.GetAttributes().FirstOrDefault(attribute => Is(attribute, shortName));

    public static bool Is(AttributeData attribute, string shortName) =>
        IsOurs(attribute)
        && attribute.AttributeClass is { } type
        && type.Name.Length == shortName.Length + nameof(Attribute).Length
        && type.Name.StartsWith(shortName, StringComparison.Ordinal);

    /// <summary>Whether an attribute is one of the modelling attributes.</summary>
    public static bool IsOurs(AttributeData attribute) =>
        attribute.AttributeClass is { ContainingType: null, ContainingNamespace: { Name: Namespace, ContainingNamespace.IsGlobalNamespace: true } };

    /// <summary>Whether an input attribute names an input of a submodel that its member gives.</summary>
    public static bool IsConnection(AttributeData attribute) => attribute.ConstructorArguments.Length == 2;

    /// <summary>Where an attribute stands.</summary>
    public static Location Place(AttributeData attribute, ISymbol member) =>
        attribute.ApplicationSyntaxReference is { } reference ? reference.SyntaxTree.GetLocation(reference.Span) : member.Locations[0];

    /// <returns>The named argument, or <paramref name="otherwise"/> if it is not given; null if it has no constant value.</returns>
    public static T? Named<T>(AttributeData attribute, string name, T otherwise)
    {
        foreach (var argument in attribute.NamedArguments)
        {
            if (argument.Key == name) return Constant<T>(argument.Value);
        }

        return otherwise;
    }

    /// <returns>The first argument of the constructor; null if it is missing or has no constant value.</returns>
    public static T? First<T>(AttributeData attribute) =>
        attribute.ConstructorArguments.IsDefaultOrEmpty ? default : Constant<T>(attribute.ConstructorArguments[0]);

    /// <returns>The number of the named argument of an enumeration type; 0 if it is not given.</returns>
    public static int NamedEnumeration(AttributeData attribute, string name)
    {
        foreach (var argument in attribute.NamedArguments)
        {
            if (argument.Key == name && argument.Value is { Kind: TypedConstantKind.Enum, Value: int number }) return number;
        }

        return 0;
    }

    private static T? Constant<T>(TypedConstant constant) =>
        constant.Kind == TypedConstantKind.Primitive && constant.Value is T value ? value : default;
}
