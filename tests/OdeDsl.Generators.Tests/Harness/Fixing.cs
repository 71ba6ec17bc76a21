using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeActions;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.CSharp;
using OdeDsl.CodeFixes;

namespace OdeDsl.Generators.Tests.Harness;

/// <summary>Applies code fixes as an editor does: in a workspace, to the reports of the generator and of the analyzers.</summary>
internal static class Fixing
{
    public static readonly CodeFixProvider[] Fixes =
        [.. typeof(ModelCodeFix).Assembly.GetTypes()
            .Where(static type => type.IsSubclassOf(typeof(CodeFixProvider)) && !type.IsAbstract)
            .Select(static type => (CodeFixProvider)Activator.CreateInstance(type)!)];

    /// <summary>The reports on a source, the generator's and the analyzers'.</summary>
    public static async Task<Diagnostic[]> Reports(string source)
    {
        GeneratorRun run = Compiling.Run(source);
        return [.. run.Problems, .. await Advising.Advice(run.Output)];
    }

    /// <summary>The source after the fix of the first report with this id, or null where none is offered.</summary>
    public static async Task<string?> Apply(string source, string id)
    {
        Diagnostic report = (await Reports(source)).First(report => report.Id == id);
        using AdhocWorkspace workspace = new();
        Document document = Open(workspace, source);
        CodeAction? offered = (await Offers(document, report)).FirstOrDefault();
        return offered is null ? null : await After(document, offered);
    }

    /// <summary>The source after all reports with this id are fixed at once.</summary>
    public static async Task<string> ApplyToAll(string source, string id)
    {
        Diagnostic[] reports = [.. (await Reports(source)).Where(report => report.Id == id)];
        using AdhocWorkspace workspace = new();
        Document document = Open(workspace, source);
        CodeFixProvider fix = Fixes.Single(fix => fix.FixableDiagnosticIds.Contains(id));
        CodeAction first = (await Offers(document, reports[0])).First();
        FixAllContext context = new(document, fix, FixAllScope.Document, first.EquivalenceKey, [id], new GivenReports(reports), CancellationToken.None);
        CodeAction all = await fix.GetFixAllProvider()!.GetFixAsync(context) ?? throw new InvalidOperationException("Nothing is offered for all.");
        return await After(document, all);
    }

    /// <summary>What all fixes offer for a report.</summary>
    public static async Task<List<CodeAction>> Offers(Document document, Diagnostic report)
    {
        SyntaxTree tree = (await document.GetSyntaxTreeAsync())!;
        Diagnostic here = At(report, tree);
        List<CodeAction> offers = [];
        foreach (CodeFixProvider fix in Fixes.Where(fix => fix.FixableDiagnosticIds.Contains(report.Id)))
            await fix.RegisterCodeFixesAsync(new(document, here, (offer, _) => offers.Add(offer), CancellationToken.None));
        return offers;
    }

    public static Document Open(AdhocWorkspace workspace, string source) => workspace
        .AddProject(ProjectInfo.Create(
            ProjectId.CreateNewId(), VersionStamp.Default, "Consumer", "Consumer", LanguageNames.CSharp,
            parseOptions: Compiling.ParseOptions, metadataReferences: Compiling.References))
        .AddDocument("Source0.cs", source, filePath: "/consumer/Source0.cs");

    public static async Task<string> After(Document document, CodeAction action)
    {
        var operations = await action.GetOperationsAsync(CancellationToken.None);
        Solution changed = operations.OfType<ApplyChangesOperation>().Single().ChangedSolution;
        return (await changed.GetDocument(document.Id)!.GetTextAsync()).ToString();
    }

    /// <summary>A report on the same text, in the tree of the workspace.</summary>
    private static Diagnostic At(Diagnostic report, SyntaxTree tree) =>
        Diagnostic.Create(report.Descriptor, Location.Create(tree, report.Location.SourceSpan));

    private sealed class GivenReports(Diagnostic[] reports) : FixAllContext.DiagnosticProvider
    {
        public override async Task<IEnumerable<Diagnostic>> GetDocumentDiagnosticsAsync(Document document, CancellationToken cancellationToken)
        {
            SyntaxTree tree = (await document.GetSyntaxTreeAsync(cancellationToken))!;
            return reports.Select(report => At(report, tree));
        }

        public override Task<IEnumerable<Diagnostic>> GetAllDiagnosticsAsync(Project project, CancellationToken cancellationToken) =>
            GetDocumentDiagnosticsAsync(project.Documents.Single(), cancellationToken);

        public override Task<IEnumerable<Diagnostic>> GetProjectDiagnosticsAsync(Project project, CancellationToken cancellationToken) =>
            Task.FromResult<IEnumerable<Diagnostic>>([]);
    }
}
