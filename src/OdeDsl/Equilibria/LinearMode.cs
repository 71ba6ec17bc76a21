using System.Numerics;

namespace OdeDsl.Equilibria;

/// <summary>
/// One mode of the linearised motion: a real eigenvalue λ, or a complex pair σ ± iω given by its member with positive ω.
/// </summary>
/// <remarks>
/// Formulas: any handbook of control engineering, second-order lag. Times are in the model's time unit, frequencies in radians per
/// time unit.
/// </remarks>
/// <param name="Eigenvalue">λ, or σ + iω with ω &gt; 0.</param>
public sealed record LinearMode(Complex Eigenvalue)
{
    /// <summary>Whether the mode oscillates (a complex pair).</summary>
    public bool Oscillates => Eigenvalue.Imaginary != 0;

    /// <summary>τ = -1/σ: the time in which the mode shrinks by e; negative if it grows; infinite if σ = 0.</summary>
    public double TimeConstant => Eigenvalue.Real == 0 ? double.PositiveInfinity : -1 / Eigenvalue.Real;

    /// <summary>The undamped natural frequency |λ|.</summary>
    public double NaturalFrequency => Complex.Abs(Eigenvalue);

    /// <summary>ζ = -σ/|λ|: 1 for a decaying real mode, -1 for a growing one, NaN if λ = 0.</summary>
    public double DampingRatio => -Eigenvalue.Real / NaturalFrequency;

    /// <summary>The period 2π/ω of the oscillation; infinite if the mode does not oscillate.</summary>
    public double Period => Oscillates ? Math.Tau / Eigenvalue.Imaginary : double.PositiveInfinity;
}
