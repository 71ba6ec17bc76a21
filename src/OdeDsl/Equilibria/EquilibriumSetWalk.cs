using System.Collections.Immutable;

namespace OdeDsl.Equilibria;

/// <summary>
/// Tells a continuum of equilibria from a degenerate single one, and walks along a line of them: a step along the null direction, then
/// Newton steps of minimum norm back to the set (Gauss-Newton on an under-determined system, as in numerical continuation: E. L. Allgower
/// and K. Georg, "Numerical Continuation Methods", 1990, chapter 3).
/// </summary>
internal sealed class EquilibriumSetWalk(RootProblem problem, NullSpace nullSpace, DampedNewton newton, SearchRegion region)
{
    /// <summary>The length of a step, in widths.</summary>
    private const double StepLength = 0.02;

    /// <summary>A correction that brings the point back by more than this part of the step did not find a neighbour.</summary>
    private const double Returned = 0.5;

    /// <summary>A line that crosses the region corner to corner a few times is walked completely.</summary>
    private const int MaximumSteps = 500;

    /// <summary>Halvings of the last step that locate the end of a line.</summary>
    private const int EndBisections = 45;

    /// <summary>The continuum a root belongs to, or <see langword="null"/> if it has no neighbours along its null directions.</summary>
    public EquilibriumSet? SetThrough(ReadOnlySpan<double> root, double[][] nullDirections)
    {
        double[] start = root.ToArray();
        if (nullDirections.Length > 1)
        {
            int dimension = nullDirections.Count(direction => Neighbour(start, direction, StepLength) is not null);
            return dimension == 0 ? null : new EquilibriumSet(dimension, [State(start)]);
        }

        double[] forward = nullDirections[0];
        double[] backward = [.. forward.Select(static value => -value)];
        if (Neighbour(start, forward, StepLength) is null && Neighbour(start, backward, StepLength) is null) return null;
        List<double[]> ahead = Walk(start, forward);
        bool closed = ahead.Count > 2 && Distance(ahead[^1], start) <= StepLength / 2;
        List<double[]> behind = closed ? [] : Walk(start, backward);
        behind.Reverse();
        return new EquilibriumSet(1, [.. behind.Append(start).Concat(ahead).Select(State)]);
    }

    private List<double[]> Walk(double[] start, double[] direction)
    {
        var points = new List<double[]>();
        double[] here = start;
        for (int k = 0; k < MaximumSteps; k++)
        {
            double[]? next = Neighbour(here, direction, StepLength);
            if (next is null || !IsInside(next))
            {
                if (End(here, direction) is double[] end) points.Add(end);
                return points;
            }

            points.Add(next);
            double[][] directions = nullSpace.Directions(next);
            if (directions.Length != 1) return points;
            double along = 0;
            for (int i = 0; i < here.Length; i++) along += (next[i] - here[i]) * directions[0][i] / (problem.Scale[i] * problem.Scale[i]);
            direction = along >= 0 ? directions[0] : [.. directions[0].Select(static value => -value)];
            here = next;
            if (k > 1 && Distance(next, start) <= StepLength / 2) return points; // once round a closed line
        }

        return points;
    }

    private double[]? End(double[] here, double[] direction)
    {
        double inside = 0, outside = StepLength;
        double[]? end = null;
        for (int k = 0; k < EndBisections; k++)
        {
            double middle = (inside + outside) / 2;
            double[]? point = Neighbour(here, direction, middle);
            if (point is not null && IsInside(point)) (inside, end) = (middle, point);
            else outside = middle;
        }

        return end;
    }

    private double[]? Neighbour(double[] here, double[] direction, double length)
    {
        var point = new double[here.Length];
        for (int i = 0; i < here.Length; i++) point[i] = here[i] + (length * direction[i]);
        if (!newton.Solve(point)) return null;
        return Distance(point, here) >= Returned * length ? point : null;
    }

    // In scales of all unknowns; angles modulo their periods, so that a line once round a circle closes.
    private double Distance(double[] a, double[] b)
    {
        double sum = 0;
        for (int i = 0; i < a.Length; i++)
        {
            double part = (i < region.Count ? region.Difference(i, a[i], b[i]) : a[i] - b[i]) / problem.Scale[i];
            sum += part * part;
        }

        return Math.Sqrt(sum);
    }

    private bool IsInside(double[] point)
    {
        double[] wrapped = [.. point];
        region.Wrap(wrapped.AsSpan(0, region.Count));
        return problem.Accepts(wrapped);
    }

    private ImmutableArray<double> State(double[] point) => [.. point.AsSpan(0, region.Count)];
}
