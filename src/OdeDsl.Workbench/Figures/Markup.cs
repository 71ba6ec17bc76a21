using System.Globalization;
using System.Text;

namespace OdeDsl.Workbench.Figures;

/// <summary>
/// Writes HTML and SVG elements. All text and attribute values pass through one escape, so that a name of whatever content is shown
/// and never read as markup.
/// </summary>
internal sealed class Markup
{
    private readonly StringBuilder text = new();
    private readonly Stack<string> open = new();

    /// <summary>Opens an element.</summary>
    /// <param name="name">The element's name, our own.</param>
    /// <param name="attributes">Names (our own) and values (anything).</param>
    public Markup Open(string name, params ReadOnlySpan<(string Name, string Value)> attributes)
    {
        Start(name, attributes);
        text.Append('>');
        open.Push(name);
        return this;
    }

    /// <summary>Writes an element without content, closed as XML asks.</summary>
    public Markup Empty(string name, params ReadOnlySpan<(string Name, string Value)> attributes)
    {
        Start(name, attributes);
        text.Append("/>");
        return this;
    }

    /// <summary>Writes an element that holds text only.</summary>
    public Markup Element(string name, string content, params ReadOnlySpan<(string Name, string Value)> attributes) =>
        Open(name, attributes).Text(content).Close();

    public Markup Text(string content)
    {
        text.Append(Escape(content));
        return this;
    }

    /// <summary>Closes the innermost element.</summary>
    public Markup Close()
    {
        text.Append("</").Append(open.Pop()).Append('>');
        return this;
    }

    /// <summary>Starts a new line, for readable files.</summary>
    public Markup Line()
    {
        text.Append('\n');
        return this;
    }

    /// <summary>Adds finished markup that another instance of this class wrote, or our own constant text.</summary>
    public Markup Raw(string markup)
    {
        text.Append(markup);
        return this;
    }

    /// <summary>The markup.</summary>
    /// <exception cref="InvalidOperationException">An element is still open.</exception>
    public override string ToString() =>
        open.Count == 0 ? text.ToString() : throw new InvalidOperationException($"The element {open.Peek()} is still open.");

    /// <summary>A coordinate: a tenth of a unit is finer than the eye.</summary>
    public static string Coordinate(double value)
    {
        string shown = value.ToString("0.#", CultureInfo.InvariantCulture);
        return shown == "-0" ? "0" : shown;
    }

    /// <summary>
    /// Text as data of HTML and XML. Characters that XML forbids, and those that turn the direction of writing and could make a name
    /// read as another, become the replacement character.
    /// </summary>
    public static string Escape(string content)
    {
        StringBuilder escaped = new(content.Length);
        foreach (Rune rune in content.EnumerateRunes())
        {
            switch (rune.Value)
            {
                case '&': escaped.Append("&amp;"); break;
                case '<': escaped.Append("&lt;"); break;
                case '>': escaped.Append("&gt;"); break;
                case '"': escaped.Append("&quot;"); break;
                case '\'': escaped.Append("&#39;"); break;
                case '\t' or '\n' or '\r': escaped.Append(' '); break;
                case < 0x20 or (>= 0x7F and <= 0x9F) or 0xFFFE or 0xFFFF: escaped.Append('\uFFFD'); break;
                case (>= 0x202A and <= 0x202E) or (>= 0x2066 and <= 0x2069): escaped.Append('\uFFFD'); break;
                default: escaped.Append(rune.ToString()); break;
            }
        }

        return escaped.ToString();
    }

    private void Start(string name, ReadOnlySpan<(string Name, string Value)> attributes)
    {
        text.Append('<').Append(name);
        foreach ((string attribute, string value) in attributes) text.Append(' ').Append(attribute).Append("=\"").Append(Escape(value)).Append('"');
    }
}
