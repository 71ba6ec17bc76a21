using System.Globalization;
using OdeDsl.Modeling;

namespace OdeDsl.Branches;

/// <summary>Follows one branch of equilibria step by step, from a start value of the parameter towards a target.</summary>
/// <remarks>
/// Pseudo-arclength continuation (H. B. Keller 1977): Euler predictor along the tangent, Newton corrector in the plane normal to it.
/// A step is thrown away and halved if the corrector fails, if the tangent turns too much, if the corrected point lies far from the
/// predicted one (another branch), or if a special point within it cannot be located.
/// </remarks>
internal sealed class BranchFollower
{
    // The tangent may turn by about 25 degrees in one step; a step that turns it by less than 11 may grow.
    private const double SmallestCosine = 0.9;
    private const double ComfortableCosine = 0.98;
    private const int ComfortableIterations = 5;
    private const double Growth = 1.5;

    // A point that falls on a change of stability hides it: the step is shortened a little so that the change lies inside a step.
    private const double Nudge = 0.83;
    private const int MaximumNudges = 3;

    // Continuous rates vanish on both sides of a surface; scaled rates below this count as zero there.
    private const double ContinuousRates = 1e-7;

    // How far a branch is looked at beyond a surface to see to which side it leads, in scaled variables.
    private const double SideProbe = 1e-5;

    private readonly BranchOptions options;
    private readonly EquilibriumCurve curve;
    private readonly SpecialPointLocator locator;
    private readonly BoundWatch bounds;
    private readonly SurfaceWatch surfaces;
    private readonly DynamicSystem system;
    private readonly int parameter;
    private readonly (double From, double To) range;
    private readonly List<FollowedEquilibrium> points = [];
    private readonly List<SpecialPoint> special = [];
    private CurvePoint last;
    private double arcLength;
    private int rejected;
    private int nudges;
    private BranchEnd? end;
    private string endText = "";

    private BranchFollower(DynamicSystem system, int parameter, ReadOnlySpan<double> start, double from, double to, BranchOptions options)
    {
        this.system = system;
        this.parameter = parameter;
        this.options = options;
        range = (from, to);
        curve = new EquilibriumCurve(system, parameter, BranchScales.Of(system.Description, start, from, to));
        locator = new SpecialPointLocator(curve);
        bounds = new BoundWatch(curve, locator, system.Description, parameter, from, to, options.RespectStateBounds);
        surfaces = new SurfaceWatch(curve, locator, system.Description);
        last = Begin(start);
    }

    /// <summary>Follows the branch through an equilibrium.</summary>
    /// <param name="system">The system; its own value of the parameter does not matter.</param>
    /// <param name="parameter">The index of the parameter.</param>
    /// <param name="start">The equilibrium at <paramref name="from"/>, at least roughly.</param>
    /// <param name="from">The start value.</param>
    /// <param name="to">The target.</param>
    /// <param name="options">How finely to follow.</param>
    /// <param name="cancellation">Stops the following.</param>
    /// <exception cref="InvalidOperationException">Newton's method finds no equilibrium near <paramref name="start"/>, or a continuum.</exception>
    /// <exception cref="OperationCanceledException">The following was cancelled.</exception>
    public static BranchResult Follow(
        DynamicSystem system, int parameter, ReadOnlySpan<double> start, double from, double to, BranchOptions options,
        CancellationToken cancellation)
    {
        var follower = new BranchFollower(system, parameter, start, from, to, options);
        return follower.Run(cancellation);
    }

