namespace OdeDsl.Workbench.Figures;

/// <summary>The words beside samples of the lines and shapes of a figure, in one or two columns below it.</summary>
internal sealed class Legend
{
    private const double RowHeight = 21;
    private const double SampleWidth = 34;
    private const double FontSize = 13;

    private readonly List<(string Text, Action<Markup, double, double> Sample)> entries = [];

    /// <summary>Adds a line.</summary>
    /// <param name="kind">The class that gives the line its look.</param>
    /// <param name="text">What it is.</param>
    public void Line(string kind, string text) => entries.Add((text, (markup, x, y) => markup.Empty(
        "path", ("class", kind), ("d", $"M{Markup.Coordinate(x)} {Markup.Coordinate(y)}h26"))));

    /// <summary>Adds a shape.</summary>
    /// <param name="kind">The shape.</param>
    /// <param name="text">What it is.</param>
    public void Mark(MarkKind kind, string text) => entries.Add((text, (markup, x, y) => Marks.Draw(markup, kind, x + 13, y)));

    /// <summary>Adds an entry that draws its own sample.</summary>
    /// <param name="text">What it is.</param>
    /// <param name="sample">Draws the sample, given its left end and its middle height.</param>
    public void Add(string text, Action<Markup, double, double> sample) => entries.Add((text, sample));

    /// <summary>The height needed in a width.</summary>
    public double Height(double width) => Rows(width) * RowHeight + (entries.Count == 0 ? 0 : 8);

    /// <summary>Draws the entries below a height.</summary>
    public void Draw(Markup markup, double left, double top, double width)
    {
        int columns = Columns(width), rows = Rows(width);
        for (int i = 0; i < entries.Count; i++)
        {
            double x = left + i / rows * (width / columns), y = top + 8 + (i % rows + 0.5) * RowHeight;
            entries[i].Sample(markup, x, y);
            markup.Element("text", entries[i].Text, ("x", Markup.Coordinate(x + SampleWidth)), ("y", Markup.Coordinate(y + 4.5)));
        }
    }

    private int Columns(double width) =>
        entries.Count > 1 && entries.TrueForAll(entry => SampleWidth + TextWidth.Of(entry.Text, FontSize) <= width / 2 - 8) ? 2 : 1;

    private int Rows(double width) => (entries.Count + Columns(width) - 1) / Columns(width);
}
