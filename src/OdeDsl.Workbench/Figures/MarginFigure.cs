using OdeDsl.Assessment;
using OdeDsl.Workbench.Wording;

namespace OdeDsl.Workbench.Figures;

/// <summary>Draws how far each parameter stands from a change, in per cent of its present value, the narrowest on top.</summary>
internal static class MarginFigure
{
    private const double Width = 720, PlotLeft = 190, PlotWidth = 512, PlotTop = 14, RowHeight = 46, BelowPlot = 54;

    // Bars longer than this many per cent are cut and say so.
    private const double Shown = 100;

    public static Figure Draw(string id, string title, string caption, MarginsAnswer margins)
    {
        double plotHeight = Math.Max(1, margins.Parameters.Count) * RowHeight;
        Legend legend = new();
        legend.Line("edge", "nearest change found, with the parameter's value there");
        legend.Line("beyond", "no change found as far as explored");
        double height = PlotTop + plotHeight + BelowPlot + legend.Height(PlotWidth) + 6;
        Axis percent = new() { Name = "Change of the parameter", Unit = "%", Lower = -Shown, Upper = Shown };
        Axis rows = new() { Name = "Parameter", Unit = "", Lower = 0, Upper = 1 };
        Frame frame = new(percent, rows, PlotLeft, PlotTop, PlotWidth, plotHeight);
        Markup markup = Figure.Start(id, title, Description(margins), Width, height);
        DrawAxis(markup, frame);
        for (int i = 0; i < margins.Parameters.Count; i++) DrawRow(markup, frame, margins.Parameters[i], PlotTop + (i + 0.5) * RowHeight);
        legend.Draw(markup, PlotLeft, frame.Bottom + BelowPlot - 4, PlotWidth);
        return new Figure(id, title, caption, markup.Close().ToString());
    }

    private static void DrawAxis(Markup markup, Frame frame)
    {
        foreach (Tick tick in frame.X.TicksFor(8))
        {
            string x = Markup.Coordinate(frame.PlaceX(tick.Value));
            markup.Empty("path", ("class", tick.Value == 0 ? "zero" : "grid"), ("d", $"M{x} {Markup.Coordinate(frame.Top)}V{Markup.Coordinate(frame.Bottom)}"));
            string label = tick.Value > 0 ? "+" + tick.Label : tick.Label;
            markup.Element("text", label, ("x", x), ("y", Markup.Coordinate(frame.Bottom + 18)), ("text-anchor", "middle"));
        }

        string middle = Markup.Coordinate(frame.Left + frame.Width / 2);
        markup.Element("text", frame.X.Label, ("class", "name"), ("x", middle), ("y", Markup.Coordinate(frame.Bottom + 40)), ("text-anchor", "middle"));
        markup.Line();
    }

    private static void DrawRow(Markup markup, Frame frame, ParameterMargin margin, double y)
    {
        markup.Element("text", margin.Parameter.Name, ("x", Markup.Coordinate(frame.Left - 10)), ("y", Markup.Coordinate(y - 3)), ("text-anchor", "end"));
        string value = NumberText.With(margin.Value, margin.Parameter.Unit);
        markup.Element("text", value, ("class", "quiet"), ("x", Markup.Coordinate(frame.Left - 10)), ("y", Markup.Coordinate(y + 14)), ("text-anchor", "end"));
        double left = DrawEdge(markup, frame, margin, margin.Down, -1, y), right = DrawEdge(markup, frame, margin, margin.Up, 1, y);
        markup.Empty(
            "rect",
            ("class", "span"),
            ("x", Markup.Coordinate(left)),
            ("y", Markup.Coordinate(y - 7)),
            ("width", Markup.Coordinate(right - left)),
            ("height", "14"));
        markup.Line();
    }

    /// <summary>Draws one end of a bar and gives its place.</summary>
    private static double DrawEdge(Markup markup, Frame frame, ParameterMargin margin, MarginEdge edge, int side, double y)
    {
        bool isChange = edge.Event is not (MarginEvent.None or MarginEvent.Unknown);
        double explored = margin.Value == 0 ? side * Shown : (edge.ExploredTo - margin.Value) / Math.Abs(margin.Value) * 100;
        double percent = isChange ? edge.Percent ?? explored : explored;
        bool isCut = Math.Abs(percent) > Shown;
        double place = frame.PlaceX(Math.Clamp(percent, -Shown, Shown));
        string x = Markup.Coordinate(place);
        if (isChange && !isCut)
        {
            markup.Empty("path", ("class", "edge"), ("d", $"M{x} {Markup.Coordinate(y - 12)}v24"));
            WriteBeside(markup, frame, NumberText.With(edge.Value ?? double.NaN, margin.Parameter.Unit), place, side, y);
        }
        else
        {
            markup.Empty("path", ("class", "beyond"), ("d", $"M{x} {Markup.Coordinate(y - 10)}v20"));
            if (isChange) WriteInside(markup, $"{NumberText.With(edge.Value ?? double.NaN, margin.Parameter.Unit)}, {SignedPercent(percent)}", place, side, y);
        }

        return place;
    }

    private static string SignedPercent(double percent) => $"{(percent > 0 ? "+" : "")}{NumberText.Format(percent, 3)}\u00A0%";

    // Outside the bar if there is room, otherwise above its end.
    private static void WriteBeside(Markup markup, Frame frame, string text, double x, int side, double y)
    {
        double width = TextWidth.Of(text, 13) + 6;
        bool fits = side < 0 ? x - width >= frame.Left : x + width <= frame.Right;
        if (!fits)
        {
            WriteInside(markup, text, x, side, y);
            return;
        }

        markup.Element("text", text, ("class", "halo"), ("x", Markup.Coordinate(x + side * 6)), ("y", Markup.Coordinate(y + 4.5)), ("text-anchor", side < 0 ? "end" : "start"));
    }

    private static void WriteInside(Markup markup, string text, double x, int side, double y) => markup.Element(
        "text", text, ("class", "halo"), ("x", Markup.Coordinate(x - side * 6)), ("y", Markup.Coordinate(y + 4.5)), ("text-anchor", side < 0 ? "start" : "end"));

    private static string Description(MarginsAnswer margins) => margins.Parameters.Count == 0
        ? "The model has no parameters."
        : string.Join(" ", margins.Parameters.Select(static margin => $"{margin.Parameter.Name}: {margin.Down.Text} {margin.Up.Text}"));
}
