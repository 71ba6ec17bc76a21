using System.Collections.Immutable;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Diagnostics;

namespace OdeDsl.Generators.Diagnostics.Advice;

/// <summary>Tells of states that nothing in the model reads.</summary>
[DiagnosticAnalyzer(LanguageNames.CSharp)]
public sealed class UnreadStateAnalyzer : DiagnosticAnalyzer
{
    public override ImmutableArray<DiagnosticDescriptor> SupportedDiagnostics { get; } = ImmutableArray.Create(Descriptors.UnreadState);

    public override void Initialize(AnalysisContext context)
    {
        context.EnableConcurrentExecution();
        context.ConfigureGeneratedCodeAnalysis(GeneratedCodeAnalysisFlags.None);
        ModelMemberReads.Watch(context, static (end, model, reads) =>
        {
            foreach (ISymbol state in model.GetMembers().Where(ModelCode.IsState))
            {
                if (!reads.Contains(state)) end.ReportDiagnostic(Diagnostic.Create(Descriptors.UnreadState, state.Locations[0], state.Name));
            }
        });
    }
}
