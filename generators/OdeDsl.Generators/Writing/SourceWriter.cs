using System.Text;

namespace OdeDsl.Generators.Writing;

/// <summary>Collects lines with indentation. Line ends are <c>\n</c> on every system.</summary>
internal sealed class SourceWriter
{
    private readonly StringBuilder _text = new();
    private int _depth;

    public void Line() => _text.Append('\n');

    public void Line(string line) => _text.Append(' ', 4 * _depth).Append(line).Append('\n');

    /// <summary>Several lines, given with <c>\n</c> between them.</summary>
    public void Lines(string lines)
    {
        foreach (string line in lines.Replace("\r", "").Split('\n'))
        {
            if (line.Length == 0) Line();
            else Line(line);
        }
    }

    /// <summary>A line and the brace that opens its block.</summary>
    public void Open(string line)
    {
        Line(line);
        Line("{");
        _depth++;
    }

    public void Close(string end = "}")
    {
        _depth--;
        Line(end);
    }

    public override string ToString() => _text.ToString();
}
