using OdeDsl.LinearAlgebra;

namespace OdeDsl.Integration;

/// <summary>
/// The linear equations of a Radau IIA method's transformed stages: (γ/h − J) and ((α + iβ)/h − J), factored once for
/// a step size and Jacobian (E. Hairer, G. Wanner, Solving ODEs II, section IV.8). Vectors of several blocks are solved block by block.
/// </summary>
internal sealed class StageEquations
{
    private readonly int blockSize, dimension;
    private readonly ShiftedSolver real;
    private readonly ComplexShiftedSolver[] pairs;

    /// <param name="structure">How the Jacobian is held.</param>
    /// <param name="dimension">The number of components, whole blocks.</param>
    /// <param name="mostStages">The number of stages at most.</param>
    public StageEquations(JacobianStructure structure, int dimension, int mostStages)
    {
        Structure = structure;
        blockSize = structure.Size;
        this.dimension = dimension;
        Jacobian = new double[structure.EntryCount];
        real = structure.MakeReal();
        pairs = new ComplexShiftedSolver[(mostStages - 1) / 2];
        for (int k = 0; k < pairs.Length; k++) pairs[k] = structure.MakeComplex();
    }

    /// <summary>How the Jacobian is held.</summary>
    public JacobianStructure Structure { get; }

    /// <summary>The Jacobian last evaluated.</summary>
    public double[] Jacobian { get; }

    /// <summary>Factors all matrices.</summary>
    /// <returns><see langword="false"/> if one is singular.</returns>
    public bool Factor(RadauCoefficients method, double h)
    {
        if (!real.Factor(Jacobian, method.Gamma / h)) return false;
        for (int k = 0; k < method.Alpha.Length; k++)
        {
            if (!pairs[k].Factor(Jacobian, method.Alpha[k] / h, method.Beta[k] / h)) return false;
        }

        return true;
    }

    /// <summary>Newton's corrections of the transformed stages w from the transformed rates f, which they replace.</summary>
    public void Correct(RadauCoefficients method, double h, double[][] f, double[][] w)
    {
        StageSums.Combine(f[0], f[0], -method.Gamma / h, w[0]);
        Filter(f[0]);
        for (int k = 0; k < method.Alpha.Length; k++)
        {
            double alpha = method.Alpha[k] / h, beta = method.Beta[k] / h;
            (double[] re, double[] im) = (f[2 * k + 1], f[2 * k + 2]);
            StageSums.Combine(re, re, -alpha, w[2 * k + 1], beta, w[2 * k + 2]);
            StageSums.Combine(im, im, -beta, w[2 * k + 1], -alpha, w[2 * k + 2]);
            for (int start = 0; start < dimension; start += blockSize)
                pairs[k].Solve(re.AsSpan(start, blockSize), im.AsSpan(start, blockSize));
        }
    }

    /// <summary>Applies (γ/h − J)⁻¹.</summary>
    public void Filter(double[] vector)
    {
        for (int start = 0; start < dimension; start += blockSize) real.Solve(vector.AsSpan(start, blockSize));
    }
}
