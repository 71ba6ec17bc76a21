using OdeDsl.Workbench.Figures;

namespace OdeDsl.Workbench.Portraits;

/// <summary>Curves on which a function of two variables vanishes, by squares of a grid, each crossing refined along its edge.</summary>
internal static class Contours
{
    private const int Columns = 120, Rows = 84, Halvings = 40;

    // Where a function changes sign by a jump, it does not become small beside its values at the ends of the edge.
    private const double SmallShare = 1e-6;

    /// <param name="function">The function; where it is not finite there is no curve.</param>
    /// <param name="x">The range of the first variable.</param>
    /// <param name="y">The range of the second variable.</param>
    /// <returns>Lines of consecutive points.</returns>
    public static IReadOnlyList<IReadOnlyList<PlanePoint>> Trace(Func<double, double, double> function, Axis x, Axis y)
    {
        double[,] values = new double[Columns + 1, Rows + 1];
        for (int i = 0; i <= Columns; i++)
        {
            for (int j = 0; j <= Rows; j++) values[i, j] = function(Place(x, i, Columns), Place(y, j, Rows));
        }

        // An edge is named by its lower left node and its direction.
        Dictionary<(int I, int J, bool Across), PlanePoint> crossings = [];
        for (int i = 0; i <= Columns; i++)
        {
            for (int j = 0; j <= Rows; j++)
            {
                if (i < Columns) Cross(i, j, true);
                if (j < Rows) Cross(i, j, false);
            }
        }

        return Join(crossings);

        void Cross(int i, int j, bool across)
        {
            double from = values[i, j], to = across ? values[i + 1, j] : values[i, j + 1];
            if (!(from < 0 && to >= 0) && !(from >= 0 && to < 0)) return;
            PlanePoint a = new(Place(x, i, Columns), Place(y, j, Rows));
            PlanePoint b = across ? a with { X = Place(x, i + 1, Columns) } : a with { Y = Place(y, j + 1, Rows) };
            if (Root(function, a, b, from, to) is { } root) crossings[(i, j, across)] = root;
        }
    }

    private static double Place(Axis axis, int index, int count) => axis.Lower + (axis.Upper - axis.Lower) * index / count;

    private static PlanePoint? Root(Func<double, double, double> function, PlanePoint a, PlanePoint b, double valueA, double valueB)
    {
        double size = Math.Max(Math.Abs(valueA), Math.Abs(valueB));
        for (int k = 0; k < Halvings; k++)
        {
            PlanePoint middle = new((a.X + b.X) / 2, (a.Y + b.Y) / 2);
            double value = function(middle.X, middle.Y);
            if ((value < 0) == (valueA < 0)) (a, valueA) = (middle, value);
            else (b, valueB) = (middle, value);
        }

        return Math.Abs(valueA) <= SmallShare * size && Math.Abs(valueB) <= SmallShare * size ? a : null;
    }

    /// <summary>Joins the crossings of each square's edges into lines.</summary>
    private static List<IReadOnlyList<PlanePoint>> Join(Dictionary<(int I, int J, bool Across), PlanePoint> crossings)
    {
        Dictionary<(int, int, bool), List<(int, int, bool)>> neighbours = [];
        for (int i = 0; i < Columns; i++)
        {
            for (int j = 0; j < Rows; j++)
            {
                (int, int, bool)[] cut = [.. new[] { (i, j, true), (i + 1, j, false), (i, j + 1, true), (i, j, false) }.Where(crossings.ContainsKey)];
                for (int k = 0; k + 1 < cut.Length; k += 2) Link(cut[k], cut[k + 1]);
            }
        }

        List<IReadOnlyList<PlanePoint>> lines = [];
        HashSet<(int, int, bool)> used = [];
        // Open lines first, from their ends; what is left then is closed.
        foreach ((int, int, bool) start in neighbours.Keys.OrderBy(edge => neighbours[edge].Count).ThenBy(static edge => edge))
        {
            if (used.Contains(start)) continue;
            List<PlanePoint> line = [];
            (int, int, bool)? edge = start;
            while (edge is { } here && used.Add(here))
            {
                line.Add(crossings[here]);
                edge = neighbours[here].Where(next => !used.Contains(next)).Select(static next => ((int, int, bool)?)next).FirstOrDefault();
            }

            bool isClosed = line.Count > 2 && neighbours[start].Count == 2;
            if (isClosed) line.Add(line[0]);
            if (line.Count > 1) lines.Add(line);
        }

        return lines;

        void Link((int, int, bool) one, (int, int, bool) other)
        {
            (neighbours.TryGetValue(one, out var first) ? first : neighbours[one] = []).Add(other);
            (neighbours.TryGetValue(other, out var second) ? second : neighbours[other] = []).Add(one);
        }
    }
}
