using System.Collections.Immutable;
using System.Threading.Tasks;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeActions;
using Microsoft.CodeAnalysis.CodeFixes;

namespace OdeDsl.CodeFixes;

/// <summary>
/// What all fixes share: a fix is a pure function from a file's syntax to its mended syntax, and is offered only where that function
/// has an answer. Many at once are merged by the workspace.
/// </summary>
public abstract class ModelCodeFix : CodeFixProvider
{
    public sealed override FixAllProvider GetFixAllProvider() => WellKnownFixAllProviders.BatchFixer;

    public sealed override async Task RegisterCodeFixesAsync(CodeFixContext context)
    {
        if (await context.Document.GetSyntaxRootAsync(context.CancellationToken).ConfigureAwait(false) is not { } root) return;
        foreach (Diagnostic diagnostic in context.Diagnostics)
        {
            // A report can be older than the text.
            if (!root.FullSpan.Contains(diagnostic.Location.SourceSpan)) continue;
            SyntaxNode place = root.FindNode(diagnostic.Location.SourceSpan, getInnermostNodeForTie: true);
            if (Mend(place, diagnostic) is not { } change) continue;
            context.RegisterCodeFix(
                CodeAction.Create(
                    change.Title,
                    _ => Task.FromResult(context.Document.WithSyntaxRoot(root.ReplaceNode(change.Old, change.New))),
                    equivalenceKey: GetType().Name + diagnostic.Id),
                diagnostic);
        }
    }

    /// <summary>Decides what to replace.</summary>
    /// <param name="place">The innermost node that covers the place of the report.</param>
    /// <param name="diagnostic">The report.</param>
    /// <returns>The change, or null where the fix does not apply.</returns>
    private protected abstract Change? Mend(SyntaxNode place, Diagnostic diagnostic);

    private protected static ImmutableArray<string> Ids(params DiagnosticDescriptor[] descriptors)
    {
        ImmutableArray<string>.Builder ids = ImmutableArray.CreateBuilder<string>(descriptors.Length);
        foreach (DiagnosticDescriptor descriptor in descriptors) ids.Add(descriptor.Id);
        return ids.MoveToImmutable();
    }
}
