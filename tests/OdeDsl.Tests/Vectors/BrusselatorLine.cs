namespace OdeDsl.Tests.Vectors;

/// <summary>
/// The Brusselator with diffusion on a line, u and v given at both ends, by central differences at inner points (E. Hairer and G. Wanner, Solving
/// Ordinary Differential Equations II, sections IV.1 and IV.10).
/// </summary>
[OdeModel]
public sealed partial class BrusselatorLine
{
    [Parameter(500)] public partial int Points { get; init; }

    [State(Length = nameof(Points), Initial = 1)] public partial double[] U { get; set; }

    [State(Length = nameof(Points), Initial = 3)] public partial double[] V { get; set; }

    [Parameter(0.02)] public partial double Diffusion { get; set; }

    [Rate(nameof(U))]
    private double URate(int i) => 1 + U[i] * U[i] * V[i] - 4 * U[i] + Diffusion * Curvature(U, i, 1);

    [Rate(nameof(V))]
    private double VRate(int i) => 3 * U[i] - U[i] * U[i] * V[i] + Diffusion * Curvature(V, i, 3);

    private double Curvature(double[] x, int i, double end)
    {
        double before = i == 0 ? end : x[i - 1];
        double after = i == Points - 1 ? end : x[i + 1];
        return (before - 2 * x[i] + after) * (Points + 1) * (Points + 1);
    }
}
