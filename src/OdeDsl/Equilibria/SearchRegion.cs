using System.Collections.Immutable;
using OdeDsl.Modeling;

namespace OdeDsl.Equilibria;

/// <summary>
/// The part of state space that searches cover, and how far apart two states are in it. Bounds come from the model; an infinite
/// bound is replaced, for placing starts only, by a distance of <see cref="ReachFactor"/> times max(|initial value|, 1) from the
/// initial value (or from the other bound, if that lies farther out). An angle without both bounds is covered over one period.
/// </summary>
internal sealed class SearchRegion
{
    /// <summary>How far starts are spread from the initial value where the model gives no bound. Our choice.</summary>
    public const double ReachFactor = 10;

    /// <summary>The part of a state's width below which its magnitude no longer counts when accuracies are judged relative to it.</summary>
    private const double LocalFloor = 1e-3;

    /// <summary>Roots within this part of the width outside a bound count as lying on it.</summary>
    private const double BoundSlack = 1e-9;

    /// <summary>A motion this many widths outside its bounds has run away. Our choice.</summary>
    private const double RunawayBounded = 10;

    /// <summary>The same where the model gives no bounds and the width is only a guess.</summary>
    private const double RunawayUnbounded = 1e4;

    private const int PartsPerTurn = 8;

    /// <summary>The accuracy of a root, in widths, that rounding allows at best.</summary>
    private const double RoundingPart = 1e-15;

    /// <summary>A step over more turns than this can follow is not resolved.</summary>
    private const int MostCuts = 1000;

    private readonly double[] trueLower;
    private readonly double[] trueUpper;
    private readonly double[] period;

    public SearchRegion(ModelDescription description, ReadOnlySpan<double> initialState)
    {
        int n = description.States.Length;
        (trueLower, trueUpper, period) = (new double[n], new double[n], new double[n]);
        (Lower, Upper, Width) = (new double[n], new double[n], new double[n]);
        for (int i = 0; i < n; i++)
        {
            StateDescription state = description.States[i];
            period[i] = state.AnglePeriod ?? 0;
            (trueLower[i], trueUpper[i]) = (state.Lower, state.Upper);
            (Lower[i], Upper[i]) = Finite(state, initialState[i]);
            // A state pinned by equal bounds still needs a length to be compared with.
            Width[i] = Upper[i] > Lower[i] ? Upper[i] - Lower[i] : Math.Max(Math.Abs(Upper[i]), 1);
        }
    }

    public int Count => period.Length;

    /// <summary>The corners of the box that starts are spread over: always finite.</summary>
    public double[] Lower { get; }

    public double[] Upper { get; }

    /// <summary>The scale of each state: the width of the box.</summary>
    public double[] Width { get; }

    /// <summary>The period of each angle state; 0 for the others.</summary>
    public ReadOnlySpan<double> Periods => period;

    public static SearchRegion Of(DynamicSystem system) => new(system.Description, system.InitialState);

    /// <summary>The size against which errors in state i are judged at a place.</summary>
    public double LocalScale(int i, double value) =>
        period[i] > 0 ? period[i] : Math.Max(Math.Abs(value), LocalFloor * Width[i]);

    /// <summary>Moves a point of the unit cube into the box.</summary>
    public void Spread(ReadOnlySpan<double> unit, Span<double> state)
    {
        for (int i = 0; i < Count; i++) state[i] = Lower[i] + (unit[i] * (Upper[i] - Lower[i]));
    }

    /// <summary>Moves every angle by whole turns into [-period/2, period/2), or into its bounds if that value is outside them.</summary>
    public void Wrap(Span<double> state)
    {
        for (int i = 0; i < Count; i++)
        {
            double p = period[i];
            if (p <= 0 || !double.IsFinite(state[i])) continue;
            double wrapped = state[i] - (p * Math.Floor((state[i] + (p / 2)) / p));
            if (wrapped >= p / 2) wrapped -= p; // rounding of the quotient
            double slack = BoundSlack * p;
            if (wrapped < trueLower[i] - slack) wrapped += p * Math.Ceiling((trueLower[i] - slack - wrapped) / p);
            else if (wrapped > trueUpper[i] + slack) wrapped -= p * Math.Ceiling((wrapped - trueUpper[i] - slack) / p);
            state[i] = wrapped;
        }
    }

    /// <summary>Puts values that are zero or on a bound up to rounding exactly there.</summary>
    public void Tidy(Span<double> state)
    {
        for (int i = 0; i < Count; i++)
        {
            double near = RoundingPart * Width[i];
            if (Math.Abs(state[i] - trueLower[i]) <= near) state[i] = trueLower[i];
            else if (Math.Abs(state[i] - trueUpper[i]) <= near) state[i] = trueUpper[i];
            else if (Math.Abs(state[i]) <= near) state[i] = 0;
        }
    }

