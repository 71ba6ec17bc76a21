using System.Reflection;
using System.Runtime.Loader;
using System.Text;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using OdeDsl.Generators.Reading;
using OdeDsl.Generators.Writing;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Emitted;

/// <summary>The emitted code of a model, compiled with every warning an error, loaded and ready to call.</summary>
internal sealed class EmittedModel
{
    private EmittedModel(string source, IEmittedCalls calls) => (Source, Calls) = (source, calls);

    public string Source { get; }

    public IEmittedCalls Calls { get; }

    public static EmittedModel Of(ModelDefinition model) => OfMany([model])[0];

    /// <summary>Compiles many models at once, which is much faster than one by one.</summary>
    public static EmittedModel[] OfMany(IReadOnlyList<ModelDefinition> models)
    {
        string[] sources = [.. models.Select(static model => ModelWriter.Write(model, CancellationToken.None))];
        Assembly assembly = Compile([.. sources, .. models.Select(UserHalf)]);
        return [.. models.Select((model, i) => new EmittedModel(sources[i], CallsOf(assembly.GetType(model.Type.MetadataName)!)))];
    }

    /// <summary>The members of the system that belongs to a model class.</summary>
    public static IEmittedCalls CallsOf(Type type)
    {
        Type contract = type.GetInterfaces().Single(static face => face.Name.StartsWith("IOdeModel", StringComparison.Ordinal));
        Type calls = typeof(EmittedCalls<,>).MakeGenericType(contract.GetGenericArguments());
        return (IEmittedCalls)Activator.CreateInstance(calls)!;
    }

    public static Assembly Compile(params string[] sources)
    {
        CSharpParseOptions parse = new(LanguageVersion.CSharp13, DocumentationMode.Diagnose);
        CSharpCompilationOptions options = new(
            OutputKind.DynamicallyLinkedLibrary,
            optimizationLevel: OptimizationLevel.Release,
            generalDiagnosticOption: ReportDiagnostic.Error,
            warningLevel: 9999,
            nullableContextOptions: NullableContextOptions.Enable);
        CSharpCompilation compilation = CSharpCompilation.Create(
            "Emitted", [.. sources.Select(source => CSharpSyntaxTree.ParseText(source, parse, encoding: Encoding.UTF8))], Compiling.References, options);
        using MemoryStream image = new();
        var result = compilation.Emit(image);
        Diagnostic[] problems = [.. result.Diagnostics.Where(static problem => problem.Severity >= DiagnosticSeverity.Warning)];
        if (problems.Length > 0) throw new InvalidOperationException(string.Join("\n", problems.Take(5).Select(static p => p.ToString())) + "\n" + problems[0].Location.SourceTree);
        image.Position = 0;
        return new AssemblyLoadContext(null, isCollectible: true).LoadFromStream(image);
    }

    /// <summary>The declarations a user would have written.</summary>
    public static string UserHalf(ModelDefinition model)
    {
        StringBuilder text = new();
        text.Append("namespace Models;\n/// <summary>A model.</summary>\npublic sealed partial class ").Append(model.Type.Types[0].Name).Append("\n{\n");
        foreach (PropertyDefinition property in model.States.Select(static s => s.Property).Concat(model.Parameters.Select(static p => p.Property))
            .Concat(model.Modes.Select(static m => m.Property)).Concat(model.Inputs.Select(static u => u.Property)))
            text.Append("/// <summary>A number.</summary>\npublic partial double @").Append(property.Name).Append(" { get; set; }\n");
        for (int i = 0; i < model.Tables.Count; i++) text.Append(RandomTables.Declaration(model.Tables[i].Name, i));
        return text.Append("}\n").ToString();
    }
}
