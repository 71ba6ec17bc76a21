namespace OdeDsl.Integration;

/// <summary>A plane in the state space, watched in one direction: Normal · state = Offset.</summary>
/// <param name="Normal">The normal, n values, not all zero.</param>
/// <param name="Offset">The offset.</param>
/// <param name="Direction">
/// 1: crossings where the value rises along the motion; -1: where it falls; 0: both. With time running backwards the motion is
/// taken in the order in which it is integrated.
/// </param>
public readonly record struct Section(double[] Normal, double Offset, int Direction)
{
    /// <summary>The signed distance from the plane, in units of the normal.</summary>
    /// <param name="state">A state; entries beyond the normal's length are ignored.</param>
    /// <returns>Normal · state − Offset.</returns>
    public double Value(ReadOnlySpan<double> state)
    {
        double value = -Offset;
        for (int i = 0; i < Normal.Length; i++) value += Normal[i] * state[i];
        return value;
    }
}
