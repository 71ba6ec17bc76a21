namespace OdeDsl.Tests.Problems;

/// <summary>R. J. Field, R. M. Noyes, Journal of Chemical Physics 60, 1974, page 1877; E. Hairer, G. Wanner, Solving ODEs II, section IV.10.</summary>
[OdeModel]
internal sealed partial class Orego
{
    [State(Initial = 1)] public partial double Y1 { get; set; }
    [State(Initial = 2)] public partial double Y2 { get; set; }
    [State(Initial = 3)] public partial double Y3 { get; set; }

    [Rate(nameof(Y1))] private double Y1Rate => 77.27 * (Y2 + Y1 * (1 - 8.375e-6 * Y1 - Y2));
    [Rate(nameof(Y2))] private double Y2Rate => (Y3 - (1 + Y1) * Y2) / 77.27;
    [Rate(nameof(Y3))] private double Y3Rate => 0.161 * (Y1 - Y3);
}
