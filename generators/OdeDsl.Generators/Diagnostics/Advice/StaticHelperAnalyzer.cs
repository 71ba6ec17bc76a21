using System.Collections.Immutable;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Diagnostics;
using Microsoft.CodeAnalysis.Operations;

namespace OdeDsl.Generators.Diagnostics.Advice;

/// <summary>Tells of private helpers that use nothing of the model.</summary>
[DiagnosticAnalyzer(LanguageNames.CSharp)]
public sealed class StaticHelperAnalyzer : DiagnosticAnalyzer
{
    public override ImmutableArray<DiagnosticDescriptor> SupportedDiagnostics { get; } = ImmutableArray.Create(Descriptors.HelperNotStatic);

    public override void Initialize(AnalysisContext context)
    {
        context.EnableConcurrentExecution();
        context.ConfigureGeneratedCodeAnalysis(GeneratedCodeAnalysisFlags.None);
        context.RegisterOperationBlockAction(Check);
    }

    private static void Check(OperationBlockAnalysisContext context)
    {
        if (context.OwningSymbol is not IMethodSymbol { MethodKind: MethodKind.Ordinary or MethodKind.PropertyGet } method) return;
        ISymbol helper = ModelCode.Member(method);
        if (helper is not { IsStatic: false, DeclaredAccessibility: Accessibility.Private, IsOverride: false } || !ModelCode.IsModel(helper.ContainingType)) return;
        if (ModelCode.IsMarked(helper) || helper is IPropertySymbol { SetMethod: not null } or IMethodSymbol { IsPartialDefinition: true }) return;
        // Broken code says nothing about what it uses.
        if (context.OperationBlocks.SelectMany(static block => block.DescendantsAndSelf())
            .Any(static part => part is IInstanceReferenceOperation or IInvalidOperation)) return;
        context.ReportDiagnostic(Diagnostic.Create(Descriptors.HelperNotStatic, helper.Locations[0], helper.Name));
    }
}
