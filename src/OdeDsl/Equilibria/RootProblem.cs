using OdeDsl.Modeling;

namespace OdeDsl.Equilibria;

/// <summary>
/// A smooth system of as many equations as unknowns whose roots may be rests of a model; the first unknowns are the states.
/// Not thread-safe.
/// </summary>
internal abstract class RootProblem(DynamicSystem system, SearchRegion region)
{
    /// <summary>
    /// A switching function this close to its surface, relative to its change over the states' local sizes, counts as on it.
    /// </summary>
    public const double OnSurface = 1e-8;

    protected DynamicSystem System { get; } = system;

    protected SearchRegion Region { get; } = region;

    /// <summary>The number of unknowns.</summary>
    public abstract int Size { get; }

    /// <summary>The number of unknowns that are states, counted from the first.</summary>
    public int StateCount => System.StateCount;

    /// <summary>The scale of each unknown.</summary>
    public abstract ReadOnlySpan<double> Scale { get; }

    /// <summary>Sets the unknowns that are not states before a search starts from a state.</summary>
    public virtual void Begin(Span<double> point)
    {
    }

    /// <summary>Evaluates the equations; values that are not finite mean that the point is outside their domain.</summary>
    public abstract void Evaluate(ReadOnlySpan<double> point, Span<double> values);

    /// <summary>Evaluates the derivatives by rows.</summary>
    public abstract void Differentiate(ReadOnlySpan<double> point, Span<double> jacobian);

    /// <summary>
    /// Whether a root (angles wrapped) is a rest of the model: inside the state bounds, and where the equations' formulas hold.
    /// </summary>
    public abstract bool Accepts(ReadOnlySpan<double> point);

    /// <summary>Describes a root that <see cref="Accepts"/> took.</summary>
    /// <param name="point">The root.</param>
    /// <param name="nullity">The number of eigenvalues known to be zero in exact arithmetic (0 if the root is regular).</param>
    /// <param name="set">The continuum it belongs to, if any.</param>
    public abstract Equilibrium Describe(ReadOnlySpan<double> point, int nullity, EquilibriumSet? set);
}
