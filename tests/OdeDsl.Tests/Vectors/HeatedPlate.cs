namespace OdeDsl.Tests.Vectors;

/// <summary>Heat in a square plate with sides of length one held at zero, by central differences at inner points.</summary>
[OdeModel]
public sealed partial class HeatedPlate
{
    [Parameter(9)] public partial int Points { get; init; }

    [State(Rows = nameof(Points), Columns = nameof(Points))] public partial double[,] Temperature { get; set; }

    [Parameter(0.1)] public partial double Diffusivity { get; set; }

    [Rate(nameof(Temperature))]
    private double TemperatureRate(int i, int j)
    {
        double north = i == 0 ? 0 : Temperature[i - 1, j], south = i == Points - 1 ? 0 : Temperature[i + 1, j];
        double west = j == 0 ? 0 : Temperature[i, j - 1], east = j == Points - 1 ? 0 : Temperature[i, j + 1];
        return Diffusivity * (north + south + west + east - 4 * Temperature[i, j]) * (Points + 1) * (Points + 1);
    }
}
