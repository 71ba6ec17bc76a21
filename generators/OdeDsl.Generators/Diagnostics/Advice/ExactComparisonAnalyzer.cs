using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Diagnostics;
using Microsoft.CodeAnalysis.Operations;

namespace OdeDsl.Generators.Diagnostics.Advice;

/// <summary>Tells of <c>==</c> and <c>!=</c> on numbers that move: a motion passes through a point without stopping at it.</summary>
[DiagnosticAnalyzer(LanguageNames.CSharp)]
public sealed class ExactComparisonAnalyzer : DiagnosticAnalyzer
{
    public override ImmutableArray<DiagnosticDescriptor> SupportedDiagnostics { get; } = ImmutableArray.Create(Descriptors.ExactComparison);

    public override void Initialize(AnalysisContext context)
    {
        context.EnableConcurrentExecution();
        context.ConfigureGeneratedCodeAnalysis(GeneratedCodeAnalysisFlags.None);
        context.RegisterOperationAction(Check, OperationKind.Binary);
    }

    private static void Check(OperationAnalysisContext context)
    {
        IBinaryOperation comparison = (IBinaryOperation)context.Operation;
        if (comparison.OperatorKind is not (BinaryOperatorKind.Equals or BinaryOperatorKind.NotEquals)) return;
        if (!ModelCode.IsDouble(comparison.LeftOperand) || !ModelCode.IsModel(context.ContainingSymbol.ContainingType)) return;
        if (!ModelCode.MentionsMotion(comparison)) return;
        context.ReportDiagnostic(Diagnostic.Create(Descriptors.ExactComparison, comparison.Syntax.GetLocation(), comparison.Syntax.ToString()));
    }
}
