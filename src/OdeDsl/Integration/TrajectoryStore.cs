namespace OdeDsl.Integration;

/// <summary>
/// The steps of a run: times and states at the nodes, and for each step the coefficients of its continuation (<see cref="DenseStep"/>).
/// Grows while the run is recorded; read-only afterwards.
/// </summary>
internal sealed class TrajectoryStore(int stateCount, double time, ReadOnlySpan<double> state)
{
    private double[] times = [time];
    private double[] states = state[..stateCount].ToArray();
    private double[] coefficients = [];

    /// <summary>The number of nodes: one more than steps.</summary>
    public int NodeCount { get; private set; } = 1;

    /// <summary>The times of the nodes, ascending or descending.</summary>
    public ReadOnlySpan<double> Times => times.AsSpan(0, NodeCount);

    /// <summary>The state at a node.</summary>
    public ReadOnlySpan<double> State(int node) => states.AsSpan(node * stateCount, stateCount);

    /// <summary>Adds the step that a stepper holds.</summary>
    public void Append(Stepper stepper)
    {
        stepper.EnsureDense();
        int step = NodeCount - 1, stride = DenseStep.CoefficientCount * stateCount;
        Grow(ref times, NodeCount + 1);
        Grow(ref states, (NodeCount + 1) * stateCount);
        Grow(ref coefficients, (step + 1) * stride);
        times[NodeCount] = stepper.EndTime;
        stepper.End.AsSpan(0, stateCount).CopyTo(states.AsSpan(NodeCount * stateCount));
        Span<double> to = coefficients.AsSpan(step * stride, stride);
        stepper.D2.AsSpan(0, stateCount).CopyTo(to);
        stepper.D3.AsSpan(0, stateCount).CopyTo(to[stateCount..]);
        stepper.D4.AsSpan(0, stateCount).CopyTo(to[(2 * stateCount)..]);
        NodeCount++;
    }

    /// <summary>The step whose times hold a time.</summary>
    public int StepOf(double time)
    {
        bool forward = times[NodeCount - 1] >= times[0];
        int low = 0, high = NodeCount - 1;
        while (high - low > 1)
        {
            int middle = (low + high) / 2;
            if (forward ? time >= times[middle] : time <= times[middle]) low = middle;
            else high = middle;
        }

        return low;
    }

    /// <summary>Where a time lies inside a step: 0 at its start, 1 at its end.</summary>
    public double Theta(int step, double time) => (time - times[step]) / (times[step + 1] - times[step]);

    /// <summary>The time at a place inside a step.</summary>
    public double TimeAt(int step, double theta) =>
        theta >= 1 ? times[step + 1] : times[step] + theta * (times[step + 1] - times[step]);

    /// <summary>One state inside a step.</summary>
    public double Value(int step, double theta, int index)
    {
        ReadOnlySpan<double> d = Coefficients(step);
        return DenseStep.Value(
            theta, State(step)[index], State(step + 1)[index], d[index], d[stateCount + index], d[2 * stateCount + index]);
    }

    /// <summary>The derivative of one state by the place inside a step.</summary>
    public double Slope(int step, double theta, int index)
    {
        ReadOnlySpan<double> d = Coefficients(step);
        return DenseStep.Slope(
            theta, State(step)[index], State(step + 1)[index], d[index], d[stateCount + index], d[2 * stateCount + index]);
    }

    /// <summary>All states inside a step.</summary>
    public void Evaluate(int step, double theta, Span<double> state)
    {
        ReadOnlySpan<double> d = Coefficients(step);
        DenseStep.Evaluate(
            theta, State(step), State(step + 1), d[..stateCount], d.Slice(stateCount, stateCount), d[(2 * stateCount)..], state[..stateCount]);
    }

    private static void Grow(ref double[] array, int count)
    {
        if (count > array.Length) Array.Resize(ref array, Math.Max(count, Math.Max(64, 2 * array.Length)));
    }

    private ReadOnlySpan<double> Coefficients(int step)
    {
        int stride = DenseStep.CoefficientCount * stateCount;
        return coefficients.AsSpan(step * stride, stride);
    }
}
