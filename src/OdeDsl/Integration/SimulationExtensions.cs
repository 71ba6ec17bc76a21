using OdeDsl.Integration;
using OdeDsl.Modeling;

namespace OdeDsl;

/// <summary>Simulation of models and systems.</summary>
public static class SimulationExtensions
{
    /// <summary>Simulates a model from the state it holds. The model itself is not changed.</summary>
    /// <typeparam name="TModel">The model class.</typeparam>
    /// <typeparam name="TSystem">Its equations.</typeparam>
    /// <param name="model">The model.</param>
    /// <param name="until">The end time.</param>
    /// <param name="options">How to simulate; <see langword="null"/>: relative tolerance 10⁻⁶, automatic choice of the method.</param>
    /// <param name="progress">Receives the part done, 0 to 1, at most a hundred times.</param>
    /// <param name="cancellationToken">Ends the run at the next step.</param>
    /// <returns>The run.</returns>
    /// <exception cref="IntegrationException">The end time cannot be reached; the exception says why and holds the run so far.</exception>
    /// <exception cref="IntegrationCanceledException">The run was cancelled; the exception holds the run so far.</exception>
    /// <exception cref="ArgumentException">The end time, an option, a state or a parameter has no meaning.</exception>
    public static Trajectory Simulate<TModel, TSystem>(
        this IOdeModel<TModel, TSystem> model,
        double until,
        SimulationOptions? options = null,
        IProgress<double>? progress = null,
        CancellationToken cancellationToken = default)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem =>
        DynamicSystem.Of(model).Simulate(until, options, progress, cancellationToken);

    /// <summary>Simulates a system from its initial state.</summary>
    /// <param name="system">The system.</param>
    /// <param name="until">The end time; before the start time: time runs backwards.</param>
    /// <param name="options">How to simulate; <see langword="null"/>: relative tolerance 10⁻⁶, automatic choice of the method.</param>
    /// <param name="progress">Receives the part done, 0 to 1, at most a hundred times.</param>
    /// <param name="cancellationToken">Ends the run at the next step.</param>
    /// <returns>The run.</returns>
    /// <exception cref="IntegrationException">The end time cannot be reached; the exception says why and holds the run so far.</exception>
    /// <exception cref="IntegrationCanceledException">The run was cancelled; the exception holds the run so far.</exception>
    /// <exception cref="ArgumentException">The end time or an option has no meaning.</exception>
    public static Trajectory Simulate(
        this DynamicSystem system,
        double until,
        SimulationOptions? options = null,
        IProgress<double>? progress = null,
        CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(system);
        options ??= new SimulationOptions();
        if (!double.IsFinite(until)) throw new ArgumentOutOfRangeException(nameof(until), until, "The end time must be a finite number.");
        if (!double.IsFinite(options.From)) throw new ArgumentException("The start time must be a finite number.", nameof(options));
        return Simulation.Run(system, until, options, progress, cancellationToken);
    }
}
