using OdeDsl.LinearAlgebra;

namespace OdeDsl.Integration;

/// <summary>
/// Searches a step for the first place where a guard stops being positive, on the step's continuation: at seven places between
/// which each guard is followed by the polynomial through them, so that a dip between two places is seen by its slopes.
/// </summary>
internal sealed class CrossingSearch
{
    /// <summary>The number of places. A guard linear in the state is a polynomial of degree four at most: represented exactly.</summary>
    private const int Places = 7;

    /// <summary>A dip whose estimated depth ends above this part of the guard's range over the step is not looked into.</summary>
    private const double DipMargin = 0.25;

    /// <summary>Chebyshev coefficients of degree five and six above this part of the range: the guard is not resolved.</summary>
    private const double LargestTail = 0.02;

    /// <summary>A step of no more than so many units of rounding of the time has no inside: only its end is looked at.</summary>
    private const double MinuteStep = 1024;

    /// <summary>Refinements of a dip's lowest place; halvings towards a start on a surface.</summary>
    private const int Refinements = 40;

    // Chebyshev's extreme points on [0, 1] and the matrix that differentiates the polynomial through values there (L. N. Trefethen,
    // Spectral Methods in MATLAB, 2000, chapter 6).
    private static readonly double[] Theta = [.. Enumerable.Range(0, Places).Select(static i => (1 - Math.Cos(Math.PI * i / (Places - 1))) / 2)];
    private static readonly double[,] Differentiation = DifferentiationMatrix();

    private readonly GuardSet guards;
    private readonly double[] samples;
    private readonly double[] values;
    private readonly double[] state;
    private readonly double[] slopes = new double[Places];
    private readonly Func<double, double> guardAt;
    private Stepper? stepper;
    private int watched;

    public CrossingSearch(GuardSet guards, int stateCount)
    {
        this.guards = guards;
        samples = new double[Places * guards.Count];
        values = new double[guards.Count];
        state = new double[stateCount];
        guardAt = GuardAt;
    }

    /// <summary>The guard found.</summary>
    public int Found { get; private set; }

    /// <summary>When it stops being positive.</summary>
    public double Time { get; private set; }

    /// <summary>Whether a guard is not positive at the end of the step, so that the next start needs a look.</summary>
    public bool EndsOnSurface { get; private set; }

    /// <summary>Searches the step that a stepper holds.</summary>
    public SearchOutcome Search(Stepper held)
    {
        stepper = held;
        int count = guards.Count;
        for (int i = 0; i < Places; i++)
        {
            Sample(i, samples.AsSpan(i * count, count));
            for (int k = 0; k < count; k++)
            {
                if (double.IsNaN(samples[i * count + k])) return SearchOutcome.Unresolved;
            }
        }

        Found = -1;
        bool isMinute = Math.Abs(held.EndTime - held.StartTime) <= MinuteStep * Ulp(held.EndTime);
        Time = held.EndTime;
        EndsOnSurface = false;
        for (int guard = 0; guard < count; guard++)
        {
            EndsOnSurface |= guard < guards.SectionIndex && Value(guard, Places - 1) <= 0;
            if (!MayCross(guard)) continue;
            if (isMinute)
            {
                if (StartsArmed(guard) && Value(guard, Places - 1) <= 0) (Found, Time) = (guard, held.EndTime);
                continue;
            }

            if (!IsResolved(guard)) return SearchOutcome.Unresolved;
            SearchGuard(guard);
        }

        return Found >= 0 ? SearchOutcome.Found : SearchOutcome.Nothing;
    }

    // The polynomial through the places shows a guard truly only if its highest Chebyshev coefficients are small; otherwise the step is too
    // long for this guard. Rounding is left alone.
    private bool IsResolved(int guard)
    {
        double fifth = 0, sixth = 0, lowest = double.PositiveInfinity, highest = double.NegativeInfinity;
        for (int i = 0; i < Places; i++)
        {
            double value = Value(guard, i), weight = i is 0 or Places - 1 ? 0.5 : 1;
            fifth += weight * value * Math.Cos(Math.PI * 5 * i / (Places - 1));
            sixth += weight * value * (i % 2 == 0 ? 0.5 : -0.5);
            lowest = Math.Min(lowest, value);
            highest = Math.Max(highest, value);
        }

        double tail = (Math.Abs(fifth) + Math.Abs(sixth)) * 2 / (Places - 1), range = highest - lowest;
        return tail <= LargestTail * range || range <= guards.Rounding(guard, stepper!.EndTime, stepper.End.AsSpan(0, state.Length));
    }

    private void Sample(int place, Span<double> to)
    {
        double time = TimeOf(place);
        if (place == 0) guards.Evaluate(time, stepper!.Start.AsSpan(0, state.Length), to);
        else if (place == Places - 1) guards.Evaluate(time, stepper!.End.AsSpan(0, state.Length), to);
        else
        {
            stepper!.Evaluate(time, state);
            guards.Evaluate(time, state, to);
        }
    }

