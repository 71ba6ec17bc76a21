using OdeDsl.LinearAlgebra;
using static OdeDsl.Integration.RadauIIA5Coefficients;

namespace OdeDsl.Integration;

/// <summary>
/// The linear equations of the Radau IIA method's transformed stages: (γ/h − J) and ((α + iβ)/h − J), factored once for
/// a step size and Jacobian (E. Hairer, G. Wanner, Solving ODEs II, section IV.8). Vectors of several blocks are solved block by block.
/// </summary>
internal sealed class StageEquations(int blockSize, int dimension)
{
    private readonly RealFactorization real = new(blockSize);
    private readonly ComplexFactorization complex = new(blockSize);

    /// <summary>Factors both matrices.</summary>
    /// <returns><see langword="false"/> if one is singular.</returns>
    public bool Factor(ReadOnlySpan<double> jacobian, double h)
    {
        double gamma = Gamma / h, alpha = Alpha / h, beta = Beta / h;
        for (int i = 0; i < blockSize; i++)
        {
            ReadOnlySpan<double> row = jacobian.Slice(i * blockSize, blockSize);
            for (int j = 0; j < row.Length; j++)
            {
                bool diagonal = i == j;
                real[i, j] = (diagonal ? gamma : 0) - row[j];
                complex.Set(i, j, (diagonal ? alpha : 0) - row[j], diagonal ? beta : 0);
            }
        }

        return real.Factor() && complex.Factor();
    }

    /// <summary>Newton's corrections of the transformed stages w from the transformed rates f, which they replace.</summary>
    public void Correct(double h, double[] f1, double[] f2, double[] f3, double[] w1, double[] w2, double[] w3)
    {
        double gamma = Gamma / h, alpha = Alpha / h, beta = Beta / h;
        StageSums.Combine(f1, f1, -gamma, w1);
        StageSums.Combine(f2, f2, -alpha, w2, beta, w3);
        StageSums.Combine(f3, f3, -beta, w2, -alpha, w3);
        for (int start = 0; start < dimension; start += blockSize)
        {
            real.Solve(f1.AsSpan(start, blockSize));
            complex.Solve(f2.AsSpan(start, blockSize), f3.AsSpan(start, blockSize));
        }
    }

    /// <summary>Applies (γ/h − J)⁻¹.</summary>
    public void Filter(double[] vector)
    {
        for (int start = 0; start < dimension; start += blockSize) real.Solve(vector.AsSpan(start, blockSize));
    }
}
