using System.Numerics;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <content>Assignments to local variables and arguments.</content>
internal sealed partial class BodyReader
{
    private Value Assignment(ISimpleAssignmentOperation operation)
    {
        if (operation.IsRef) return Unsupported(operation);
        if (operation.Target is IDiscardOperation) return Evaluate(operation.Value);
        ISymbol? target = Target(operation.Target);
        Value value = Evaluate(operation.Value);
        if (target is not null) Assign(target, value);
        return value;
    }

    private Value CompoundAssignment(ICompoundAssignmentOperation operation)
    {
        if (operation.OperatorMethod is not null) return UserDefined(operation, operation.OperatorMethod);
        if (Target(operation.Target) is not { } target) return UnknownValue.Instance;
        Value first = Evaluate(operation.Target);
        Value second = Evaluate(operation.Value);
        _current = operation;
        ITypeSymbol? type = operation.Type;
        Value value = (first, second) switch
        {
            (WholeValue, NumberValue) =>
                Problem(Descriptors.WholeNumberUnknown, operation, UserText.Of(operation.Syntax), type!.ToDisplayString()),
            (WholeValue, WholeValue) => Narrowed(
                operation,
                Apply(operation, operation.OperatorKind, first, second, Promoted(type!, operation.Value.Type!), operation.IsChecked)),
            _ => Apply(operation, operation.OperatorKind, first, second, type, operation.IsChecked),
        };
        Assign(target, value);
        return value;
    }

    /// <summary>Converts the result of a compound assignment back to the type of its target.</summary>
    private Value Narrowed(ICompoundAssignmentOperation operation, Value value) => value is WholeValue whole
        ? Whole(operation, () => whole.Choice.Select(a => WholeNumbers.Fit(a, operation.Type!, operation.IsChecked)))
        : value;

    /// <summary>The type C# computes in when an operator joins two integer types (C# specification, numeric promotions).</summary>
    private ITypeSymbol Promoted(ITypeSymbol first, ITypeSymbol second)
    {
        if (first.TypeKind == TypeKind.Enum) return first;
        SpecialType a = first.SpecialType;
        SpecialType b = second.SpecialType;
        SpecialType promoted =
            a == SpecialType.System_UInt64 || b == SpecialType.System_UInt64 ? SpecialType.System_UInt64
            : a == SpecialType.System_Int64 || b == SpecialType.System_Int64 ? SpecialType.System_Int64
            : a == SpecialType.System_UInt32 && b == SpecialType.System_UInt32 ? SpecialType.System_UInt32
            : a == SpecialType.System_UInt32 || b == SpecialType.System_UInt32 ? SpecialType.System_Int64
            : SpecialType.System_Int32;
        return _compilation.GetSpecialType(promoted);
    }

    private Value Step(IIncrementOrDecrementOperation operation)
    {
        if (operation.OperatorMethod is not null) return UserDefined(operation, operation.OperatorMethod);
        if (Target(operation.Target) is not { } target) return UnknownValue.Instance;
        Value before = Evaluate(operation.Target);
        bool up = operation.Kind == OperationKind.Increment;
        Value after = before switch
        {
            NumberValue number => new NumberValue(_graph.Binary(up ? Operator.Add : Operator.Subtract, number.Node, _graph.Constant(1.0))),
            WholeValue whole => Whole(operation, () => whole.Choice.Select(a =>
                WholeNumbers.Fit(up ? a + BigInteger.One : a - BigInteger.One, operation.Type!, operation.IsChecked))),
            IndexValue index => WholeOf(index.Number.Plus(up ? 1 : -1)),
            LiteralValue literal => Imprecise(operation, literal),
            _ => UnknownValue.Instance,
        };
        Assign(target, after);
        return operation.IsPostfix ? before : after;
    }

    private void Assign(ISymbol variable, Value value) => _flow = _flow with { Variables = _flow.Variables.SetItem(variable, value) };

    /// <summary>The variable an assignment changes, or null with a problem reported.</summary>
    private ISymbol? Target(IOperation target)
    {
        ISymbol? variable = target switch
        {
            ILocalReferenceOperation local => local.Local,
            IParameterReferenceOperation { Parameter.RefKind: RefKind.None } parameter => parameter.Parameter,
            _ => null,
        };
        if (variable is null && IsInAction && target is IMemberReferenceOperation) return SetByAction(target);
        // A local function that changes a variable around it would have an effect beyond its result.
        bool isOwn = variable is not null
            && (_active[_active.Count - 1].Member is not IMethodSymbol { MethodKind: MethodKind.LocalFunction } function
                || SymbolEqualityComparer.Default.Equals(variable.ContainingSymbol, function));
        if (isOwn && variable!.ContainingSymbol is not IMethodSymbol { MethodKind: MethodKind.Constructor }) return variable;
        if (target is IInvalidOperation) Unresolved(target);
        else Problem(Descriptors.AssignmentOutside, target, UserText.Of(target.Syntax));
        return null;
    }
}
