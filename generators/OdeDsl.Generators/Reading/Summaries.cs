using System;
using System.Collections.Generic;
using System.Linq;
using System.Text;
using System.Threading;
using System.Xml;
using System.Xml.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;

namespace OdeDsl.Generators.Reading;

/// <summary>
/// Documentation summaries, read from the comments themselves: the compiler parses documentation only in projects that generate
/// a documentation file, and summaries must not come and go with that setting.
/// </summary>
internal static class Summaries
{
    /// <summary>The summary of a symbol as plain text on one line, or the empty string.</summary>
    public static string Of(ISymbol symbol, CancellationToken cancellation) =>
        symbol.DeclaringSyntaxReferences
            .Select(reference => Of(reference.GetSyntax(cancellation)))
            .FirstOrDefault(static summary => summary.Length > 0) ?? "";

    private static string Of(SyntaxNode declaration)
    {
        string comment = string.Join("\n", declaration.GetLeadingTrivia().SelectMany(Lines));
        if (comment.IndexOf("<summary>", StringComparison.Ordinal) < 0) return "";
        try
        {
            XElement? summary = XElement.Parse("<doc>" + comment + "</doc>").Element("summary");
            return summary is null ? "" : Folded(summary);
        }
        catch (XmlException)
        {
            return ""; // The compiler warns about such comments where documentation is wanted.
        }
    }

    private static IEnumerable<string> Lines(SyntaxTrivia trivia)
    {
        string text = trivia.ToFullString().TrimStart();
        if (text.StartsWith("///", StringComparison.Ordinal))
            return text.Split('\n').Select(static line => line.Trim().TrimStart('/'));
        if (trivia.IsKind(SyntaxKind.MultiLineDocumentationCommentTrivia) || text.StartsWith("/**", StringComparison.Ordinal))
            return text.Trim().TrimEnd('/', '*').Substring(3).Split('\n').Select(static line => line.Trim().TrimStart('*'));
        return [];
    }

    private static string Folded(XElement element)
    {
        StringBuilder text = new();
        Append(element, text);
        return string.Join(" ", text.ToString().Split((char[]?)null, StringSplitOptions.RemoveEmptyEntries));
    }

    private static void Append(XElement element, StringBuilder text)
    {
        foreach (XNode node in element.Nodes())
        {
            if (node is XText words) text.Append(words.Value);
            if (node is not XElement inner) continue;
            if (inner.IsEmpty) text.Append(Referred(inner));
            else Append(inner, text);
            if (inner.Name.LocalName == "para") text.Append(' ');
        }
    }

    /// <summary>What an empty element such as <c>see cref</c> or <c>paramref</c> refers to.</summary>
    private static string Referred(XElement element) =>
        element.Attributes().Select(static attribute => attribute.Value).FirstOrDefault() ?? "";
}
