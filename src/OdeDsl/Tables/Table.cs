namespace OdeDsl;

/// <summary>
/// A function given by its values at knots: a pump curve, a valve characteristic, a measured course. Immutable and safe to use from
/// several threads at once; evaluation does not allocate.
/// </summary>
/// <remarks>
/// In a model a table is a static read-only member marked with <see cref="TableAttribute"/>; equations read it by <see cref="At(double)"/>.
/// Its knots are surfaces of a switching function there, so that no step of an integration runs across a kink unseen.
/// </remarks>
public sealed partial class Table
{
    private readonly double[] knots;
    private readonly double[] values;

    /// <summary>Makes a table.</summary>
    /// <param name="knots">The arguments, ascending, at least 2.</param>
    /// <param name="values">The value at each knot.</param>
    /// <param name="interpolation">How the function runs between knots.</param>
    /// <param name="extrapolation">What it says outside them.</param>
    /// <exception cref="ArgumentException">
    /// Fewer than two knots, another number of values, a number that is not finite, knots that do not ascend or lie so close that a slope
    /// between them is not finite. The message names the place.
    /// </exception>
    /// <exception cref="ArgumentOutOfRangeException">There is no such interpolation or extrapolation.</exception>
    public Table(ReadOnlySpan<double> knots, ReadOnlySpan<double> values, Interpolation interpolation, Extrapolation extrapolation)
    {
        if (!Enum.IsDefined(interpolation)) throw new ArgumentOutOfRangeException(nameof(interpolation), interpolation, "There is no such interpolation.");
        if (!Enum.IsDefined(extrapolation)) throw new ArgumentOutOfRangeException(nameof(extrapolation), extrapolation, "There is no such extrapolation.");
        Validate(knots, values);
        this.knots = knots.ToArray();
        this.values = values.ToArray();
        Interpolation = interpolation;
        Extrapolation = extrapolation;
        density = (knots.Length - 1) / (knots[^1] - knots[0]);
        segments = MakeSegments();
    }

    /// <summary>The arguments at which values are given, ascending.</summary>
    public ReadOnlySpan<double> Knots => knots;

    /// <summary>The value at each knot.</summary>
    public ReadOnlySpan<double> Values => values;

    /// <summary>How the function runs between knots.</summary>
    public Interpolation Interpolation { get; }

    /// <summary>What it says outside them.</summary>
    public Extrapolation Extrapolation { get; }

    /// <summary>The value at an argument; at a knot exactly the value given there.</summary>
    /// <param name="x">The argument; NaN and the infinities give NaN.</param>
    /// <returns>The value.</returns>
    /// <exception cref="TableRangeException">The argument lies outside the knots and <see cref="Extrapolation.Fail"/> was chosen.</exception>
    public double At(double x)
    {
        if (Extrapolation == Extrapolation.Fail && (x < knots[0] || x > knots[^1])) throw new TableRangeException(x, knots[0], knots[^1]);
        return At(x, Segment(x));
    }

    private static void Validate(ReadOnlySpan<double> knots, ReadOnlySpan<double> values)
    {
        if (knots.Length < 2) throw new ArgumentException($"A table needs at least two knots, but {knots.Length} were given.", nameof(knots));
        if (values.Length != knots.Length)
            throw new ArgumentException($"A table needs one value per knot: {knots.Length} knots, but {values.Length} values were given.", nameof(values));
        for (int i = 0; i < knots.Length; i++)
        {
            if (!double.IsFinite(knots[i])) throw new ArgumentException($"Knot {i} is {knots[i]}; knots must be finite numbers.", nameof(knots));
            if (!double.IsFinite(values[i])) throw new ArgumentException($"Value {i} is {values[i]}; values must be finite numbers.", nameof(values));
            if (i == 0) continue;
            if (!(knots[i] > knots[i - 1]))
                throw new ArgumentException($"Knots must ascend, but knot {i} ({knots[i]:r}) is not above knot {i - 1} ({knots[i - 1]:r}).", nameof(knots));
            if (!double.IsFinite((values[i] - values[i - 1]) / (knots[i] - knots[i - 1])))
                throw new ArgumentException($"The slope between knots {i - 1} and {i} is not a finite number.", nameof(knots));
        }
    }
}
