using OdeDsl.Workbench.Wording;

namespace OdeDsl.Workbench.Figures;

/// <summary>One quantity over time.</summary>
/// <param name="Y">The quantity's axis.</param>
/// <param name="Points">Times and values, unrolled if the quantity is an angle.</param>
internal sealed record TimeCourse(Axis Y, IReadOnlyList<PlanePoint> Points);

/// <summary>Draws quantities over time, one above the other over a common time axis.</summary>
internal static class TimeCourseFigure
{
    private const double Width = 720, PlotLeft = 78, PlotWidth = 624, FirstTop = 24, PanelHeight = 112, Gap = 32, BelowPlot = 54;

    /// <param name="id">The figure's id.</param>
    /// <param name="title">What it shows.</param>
    /// <param name="caption">What it shows, with the values it holds for.</param>
    /// <param name="time">The time axis.</param>
    /// <param name="courses">The quantities, from the top down.</param>
    public static Figure Draw(string id, string title, string caption, Axis time, IReadOnlyList<TimeCourse> courses)
    {
        double height = FirstTop + courses.Count * (PanelHeight + Gap) - Gap + BelowPlot;
        string description = string.Join("; ", courses.Select(static course =>
            $"{course.Y.Label} between {NumberText.Format(course.Points.Min(static point => point.Y))} and {NumberText.Format(course.Points.Max(static point => point.Y))}"));
        Markup markup = Figure.Start(id, title, $"Over {time.Label}: {description}.", Width, height);
        for (int i = 0; i < courses.Count; i++)
        {
            double top = FirstTop + i * (PanelHeight + Gap);
            Frame frame = new(time, courses[i].Y, PlotLeft, top, PlotWidth, PanelHeight);
            frame.Draw(markup, named: false, withX: i == courses.Count - 1);
            markup.Element("text", courses[i].Y.Label, ("class", "name"), ("x", Markup.Coordinate(PlotLeft)), ("y", Markup.Coordinate(top - 8)));
            markup.Empty("path", ("class", "orbit"), ("d", Polyline.PathData(Polyline.Pieces(frame, courses[i].Points))));
            markup.Line();
        }

        return new Figure(id, title, caption, markup.Close().ToString());
    }
}
