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
    private int[] starts = [0]; // of each step's coefficients; the end of the last one last

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
        ReadOnlySpan<double> continuation = stepper.Continuation;
        int count = continuation.Length / stepper.Dimension, start = starts[NodeCount - 1], end = start + count * stateCount;
        Grow(ref times, NodeCount + 1);
        Grow(ref states, (NodeCount + 1) * stateCount);
        Grow(ref coefficients, end);
        Grow(ref starts, NodeCount + 1);
        times[NodeCount] = stepper.EndTime;
        stepper.End.AsSpan(0, stateCount).CopyTo(states.AsSpan(NodeCount * stateCount));
        for (int k = 0; k < count; k++)
            continuation.Slice(k * stepper.Dimension, stateCount).CopyTo(coefficients.AsSpan(start + k * stateCount));
        starts[NodeCount] = end;
        NodeCount++;
    }

    /// <summary>Adds a jump: a step that takes no time.</summary>
    public void AppendJump(ReadOnlySpan<double> state)
    {
        Grow(ref times, NodeCount + 1);
        Grow(ref states, (NodeCount + 1) * stateCount);
        Grow(ref starts, NodeCount + 1);
        starts[NodeCount] = starts[NodeCount - 1];
        times[NodeCount] = times[NodeCount - 1];
        state.CopyTo(states.AsSpan(NodeCount * stateCount));
        NodeCount++;
    }

    /// <summary>Whether a step is a jump.</summary>
    public bool IsJump(int step) => times[step + 1] == times[step];

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

    /// <summary>Where a time lies inside a step: 0 at its start, 1 at its end and behind a jump.</summary>
    public double Theta(int step, double time) => IsJump(step) ? 1 : (time - times[step]) / (times[step + 1] - times[step]);

    /// <summary>The time at a place inside a step.</summary>
    public double TimeAt(int step, double theta) =>
        theta >= 1 ? times[step + 1] : times[step] + theta * (times[step + 1] - times[step]);

    /// <summary>One state inside a step.</summary>
    public double Value(int step, double theta, int index) =>
        DenseStep.Value(theta, State(step)[index], State(step + 1)[index], Coefficients(step), stateCount, index);

    /// <summary>All states inside a step.</summary>
    public void Evaluate(int step, double theta, Span<double> state) =>
        DenseStep.Evaluate(theta, State(step), State(step + 1), Coefficients(step), stateCount, state[..stateCount]);

    private static void Grow<T>(ref T[] array, int count)
    {
        if (count > array.Length) Array.Resize(ref array, Math.Max(count, Math.Max(64, 2 * array.Length)));
    }

    private ReadOnlySpan<double> Coefficients(int step) => coefficients.AsSpan(starts[step]..starts[step + 1]);
}