    /// <summary>Whether a wrapped state lies within the model's own bounds.</summary>
    public bool Contains(ReadOnlySpan<double> state)
    {
        for (int i = 0; i < Count; i++)
        {
            double slack = BoundSlack * Width[i];
            if (!(state[i] >= trueLower[i] - slack && state[i] <= trueUpper[i] + slack)) return false;
        }

        return true;
    }

    /// <summary>The difference a - b in state i, the shorter way round for angles.</summary>
    public double Difference(int i, double a, double b) =>
        period[i] > 0 ? Math.IEEERemainder(a - b, period[i]) : a - b;

    /// <summary>The distance of two states: the largest difference in parts of the box's widths.</summary>
    public double Distance(ReadOnlySpan<double> a, ReadOnlySpan<double> b)
    {
        double largest = 0;
        for (int i = 0; i < Count; i++) largest = Math.Max(largest, Math.Abs(Difference(i, a[i], b[i])) / Width[i]);
        return largest;
    }

    /// <summary>The distance of two states relative to their own size: what is left when they are the same up to rounding.</summary>
    public double LocalDistance(ReadOnlySpan<double> a, ReadOnlySpan<double> b)
    {
        double largest = 0;
        for (int i = 0; i < Count; i++)
        {
            double scale = Math.Max(LocalScale(i, a[i]), LocalScale(i, b[i]));
            largest = Math.Max(largest, Math.Abs(Difference(i, a[i], b[i])) / scale);
        }

        return largest;
    }

    /// <summary>How far a state lies outside the box, in widths; 0 inside. Angles are never outside.</summary>
    public double Excess(ReadOnlySpan<double> state)
    {
        double largest = 0;
        for (int i = 0; i < Count; i++)
        {
            if (period[i] > 0) continue;
            double excess = Math.Max(Lower[i] - state[i], state[i] - Upper[i]) / Width[i];
            if (double.IsNaN(excess)) return double.PositiveInfinity;
            largest = Math.Max(largest, excess);
        }

        return largest;
    }

    /// <summary>Into how many parts to cut a step so that no angle turns more than an eighth of its period in one.</summary>
    public int Cuts(ReadOnlySpan<double> from, ReadOnlySpan<double> to, int fewest)
    {
        double turns = 0;
        for (int i = 0; i < Count; i++)
        {
            if (period[i] > 0) turns = Math.Max(turns, Math.Abs(to[i] - from[i]) / period[i]);
        }

        return (int)Math.Clamp(PartsPerTurn * turns, fewest, MostCuts);
    }

    /// <summary>Whether a motion has left for good: angles never do.</summary>
    public bool IsRunaway(ReadOnlySpan<double> state)
    {
        for (int i = 0; i < Count; i++)
        {
            if (period[i] > 0) continue;
            double limit = double.IsFinite(trueLower[i]) && double.IsFinite(trueUpper[i]) ? RunawayBounded : RunawayUnbounded;
            double excess = Math.Max(Lower[i] - state[i], state[i] - Upper[i]) / Width[i];
            if (!(excess <= limit)) return true;
        }

        return false;
    }

    /// <summary>
    /// The distance of a state from a segment, in given units; the ends of the segment lie less than half a period apart.
    /// </summary>
    public double DistanceToSegment(
        ReadOnlySpan<double> state, ReadOnlySpan<double> from, ReadOnlySpan<double> to, ReadOnlySpan<double> units)
    {
        double along = 0, square = 0;
        for (int i = 0; i < Count; i++)
        {
            double segment = (to[i] - from[i]) / units[i];
            along += Difference(i, state[i], from[i]) / units[i] * segment;
            square += segment * segment;
        }

        double fraction = square > 0 ? Math.Clamp(along / square, 0, 1) : 0;
        double largest = 0;
        for (int i = 0; i < Count; i++)
        {
            double gap = (Difference(i, state[i], from[i]) - (fraction * (to[i] - from[i]))) / units[i];
            largest = Math.Max(largest, Math.Abs(gap));
        }

        return largest;
    }

    public ImmutableArray<double> LowerCorner => [.. Lower];

    public ImmutableArray<double> UpperCorner => [.. Upper];

    private static (double Lower, double Upper) Finite(StateDescription state, double initial)
    {
        bool below = double.IsFinite(state.Lower), above = double.IsFinite(state.Upper);
        if (below && above) return (state.Lower, state.Upper);
        if (state.AnglePeriod is double p)
        {
            if (below) return (state.Lower, state.Lower + p);
            return above ? (state.Upper - p, state.Upper) : (-p / 2, p / 2);
        }

        double reach = ReachFactor * Math.Max(Math.Abs(initial), 1);
        double lower = below ? state.Lower : (above ? Math.Min(initial, state.Upper) : initial) - reach;
        double upper = above ? state.Upper : (below ? Math.Max(initial, state.Lower) : initial) + reach;
        return (lower, upper);
    }
}