    private double TimeOf(int place)
    {
        if (place == 0) return stepper!.StartTime;
        if (place == Places - 1) return stepper!.EndTime;
        return stepper!.StartTime + Theta[place] * (stepper.EndTime - stepper.StartTime);
    }

    private double Value(int guard, int place) => samples[place * guards.Count + guard];

    // A guard that varies by less than its distance from zero is out of reach.
    private bool MayCross(int guard)
    {
        double lowest = double.PositiveInfinity, highest = double.NegativeInfinity;
        for (int i = 0; i < Places; i++)
        {
            lowest = Math.Min(lowest, Value(guard, i));
            highest = Math.Max(highest, Value(guard, i));
        }

        return lowest <= highest - lowest;
    }

    /// <summary>Whether a guard was positive where the step searched last starts.</summary>
    public bool StartsArmed(int guard) => Value(guard, 0) > 0 && !guards.IsLeft(guard);

    private void SearchGuard(int guard)
    {
        watched = guard;
        Differentiate(guard);
        bool armed = StartsArmed(guard);
        for (int i = 0; i + 1 < Places; i++)
        {
            if (armed && Place(i) >= Place(Time)) return;
            double here = Value(guard, i), next = Value(guard, i + 1);
            if (!armed)
            {
                // A start on the surface that rises from it and is back before the first place.
                if (i == 0 && slopes[0] > 0 && next <= 0) SearchHop(i);
                armed = next > 0;
                continue;
            }

            if (next <= 0)
            {
                Keep(Root(TimeOf(i), here, TimeOf(i + 1), next));
                return;
            }

            if (slopes[i] < 0 && slopes[i + 1] > 0 && SearchDip(guard, i)) return;
        }
    }

    private bool SearchDip(int guard, int i)
    {
        double width = Theta[i + 1] - Theta[i], here = Value(guard, i), next = Value(guard, i + 1), range = 0;
        for (int k = 0; k < Places; k++) range = Math.Max(range, Value(guard, k));
        // The cubic with these values and slopes lies above the lower of the two chords of slope.
        double floor = Math.Min(here + slopes[i] * width / 2, next - slopes[i + 1] * width / 2);
        if (floor > DipMargin * range) return false;
        double low = TimeOf(i), high = TimeOf(i + 1);
        for (int k = 0; k < Refinements && Math.Abs(high - low) > 4 * Ulp(high); k++)
        {
            // Golden section keeps a bracket of three; thirds need no memory and the search is rare.
            double a = low + (high - low) / 3, b = high - (high - low) / 3, atA = GuardAt(a), atB = GuardAt(b);
            if (atA <= 0 || atB <= 0)
            {
                (double bottom, double value) = atA <= 0 ? (a, atA) : (b, atB);
                Keep(Root(TimeOf(i), here, bottom, value));
                return true;
            }

            if (atA < atB) high = b;
            else low = a;
        }

        return false;
    }

    private void SearchHop(int i)
    {
        double start = TimeOf(i), end = TimeOf(i + 1), value = Value(watched, i + 1);
        for (int k = 0; k < Refinements; k++)
        {
            double middle = start + (end - start) / 2, at = GuardAt(middle);
            if (at > 0)
            {
                Keep(Root(middle, at, end, value));
                return;
            }

            (end, value) = (middle, at);
        }
    }

    private double Root(double a, double atA, double b, double atB) => BracketedRoot.Find(guardAt, a, atA, b, atB);

    private void Keep(double time)
    {
        if (Found >= 0 && Place(time) >= Place(Time)) return;
        Found = watched;
        Time = time;
    }

    /// <summary>The found guard at a time inside the step held.</summary>
    public double ValueAt(double time)
    {
        watched = Found;
        return GuardAt(time);
    }

    private double GuardAt(double time)
    {
        stepper!.Evaluate(time, state);
        guards.Evaluate(time, state, values);
        return values[watched];
    }

    private double Place(int place) => Place(TimeOf(place));

    private double Place(double time) => (time - stepper!.StartTime) * guards.Direction;

    private void Differentiate(int guard)
    {
        for (int i = 0; i < Places; i++)
        {
            double sum = 0;
            for (int k = 0; k < Places; k++) sum += Differentiation[i, k] * Value(guard, k);
            slopes[i] = sum;
        }
    }

    private static double Ulp(double value) => Math.BitIncrement(Math.Abs(value)) - Math.Abs(value);

    private static double[,] DifferentiationMatrix()
    {
        var matrix = new double[Places, Places];
        for (int i = 0; i < Places; i++)
        {
            double sum = 0;
            for (int k = 0; k < Places; k++)
            {
                if (k == i) continue;
                double ends = (i is 0 or Places - 1 ? 2.0 : 1) / (k is 0 or Places - 1 ? 2 : 1);
                matrix[i, k] = ends * ((i + k) % 2 == 0 ? 1 : -1) / (Theta[i] - Theta[k]);
                sum += matrix[i, k];
            }

            // Constants have no slope.
            matrix[i, i] = -sum;
        }

        return matrix;
    }
}
