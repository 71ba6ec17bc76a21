using OdeDsl.Ensembles;
using OdeDsl.Modeling;

namespace OdeDsl;

/// <summary>Lyapunov exponents: how fast neighbouring motions separate.</summary>
public static class LyapunovExtensions
{
    /// <summary>Estimates the Lyapunov exponents of the motion from the model's state.</summary>
    /// <typeparam name="TModel">The model class.</typeparam>
    /// <typeparam name="TSystem">Its generated equations.</typeparam>
    /// <param name="model">The model; it is not changed.</param>
    /// <param name="options">How long and how finely to follow the motion.</param>
    /// <param name="cancellationToken">Stops the estimation.</param>
    /// <returns>The exponents, largest first, with their uncertainties.</returns>
    /// <exception cref="ArgumentException">An option is out of its range.</exception>
    /// <exception cref="Integration.IntegrationException">The motion cannot be continued, for example because it runs away.</exception>
    /// <exception cref="OperationCanceledException">The estimation was cancelled.</exception>
    public static LyapunovResult LyapunovExponents<TModel, TSystem>(
        this IOdeModel<TModel, TSystem> model, LyapunovOptions? options = null, CancellationToken cancellationToken = default)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem =>
        DynamicSystem.Of(model).LyapunovExponents(options, cancellationToken);

    /// <summary>Estimates the Lyapunov exponents of the motion from the system's initial state.</summary>
    /// <param name="system">The system.</param>
    /// <param name="options">How long and how finely to follow the motion.</param>
    /// <param name="cancellationToken">Stops the estimation.</param>
    /// <returns>The exponents, largest first, with their uncertainties.</returns>
    /// <exception cref="ArgumentException">An option is out of its range.</exception>
    /// <exception cref="Integration.IntegrationException">The motion cannot be continued, for example because it runs away.</exception>
    /// <exception cref="OperationCanceledException">The estimation was cancelled.</exception>
    public static LyapunovResult LyapunovExponents(
        this DynamicSystem system, LyapunovOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(system);
        options ??= new LyapunovOptions();
        LyapunovOptions.Validate(options, system.StateCount);
        return new LyapunovEstimator(system, options, cancellationToken).Run();
    }
}
