using System.Collections.Immutable;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;

namespace OdeDsl;

/// <summary>Finds where a model rests.</summary>
public static class EquilibriumExtensions
{
    /// <summary>
    /// Finds equilibria within the state bounds: many evenly spread starts, damped Newton's method with the analytic Jacobian, deflation
    /// of those already found, regime by regime for models with switches, and rests by sliding on one switching surface at a time.
    /// Equal inputs give equal results.
    /// </summary>
    /// <remarks>
    /// An infinite bound is replaced, for placing the starts, by ten times max(|initial value|, 1) from the initial value; what is found
    /// beyond still counts. Equilibria are told apart modulo the periods of angles. A continuum of equilibria is reported once.
    /// <see cref="EquilibriumSearchResult.Completeness"/> says how much was searched; it proves nothing.
    /// </remarks>
    /// <param name="system">The system.</param>
    /// <param name="options">How thoroughly to search.</param>
    /// <param name="cancellationToken">Ends the search.</param>
    /// <returns>The equilibria, classified, and the evidence.</returns>
    /// <exception cref="InvalidOperationException">The model depends on time explicitly.</exception>
    /// <exception cref="ArgumentException">An extra start has the wrong length or is not finite, or a count is negative.</exception>
    /// <exception cref="OperationCanceledException">The search was cancelled.</exception>
    public static EquilibriumSearchResult FindEquilibria(
        this DynamicSystem system, EquilibriumSearchOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(system);
        options ??= new EquilibriumSearchOptions();
        if (options.MinimumStarts < 0 || options.MaximumStarts < 1 || options.MaximumRegimes < 1)
            throw new ArgumentException("The numbers of starts and regimes must be positive.", nameof(options));
        SearchStarts.Require(system, options.ExtraStarts, nameof(options));
        RequireAutonomous(system, "has no equilibria in the sense of constant states");
        return EquilibriumSearch.Run(system, options, cancellationToken);
    }

    /// <inheritdoc cref="FindEquilibria(DynamicSystem, EquilibriumSearchOptions?, CancellationToken)"/>
    /// <typeparam name="TModel">The model class.</typeparam>
    /// <typeparam name="TSystem">Its equations.</typeparam>
    /// <param name="model">The model, with the parameters and the initial state it holds now.</param>
    /// <param name="options">How thoroughly to search.</param>
    /// <param name="cancellationToken">Ends the search.</param>
    public static EquilibriumSearchResult FindEquilibria<TModel, TSystem>(
        this IOdeModel<TModel, TSystem> model, EquilibriumSearchOptions? options = null, CancellationToken cancellationToken = default)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem =>
        FindEquilibria(DynamicSystem.Of(model), options, cancellationToken);

    internal static void RequireAutonomous(DynamicSystem system, string consequence)
    {
        if (!system.DependsOnTime) return;
        if (!system.Description.DependsOnTime)
        {
            throw new InvalidOperationException(
                $"A signal that varies with time is bound to an input of {system.Description.Name}, so it {consequence}. Bind a constant value instead.");
        }

        throw new InvalidOperationException(
            $"The rates of {system.Description.Name} depend on time explicitly, so it {consequence}. "
            + "Remove the time dependence, or make the driving a state (for a periodic drive, an angle with a constant rate).");
    }
}
