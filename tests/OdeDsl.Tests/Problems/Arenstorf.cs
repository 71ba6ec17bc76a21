namespace OdeDsl.Tests.Problems;

/// <summary>A closed orbit of the restricted three-body problem (E. Hairer, S. P. Norsett, G. Wanner, Solving ODEs I, section II.0).</summary>
[OdeModel]
internal sealed partial class Arenstorf
{
    private const double Moon = 0.012277471;
    private const double Earth = 1 - Moon;

    [State(Initial = 0.994)] public partial double X { get; set; }
    [State(Initial = 0)] public partial double Y { get; set; }
    [State(Initial = 0)] public partial double U { get; set; }
    [State(Initial = -2.00158510637908252240537862224)] public partial double V { get; set; }

    private double EarthCube => Math.Pow((X + Moon) * (X + Moon) + Y * Y, 1.5);
    private double MoonCube => Math.Pow((X - Earth) * (X - Earth) + Y * Y, 1.5);

    [Rate(nameof(X))] private double XRate => U;
    [Rate(nameof(Y))] private double YRate => V;
    [Rate(nameof(U))] private double URate => X + 2 * V - Earth * (X + Moon) / EarthCube - Moon * (X - Earth) / MoonCube;
    [Rate(nameof(V))] private double VRate => Y - 2 * U - Earth * Y / EarthCube - Moon * Y / MoonCube;
}
