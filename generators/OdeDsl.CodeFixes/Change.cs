using Microsoft.CodeAnalysis;

namespace OdeDsl.CodeFixes;

/// <summary>One replacement in a file.</summary>
/// <param name="Title">What the editor offers to do.</param>
/// <param name="Old">The node to replace.</param>
/// <param name="New">What stands there afterwards.</param>
internal sealed record Change(string Title, SyntaxNode Old, SyntaxNode New);
