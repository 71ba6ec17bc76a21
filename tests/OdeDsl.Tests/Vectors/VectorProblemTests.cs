using OdeDsl.Integration;
using OdeDsl.Modeling;
using Xunit;

namespace OdeDsl.Tests.Vectors;

/// <summary>Public problems written with vectors.</summary>
public class VectorProblemTests
{
    private static readonly int[] FiveDiagonals = [-6, -1, 0, 1, 6];

    [Fact]
    public void The_Jacobian_of_the_Brusselator_has_four_entries_in_a_row()
    {
        SparsityPattern pattern = DynamicSystem.Of(new BrusselatorLine { Points = 100 }).Description.StateSparsity;

        // Own point and both neighbours of the same species, and the own point of the other; one neighbour fewer at each end.
        Assert.Equal(2 * (4 * 100 - 2), pattern.EntryCount);
        Assert.True(pattern.Contains(5, 4) && pattern.Contains(5, 5) && pattern.Contains(5, 6) && pattern.Contains(5, 105) && pattern.Contains(105, 5));
        Assert.False(pattern.Contains(5, 104));
    }

    // The product of two sines is an eigenvector of the five-point Laplacian with eigenvalue -8 sin²(π h / 2) / h² (e.g. J. W. Demmel, Applied Numerical
    // Linear Algebra, 1997, section 6.3.3; from memory), so the semi-discrete plate cools by exactly that rate; the plate itself by
    // 2 π² (H. S. Carslaw and J. C. Jaeger, Conduction of Heat in Solids, second edition, 1959, products of solutions in section 5.6; from memory).
    [Theory]
    [InlineData(3)]
    [InlineData(9)]
    [InlineData(19)]
    public void A_plate_cools_as_the_closed_forms_say(int points)
    {
        const double Time = 0.5;
        HeatedPlate plate = new() { Points = points };
        double h = 1.0 / (points + 1);
        for (int i = 0; i < points; i++)
        {
            for (int j = 0; j < points; j++) plate.Temperature[i, j] = Math.Sin(Math.PI * (i + 1) * h) * Math.Sin(Math.PI * (j + 1) * h);
        }

        Trajectory run = plate.Simulate(Time, new SimulationOptions { RelativeTolerance = 1e-9 });

        double sine = Math.Sin(Math.PI * h / 2);
        double discrete = Math.Exp(-plate.Diffusivity * 8 * sine * sine / (h * h) * Time), exact = Math.Exp(-plate.Diffusivity * 2 * Math.PI * Math.PI * Time);
        for (int i = 0; i < points; i++)
        {
            for (int j = 0; j < points; j++) Assert.Equal(plate.Temperature[i, j] * discrete, run[plate.Temperature, i, j].Final, 1e-7);
        }

        // Second order: the error of the rate is 2 π² · π² h² / 12.
        double expected = exact * plate.Diffusivity * Time * 2 * Math.PI * Math.PI * Math.PI * Math.PI * h * h / 12;
        Assert.InRange((discrete - exact) / expected, 0.85, 1.15);
    }

    [Fact]
    public void The_Jacobian_of_the_plate_has_five_diagonals()
    {
        SparsityPattern pattern = DynamicSystem.Of(new HeatedPlate { Points = 6 }).Description.StateSparsity;

        Assert.Equal(5 * 36 - 4 * 6, pattern.EntryCount);
        for (int row = 0; row < 36; row++)
        {
            for (int entry = pattern.RowStarts[row]; entry < pattern.RowStarts[row + 1]; entry++)
                Assert.Contains(pattern.Columns[entry] - row, FiveDiagonals);
        }
    }

    [Fact]
    public void A_copy_has_vectors_of_its_own()
    {
        BrusselatorLine line = new() { Points = 3 };
        line.U[1] = 7;

        BrusselatorLine copy = ((IOdeModel<BrusselatorLine, BrusselatorLine.Equations>)line).Copy();
        line.U[1] = 8;

        Assert.Equal(7, copy.U[1]);
    }
}
