namespace OdeDsl.Workbench.Figures;

/// <summary>The rectangle a plot lives in, its two axes and how values become places.</summary>
/// <param name="X">The horizontal axis.</param>
/// <param name="Y">The vertical axis.</param>
/// <param name="Left">The left edge of the rectangle.</param>
/// <param name="Top">The top edge.</param>
/// <param name="Width">The width.</param>
/// <param name="Height">The height.</param>
internal sealed record Frame(Axis X, Axis Y, double Left, double Top, double Width, double Height)
{
    public double Right => Left + Width;

    public double Bottom => Top + Height;

    public double PlaceX(double value) => Left + Width * X.Share(value);

    public double PlaceY(double value) => Bottom - Height * Y.Share(value);

    /// <summary>Draws grid, frame, ticks and the axes' names with their units.</summary>
    /// <param name="markup">Receives the elements.</param>
    /// <param name="named">Whether the vertical axis is named along its side (otherwise the caller names it).</param>
    /// <param name="withX">Whether the horizontal axis has labels (false for all but the lowest of stacked plots).</param>
    public void Draw(Markup markup, bool named = true, bool withX = true)
    {
        markup.Open("g", ("class", "axes"));
        foreach (Tick tick in X.TicksFor((int)Math.Max(2, Width / 80)))
        {
            string x = Markup.Coordinate(PlaceX(tick.Value));
            markup.Empty("path", ("class", "grid"), ("d", $"M{x} {Markup.Coordinate(Top)}V{Markup.Coordinate(Bottom)}"));
            if (withX) markup.Element("text", tick.Label, ("x", x), ("y", Markup.Coordinate(Bottom + 18)), ("text-anchor", "middle"));
        }

        foreach (Tick tick in Y.TicksFor((int)Math.Clamp(Height / 24, 2, 10)))
        {
            double y = PlaceY(tick.Value);
            markup.Empty("path", ("class", "grid"), ("d", $"M{Markup.Coordinate(Left)} {Markup.Coordinate(y)}H{Markup.Coordinate(Right)}"));
            markup.Element(
                "text", tick.Label, ("x", Markup.Coordinate(Left - 7)), ("y", Markup.Coordinate(y + 4.5)), ("text-anchor", "end"));
        }

        markup.Empty(
            "rect",
            ("class", "frame"),
            ("x", Markup.Coordinate(Left)),
            ("y", Markup.Coordinate(Top)),
            ("width", Markup.Coordinate(Width)),
            ("height", Markup.Coordinate(Height)));
        if (withX)
        {
            string middle = Markup.Coordinate(Left + Width / 2);
            markup.Element("text", X.Label, ("class", "name"), ("x", middle), ("y", Markup.Coordinate(Bottom + 40)), ("text-anchor", "middle"));
        }

        if (named)
        {
            string turned = $"translate(20 {Markup.Coordinate(Top + Height / 2)}) rotate(-90)";
            markup.Element("text", Y.Label, ("class", "name"), ("transform", turned), ("text-anchor", "middle"));
        }

        markup.Close().Line();
    }
}
