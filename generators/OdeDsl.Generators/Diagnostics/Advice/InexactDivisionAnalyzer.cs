using System;
using System.Collections.Immutable;
using System.Globalization;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Diagnostics;
using Microsoft.CodeAnalysis.Operations;

namespace OdeDsl.Generators.Diagnostics.Advice;

/// <summary>Tells of <c>1 / 2</c> where a double is wanted: C# divides whole numbers without remainder, and gives 0.</summary>
[DiagnosticAnalyzer(LanguageNames.CSharp)]
public sealed class InexactDivisionAnalyzer : DiagnosticAnalyzer
{
    public override ImmutableArray<DiagnosticDescriptor> SupportedDiagnostics { get; } = ImmutableArray.Create(Descriptors.InexactDivision);

    public override void Initialize(AnalysisContext context)
    {
        context.EnableConcurrentExecution();
        context.ConfigureGeneratedCodeAnalysis(GeneratedCodeAnalysisFlags.None);
        context.RegisterOperationAction(Check, OperationKind.Binary);
    }

    private static void Check(OperationAnalysisContext context)
    {
        IBinaryOperation division = (IBinaryOperation)context.Operation;
        if (division is not { OperatorKind: BinaryOperatorKind.Divide, Type.SpecialType: SpecialType.System_Int32 or SpecialType.System_Int64 }) return;
        if (Whole(division.LeftOperand) is not { } dividend || Whole(division.RightOperand) is not { } divisor) return;
        if (divisor == 0 || dividend % divisor == 0 || !BecomesDouble(division) || !ModelCode.IsModel(context.ContainingSymbol.ContainingType)) return;
        context.ReportDiagnostic(Diagnostic.Create(
            Descriptors.InexactDivision,
            division.Syntax.GetLocation(),
            division.Syntax.ToString(),
            decimal.Truncate(dividend / divisor).ToString(CultureInfo.InvariantCulture)));
    }

    private static decimal? Whole(IOperation operand) =>
        operand.ConstantValue is { HasValue: true, Value: int or long } constant ? Convert.ToDecimal(constant.Value, CultureInfo.InvariantCulture) : null;

    /// <summary>Whether the quotient goes into a double without a cast that would show that it is meant.</summary>
    private static bool BecomesDouble(IOperation operation) => operation.Parent switch
    {
        IParenthesizedOperation parenthesized => BecomesDouble(parenthesized),
        IConversionOperation { IsImplicit: true } conversion => ModelCode.IsDouble(conversion) || BecomesDouble(conversion),
        IUnaryOperation unary => BecomesDouble(unary),
        IBinaryOperation { OperatorKind: BinaryOperatorKind.Add or BinaryOperatorKind.Subtract or BinaryOperatorKind.Multiply or BinaryOperatorKind.Divide } binary =>
            BecomesDouble(binary),
        _ => false,
    };
}
