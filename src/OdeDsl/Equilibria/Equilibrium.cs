using System.Collections.Immutable;
using System.Numerics;

namespace OdeDsl.Equilibria;

/// <summary>A state in which every rate vanishes, with its linearised motion.</summary>
public sealed record Equilibrium
{
    /// <summary>The state. Angles lie in [-period/2, period/2), or within the state's bounds where those leave no such value.</summary>
    public required ImmutableArray<double> State { get; init; }

    /// <summary>The largest magnitude of a rate at <see cref="State"/> (of the sliding motion's rates for a rest on a surface).</summary>
    public required double Residual { get; init; }

    /// <summary>The regime the equilibrium lies in; for a rest on a surface the regime of the side where its switch is off.</summary>
    public ImmutableArray<double> Regime { get; init; } = [];

    /// <summary>The Jacobian by rows: the derivatives of the rates (of the sliding motion's rates for a rest on a surface).</summary>
    public required ImmutableArray<double> Jacobian { get; init; }

    /// <summary>
    /// The eigenvalues of the Jacobian, largest real part first. A rest on a surface has one fewer than states: motion within the surface.
    /// </summary>
    public required ImmutableArray<Complex> Eigenvalues { get; init; }

    /// <summary>The modes, slowest first: one for each real eigenvalue and one for each complex pair.</summary>
    public required ImmutableArray<LinearMode> Modes { get; init; }

    /// <summary>
    /// The mode that outlives the others: of all eigenvalues the one with the largest real part, so the fastest to grow if one grows, and
    /// the slowest to decay otherwise; <see langword="null"/> if there is no mode.
    /// </summary>
    public LinearMode? LeadingMode => Modes.MaxBy(static mode => mode.Eigenvalue.Real);

    /// <summary>How the linearised motion looks.</summary>
    public required EquilibriumKind Kind { get; init; }

    /// <summary>Whether small disturbances die out.</summary>
    public required Stability Stability { get; init; }

    /// <summary>The number of eigenvalues with a positive real part that is not negligible.</summary>
    public required int UnstableCount { get; init; }

    /// <summary>
    /// The index of the switching function on whose surface the system rests by sliding (Filippov's sense: a weighted mean of the rates
    /// on both sides vanishes, neither side's rates do), or <see langword="null"/> for an ordinary equilibrium.
    /// </summary>
    public int? Surface { get; init; }

    /// <summary>The continuum this equilibrium stands for, or <see langword="null"/> if it is isolated.</summary>
    public EquilibriumSet? Set { get; init; }

    /// <summary>The number of search starts that ended here.</summary>
    public int Landings { get; init; }

    /// <summary>Whether every small disturbance dies out.</summary>
    public bool IsStable => Stability == Stability.Stable;

    /// <summary>Whether this is a rest by sliding on a switching surface.</summary>
    public bool IsSliding => Surface is not null;
}
