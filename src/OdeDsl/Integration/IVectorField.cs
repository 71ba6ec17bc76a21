using OdeDsl.LinearAlgebra;

namespace OdeDsl.Integration;

/// <summary>
/// A differential equation as the steppers see it: y' = f(t, y). Implemented by structs, so that the rates are compiled into
/// the stepper's loops. A field may be made of blocks of equal size: the state first, then tangents carried along by it.
/// </summary>
internal interface IVectorField
{
    /// <summary>The number of components of y.</summary>
    int Dimension { get; }

    /// <summary>The size of a block: the number of states.</summary>
    int BlockSize { get; }

    /// <summary>How the Jacobian is held at present; changes where the motion begins or ends to slide.</summary>
    JacobianStructure Structure { get; }

    /// <summary>The room that the Jacobian takes at most.</summary>
    int LargestJacobian { get; }

    /// <summary>Whether the rates depend on time by themselves.</summary>
    bool DependsOnTime { get; }

    /// <summary>Computes f(t, y).</summary>
    void Rates(double time, ReadOnlySpan<double> y, Span<double> rates);

    /// <summary>Computes ∂f/∂t of the first block.</summary>
    /// <param name="time">The time.</param>
    /// <param name="y">The position.</param>
    /// <param name="scale">A time over which the rates change little, for where a difference must do.</param>
    /// <param name="derivative">Receives the derivative.</param>
    void TimeDerivative(double time, ReadOnlySpan<double> y, double scale, Span<double> derivative);

    /// <summary>Computes the product of the first block's Jacobian with a direction of the first block.</summary>
    void DirectionalDerivative(double time, ReadOnlySpan<double> y, ReadOnlySpan<double> direction, Span<double> product);

    /// <summary>
    /// Computes the Jacobian of the first block in the layout of <see cref="Structure"/>. Implicit methods use it for every block: the blocks of
    /// tangents have the same one, and their dependence on the state is left to the iteration (the state does not depend on them).
    /// </summary>
    void Jacobian(double time, ReadOnlySpan<double> y, Span<double> jacobian);
}
