using Microsoft.CodeAnalysis;

namespace OdeDsl.Generators.Diagnostics;

/// <content>Vectors, their lengths, indices and loops.</content>
internal static partial class Descriptors
{
    public static readonly DiagnosticDescriptor LengthInvalid = new(
        "ODE0150", "A length must be a whole number that is known",
        "The length given for '{0}' cannot be used ({1}); give a whole number from 1 on, or nameof of a [Parameter] of type int",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0150");

    public static readonly DiagnosticDescriptor LengthMissing = new(
        "ODE0151", "A vector needs its lengths",
        "'{0}' is a {2}; give it {1} in its attribute, and nothing else of these three",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0151");

    public static readonly DiagnosticDescriptor LengthOfScalar = new(
        "ODE0152", "Only a vector has a length",
        "'{0}' is a single number but has {1}; remove it, or make '{0}' a double[] or double[,]",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0152");

    public static readonly DiagnosticDescriptor WholeParameterChangeable = new(
        "ODE0153", "A whole-number parameter is fixed when the model is made",
        "'{0}' is a parameter of type int but can be set at any time; write {{ get; init; }}",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0153");

    public static readonly DiagnosticDescriptor RateIndices = new(
        "ODE0154", "The rate of a vector must take its index",
        "The rate '{0}' of '{1}' must take {2} and, if it depends on time, a double 'time'",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0154");

    public static readonly DiagnosticDescriptor IndexOutOfRange = new(
        "ODE0155", "An index leaves the vector",
        "'{0}' reads {1} of '{2}'; treat the ends of the range apart by a condition on the index",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0155");

    public static readonly DiagnosticDescriptor IndexNotSupported = new(
        "ODE0156", "An index is too complicated",
        "'{0}' cannot be followed: {1}; use sums and differences of indices, lengths and constants, multiplied by constants",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0156");

    public static readonly DiagnosticDescriptor LoopNotSupported = new(
        "ODE0157", "Only loops that count up are supported",
        "This loop cannot be followed: {0}; write for (int k = first; k < end; k++)",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0157");

    public static readonly DiagnosticDescriptor LoopIsNoSum = new(
        "ODE0158", "A loop may only add up",
        "'{0}' is more than a sum here; a loop may only add to numbers or subtract from them, each on its own",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0158");

    public static readonly DiagnosticDescriptor LengthTooShort = new(
        "ODE0159", "A vector is too short for its equations",
        "'{0}' is {1}, but the equations treat so many elements apart that it must be at least {2}",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0159");
}
