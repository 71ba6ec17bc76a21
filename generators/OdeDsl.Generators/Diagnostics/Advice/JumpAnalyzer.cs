using System.Collections.Immutable;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Diagnostics;
using Microsoft.CodeAnalysis.Operations;

namespace OdeDsl.Generators.Diagnostics.Advice;

/// <summary>Tells of a choice between two constants by a relation that moves: a jump for certain, and perhaps an event.</summary>
[DiagnosticAnalyzer(LanguageNames.CSharp)]
public sealed class JumpAnalyzer : DiagnosticAnalyzer
{
    public override ImmutableArray<DiagnosticDescriptor> SupportedDiagnostics { get; } = ImmutableArray.Create(Descriptors.JumpInEquation);

    public override void Initialize(AnalysisContext context)
    {
        context.EnableConcurrentExecution();
        context.ConfigureGeneratedCodeAnalysis(GeneratedCodeAnalysisFlags.None);
        context.RegisterOperationAction(Check, OperationKind.Conditional);
    }

    private static void Check(OperationAnalysisContext context)
    {
        IConditionalOperation choice = (IConditionalOperation)context.Operation;
        if (choice.WhenFalse is null || choice.Type?.SpecialType is not (SpecialType.System_Double or SpecialType.System_Int32)) return;
        if (choice.WhenTrue.ConstantValue is not { HasValue: true } yes || choice.WhenFalse.ConstantValue is not { HasValue: true } no) return;
        if (Equals(yes.Value, no.Value) || !ModelCode.IsModel(context.ContainingSymbol.ContainingType)) return;
        if (!choice.Condition.DescendantsAndSelf().Any(IsMovingRelation)) return;
        context.ReportDiagnostic(Diagnostic.Create(
            Descriptors.JumpInEquation, choice.Syntax.GetLocation(), choice.Condition.Syntax.ToString(), ModelCode.Member(context.ContainingSymbol).Name));
    }

    private static bool IsMovingRelation(IOperation operation) =>
        operation is IBinaryOperation
        {
            OperatorKind: BinaryOperatorKind.LessThan or BinaryOperatorKind.LessThanOrEqual
                or BinaryOperatorKind.GreaterThan or BinaryOperatorKind.GreaterThanOrEqual,
        } && ModelCode.MentionsMotion(operation);
}
