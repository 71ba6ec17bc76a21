using OdeDsl.Assessment;
using OdeDsl.Integration;
using OdeDsl.Workbench.Wording;

namespace OdeDsl.Workbench.Figures;

/// <summary>Draws what accuracy each integration method gives for its work, on the model's own motion.</summary>
internal static class MethodFigure
{
    private const double Width = 720, PlotLeft = 78, PlotTop = 14, PlotWidth = 624, PlotHeight = 250, BelowPlot = 48;

    // A measured error of zero has no place on a logarithmic axis; it is shown at rounding.
    private const double Rounding = 1e-16;

    /// <returns>The figure, or null if nothing was measured.</returns>
    public static Figure? Draw(string id, string title, string caption, MethodAnswer answer)
    {
        MethodMeasurement[] measured = [.. answer.Measurements.Where(static measurement => double.IsFinite(measurement.Error) && measurement.Work > 0)];
        if (measured.Length == 0) return null;
        IntegrationMethod[] methods = [.. measured.Select(static measurement => measurement.Method).Distinct()];
        Axis work = Decades("Work", "evaluations of the rates", measured.Select(static measurement => measurement.Work));
        Axis error = Decades("Error", "1", measured.Select(Error).Append(answer.WantedError));
        Frame frame = new(work, error, PlotLeft, PlotTop, PlotWidth, PlotHeight);
        Legend legend = LegendFor(methods, answer);
        double height = PlotTop + PlotHeight + BelowPlot + legend.Height(PlotWidth) + 6;
        Markup markup = Figure.Start(id, title, Description(measured), Width, height);
        frame.Draw(markup);
        string wanted = Markup.Coordinate(frame.PlaceY(answer.WantedError));
        markup.Empty("path", ("class", "wanted"), ("d", $"M{Markup.Coordinate(frame.Left)} {wanted}H{Markup.Coordinate(frame.Right)}"));
        for (int i = 0; i < methods.Length; i++)
        {
            PlanePoint[] points = [.. measured
                .Where(measurement => measurement.Method == methods[i])
                .OrderByDescending(static measurement => measurement.RelativeTolerance)
                .Select(measurement => new PlanePoint(frame.PlaceX(measurement.Work), frame.PlaceY(Error(measurement))))];
            markup.Empty("path", ("class", $"method-{i % 3}"), ("d", Polyline.PathData([points])));
            foreach (PlanePoint point in points) Spot(markup, i, point.X, point.Y);
        }

        MethodMeasurement? best = Array.Find(
            measured, measurement => measurement.Method == answer.Recommended && measurement.RelativeTolerance == answer.RelativeTolerance);
        if (best is not null) Ring(markup, frame.PlaceX(best.Work), frame.PlaceY(Error(best)));
        legend.Draw(markup, PlotLeft, frame.Bottom + BelowPlot, PlotWidth);
        return new Figure(id, title, caption, markup.Close().ToString());
    }

    private static double Error(MethodMeasurement measurement) => Math.Max(Rounding, measurement.Error);

    /// <summary>A logarithmic axis over whole decades.</summary>
    private static Axis Decades(string name, string unit, IEnumerable<double> values)
    {
        double[] all = [.. values];
        double lower = Math.Floor(Math.Log10(all.Min()) - 0.05), upper = Math.Ceiling(Math.Log10(all.Max()) + 0.05);
        return new Axis { Name = name, Unit = unit, Lower = Math.Pow(10, lower), Upper = Math.Pow(10, upper), IsLogarithmic = true };
    }

    private static void Spot(Markup markup, int method, double x, double y)
    {
        string kind = $"method-{method % 3} spot";
        if (method % 3 == 2)
        {
            markup.Empty(
                "rect", ("class", kind), ("x", Markup.Coordinate(x - 6)), ("y", Markup.Coordinate(y - 6)), ("width", "12"), ("height", "12"));
            return;
        }

        markup.Empty("circle", ("class", kind), ("cx", Markup.Coordinate(x)), ("cy", Markup.Coordinate(y)), ("r", "4.5"));
    }

    private static void Ring(Markup markup, double x, double y) => markup.Empty(
        "circle", ("class", "chosen"), ("cx", Markup.Coordinate(x)), ("cy", Markup.Coordinate(y)), ("r", "11"));

    private static Legend LegendFor(IntegrationMethod[] methods, MethodAnswer answer)
    {
        Legend legend = new();
        for (int i = 0; i < methods.Length; i++)
        {
            int method = i;
            legend.Add(Words.Of(methods[i]), (markup, x, y) =>
            {
                markup.Empty("path", ("class", $"method-{method % 3}"), ("d", $"M{Markup.Coordinate(x)} {Markup.Coordinate(y)}h26"));
                Spot(markup, method, x + 13, y);
            });
        }

        legend.Line("wanted", "wanted accuracy");
        if (answer.Recommended is not null) legend.Add("recommended", static (markup, x, y) => Ring(markup, x + 13, y));
        return legend;
    }

    private static string Description(MethodMeasurement[] measured) => string.Join("; ", measured.Select(static measurement =>
        $"{Words.Of(measurement.Method)} at tolerance {NumberText.Format(measurement.RelativeTolerance, 2)}: work {NumberText.Format(measurement.Work, 3)}, error {NumberText.Format(measurement.Error, 2)}")) + ".";
}
