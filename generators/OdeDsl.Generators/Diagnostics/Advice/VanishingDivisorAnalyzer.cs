using System.Collections.Generic;
using System.Collections.Immutable;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Diagnostics;
using Microsoft.CodeAnalysis.Operations;

namespace OdeDsl.Generators.Diagnostics.Advice;

/// <summary>Tells of divisions by something that is zero somewhere within the bounds of the states.</summary>
[DiagnosticAnalyzer(LanguageNames.CSharp)]
public sealed class VanishingDivisorAnalyzer : DiagnosticAnalyzer
{
    public override ImmutableArray<DiagnosticDescriptor> SupportedDiagnostics { get; } = ImmutableArray.Create(Descriptors.VanishingDivisor);

    public override void Initialize(AnalysisContext context)
    {
        context.EnableConcurrentExecution();
        context.ConfigureGeneratedCodeAnalysis(GeneratedCodeAnalysisFlags.None);
        context.RegisterOperationAction(Check, OperationKind.Binary);
    }

    private static void Check(OperationAnalysisContext context)
    {
        IBinaryOperation division = (IBinaryOperation)context.Operation;
        if (division is not { OperatorKind: BinaryOperatorKind.Divide, OperatorMethod: null } || !ModelCode.IsDouble(division)) return;
        if (!ModelCode.IsModel(context.ContainingSymbol.ContainingType)) return;
        List<ISymbol> states = [];
        if (ValueRange.Of(division.RightOperand, states) is not { HoldsZero: true } || states.Count == 0 || IsGuarded(division, states)) return;
        context.ReportDiagnostic(Diagnostic.Create(
            Descriptors.VanishingDivisor,
            division.RightOperand.Syntax.GetLocation(),
            division.RightOperand.Syntax.ToString(),
            string.Join(", ", states.Select(static state => state.Name))));
    }

    /// <summary>Whether a condition around the division looks at one of the states: whoever wrote it has thought of the zero.</summary>
    private static bool IsGuarded(IOperation division, List<ISymbol> states)
    {
        for (IOperation? around = division.Parent; around is not null; around = around.Parent)
        {
            IOperation? condition = around switch
            {
                IConditionalOperation conditional => conditional.Condition,
                ISwitchExpressionOperation choice => choice.Value,
                ISwitchOperation choice => choice.Value,
                // An early return under a condition guards what follows it.
                IBlockOperation block => block.Operations.OfType<IConditionalOperation>().FirstOrDefault(check => Mentions(check.Condition, states))?.Condition,
                _ => null,
            };
            if (condition is not null && Mentions(condition, states)) return true;
        }

        return false;
    }

    private static bool Mentions(IOperation operation, List<ISymbol> states) => operation.DescendantsAndSelf().Any(part =>
        part is IPropertyReferenceOperation reference && states.Contains(reference.Property, SymbolEqualityComparer.Default));
}
