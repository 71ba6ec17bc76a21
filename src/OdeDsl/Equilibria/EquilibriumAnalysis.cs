using OdeDsl.Modeling;

namespace OdeDsl.Equilibria;

/// <summary>
/// Single equilibria: refine a guess, describe a known one. See <see cref="EquilibriumExtensions"/> for the search of all.
/// </summary>
public static class EquilibriumAnalysis
{
    /// <summary>
    /// Moves a guess to an equilibrium nearby by damped Newton's method in the guess's own regime (P. Deuflhard, "Newton Methods for
    /// Nonlinear Problems", 2004, section 3.3). The state bounds are not enforced; angles are not wrapped.
    /// </summary>
    /// <param name="system">The system; explicit time is held at 0.</param>
    /// <param name="state">The guess; receives the equilibrium, or the last iterate on failure.</param>
    /// <param name="residual">The largest magnitude of a rate at the result.</param>
    /// <returns>Whether the iteration converged to a point whose own regime is the guess's (or that lies on the regime's edge).</returns>
    /// <exception cref="ArgumentException">The state has the wrong length.</exception>
    public static bool TryRefine(DynamicSystem system, Span<double> state, out double residual)
    {
        ArgumentNullException.ThrowIfNull(system);
        RequireLength(system, state.Length, nameof(state));
        var region = SearchRegion.Of(system);
        var regime = new double[system.SwitchCount];
        system.Regime(0, state, regime);
        var problem = new RegimeProblem(system, region, regime);
        bool converged = new DampedNewton(problem, region).Solve(state);
        var rates = new double[system.StateCount];
        problem.Evaluate(state, rates);
        residual = rates.Max(Math.Abs);
        return converged && problem.FormulasHoldAt(state);
    }

    /// <summary>Describes a state at which the rates vanish: eigenvalues, modes, kind, stability, in the state's own regime.</summary>
    /// <param name="system">The system; explicit time is held at 0.</param>
    /// <param name="state">The equilibrium; <see cref="Equilibrium.Residual"/> of the result tells how well the rates vanish.</param>
    /// <returns>The description. Continua and rests by sliding are not recognised here; the search does that.</returns>
    /// <exception cref="ArgumentException">The state has the wrong length.</exception>
    public static Equilibrium Describe(DynamicSystem system, ReadOnlySpan<double> state)
    {
        ArgumentNullException.ThrowIfNull(system);
        RequireLength(system, state.Length, nameof(state));
        return new RegimeProblem(system, SearchRegion.Of(system), null).Describe(state, 0, null);
    }

    private static void RequireLength(DynamicSystem system, int length, string name)
    {
        if (length == system.StateCount) return;
        throw new ArgumentException($"This model has {system.StateCount} states, but {length} values were given.", name);
    }
}
