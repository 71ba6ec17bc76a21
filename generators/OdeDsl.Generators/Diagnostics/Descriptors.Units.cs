using Microsoft.CodeAnalysis;

namespace OdeDsl.Generators.Diagnostics;

/// <content>Units.</content>
internal static partial class Descriptors
{
    public static readonly DiagnosticDescriptor UnitNotRead = new(
        "ODE0100", "A unit cannot be read",
        "Unit '{0}' of '{1}' cannot be read: {2}",
        Category, DiagnosticSeverity.Warning, isEnabledByDefault: true, helpLinkUri: Help + "ODE0100");

    public static readonly DiagnosticDescriptor DimensionsDiffer = new(
        "ODE0101", "Quantities of different dimension are joined",
        "{0} is in {1}, but {2} is in {3}; only quantities of one dimension can be added, compared or chosen between",
        Category, DiagnosticSeverity.Warning, isEnabledByDefault: true, helpLinkUri: Help + "ODE0101");

    public static readonly DiagnosticDescriptor SizesDiffer = new(
        "ODE0102", "Units of one dimension differ in size",
        "{0} is in {1}, but {2} is in {3}; multiply it by {4}, because factors between units are not applied silently",
        Category, DiagnosticSeverity.Warning, isEnabledByDefault: true, helpLinkUri: Help + "ODE0102");

    public static readonly DiagnosticDescriptor ResultUnit = new(
        "ODE0103", "The unit of a result does not fit",
        "{0} is in {1}, but {2} must be in {3}; correct the formula or the stated units",
        Category, DiagnosticSeverity.Warning, isEnabledByDefault: true, helpLinkUri: Help + "ODE0103");

    public static readonly DiagnosticDescriptor NumberExpected = new(
        "ODE0104", "A function needs a number without a unit",
        "{0} is in {1}, but {2} must have no dimension; divide it by a quantity of its kind",
        Category, DiagnosticSeverity.Warning, isEnabledByDefault: true, helpLinkUri: Help + "ODE0104");

    public static readonly DiagnosticDescriptor ExponentNotConstant = new(
        "ODE0105", "The power of a quantity must be constant",
        "{0} is in {1}, so that its power changes its unit with {2}; make the exponent a constant, or the base a number without a unit",
        Category, DiagnosticSeverity.Warning, isEnabledByDefault: true, helpLinkUri: Help + "ODE0105");

    public static readonly DiagnosticDescriptor ShiftedScale = new(
        "ODE0106", "A temperature in degrees Celsius is used as if its zero were none",
        "{0} is a temperature in Cel, and {1}; take a difference of two temperatures, or state it in K",
        Category, DiagnosticSeverity.Warning, isEnabledByDefault: true, helpLinkUri: Help + "ODE0106");
}