    private CurvePoint Begin(ReadOnlySpan<double> start)
    {
        int n = system.StateCount;
        double[] position = new double[n + 1];
        for (int i = 0; i < n; i++) position[i] = start[i] / curve.Scales[i];
        position[n] = range.From / curve.Scales[n];
        double[] axis = new double[n + 1];
        axis[n] = 1;
        double[] onward = new double[n + 1];
        onward[n] = Math.Sign(range.To - range.From);
        curve.SystemAt(position).Regime(0, start, curve.Regime);
        if (curve.Correct(position, axis, onward) is { } point) return point;
        throw new InvalidOperationException(string.Create(
            CultureInfo.InvariantCulture,
            $"No isolated equilibrium of {system.Description.Name} was found near the start at {system.Description.Parameters[parameter].Name} = {range.From:G6}: {(curve.LastWasNotFinite ? "the rates are not finite there" : "Newton's method does not converge, or equilibria form a continuum")}."));
    }

    private BranchResult Run(CancellationToken cancellation)
    {
        Record(last, 0, range.From);
        double step = options.MaximumStep / 4;
        while (end is null)
        {
            cancellation.ThrowIfCancellationRequested();
            step = points.Count >= options.MaximumPoints
                ? End(BranchEnd.PointLimit, $"The limit of {options.MaximumPoints} points was used up.")
                : Advance(Math.Min(step, options.MaximumStep));
        }

        return new BranchResult
        {
            Description = system.Description,
            ParameterIndex = parameter,
            From = range.From,
            To = range.To,
            Points = points,
            SpecialPoints = special,
            End = end.Value,
            EndText = endText,
            RejectedSteps = rejected,
            JacobianEvaluations = curve.JacobianEvaluations,
        };
    }

    /// <summary>Tries one step and returns the length of the next.</summary>
    private double Advance(double step)
    {
        if (locator.At(last, step) is not { } next || !BelongsTogether(last, next, step)) return Reject(step);
        if (next.UnstableCount + next.StableCount < last.UnstableCount + last.StableCount && nudges < MaximumNudges)
        {
            nudges++;
            return step * Nudge;
        }

        if (locator.Between(last, next, step) is not { } found) return Reject(step);
        nudges = 0;
        bool grow = next.Iterations <= ComfortableIterations && Cosine(last, next) >= ComfortableCosine;
        BranchStop? bound = bounds.FirstPassed(last, next);
        BranchStop? surface = surfaces.FirstPassed(last, next, step);
        BranchStop? stop = bound is null || (surface is not null && surface.Along < bound.Along) ? surface : bound;
        Record(found, stop?.Along ?? double.PositiveInfinity);
        if (stop is null)
        {
            Record(next, Distance(last, next));
            last = next;
        }
        else
        {
            Record(stop.Point, Distance(last, stop.Point), stop.Parameter);
            last = stop.Point;
            if (stop.Switches.Count > 0) PassSurface(stop);
            else EndAtBound(stop);
        }

        return grow ? step * Growth : step;
    }

    private static bool BelongsTogether(CurvePoint from, CurvePoint to, double step)
    {
        double miss = 0;
        for (int i = 0; i < from.Position.Length; i++)
            miss = Math.Max(miss, Math.Abs(from.Position[i] + step * from.Tangent[i] - to.Position[i]));
        return miss <= 0.5 * step && Cosine(from, to) >= SmallestCosine;
    }

    private double Reject(double step)
    {
        rejected++;
        if (step / 2 >= options.MinimumStep) return step / 2;
        return curve.LastWasNotFinite
            ? End(BranchEnd.NotFinite, "The rates or their derivatives are not finite beyond the last point.")
            : End(BranchEnd.StepTooSmall, "No equilibrium was found near the last one, however short the step.");
    }

    private double End(BranchEnd reason, string text)
    {
        end = reason;
        endText = text;
        return 0;
    }

    private void EndAtBound(BranchStop stop)
    {
        if (stop.End == BranchEnd.StartValueReached && IsFirstPoint(stop.Point))
            End(BranchEnd.ReturnedToStart, "The branch closed on itself: it came back to its first point.");
        else
            End(stop.End, stop.Text);
    }

    private bool IsFirstPoint(CurvePoint point)
    {
        double[] state = curve.StateOf(point.Position);
        for (int i = 0; i < state.Length; i++)
        {
            double difference = state[i] - points[0].State[i];
            if (system.Description.States[i].AnglePeriod is { } period) difference = Math.IEEERemainder(difference, period);
            if (!(Math.Abs(difference) <= 1e-6 * curve.Scales[i])) return false;
        }

        return true;
    }

    /// <summary>Goes on in the regime beyond a surface if the equilibrium continues there.</summary>
    private void PassSurface(BranchStop stop)
    {
        CurvePoint before = stop.Point;
        foreach ((int index, double entry) in stop.Switches) curve.Regime[index] = entry;
        CurvePoint? after = curve.ResidualAt(before.Position) <= ContinuousRates ? Beyond(before, stop.Switches[0].Index) : null;
        string evidence = stop.Text + (after is null
            ? " The rates jump there: no ordinary equilibrium continues beyond; the system may rest by sliding on the surface."
            : before.ParameterSlope * after.ParameterSlope < 0
                ? " The branch goes on with another slope and turns back in the parameter there."
                : " The branch goes on with another slope.");
        int unstable = before.UnstableCount;
        Record(SpecialPointKind.SurfaceContact, before, 0, (unstable, after?.UnstableCount ?? unstable), evidence, points.Count - 1);
        if (after is null) End(BranchEnd.SurfaceReached, evidence);
        else last = after;
    }

    /// <summary>The point on a surface with the tangent that leads away from it into the regime locked now.</summary>
    private CurvePoint? Beyond(CurvePoint onSurface, int index)
    {
        if (curve.TangentAt(onSurface.Position, onSurface.Tangent) is not { } tangent) return null;
        double entry = curve.Regime[index];
        if (!LeadsInto(onSurface, tangent, index, entry))
        {
            for (int i = 0; i < tangent.Length; i++) tangent[i] = -tangent[i];
            if (!LeadsInto(onSurface, tangent, index, entry)) return null;
        }

        return curve.Correct(onSurface.Position, tangent, tangent);
    }

    private bool LeadsInto(CurvePoint onSurface, double[] tangent, int index, double entry)
    {
        double[] probe = new double[tangent.Length];
        for (int i = 0; i < probe.Length; i++) probe[i] = onSurface.Position[i] + SideProbe * tangent[i];
        double[] values = new double[curve.Regime.Length];
        curve.SystemAt(probe).SwitchingFunctions(0, curve.StateOf(probe), curve.Regime, values);
        return system.Description.Switches[index].SideOf(values[index], curve.Regime[index]) == entry;
    }

    private void Record(CurvePoint point, double distance, double? parameterValue = null)
    {
        arcLength += distance;
        points.Add(new FollowedEquilibrium(
            parameterValue ?? point.Parameter * curve.Scales[^1],
            curve.StateOf(point.Position),
            point.Eigenvalues,
            point.UnstableCount,
            point.StableCount == point.Eigenvalues.Length,
            arcLength,
            point.Residual));
    }

    private void Record(List<SpecialPointLocator.Located> found, double until)
    {
        // A special point on the bound itself belongs to the branch; crossings are located to about the square root of rounding.
        const double Slack = 1e-7;
        int unstable = last.UnstableCount;
        foreach (SpecialPointLocator.Located located in found)
        {
            if (located.Along > until + Slack) break;
            int after = unstable + located.UnstableChange;
            string evidence = SpecialPointLocator.Evidence(located, located.Point.Parameter * curve.Scales[^1]);
            Record(located.Kind, located.Point, located.Condition, (unstable, after), evidence, points.Count - 1);
            unstable = after;
        }
    }

    private void Record(
        SpecialPointKind kind, CurvePoint point, double condition, (int Before, int After) counts, string evidence, int afterPoint) =>
        special.Add(new SpecialPoint
        {
            Kind = kind,
            // A special point on a bound may come out a rounding beyond it.
            Parameter = Math.Clamp(point.Parameter * curve.Scales[^1], Math.Min(range.From, range.To), Math.Max(range.From, range.To)),
            State = curve.StateOf(point.Position),
            Eigenvalues = point.Eigenvalues,
            Frequency = kind == SpecialPointKind.HopfPoint ? SpecialPointLocator.CriticalFrequency(point) : null,
            Residual = point.Residual,
            Condition = condition,
            UnstableCounts = counts,
            AfterPoint = afterPoint,
            Evidence = evidence,
        });

    private static double Cosine(CurvePoint from, CurvePoint to)
    {
        double cosine = 0;
        for (int i = 0; i < from.Tangent.Length; i++) cosine += from.Tangent[i] * to.Tangent[i];
        return cosine;
    }

    private static double Distance(CurvePoint from, CurvePoint to)
    {
        double sum = 0;
        for (int i = 0; i < from.Position.Length; i++) sum += Math.Pow(to.Position[i] - from.Position[i], 2);
        return Math.Sqrt(sum);
    }
}
