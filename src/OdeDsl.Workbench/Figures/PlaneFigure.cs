using OdeDsl.Workbench.Wording;

namespace OdeDsl.Workbench.Figures;

/// <summary>Draws a plane of two states: a phase portrait, or a projection of a larger space.</summary>
internal static class PlaneFigure
{
    private const double Width = 720, PlotLeft = 78, PlotTop = 14, PlotWidth = 624, PlotHeight = 430;
    private const double BelowPlot = 48;

    // The field's shade names its speed in this many steps, each covering an equal share of the arrows.
    private const int Shades = 4;

    public static Figure Draw(PlanePicture picture)
    {
        Frame frame = new(picture.X, picture.Y, PlotLeft, PlotTop, PlotWidth, PlotHeight);
        Legend legend = LegendFor(picture);
        double height = PlotTop + PlotHeight + BelowPlot + legend.Height(PlotWidth) + 6;
        Markup markup = Figure.Start(picture.Id, picture.Title, Description(picture), Width, height);
        markup.Open("clipPath", ("id", picture.Id + "-clip"));
        markup.Empty(
            "rect", ("x", Markup.Coordinate(PlotLeft)), ("y", Markup.Coordinate(PlotTop)), ("width", Markup.Coordinate(PlotWidth)), ("height", Markup.Coordinate(PlotHeight)));
        markup.Close().Line();
        frame.Draw(markup);
        markup.Open("g", ("clip-path", $"url(#{picture.Id}-clip)"));
        DrawField(markup, frame, picture.Field);
        foreach (PlaneCurve curve in picture.Curves.OrderBy(static curve => curve.Kind)) DrawCurve(markup, frame, curve);
        markup.Close().Line();
        foreach (PlaneMark mark in picture.Marks.OrderBy(static mark => mark.Kind)) DrawMark(markup, frame, mark);
        foreach (PlaneCurve curve in picture.Curves) DrawLabel(markup, frame, curve);
        legend.Draw(markup, PlotLeft, PlotTop + PlotHeight + BelowPlot, PlotWidth);
        return new Figure(picture.Id, picture.Title, picture.Caption, markup.Close().ToString());
    }

    private static void DrawField(Markup markup, Frame frame, IReadOnlyList<FieldArrow> field)
    {
        if (field.Count == 0) return;
        double cell = Math.Sqrt(frame.Width * frame.Height / field.Count);
        double[] speeds = [.. field.Select(arrow => Speed(frame, arrow)).Where(double.IsFinite).Order()];
        if (speeds.Length == 0) return;
        for (int shade = 0; shade < Shades; shade++)
        {
            double low = speeds[shade * (speeds.Length - 1) / Shades], high = speeds[(shade + 1) * (speeds.Length - 1) / Shades];
            string data = string.Concat(field
                .Where(arrow => Speed(frame, arrow) is var speed && (speed > low || (shade == 0 && speed >= low)) && speed <= high)
                .Select(arrow => Arrow(frame, arrow, 0.62 * cell)));
            markup.Empty("path", ("class", "field"), ("opacity", Markup.Coordinate(0.3 + 0.7 * shade / (Shades - 1))), ("d", data));
        }
    }

    // Speeds are compared in pixels, so that neither state's unit outweighs the other's.
    private static double Speed(Frame frame, FieldArrow arrow)
    {
        (double dx, double dy) = Direction(frame, arrow);
        return Math.Sqrt(dx * dx + dy * dy);
    }

    private static (double X, double Y) Direction(Frame frame, FieldArrow arrow) => (
        arrow.RateX * frame.Width / (frame.X.Upper - frame.X.Lower), -arrow.RateY * frame.Height / (frame.Y.Upper - frame.Y.Lower));

