using System;
using System.Globalization;
using System.Text;
using System.Threading;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Text;
using OdeDsl.Generators.Diagnostics;
using OdeDsl.Generators.Reading;
using OdeDsl.Generators.Writing;

namespace OdeDsl.Generators;

/// <summary>
/// The pipeline: marked classes are read into values; where these are the same as before, everything stops. Otherwise the symbolic
/// work is done and the text is written. Problems take a way of their own, because their locations change at almost every edit.
/// </summary>
[Generator(LanguageNames.CSharp)]
public sealed class ModelGenerator : IIncrementalGenerator
{
    public void Initialize(IncrementalGeneratorInitializationContext context)
    {
        IncrementalValuesProvider<ModelReading> readings = context.SyntaxProvider
            .ForAttributeWithMetadataName(Attributes.ModelFullName, static (node, _) => IsClass(node), Read)
            .WithTrackingName(StepNames.Reading);

        IncrementalValuesProvider<ModelDefinition> models = readings
            .Select(static (reading, _) => reading.Model)
            .Where(static model => model is not null)
            .Select(static (model, _) => model!)
            .WithTrackingName(StepNames.Model);
        context.RegisterSourceOutput(models, static (output, model) => Write(output, model));

        IncrementalValuesProvider<Diagnostic> problems = readings
            .SelectMany(static (reading, _) => reading.Problems)
            .WithTrackingName(StepNames.Problems);
        context.RegisterSourceOutput(problems, static (output, problem) => output.ReportDiagnostic(problem));
    }

    /// <summary>The attribute is refused elsewhere by the compiler.</summary>
    private static bool IsClass(SyntaxNode node) => node is ClassDeclarationSyntax || node.IsKind(SyntaxKind.RecordDeclaration);

    private static ModelReading Read(GeneratorAttributeSyntaxContext marked, CancellationToken cancellation)
    {
        TypeDeclarationSyntax declaration = (TypeDeclarationSyntax)marked.TargetNode;
        INamedTypeSymbol model = (INamedTypeSymbol)marked.TargetSymbol;
        return Guarded(declaration, new ModelReader(model, declaration, marked.SemanticModel.Compilation, cancellation).Read);
    }

    /// <summary>Turns a fault of ours into a problem of one model: a generator that throws takes the code of all models away.</summary>
    internal static ModelReading Guarded(TypeDeclarationSyntax declaration, Func<ModelReading> read)
    {
        try
        {
            return read();
        }
        catch (Exception fault) when (fault is not OperationCanceledException)
        {
            return ModelReading.Failed([Fault(declaration.Identifier.ValueText, fault, declaration.Identifier.GetLocation())]);
        }
    }

    private static void Write(SourceProductionContext output, ModelDefinition model)
    {
        try
        {
            string text = ModelWriter.Write(model, output.CancellationToken);
            output.AddSource(HintName(model.Type.MetadataName), SourceText.From(text, Encoding.UTF8));
        }
        catch (Exception fault) when (fault is not OperationCanceledException)
        {
            output.ReportDiagnostic(Fault(model.Type.MetadataName, fault, Location.None));
        }
    }

    private static Diagnostic Fault(string name, Exception fault, Location place) =>
        Diagnostic.Create(Descriptors.GeneratorFailed, place, name, fault.GetType().Name + ": " + fault.Message);

    /// <summary>
    /// A file name for a model: readable, and with a number because file names hold fewer characters than type names and must differ
    /// by more than upper and lower case.
    /// </summary>
    private static string HintName(string metadataName)
    {
        StringBuilder name = new();
        uint number = 2166136261; // Fowler, Noll, Vo: FNV-1a, 32 bits.
        foreach (char character in metadataName)
        {
            bool isPlain = character is (>= 'a' and <= 'z') or (>= 'A' and <= 'Z') or (>= '0' and <= '9') or '.';
            name.Append(isPlain ? character : '_');
            number = unchecked((number ^ character) * 16777619);
        }

        return name.Append('.').Append(number.ToString("x8", CultureInfo.InvariantCulture)).Append(".g.cs").ToString();
    }
}
