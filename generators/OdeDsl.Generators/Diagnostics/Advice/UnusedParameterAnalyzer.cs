using System.Collections.Immutable;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Diagnostics;

namespace OdeDsl.Generators.Diagnostics.Advice;

/// <summary>Tells of parameters that nothing in the model reads: to set them changes nothing.</summary>
[DiagnosticAnalyzer(LanguageNames.CSharp)]
public sealed class UnusedParameterAnalyzer : DiagnosticAnalyzer
{
    public override ImmutableArray<DiagnosticDescriptor> SupportedDiagnostics { get; } = ImmutableArray.Create(Descriptors.UnusedParameter);

    public override void Initialize(AnalysisContext context)
    {
        context.EnableConcurrentExecution();
        context.ConfigureGeneratedCodeAnalysis(GeneratedCodeAnalysisFlags.None);
        ModelMemberReads.Watch(context, static (end, model, reads) =>
        {
            foreach (ISymbol parameter in model.GetMembers().Where(ModelCode.IsParameter))
            {
                if (reads.Contains(parameter)) continue;
                end.ReportDiagnostic(Diagnostic.Create(Descriptors.UnusedParameter, parameter.Locations[0], parameter.Name, model.Name));
            }
        });
    }
}