    private static string Arrow(Frame frame, FieldArrow arrow, double length)
    {
        (double dx, double dy) = Direction(frame, arrow);
        double speed = Math.Sqrt(dx * dx + dy * dy);
        if (speed == 0) return "";
        (dx, dy) = (dx / speed, dy / speed);
        double x = frame.PlaceX(arrow.At.X) + dx * length / 2, y = frame.PlaceY(arrow.At.Y) + dy * length / 2;
        double headX = -dx * 4.5, headY = -dy * 4.5;
        return $"M{Markup.Coordinate(x - dx * length)} {Markup.Coordinate(y - dy * length)}L{Markup.Coordinate(x)} {Markup.Coordinate(y)}"
            + $"l{Markup.Coordinate(headX - headY * 0.5)} {Markup.Coordinate(headY + headX * 0.5)}"
            + $"M{Markup.Coordinate(x)} {Markup.Coordinate(y)}l{Markup.Coordinate(headX + headY * 0.5)} {Markup.Coordinate(headY - headX * 0.5)}";
    }

    private static void DrawCurve(Markup markup, Frame frame, PlaneCurve curve)
    {
        List<IReadOnlyList<PlanePoint>> pieces = [.. curve.Lines.SelectMany(line => Polyline.Pieces(frame, line))];
        if (pieces.Count == 0) return;
        markup.Empty("path", ("class", ClassOf(curve.Kind)), ("d", Polyline.PathData(pieces)));
        bool directed = curve.Kind is not (CurveKind.LevelX or CurveKind.LevelY or CurveKind.Wall);
        if (!directed) return;
        foreach (IReadOnlyList<PlanePoint> line in pieces.Where(line => Length(line) > 60).OrderByDescending(Length).Take(2))
            DrawHead(markup, frame, ClassOf(curve.Kind), line);
    }

    /// <summary>Draws an arrow head in the longer half of a line, where it is inside the frame.</summary>
    private static void DrawHead(Markup markup, Frame frame, string kind, IReadOnlyList<PlanePoint> line)
    {
        double goal = 0.38 * Length(line), run = 0;
        for (int i = 0; i + 1 < line.Count; i++)
        {
            double dx = line[i + 1].X - line[i].X, dy = line[i + 1].Y - line[i].Y, length = Math.Sqrt(dx * dx + dy * dy);
            run += length;
            if (run < goal || length == 0) continue;
            double share = 1 - Math.Min(1, (run - goal) / length);
            PlanePoint tip = new(line[i].X + share * dx, line[i].Y + share * dy);
            if (tip.X < frame.Left || tip.X > frame.Right || tip.Y < frame.Top || tip.Y > frame.Bottom) continue;
            Marks.Head(markup, kind, tip, dx, dy);
            return;
        }
    }

    private static double Length(IReadOnlyList<PlanePoint> line)
    {
        double sum = 0;
        for (int i = 0; i + 1 < line.Count; i++) sum += Math.Sqrt(Math.Pow(line[i + 1].X - line[i].X, 2) + Math.Pow(line[i + 1].Y - line[i].Y, 2));
        return sum;
    }

    private static void DrawMark(Markup markup, Frame frame, PlaneMark mark)
    {
        double x = frame.PlaceX(frame.X.Wrap(mark.At.X)), y = frame.PlaceY(frame.Y.Wrap(mark.At.Y));
        if (!(x >= frame.Left - 1 && x <= frame.Right + 1 && y >= frame.Top - 1 && y <= frame.Bottom + 1)) return;
        Marks.Draw(markup, mark.Kind, x, y);
        Write(markup, frame, mark.Label, x, y - 11);
        // On the seam of a circle a point is at both ends of the axis.
        if (frame.X.Period is not null && x <= frame.Left + 1) Marks.Draw(markup, mark.Kind, x + frame.Width, y);
        if (frame.Y.Period is not null && y >= frame.Bottom - 1) Marks.Draw(markup, mark.Kind, x, y - frame.Height);
    }

    private static void DrawLabel(Markup markup, Frame frame, PlaneCurve curve)
    {
        if (curve.Label.Length == 0) return;
        PlanePoint? highest = curve.Lines
            .SelectMany(line => Polyline.Pieces(frame, line))
            .SelectMany(static piece => piece)
            .Where(point => point.X >= frame.Left && point.X <= frame.Right && point.Y >= frame.Top && point.Y <= frame.Bottom)
            .Select(static point => (PlanePoint?)point)
            .MinBy(static point => point!.Value.Y);
        if (highest is { } place) Write(markup, frame, curve.Label, place.X, place.Y - 8);
    }

