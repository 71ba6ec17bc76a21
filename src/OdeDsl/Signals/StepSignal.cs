namespace OdeDsl;

/// <summary>A signal of constant pieces.</summary>
internal sealed class StepSignal : Signal
{
    private readonly double[] values;

    public StepSignal(ReadOnlySpan<double> times, ReadOnlySpan<double> values)
        : base(Checked(times, values)) =>
        this.values = values.ToArray();

    internal override bool IsContinuous => false;

    internal override double At(double time, int piece) => values[piece];

    internal override double SlopeAt(double time, int piece) => 0;

    private static double[] Checked(ReadOnlySpan<double> times, ReadOnlySpan<double> values)
    {
        if (times.Length == 0) throw new ArgumentException("A signal of steps needs a time at least.", nameof(times));
        if (values.Length != times.Length)
            throw new ArgumentException($"Each time needs a value: {times.Length} times, but {values.Length} values were given.", nameof(values));
        for (int i = 0; i < times.Length; i++)
        {
            if (!double.IsFinite(times[i])) throw new ArgumentException($"Time {i} is {times[i]}; times must be finite numbers.", nameof(times));
            if (!double.IsFinite(values[i])) throw new ArgumentException($"Value {i} is {values[i]}; values must be finite numbers.", nameof(values));
            if (i > 0 && !(times[i] > times[i - 1]))
                throw new ArgumentException($"Times must ascend, but time {i} ({times[i]:r}) is not above time {i - 1} ({times[i - 1]:r}).", nameof(times));
        }

        // The first value holds before its time too: no kink there.
        return times[1..].ToArray();
    }
}
