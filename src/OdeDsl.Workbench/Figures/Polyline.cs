using System.Globalization;
using System.Text;

namespace OdeDsl.Workbench.Figures;

/// <summary>A point of a curve, in the units of the axes.</summary>
internal readonly record struct PlanePoint(double X, double Y);

/// <summary>Turns curves on the unrolled line into lines on a frame: cut at seams, cut far outside, thinned.</summary>
internal static class Polyline
{
    // Thinning moves a line by at most this many pixels.
    private const double Tolerance = 0.25;

    // Points farther outside the frame than this many frame sizes are left out.
    private const double FarOutside = 1;

    /// <summary>The pieces of a curve in pixels.</summary>
    /// <param name="frame">Where to draw.</param>
    /// <param name="curve">Consecutive points, on the unrolled line where an axis is an angle.</param>
    public static IReadOnlyList<IReadOnlyList<PlanePoint>> Pieces(Frame frame, IReadOnlyList<PlanePoint> curve)
    {
        List<IReadOnlyList<PlanePoint>> pieces = [];
        List<PlanePoint> piece = [];
        for (int i = 0; i + 1 < curve.Count; i++)
        {
            foreach ((PlanePoint from, PlanePoint to) in Segments(frame, curve[i], curve[i + 1]))
            {
                bool joins = piece.Count > 0 && Math.Abs(piece[^1].X - from.X) + Math.Abs(piece[^1].Y - from.Y) <= 1e-6 * (frame.Width + frame.Height);
                if (!joins) Finish();
                bool isFinite = double.IsFinite(from.X + from.Y + to.X + to.Y);
                if (!isFinite || (IsFar(frame, from) && IsFar(frame, to))) continue;
                if (piece.Count == 0) piece.Add(from);
                piece.Add(to);
            }
        }

        Finish();
        return pieces;

        void Finish()
        {
            if (piece.Count > 1) pieces.Add(Thin(piece));
            piece = [];
        }
    }

    /// <summary>The data of a <c>path</c> element.</summary>
    public static string PathData(IEnumerable<IReadOnlyList<PlanePoint>> pieces)
    {
        StringBuilder data = new();
        foreach (IReadOnlyList<PlanePoint> piece in pieces)
        {
            for (int i = 0; i < piece.Count; i++)
            {
                data.Append(CultureInfo.InvariantCulture, $"{(i == 0 ? "M" : i == 1 ? "L" : " ")}{Markup.Coordinate(piece[i].X)} {Markup.Coordinate(piece[i].Y)}");
            }
        }

        return data.ToString();
    }

    /// <summary>One step of a curve, cut where an angle passes the seam of its axis, in pixels.</summary>
    private static IEnumerable<(PlanePoint From, PlanePoint To)> Segments(Frame frame, PlanePoint from, PlanePoint to)
    {
        List<double> cuts = [0, .. Seams(frame.X, from.X, to.X), .. Seams(frame.Y, from.Y, to.Y), 1];
        cuts.Sort();
        for (int i = 0; i + 1 < cuts.Count; i++)
        {
            if (cuts[i + 1] <= cuts[i]) continue;
            PlanePoint a = At(cuts[i]), b = At(cuts[i + 1]), middle = At((cuts[i] + cuts[i + 1]) / 2);
            double turnX = frame.X.Wrap(middle.X) - middle.X, turnY = frame.Y.Wrap(middle.Y) - middle.Y;
            yield return (Place(a), Place(b));

            PlanePoint Place(PlanePoint point) => new(frame.PlaceX(point.X + turnX), frame.PlaceY(point.Y + turnY));
        }

        PlanePoint At(double share) => new(from.X + (to.X - from.X) * share, from.Y + (to.Y - from.Y) * share);
    }

    /// <summary>The shares of the step at which an angle passes its seam.</summary>
    private static IEnumerable<double> Seams(Axis axis, double from, double to)
    {
        if (axis.Period is not { } period || from == to || !double.IsFinite(from) || !double.IsFinite(to)) yield break;
        double first = Math.Min(from, to), last = Math.Max(from, to);
        for (double k = Math.Ceiling((first - axis.Lower) / period); axis.Lower + k * period < last; k++)
        {
            double share = (axis.Lower + k * period - from) / (to - from);
            if (share is > 0 and < 1) yield return share;
        }
    }

    private static bool IsFar(Frame frame, PlanePoint place) =>
        !(place.X >= frame.Left - FarOutside * frame.Width && place.X <= frame.Right + FarOutside * frame.Width
            && place.Y >= frame.Top - FarOutside * frame.Height && place.Y <= frame.Bottom + FarOutside * frame.Height);

    /// <summary>Leaves out points that a straight line between their neighbours replaces (Douglas and Peucker, 1973).</summary>
    private static List<PlanePoint> Thin(List<PlanePoint> points)
    {
        bool[] kept = new bool[points.Count];
        kept[0] = kept[^1] = true;
        Stack<(int First, int Last)> open = new([(0, points.Count - 1)]);
        while (open.TryPop(out (int First, int Last) span))
        {
            double worst = Tolerance;
            int at = -1;
            for (int i = span.First + 1; i < span.Last; i++)
            {
                double distance = Distance(points[i], points[span.First], points[span.Last]);
                if (distance > worst) (worst, at) = (distance, i);
            }

            if (at < 0) continue;
            kept[at] = true;
            open.Push((span.First, at));
            open.Push((at, span.Last));
        }

        return [.. points.Where((_, i) => kept[i])];
    }

    private static double Distance(PlanePoint point, PlanePoint from, PlanePoint to)
    {
        double dx = to.X - from.X, dy = to.Y - from.Y, square = dx * dx + dy * dy;
        double share = square == 0 ? 0 : Math.Clamp(((point.X - from.X) * dx + (point.Y - from.Y) * dy) / square, 0, 1);
        return Math.Sqrt(Math.Pow(point.X - from.X - share * dx, 2) + Math.Pow(point.Y - from.Y - share * dy, 2));
    }
}
