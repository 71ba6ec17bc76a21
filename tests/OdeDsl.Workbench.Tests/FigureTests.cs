using OdeDsl.Workbench.Figures;
using OdeDsl.Workbench.Portraits;

namespace WorkbenchTests;

public class FigureTests
{
    private static readonly Axis Turn = new() { Name = "Angle", Unit = "rad", Lower = -Math.PI, Upper = Math.PI, Period = 2 * Math.PI };
    private static readonly Axis Slip = new() { Name = "Slip", Unit = "rad/s", Lower = -1, Upper = 1 };
    private static readonly Axis Square = new() { Name = "x", Unit = "m", Lower = -2, Upper = 2 };

    [Fact]
    public void A_curve_that_turns_is_cut_at_the_seam_and_never_drawn_across()
    {
        Frame frame = new(Turn, Slip, 0, 0, 600, 400);
        PlanePoint[] turns = [.. Enumerable.Range(0, 500).Select(static i => new PlanePoint(-1 + 0.05 * i, 0.5 * Math.Sin(0.1 * i)))];

        IReadOnlyList<IReadOnlyList<PlanePoint>> pieces = Polyline.Pieces(frame, turns);

        // From -1 to 23.95 the curve passes the seam at pi, 3 pi, 5 pi and 7 pi: five pieces.
        Assert.Equal(5, pieces.Count);
        Assert.All(pieces, piece => Assert.All(piece, point => Assert.InRange(point.X, -1e-6, 600 + 1e-6)));
        Assert.All(pieces, static piece => Assert.All(piece.Zip(piece.Skip(1)), static step => Assert.True(step.Second.X >= step.First.X)));
        Assert.All(pieces.Skip(1), static piece => Assert.True(Math.Abs(piece[0].X) <= 1e-6));
        Assert.All(pieces.SkipLast(1), static piece => Assert.True(Math.Abs(piece[^1].X - 600) <= 1e-6));
    }

    [Fact]
    public void Thinning_keeps_a_curve_within_a_fraction_of_a_pixel()
    {
        Frame frame = new(Square, Square, 0, 0, 600, 600);
        PlanePoint[] circle = [.. Enumerable.Range(0, 4001).Select(static i => new PlanePoint(Math.Cos(i * Math.PI / 2000), Math.Sin(i * Math.PI / 2000)))];

        IReadOnlyList<PlanePoint> piece = Assert.Single(Polyline.Pieces(frame, circle));

        Assert.True(piece.Count < 200);
        for (int i = 0; i + 1 < piece.Count; i++)
        {
            PlanePoint middle = new((piece[i].X + piece[i + 1].X) / 2 - 300, (piece[i].Y + piece[i + 1].Y) / 2 - 300);
            Assert.True(Math.Abs(Math.Sqrt(middle.X * middle.X + middle.Y * middle.Y) - 150) <= 0.3);
        }
    }

    [Fact]
    public void Points_that_are_not_finite_leave_a_gap()
    {
        Frame frame = new(Square, Square, 0, 0, 600, 600);
        PlanePoint[] broken = [new(0, 0), new(0.5, 0.1), new(double.NaN, 0), new(1, 0.2), new(1.5, double.PositiveInfinity), new(1, 1), new(1.5, 1)];

        IReadOnlyList<IReadOnlyList<PlanePoint>> pieces = Polyline.Pieces(frame, broken);

        Assert.Equal(2, pieces.Count);
        Assert.DoesNotContain("NaN", Polyline.PathData(pieces), StringComparison.Ordinal);
    }

    [Fact]
    public void A_contour_is_found_where_the_function_vanishes_and_not_where_it_jumps()
    {
        var circle = Contours.Trace(static (x, y) => x * x + y * y - 1, Square, Square);
        var jump = Contours.Trace(static (x, y) => x < y ? -1 : 1, Square, Square);

        IReadOnlyList<PlanePoint> line = Assert.Single(circle);
        Assert.Equal(line[0], line[^1]);
        Assert.All(line, static point => Assert.True(Math.Abs(point.X * point.X + point.Y * point.Y - 1) <= 1e-5));
        Assert.Empty(jump);
    }

    [Fact]
    public void A_point_on_the_seam_is_shown_at_both_ends()
    {
        PlanePicture picture = new()
        {
            Id = "f", Title = "T", Caption = "C", X = Turn, Y = Slip, Marks = [new PlaneMark(MarkKind.StableRest, new PlanePoint(3 * Math.PI, 0), "rest 1")],
        };

        string svg = PlaneFigure.Draw(picture).Svg;

        // Two in the plot and one in the legend.
        Assert.Equal(3, svg.Split("class=\"stable-rest\"").Length - 1);
    }

    [Fact]
    public void Ticks_stand_at_round_numbers_inside_the_range()
    {
        Assert.Equal(["−40", "−30", "−20", "−10", "0", "10"], Ticks.Linear(-45, 15, 8).Select(static tick => tick.Label));
        Assert.Equal(["0", "0.0002", "0.0004"], Ticks.Linear(0, 0.0005, 4).Select(static tick => tick.Label));
        Assert.Equal(["−π", "−π/2", "0", "π/2", "π"], Turn.TicksFor(8).Select(static tick => tick.Label));
        Assert.Equal(["10⁻²", "10⁻¹", "1", "10", "10²"], Ticks.Logarithmic(0.01, 100, 8).Select(static tick => tick.Label));
    }

    [Fact]
    public void Ticks_end_at_a_huge_or_tiny_range()
    {
        Assert.InRange(Ticks.Linear(1e15, 1e15 + 1, 8).Count, 1, 20);
        Assert.InRange(Ticks.Linear(-1e300, 1e300, 8).Count, 2, 20);
    }

    [Fact]
    public void A_figure_alone_brings_look_and_letters()
    {
        PlanePicture picture = new() { Id = "f", Title = "T", Caption = "C", X = Turn, Y = Slip };

        string alone = PlaneFigure.Draw(picture).Alone();

        Assert.StartsWith("<svg xmlns=\"http://www.w3.org/2000/svg\"", alone, StringComparison.Ordinal);
        Assert.Contains("@font-face", alone, StringComparison.Ordinal);
        Assert.Contains("prefers-color-scheme:dark", alone, StringComparison.Ordinal);
        System.Xml.Linq.XElement.Parse(alone);
    }

    [Fact]
    public void Shapes_and_dashes_tell_apart_what_colours_tell_apart()
    {
        string[] cycles = ["steady-cycle", "unsteady-cycle", "undecided-cycle"];
        string[] looks = [.. cycles.Select(static kind => Theme.Figures.Split('\n').Single(line => line.Contains($".figure .{kind}{{", StringComparison.Ordinal)))];
        string[] dashes = [.. looks.Select(static look => look.Contains("stroke-dasharray:", StringComparison.Ordinal) ? look[look.IndexOf("stroke-dasharray:", StringComparison.Ordinal)..] : "solid")];

        Assert.Equal(cycles.Length, dashes.Distinct().Count());
    }
}
