using OdeDsl.Cycles;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;

namespace OdeDsl;

/// <summary>Finds how a model keeps oscillating.</summary>
public static class LimitCycleExtensions
{
    /// <summary>
    /// Finds limit cycles and families of closed orbits: long runs from the initial state, from beside equilibria that lost stability and
    /// from evenly spread starts; recurrence on a local section (modulo whole turns of angles); closed by Newton's method on state and
    /// period with variational equations. Models of two states are also run backwards in time, where unstable cycles attract. Equal inputs
    /// give equal results.
    /// </summary>
    /// <remarks>What is not found may exist: <see cref="LimitCycleSearchResult.Text"/> says what was tried.</remarks>
    /// <param name="system">The system.</param>
    /// <param name="options">How thoroughly to search.</param>
    /// <param name="cancellationToken">Ends the search.</param>
    /// <returns>Cycles with periods, extrema and multipliers, families with their evidence, and what each run did.</returns>
    /// <exception cref="InvalidOperationException">The model depends on time explicitly.</exception>
    /// <exception cref="ArgumentException">An extra start has the wrong length or is not finite, or an option has no meaning.</exception>
    /// <exception cref="OperationCanceledException">The search was cancelled.</exception>
    public static LimitCycleSearchResult FindLimitCycles(
        this DynamicSystem system, LimitCycleSearchOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(system);
        options ??= new LimitCycleSearchOptions();
        if (options.SpreadStarts < 0 || options.MaximumStepsPerRun < 1)
            throw new ArgumentException("The numbers of starts and steps must be positive.", nameof(options));
        const double Tightest = LimitCycleSearchOptions.SmallestClosingTolerance, Loosest = LimitCycleSearchOptions.LargestClosingTolerance;
        if (!(options.ClosingTolerance >= Tightest && options.ClosingTolerance <= Loosest))
            throw new ArgumentException($"The closing tolerance must lie between {Tightest:g1} and {Loosest:g1}.", nameof(options));

        SearchStarts.Require(system, options.ExtraStarts, nameof(options));
        EquilibriumExtensions.RequireAutonomous(system, "is not searched for limit cycles of its own");
        return LimitCycleSearch.Run(system, options, cancellationToken);
    }

    /// <inheritdoc cref="FindLimitCycles(DynamicSystem, LimitCycleSearchOptions?, CancellationToken)"/>
    /// <typeparam name="TModel">The model class.</typeparam>
    /// <typeparam name="TSystem">Its equations.</typeparam>
    /// <param name="model">The model, with the parameters and the initial state it holds now.</param>
    /// <param name="options">How thoroughly to search.</param>
    /// <param name="cancellationToken">Ends the search.</param>
    public static LimitCycleSearchResult FindLimitCycles<TModel, TSystem>(
        this IOdeModel<TModel, TSystem> model, LimitCycleSearchOptions? options = null, CancellationToken cancellationToken = default)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem =>
        FindLimitCycles(DynamicSystem.Of(model), options, cancellationToken);
}
