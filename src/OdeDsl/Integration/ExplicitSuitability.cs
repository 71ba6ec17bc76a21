using OdeDsl.LinearAlgebra;

namespace OdeDsl.Integration;

/// <summary>
/// Tells when an implicit method's steps have become so small that an explicit one would be stable with them: |h| times a norm of the
/// Jacobian, which bounds its eigenvalues, well inside the explicit method's stability region, many steps in a row.
/// </summary>
/// <param name="size">The number of states.</param>
internal struct ExplicitSuitability(int size)
{
    /// <summary>The region of the explicit pair reaches to about 3.3 on the real axis and 1 on the imaginary one.</summary>
    private const double Limit = 1;

    /// <summary>Steps in a row; doubled after each change, so that changes stay rare.</summary>
    private const int FirstCount = 10;
    private const int LargestCount = 1000;

    private readonly double[] scales = new double[size];
    private double norm;
    private int count;
    private int required;

    /// <summary>Whether the explicit method suits.</summary>
    public readonly bool IsSuitable => required > 0 && count >= required;

    /// <summary>Takes the norm of a Jacobian, in units of the tolerances.</summary>
    public void Measure(JacobianStructure structure, double[] jacobian, double[] y, ErrorNorm tolerance)
    {
        for (int i = 0; i < structure.Size; i++) scales[i] = tolerance.Absolute[i] + tolerance.Relative * Math.Abs(y[i]);
        norm = structure.Norm(jacobian, scales);
    }

    /// <summary>Observes an accepted step.</summary>
    public void Observe(double h)
    {
        if (required == 0) required = FirstCount;
        count = Math.Abs(h) * norm <= Limit ? count + 1 : 0;
    }

    /// <summary>Starts counting anew.</summary>
    public void Reset()
    {
        if (IsSuitable) required = Math.Min(2 * required, LargestCount);
        count = 0;
    }
}
