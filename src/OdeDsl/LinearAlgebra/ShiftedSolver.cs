namespace OdeDsl.LinearAlgebra;

/// <summary>
/// The implicit equations of integration methods: (σ I − J) x = b with a real shift σ, factored once for a shift and a Jacobian. Nothing is
/// allocated after construction. Not thread-safe.
/// </summary>
internal abstract class ShiftedSolver
{
    /// <summary>The number of numbers that the factors take: grows with the size of the system as memory and work do.</summary>
    public abstract long FactorEntries { get; }

    /// <summary>Factors σ I − J.</summary>
    /// <param name="jacobian">The Jacobian in the layout of the <see cref="JacobianStructure"/>.</param>
    /// <param name="shift">σ.</param>
    /// <returns><see langword="false"/> if a pivot is zero, not finite or of no accuracy: the factors are then of no use.</returns>
    public abstract bool Factor(ReadOnlySpan<double> jacobian, double shift);

    /// <summary>Solves with the factors.</summary>
    /// <param name="vector">b, replaced by x.</param>
    public abstract void Solve(Span<double> vector);
}

/// <summary><see cref="ShiftedSolver"/> with a complex shift and complex vectors, real and imaginary parts kept apart.</summary>
internal abstract class ComplexShiftedSolver
{
    /// <summary>Factors σ I − J.</summary>
    /// <param name="jacobian">The Jacobian in the layout of the <see cref="JacobianStructure"/>.</param>
    /// <param name="real">The real part of σ.</param>
    /// <param name="imaginary">The imaginary part of σ.</param>
    /// <returns><see langword="false"/> if a pivot is zero, not finite or of no accuracy: the factors are then of no use.</returns>
    public abstract bool Factor(ReadOnlySpan<double> jacobian, double real, double imaginary);

    /// <summary>Solves with the factors.</summary>
    /// <param name="real">The real part of b, replaced by that of x.</param>
    /// <param name="imaginary">The imaginary part of b, replaced by that of x.</param>
    public abstract void Solve(Span<double> real, Span<double> imaginary);
}
