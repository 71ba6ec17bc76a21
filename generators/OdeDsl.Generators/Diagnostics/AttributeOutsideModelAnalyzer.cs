using System.Collections.Immutable;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Diagnostics;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Diagnostics;

/// <summary>Tells of members marked as parts of a model in a class that is none: the generator never looks at them.</summary>
[DiagnosticAnalyzer(LanguageNames.CSharp)]
public sealed class AttributeOutsideModelAnalyzer : DiagnosticAnalyzer
{
    public override ImmutableArray<DiagnosticDescriptor> SupportedDiagnostics { get; } =
        ImmutableArray.Create(Descriptors.AttributeOutsideModel);

    public override void Initialize(AnalysisContext context)
    {
        context.EnableConcurrentExecution();
        context.ConfigureGeneratedCodeAnalysis(GeneratedCodeAnalysisFlags.None);
        context.RegisterSymbolAction(Check, SymbolKind.Property, SymbolKind.Method);
    }

    private static void Check(SymbolAnalysisContext context)
    {
        ISymbol member = context.Symbol;
        if (member.ContainingType.GetAttributes().Any(static attribute => Attributes.Is(attribute, Attributes.Model))) return;
        foreach (string name in Attributes.OfMembers)
        {
            if (Attributes.Find(member, name) is not { } mark) continue;
            Location place = Attributes.Place(mark, member);
            context.ReportDiagnostic(
                Diagnostic.Create(Descriptors.AttributeOutsideModel, place, name, member.Name, member.ContainingType.Name));
        }
    }
}
