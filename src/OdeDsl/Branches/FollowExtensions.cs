using System.Collections.Immutable;
using System.Globalization;
using OdeDsl.Branches;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;

namespace OdeDsl;

/// <summary>Following of equilibria while one parameter moves.</summary>
public static class FollowExtensions
{
    /// <summary>
    /// Follows the equilibrium nearest to the model's state while one parameter moves: past folds, with Hopf points and crossings of
    /// branches located and the stability along the way.
    /// </summary>
    /// <typeparam name="TModel">The model class.</typeparam>
    /// <typeparam name="TSystem">Its generated equations.</typeparam>
    /// <param name="model">The model; it is not changed.</param>
    /// <param name="parameter">Selects the parameter, as in <c>tank =&gt; tank.TankArea</c>.</param>
    /// <param name="from">The value to start at, in the parameter's unit. The branch ends when it comes back here.</param>
    /// <param name="to">The value to reach, in the parameter's unit; may be smaller than <paramref name="from"/>.</param>
    /// <param name="options">How finely to follow, and where to start.</param>
    /// <param name="cancellationToken">Stops the following.</param>
    /// <returns>The branch with its special points and why it ended.</returns>
    /// <exception cref="ArgumentException">The selector does not return one parameter unchanged, the values are not finite or equal, or an option is out of its range.</exception>
    /// <exception cref="InvalidOperationException">The rates depend on time, or no equilibrium was found at <paramref name="from"/>.</exception>
    /// <exception cref="OperationCanceledException">The following was cancelled.</exception>
    public static BranchResult Follow<TModel, TSystem>(
        this IOdeModel<TModel, TSystem> model,
        Func<TModel, double> parameter,
        double from,
        double to,
        BranchOptions? options = null,
        CancellationToken cancellationToken = default)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem
    {
        ArgumentNullException.ThrowIfNull(model);
        ArgumentNullException.ThrowIfNull(parameter);
        return DynamicSystem.Of(model).Follow(ParameterSelector.IndexOf(model, parameter), from, to, options, cancellationToken);
    }

    /// <summary>
    /// Follows the equilibrium nearest to the system's initial state while one parameter moves: past folds, with Hopf points and
    /// crossings of branches located and the stability along the way.
    /// </summary>
    /// <param name="system">The system; its own value of the parameter does not matter.</param>
    /// <param name="parameter">The index of the parameter.</param>
    /// <param name="from">The value to start at, in the parameter's unit. The branch ends when it comes back here.</param>
    /// <param name="to">The value to reach, in the parameter's unit; may be smaller than <paramref name="from"/>.</param>
    /// <param name="options">How finely to follow, and where to start.</param>
    /// <param name="cancellationToken">Stops the following.</param>
    /// <returns>The branch with its special points and why it ended.</returns>
    /// <exception cref="ArgumentException">The index or the values are no parameter's, or an option is out of its range.</exception>
    /// <exception cref="InvalidOperationException">The rates depend on time, or no equilibrium was found at <paramref name="from"/>.</exception>
    /// <exception cref="OperationCanceledException">The following was cancelled.</exception>
    public static BranchResult Follow(
        this DynamicSystem system,
        int parameter,
        double from,
        double to,
        BranchOptions? options = null,
        CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(system);
        ArgumentOutOfRangeException.ThrowIfNegative(parameter);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(parameter, system.ParameterCount);
        if (!double.IsFinite(from)) throw new ArgumentOutOfRangeException(nameof(from), from, "The start value must be a finite number.");
        if (!double.IsFinite(to) || to == from)
            throw new ArgumentOutOfRangeException(nameof(to), to, "The value to reach must be a finite number other than the start value.");
        options ??= new BranchOptions();
        BranchOptions.Validate(options, system.StateCount);
        if (system.DependsOnTime)
            throw new InvalidOperationException($"The rates of {system.Description.Name} depend on time: it has no equilibria to follow.");
        ImmutableArray<double> start = FindStart(system.WithParameter(parameter, from), parameter, options, cancellationToken);
        return BranchFollower.Follow(system, parameter, start.AsSpan(), from, to, options, cancellationToken);
    }

    /// <summary>The equilibrium nearest to the start asked for, relative to the searched region.</summary>
    private static ImmutableArray<double> FindStart(
        DynamicSystem system, int parameter, BranchOptions options, CancellationToken cancellationToken)
    {
        ImmutableArray<double> near = options.Start ?? [.. system.InitialState];
        EquilibriumSearchResult found = system.FindEquilibria(new EquilibriumSearchOptions { ExtraStarts = [near] }, cancellationToken);
        SearchRegion region = SearchRegion.Of(system);
        Equilibrium? nearest = found.Equilibria
            .Where(static equilibrium => !equilibrium.IsSliding)
            .MinBy(equilibrium => region.Distance(equilibrium.State.AsSpan(), near.AsSpan()));
        if (nearest is not null) return nearest.State;
        ParameterDescription moved = system.Description.Parameters[parameter];
        string where = string.Create(CultureInfo.InvariantCulture, $"{moved.Name} = {system.Parameters[parameter]:G6} {moved.Unit}").TrimEnd();
        string what = found.Equilibria.IsEmpty
            ? "No equilibrium was found"
            : "Only rests that slide along a switching surface were found, which cannot be followed,";
        throw new InvalidOperationException($"{what} in the state bounds of {system.Description.Name} at {where}. {found.Completeness}");
    }
}
