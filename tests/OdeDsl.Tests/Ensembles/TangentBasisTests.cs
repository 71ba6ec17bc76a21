using OdeDsl.Ensembles;
using Xunit;

namespace OdeDsl.Tests.Ensembles;

public class TangentBasisTests
{
    [Fact]
    public void Orthonormalised_tangents_are_orthonormal_in_scaled_states_and_their_stretches_multiply_to_the_volume()
    {
        double[] scale = [2, 0.5, 1e6];
        var basis = new TangentBasis(scale, 3);
        // A linear map with determinant 24 in scaled states, applied to the orthonormal start.
        double[,] map = { { 2, 1, 0 }, { 0, 3, 5 }, { 0, 0, 4 } };
        double[] mapped = new double[9];
        for (int i = 0; i < 3; i++)
        {
            for (int j = 0; j < 3; j++)
            {
                for (int k = 0; k < 3; k++) mapped[i * 3 + j] += scale[i] * map[i, k] * basis.Columns[k * 3 + j] / scale[k];
            }
        }

        mapped.CopyTo(basis.Columns, 0);
        double[] stretches = new double[3];
        basis.Orthonormalise(stretches);
        Assert.True(Math.Abs(stretches[0] * stretches[1] * stretches[2] - 24) <= 1e-12);
        for (int a = 0; a < 3; a++)
        {
            for (int b = 0; b < 3; b++)
            {
                double product = 0;
                for (int i = 0; i < 3; i++) product += basis.Columns[i * 3 + a] / scale[i] * (basis.Columns[i * 3 + b] / scale[i]);
                Assert.True(Math.Abs(product - (a == b ? 1 : 0)) <= 1e-14, $"{a} {b} {product}");
            }
        }
    }

    [Fact]
    public void A_tangent_lost_in_the_others_has_no_length()
    {
        var basis = new TangentBasis([1, 1], 2);
        for (int i = 0; i < 2; i++) basis.Columns[i * 2 + 1] = basis.Columns[i * 2];
        basis.Orthonormalise(new double[2]);
        Assert.True(double.IsNaN(basis.Columns[1]));
    }
}