    /// <summary>Writes a short name centred at a place, pushed inside the frame, on a halo that keeps it readable over lines.</summary>
    private static void Write(Markup markup, Frame frame, string label, double x, double y)
    {
        if (label.Length == 0) return;
        double half = TextWidth.Of(label, 13) / 2 + 3;
        double placeX = Math.Clamp(x, frame.Left + half, frame.Right - half), placeY = Math.Clamp(y, frame.Top + 14, frame.Bottom - 5);
        markup.Element("text", label, ("class", "halo"), ("x", Markup.Coordinate(placeX)), ("y", Markup.Coordinate(placeY)), ("text-anchor", "middle"));
    }

    private static Legend LegendFor(PlanePicture picture)
    {
        Legend legend = new();
        foreach (MarkKind kind in picture.Marks.Select(static mark => mark.Kind).Distinct().OrderDescending()) legend.Mark(kind, TextOf(kind));
        foreach (CurveKind kind in picture.Curves.Select(static curve => curve.Kind).Distinct().OrderDescending())
            legend.Line(ClassOf(kind), TextOf(kind, picture));
        if (picture.Field.Count > 0)
        {
            legend.Add("direction of motion; darker is faster", static (markup, x, y) => markup.Empty(
                "path", ("class", "field"), ("d", $"M{Markup.Coordinate(x)} {Markup.Coordinate(y)}h26l-5 2.5m5 -2.5l-5 -2.5")));
        }

        return legend;
    }

    private static string TextOf(MarkKind kind) => kind switch
    {
        MarkKind.StableRest => "stable rest",
        MarkKind.UnstableRest => "unstable rest",
        MarkKind.Saddle => "saddle",
        MarkKind.UndecidedRest => "rest, stability undecided",
        _ => "start of the model's own motion",
    };

    private static string TextOf(CurveKind kind, PlanePicture picture) => kind switch
    {
        CurveKind.SteadyCycle => "stable limit cycle",
        CurveKind.UnsteadyCycle => "unstable limit cycle",
        CurveKind.UndecidedCycle => "limit cycle, stability undecided",
        CurveKind.Orbit => "closed orbits of a family",
        CurveKind.IntoSaddle => "into the saddle: a separatrix",
        CurveKind.FromSaddle => "out of the saddle",
        CurveKind.Motion => "the model's own motion",
        CurveKind.LevelX => $"{picture.X.Name} stands still",
        CurveKind.LevelY => $"{picture.Y.Name} stands still",
        _ => "the rates jump",
    };

    private static string ClassOf(CurveKind kind) => kind switch
    {
        CurveKind.SteadyCycle => "steady-cycle",
        CurveKind.UnsteadyCycle => "unsteady-cycle",
        CurveKind.UndecidedCycle => "undecided-cycle",
        CurveKind.Orbit => "orbit",
        CurveKind.IntoSaddle => "into-saddle",
        CurveKind.FromSaddle => "from-saddle",
        CurveKind.Motion => "motion",
        CurveKind.LevelX => "level-x",
        CurveKind.LevelY => "level-y",
        _ => "wall",
    };

    private static string Description(PlanePicture picture)
    {
        IEnumerable<string> marks = picture.Marks
            .Where(static mark => mark.Kind != MarkKind.Start)
            .Select(mark => $"{mark.Label}, {TextOf(mark.Kind)}, at {At(mark.At)}");
        IEnumerable<string> cycles = picture.Curves.Where(static curve => curve.Label.Length > 0).Select(curve => $"{curve.Label}, {TextOf(curve.Kind, picture)}");
        string content = string.Join("; ", marks.Concat(cycles));
        return $"{picture.Y.Label} against {picture.X.Label}. {(content.Length == 0 ? "No rest and no cycle is shown." : content + ".")}";

        string At(PlanePoint point) =>
            $"{picture.X.Name} {NumberText.With(point.X, picture.X.Unit)}, {picture.Y.Name} {NumberText.With(point.Y, picture.Y.Unit)}";
    }
}
