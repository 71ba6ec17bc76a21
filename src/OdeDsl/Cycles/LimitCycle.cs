using System.Collections.Immutable;
using System.Numerics;
using OdeDsl.Equilibria;
using OdeDsl.Integration;

namespace OdeDsl.Cycles;

/// <summary>An isolated closed orbit: closed by Newton's method on state and period, with its multipliers.</summary>
public sealed record LimitCycle
{
    /// <summary>The minimal period, in the model's time unit.</summary>
    public required double Period { get; init; }

    /// <summary>A state on the cycle.</summary>
    public required ImmutableArray<double> State { get; init; }

    /// <summary>
    /// The multipliers, the trivial one (motion along the cycle, 1 in exact arithmetic) first as computed, then by descending modulus.
    /// </summary>
    public required ImmutableArray<Complex> Multipliers { get; init; }

    /// <summary>
    /// How far the computed monodromy matrix is from mapping the cycle's own direction to itself, relative: evidence of accuracy.
    /// </summary>
    public required double TrivialMultiplierError { get; init; }

    /// <summary>How the multipliers were computed.</summary>
    public required MultiplierMethod MultiplierMethod { get; init; }

    /// <summary>Whether nearby motions approach the cycle: undecided if a multiplier's modulus is 1 within its accuracy.</summary>
    public required Stability Stability { get; init; }

    /// <summary>For each state the whole turns made in one period; 0 for states that are not angles.</summary>
    public required ImmutableArray<int> Winding { get; init; }

    /// <summary>The smallest value of each state over the period; on the unrolled line for angles that turn.</summary>
    public required ImmutableArray<double> Minimum { get; init; }

    /// <summary>The largest value of each state over the period; on the unrolled line for angles that turn.</summary>
    public required ImmutableArray<double> Maximum { get; init; }

    /// <summary>How far the end of one period misses its start, relative to the size of the orbit in each state.</summary>
    public required double Residual { get; init; }

    /// <summary>Whether part of the cycle slides along a switching surface.</summary>
    public required bool Slides { get; init; }

    /// <summary>Whether the cycle was reached by running time backwards.</summary>
    public required bool FoundInReversedTime { get; init; }

    /// <summary>The motion once round, from <see cref="State"/>; it runs backwards for a cycle found in reversed time.</summary>
    public required Trajectory Orbit { get; init; }

    /// <summary>Whether nearby motions approach the cycle.</summary>
    public bool IsStable => Stability == Stability.Stable;

    /// <summary>Whether an angle makes whole turns in a period.</summary>
    public bool Rotates => Winding.Any(static turns => turns != 0);

    /// <summary>Half the difference between largest and smallest value of each state.</summary>
    public ImmutableArray<double> Amplitude => [.. Maximum.Zip(Minimum, static (high, low) => (high - low) / 2)];

    /// <summary>The multipliers without the trivial one: the derivative of the return map has these eigenvalues.</summary>
    public ImmutableArray<Complex> TransverseMultipliers => Multipliers[1..];
}
