using Microsoft.CodeAnalysis;

namespace OdeDsl.Generators.Diagnostics;

/// <content>Submodels.</content>
internal static partial class Descriptors
{
    public static readonly DiagnosticDescriptor SubmodelNotModel = new(
        "ODE0107", "A submodel must be a model",
        "Submodel '{0}' has type '{1}', which is not a class marked with [OdeModel] (generic classes cannot be submodels); mark it, or remove [Submodel]",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0107");

    public static readonly DiagnosticDescriptor SubmodelNotHeld = new(
        "ODE0108", "A submodel must be held by its property",
        "Submodel '{0}' must be a property of the object that holds one submodel: write '{{ get; }} = new();' or make it partial",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0108");

    public static readonly DiagnosticDescriptor SubmodelWithoutSource = new(
        "ODE0109", "A submodel needs its source",
        "Submodel '{0}' has type '{1}' from assembly '{2}', whose equations cannot be read here; compile its source into this project",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0109");

    public static readonly DiagnosticDescriptor SubmodelOfItself = new(
        "ODE0110", "A model must not contain itself",
        "Submodel '{0}' of type '{1}' would contain itself without end; remove one of the two",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0110");

    public static readonly DiagnosticDescriptor SubmodelTimeUnit = new(
        "ODE0111", "Submodels must share the unit of time",
        "Submodel '{0}' counts time in {1}, but its model in {2}; state one TimeUnit in both",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0111");

    public static readonly DiagnosticDescriptor ConnectionUnknown = new(
        "ODE0112", "A connection must name an input of a submodel",
        "'{0}' gives '{2}' of '{1}', but there is no such submodel with an input or parameter of that name; write nameof with both",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0112");

    public static readonly DiagnosticDescriptor ConnectionTwice = new(
        "ODE0113", "A connection is made twice",
        "'{0}' is given by '{1}' already; merge '{2}' into it",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0113");

    public static readonly DiagnosticDescriptor SubmodelWithVectors = new(
        "ODE0114", "Models with vectors cannot be composed",
        "Submodel '{0}' cannot be part of this model, because '{1}' has vector states or parameters; write both in one class",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0114");

    public static readonly DiagnosticDescriptor SubmodelInputOpen = new(
        "ODE0115", "Every input of a submodel must be given",
        "Nothing gives the input '{1}' of submodel '{0}'; add a member marked [Input(nameof({0}), nameof({2}.{1}))], or make it a parameter",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0115");

    public static readonly DiagnosticDescriptor SubmodelWithEvents = new(
        "ODE0116", "A submodel cannot have modes or events yet",
        "Submodel '{0}' of type '{1}' has modes or events, which only the outermost model can have; move them there",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0116");
}
