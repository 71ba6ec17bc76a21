namespace OdeDsl.Workbench.Figures;

/// <summary>A finished figure.</summary>
/// <param name="Id">Unique within a report: letters, digits and hyphens.</param>
/// <param name="Title">What it shows, in a few words.</param>
/// <param name="Caption">What it shows, with the parameter values it holds for.</param>
/// <param name="Svg">The <c>svg</c> element; its look comes from <see cref="Theme"/>.</param>
internal sealed record Figure(string Id, string Title, string Caption, string Svg)
{
    /// <summary>The figure as a file of its own, with its look and letters inside.</summary>
    public string Alone()
    {
        int afterTag = Svg.IndexOf('>', StringComparison.Ordinal) + 1;
        string background = "<rect class=\"paper\" width=\"100%\" height=\"100%\"/>";
        return $"{Svg[..afterTag]}\n<style>\n{Theme.Alone}</style>\n{background}\n{Svg[afterTag..]}\n";
    }

    /// <summary>Starts the <c>svg</c> element of a figure.</summary>
    /// <param name="id">The figure's id.</param>
    /// <param name="title">For people who cannot see it: what it is.</param>
    /// <param name="description">For people who cannot see it: what it shows.</param>
    /// <param name="width">Its width in pixels at full size.</param>
    /// <param name="height">Its height.</param>
    public static Markup Start(string id, string title, string description, double width, double height) => new Markup()
        .Open(
            "svg",
            ("xmlns", "http://www.w3.org/2000/svg"),
            ("class", "figure"),
            ("viewBox", $"0 0 {Markup.Coordinate(width)} {Markup.Coordinate(height)}"),
            ("role", "img"),
            ("aria-labelledby", $"{id}-title {id}-text"))
        .Element("title", title, ("id", id + "-title"))
        .Element("desc", description, ("id", id + "-text"))
        .Line();
}
