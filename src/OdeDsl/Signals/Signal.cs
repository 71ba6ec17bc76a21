namespace OdeDsl;

/// <summary>
/// The course of an input over time: pieces, each smooth, that meet at kinks. Steps of an integration end on the kinks exactly.
/// Immutable; safe to use from several threads at once if its functions are.
/// </summary>
public abstract class Signal
{
    private readonly double[] kinks;

    private protected Signal(double[] kinks) => this.kinks = kinks;

    /// <summary>The times at which pieces meet, ascending.</summary>
    public ReadOnlySpan<double> Kinks => kinks;

    /// <summary>Whether the value is the same on both sides of every kink.</summary>
    internal abstract bool IsContinuous { get; }

    /// <summary>A signal that jumps: each value holds from its time on, the first one before that too.</summary>
    /// <param name="times">The times, ascending.</param>
    /// <param name="values">A value for each time.</param>
    /// <returns>The signal.</returns>
    /// <exception cref="ArgumentException">No times, another number of values, numbers that are not finite, or times that do not ascend.</exception>
    public static Signal Steps(ReadOnlySpan<double> times, ReadOnlySpan<double> values) => new StepSignal(times, values);

    /// <summary>A signal read from a table over time; its knots are the kinks.</summary>
    /// <param name="course">The table.</param>
    /// <returns>The signal. A table that does not extrapolate ends a run beyond its knots with a <see cref="TableRangeException"/>.</returns>
    public static Signal Of(Table course)
    {
        ArgumentNullException.ThrowIfNull(course);
        return new TableSignal(course);
    }

    /// <summary>A signal computed by a function.</summary>
    /// <param name="value">The value at a time. It must be smooth between the kinks.</param>
    /// <param name="slope">
    /// The derivative by time, which some implicit methods use. <see langword="null"/>: the difference (f(t + h) − f(t − h)) / 2h with
    /// h = 6·10⁻⁶ max(1, |t|), both ends kept within the piece.
    /// </param>
    /// <param name="kinks">The times at which the function jumps or has a kink, in any order.</param>
    /// <returns>The signal.</returns>
    /// <exception cref="ArgumentException">A kink is not a finite number.</exception>
    public static Signal Of(Func<double, double> value, Func<double, double>? slope = null, IEnumerable<double>? kinks = null)
    {
        ArgumentNullException.ThrowIfNull(value);
        double[] sorted = [.. (kinks ?? []).Distinct().Order()];
        if (Array.Exists(sorted, static kink => !double.IsFinite(kink))) throw new ArgumentException("Kinks must be finite numbers.", nameof(kinks));
        return new FunctionSignal(value, slope, sorted);
    }

    /// <summary>The value at a time; at a jump the value after it.</summary>
    /// <param name="time">The time.</param>
    /// <returns>The value.</returns>
    public double At(double time) => At(time, PieceAfter(time));

    /// <summary>The piece that holds a time and what follows: its number is that of the kinks up to the time.</summary>
    internal int PieceAfter(double time)
    {
        int index = kinks.AsSpan().BinarySearch(time);
        return index < 0 ? ~index : index + 1;
    }

    /// <summary>The piece that ends at or after a time.</summary>
    internal int PieceBefore(double time)
    {
        int index = kinks.AsSpan().BinarySearch(time);
        return index < 0 ? ~index : index;
    }

    /// <summary>The value of a piece; times beyond its ends by rounding only.</summary>
    internal abstract double At(double time, int piece);

    /// <summary>The slope of a piece.</summary>
    internal abstract double SlopeAt(double time, int piece);
}
