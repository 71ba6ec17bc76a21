using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Operations;

namespace OdeDsl.Generators.Reading;

/// <summary>Names for what cannot be part of an equation, and what to do instead.</summary>
internal static class Unreadable
{
    public static (string What, string Instead) Describe(IOperation operation) => operation switch
    {
        IForLoopOperation => ("A 'for' loop", "write its terms out, or as calls of a helper method"),
        IForEachLoopOperation => ("A 'foreach' loop", "write its terms out, or as calls of a helper method"),
        IWhileLoopOperation => ("A 'while' loop", "write a formula without iteration"),
        IThrowOperation => ("Throwing an exception", "give a value for every input"),
        ITryOperation => ("A 'try' statement", "give a value for every input"),
        IUsingOperation or IUsingDeclarationOperation or ILockOperation => ("A resource", "compute from states, parameters and time only"),
        IBranchOperation => ("A jump to a label", "use 'if' and 'else'"),
        { Syntax: FixedStatementSyntax } => ("A pointer", "compute with doubles"),
        { Syntax: YieldStatementSyntax } => ("An iterator", "return one number"),
        IAwaitOperation => ("Waiting for a task", "compute from states, parameters and time only"),
        IAnonymousFunctionOperation or IDelegateCreationOperation or IMethodReferenceOperation =>
            ("A lambda or delegate", "write a local function or a method, and call it"),
        IInvocationOperation { TargetMethod.MethodKind: MethodKind.DelegateInvoke } =>
            ("Calling a delegate", "call a method or a local function"),
        IInvocationOperation { TargetMethod.RefKind: not RefKind.None } => Reference,
        IPropertyReferenceOperation { Property.RefKind: not RefKind.None } => Reference,
        IInvocationOperation { TargetMethod.ContainingType: var type } when IsExtensionBlock(type) => Extension,
        IPropertyReferenceOperation { Property.ContainingType: var type } when IsExtensionBlock(type) => Extension,
        ITupleOperation or IDeconstructionAssignmentOperation => ("A tuple", "use separate local variables, or a method for each value"),
        IArrayCreationOperation or IArrayElementReferenceOperation => ("An array", "use separate local variables, parameters or members"),
        IPropertyReferenceOperation { Arguments.Length: > 0 } => ("An indexer", "use separate local variables, parameters or members"),
        IObjectCreationOperation or IAnonymousObjectCreationOperation or IWithOperation or ITypeParameterObjectCreationOperation =>
            ("Creating an object", "compute with doubles"),
        IInterpolatedStringOperation => ("A text", "use numbers and conditions"),
        ICoalesceOperation or IConditionalAccessOperation or ICoalesceAssignmentOperation =>
            ("A test for null", "use double, which is never null"),
        IIsTypeOperation or ITypeOfOperation => ("A type test", "compare numbers"),
        IInstanceReferenceOperation => ("This use of an object", "compute with doubles"),
        _ => ("'" + Shortened(UserText.Of(operation.Syntax)) + "'",
            "write it with arithmetic, comparisons and functions of System.Math on doubles"),
    };

    /// <summary>Whether the type is a C# 14 extension block. (The compiler built against has no name for it yet.)</summary>
    public static bool IsExtensionBlock(INamedTypeSymbol? type) => type is { Name.Length: 0, IsAnonymousType: false, IsTupleType: false };

    /// <summary>Where to point: at the keyword of a statement rather than at all it contains.</summary>
    public static Location Place(IOperation statement) => statement.Syntax switch
    {
        ForStatementSyntax loop => loop.ForKeyword.GetLocation(),
        CommonForEachStatementSyntax loop => loop.ForEachKeyword.GetLocation(),
        WhileStatementSyntax loop => loop.WhileKeyword.GetLocation(),
        DoStatementSyntax loop => loop.DoKeyword.GetLocation(),
        TryStatementSyntax attempt => attempt.TryKeyword.GetLocation(),
        UsingStatementSyntax use => use.UsingKeyword.GetLocation(),
        FixedStatementSyntax use => use.FixedKeyword.GetLocation(),
        LockStatementSyntax guard => guard.LockKeyword.GetLocation(),
        var other => other.GetLocation(),
    };

    private static (string What, string Instead) Reference => ("A reference", "return a plain double");

    private static (string What, string Instead) Extension =>
        ("A member of an extension block", "write an extension method with a 'this' parameter");

    private static string Shortened(string text) => text.Length <= 60 ? text : text.Substring(0, 57) + "...";
}
