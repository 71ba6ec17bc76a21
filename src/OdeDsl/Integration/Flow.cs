using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>
/// The flow of a system as a reusable map from state to state, with tangents on request: what analyses integrate with.
/// Preallocated; not safe to use from several threads at once. Time may run backwards.
/// </summary>
public sealed class Flow
{
    private readonly DynamicSystem system;
    private readonly FlowOptions options;
    private readonly Dictionary<int, Motion> motions = [];
    private double[] position = [];

    /// <summary>Makes a flow.</summary>
    /// <param name="system">The system.</param>
    /// <param name="options">How to integrate; <see langword="null"/>: relative tolerance 10⁻⁹, automatic choice of the method.</param>
    /// <exception cref="ArgumentException">An option has no meaning.</exception>
    public Flow(DynamicSystem system, FlowOptions? options = null)
    {
        ArgumentNullException.ThrowIfNull(system);
        this.system = system;
        this.options = options ?? new FlowOptions();
        this.options.Validate();
    }

    /// <summary>The system.</summary>
    public DynamicSystem System => system;

    /// <summary>Evaluations of the rates since the flow was made.</summary>
    public long RateEvaluations => motions.Values.Sum(static motion => motion.Statistics.RateEvaluations);

    /// <summary>Steps accepted since the flow was made.</summary>
    public long AcceptedSteps => motions.Values.Sum(static motion => motion.Statistics.AcceptedSteps);

    /// <summary>Whether the last run slid along a surface for a while.</summary>
    public bool Slid { get; private set; }

    /// <summary>Carries a state from one time to another.</summary>
    /// <param name="state">The state, n values, replaced by the state at the end.</param>
    /// <param name="from">The start time.</param>
    /// <param name="to">The end time; before the start time: backwards.</param>
    /// <param name="cancellationToken">Ends the run at the next step.</param>
    /// <exception cref="IntegrationException">The end time cannot be reached; the state is then as it was given.</exception>
    /// <exception cref="IntegrationCanceledException">The run was cancelled.</exception>
    public void Advance(Span<double> state, double from, double to, CancellationToken cancellationToken = default) =>
        Advance(state, [], 0, from, to, cancellationToken);

    /// <summary>Carries a state and tangents from one time to another.</summary>
    /// <param name="state">The state, n values, replaced by the state at the end.</param>
    /// <param name="tangents">
    /// n × k values by rows: each column is a small displacement of the state, replaced by what the flow makes of it
    /// (variational equation; at crossings the saltation matrix).
    /// </param>
    /// <param name="tangentCount">The number k of tangents.</param>
    /// <param name="from">The start time.</param>
    /// <param name="to">The end time; before the start time: backwards.</param>
    /// <param name="cancellationToken">Ends the run at the next step.</param>
    /// <exception cref="IntegrationException">The end time cannot be reached; state and tangents are then as they were given.</exception>
    /// <exception cref="IntegrationCanceledException">The run was cancelled.</exception>
    public void Advance(
        Span<double> state, Span<double> tangents, int tangentCount, double from, double to, CancellationToken cancellationToken = default)
    {
        double time = from;
        Run(state, tangents, tangentCount, ref time, to, null, cancellationToken);
    }

