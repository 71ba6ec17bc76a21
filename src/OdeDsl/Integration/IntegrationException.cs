using System.Globalization;

namespace OdeDsl.Integration;

/// <summary>An integration could not reach its end time.</summary>
/// <param name="reason">Why.</param>
/// <param name="time">The time reached.</param>
/// <param name="step">The size of the step last tried.</param>
/// <param name="state">The state at that time.</param>
/// <param name="detail">What happened, for the message.</param>
/// <param name="partial">The run so far, if recorded.</param>
/// <param name="innerException">What the equations threw, if they did.</param>
public sealed class IntegrationException(
    IntegrationFailure reason,
    double time,
    double step,
    IReadOnlyList<double> state,
    string detail,
    Trajectory? partial = null,
    Exception? innerException = null)
    : Exception(string.Create(CultureInfo.InvariantCulture, $"The integration stopped at time {time:g9} (step {step:g3}): {detail}"), innerException),
      IIntegrationFailure
{
    /// <inheritdoc/>
    public IntegrationFailure Reason { get; } = reason;

    /// <inheritdoc/>
    public double Time { get; } = time;

    /// <inheritdoc/>
    public double Step { get; } = step;

    /// <inheritdoc/>
    public IReadOnlyList<double> State { get; } = state;

    /// <inheritdoc/>
    public Trajectory? Partial { get; } = partial;
}
