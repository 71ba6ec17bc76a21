using System.Globalization;

namespace OdeDsl.Integration;

/// <summary>
/// An integration was cancelled. It is an <see cref="OperationCanceledException"/>, so that callers and tasks treat it as every other
/// cancellation, and an <see cref="IIntegrationFailure"/>, so that the partial results stay available.
/// </summary>
/// <param name="time">The time reached.</param>
/// <param name="step">The size of the step that would have come next.</param>
/// <param name="state">The state at that time.</param>
/// <param name="partial">The run so far, if recorded.</param>
/// <param name="token">The token that asked for it.</param>
public sealed class IntegrationCanceledException(
    double time, double step, IReadOnlyList<double> state, Trajectory? partial, CancellationToken token)
    : OperationCanceledException(string.Create(CultureInfo.InvariantCulture, $"The integration was cancelled at time {time:g9}."), token),
      IIntegrationFailure
{
    /// <inheritdoc/>
    public IntegrationFailure Reason => IntegrationFailure.Cancelled;

    /// <inheritdoc/>
    public double Time { get; } = time;

    /// <inheritdoc/>
    public double Step { get; } = step;

    /// <inheritdoc/>
    public IReadOnlyList<double> State { get; } = state;

    /// <inheritdoc/>
    public Trajectory? Partial { get; } = partial;
}