    /// <summary>Carries a state, and tangents, to the next crossing of a section.</summary>
    /// <param name="state">The state, n values, replaced by the state at the crossing.</param>
    /// <param name="tangents">
    /// n × k values by rows, or empty. They are carried to the time of the crossing, not projected onto the section.
    /// </param>
    /// <param name="tangentCount">The number k of tangents.</param>
    /// <param name="time">The start time, replaced by the time of the crossing.</param>
    /// <param name="latest">When to give up; before the start time: backwards.</param>
    /// <param name="section">The section. A start on it does not count: the motion must leave it first.</param>
    /// <param name="cancellationToken">Ends the run at the next step.</param>
    /// <returns><see langword="true"/> at a crossing; <see langword="false"/> if the latest time came first (state and time are those there).</returns>
    /// <exception cref="IntegrationException">The run cannot go on; state and tangents are then as they were given.</exception>
    /// <exception cref="IntegrationCanceledException">The run was cancelled.</exception>
    /// <exception cref="ArgumentException">The section does not fit the system.</exception>
    public bool AdvanceToSection(
        Span<double> state,
        Span<double> tangents,
        int tangentCount,
        ref double time,
        double latest,
        Section section,
        CancellationToken cancellationToken = default)
    {
        if (section.Normal is null || section.Normal.Length != system.StateCount || Array.TrueForAll(section.Normal, static x => x == 0))
            throw new ArgumentException($"A section needs a normal of {system.StateCount} numbers, not all zero.", nameof(section));
        return Run(state, tangents, tangentCount, ref time, latest, section, cancellationToken);
    }

    private bool Run(
        Span<double> state,
        Span<double> tangents,
        int tangentCount,
        ref double time,
        double to,
        Section? section,
        CancellationToken cancellationToken)
    {
        int n = system.StateCount;
        ArgumentOutOfRangeException.ThrowIfNegative(tangentCount);
        if (state.Length != n) throw new ArgumentException($"The state must have {n} values.", nameof(state));
        if (tangents.Length < n * tangentCount) throw new ArgumentException($"{tangentCount} tangents need {n * tangentCount} values.", nameof(tangents));
        if (!double.IsFinite(time) || !double.IsFinite(to)) throw new ArgumentException("Times must be finite numbers.", nameof(to));
        Slid = false;
        if (time == to) return false;
        Motion motion = MotionFor(tangentCount);
        Pack(state, tangents, tangentCount);
        bool reached = false;
        try
        {
            motion.Begin(time, position.AsSpan(0, n * (1 + tangentCount)), section);
            while (motion.Time != to && !reached)
            {
                if (cancellationToken.IsCancellationRequested) throw MotionFailure.Cancelled(motion, n, null, cancellationToken);
                StepStatus status = motion.Step(to);
                if (status != StepStatus.Accepted) throw MotionFailure.Of(status, motion, n, null);
                reached = motion.ReachedSection;
                if (!motion.EventsDue) continue;
                status = motion.Fire();
                if (status == StepStatus.Accepted && motion.IsOver && motion.Time != to) status = StepStatus.TerminalEvent;
                if (status != StepStatus.Accepted) throw MotionFailure.Of(status, motion, n, null);
            }
        }
        catch (Exception thrown) when (thrown is not IIntegrationFailure)
        {
            throw MotionFailure.Of(thrown, motion, n, null);
        }

        Slid = motion.Slid;
        time = motion.Time;
        Unpack(motion.Position, state, tangents, tangentCount);
        return reached;
    }

    private Motion MotionFor(int tangentCount)
    {
        if (motions.TryGetValue(tangentCount, out Motion? motion)) return motion;
        motion = new Motion(system, options, tangentCount);
        motions.Add(tangentCount, motion);
        if (position.Length < system.StateCount * (1 + tangentCount)) position = new double[system.StateCount * (1 + tangentCount)];
        return motion;
    }

    // Callers hold tangents as the columns of a matrix by rows; the motion carries them one after the other.
    private void Pack(ReadOnlySpan<double> state, ReadOnlySpan<double> tangents, int tangentCount)
    {
        int n = state.Length;
        state.CopyTo(position);
        for (int c = 0; c < tangentCount; c++)
        {
            for (int i = 0; i < n; i++) position[n * (1 + c) + i] = tangents[i * tangentCount + c];
        }
    }

    private static void Unpack(ReadOnlySpan<double> position, Span<double> state, Span<double> tangents, int tangentCount)
    {
        int n = state.Length;
        position[..n].CopyTo(state);
        for (int c = 0; c < tangentCount; c++)
        {
            for (int i = 0; i < n; i++) tangents[i * tangentCount + c] = position[n * (1 + c) + i];
        }
    }
}
