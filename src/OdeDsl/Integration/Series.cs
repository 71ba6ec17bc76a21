using System.Globalization;
using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>One state or observable along a <see cref="Trajectory"/>. Safe to use from several threads at once.</summary>
public sealed class Series
{
    private readonly Trajectory run;
    private readonly int stateIndex;
    private readonly int observableIndex;

    internal Series(Trajectory run, string name, string unit, int stateIndex, int observableIndex)
    {
        this.run = run;
        Name = name;
        Unit = unit;
        this.stateIndex = stateIndex;
        this.observableIndex = observableIndex;
        Values = new double[run.Store.NodeCount];
        for (int node = 0; node < Values.Length; node++) Values[node] = Evaluate(run.SystemAt(node), run.Store.Times[node], run.Store.State(node));
    }

    /// <summary>The name of the state or observable.</summary>
    public string Name { get; }

    /// <summary>The unit, or the empty string.</summary>
    public string Unit { get; }

    /// <summary>The times of the steps' ends, the start first.</summary>
    public ReadOnlySpan<double> Times => run.Times;

    /// <summary>The values at <see cref="Times"/>.</summary>
    public double[] Values { get; }

    /// <summary>The value at the end of the run.</summary>
    public double Final => Values[^1];

    /// <summary>The smallest value, searched between the steps' ends too, and its time; the first if there are several.</summary>
    public Extremum Minimum => ExtremumSearch.Find(this, sign: 1);

    /// <summary>The largest value, searched between the steps' ends too, and its time; the first if there are several.</summary>
    public Extremum Maximum => ExtremumSearch.Find(this, sign: -1);

    /// <summary>The name, the unit and the range, in invariant culture.</summary>
    /// <returns>For example <c>Level: -15.2 to 3.1 m</c>.</returns>
    public override string ToString() => string.Create(CultureInfo.InvariantCulture, $"{Name}: {Minimum.Value:G6} to {Maximum.Value:G6} {Unit}").TrimEnd();

    internal int StepCount => run.Store.NodeCount - 1;

    /// <summary>The value at a time.</summary>
    /// <param name="time">A time within the run.</param>
    /// <returns>The value.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The time lies outside the run or is not a number.</exception>
    public double At(double time)
    {
        run.RequireInside(time);
        if (StepCount == 0) return Values[0];
        int step = run.Store.StepOf(time);
        return Inside(step, run.Store.Theta(step, time));
    }

    /// <summary>Values at equally spaced times, both ends included.</summary>
    /// <param name="count">How many, at least 2.</param>
    /// <returns>The values at <see cref="Trajectory.SampleTimes"/>.</returns>
    /// <exception cref="ArgumentOutOfRangeException">Fewer than 2.</exception>
    public double[] Sample(int count)
    {
        double[] samples = run.SampleTimes(count);
        for (int i = 0; i < count; i++) samples[i] = At(samples[i]);
        return samples;
    }

    /// <summary>The value at a place inside a step.</summary>
    internal double Inside(int step, double theta)
    {
        if (stateIndex >= 0) return run.Store.Value(step, theta, stateIndex);
        Span<double> state = stackalloc double[Trajectory.SmallStateCount];
        if (run.StateCount > state.Length) state = new double[run.StateCount];
        run.Store.Evaluate(step, theta, state);
        return Evaluate(run.SystemAt(theta >= 1 ? step + 1 : step), run.Store.TimeAt(step, theta), state[..run.StateCount]);
    }

    internal bool IsJump(int step) => run.Store.IsJump(step);

    internal double TimeAt(int step, double theta) => run.Store.TimeAt(step, theta);

    private double Evaluate(DynamicSystem system, double time, ReadOnlySpan<double> state)
    {
        if (stateIndex >= 0) return state[stateIndex];
        Span<double> values = stackalloc double[Trajectory.SmallStateCount];
        int count = run.System.Description.Observables.Length;
        if (count > values.Length) values = new double[count];
        system.Observables(time, state, values[..count]);
        return values[observableIndex];
    }
}
