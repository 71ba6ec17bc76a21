namespace OdeDsl.Tests.Problems;

/// <summary>High irradiance response, E. Schaefer 1975; E. Hairer, G. Wanner, Solving ODEs II, section IV.10.</summary>
[OdeModel]
internal sealed partial class Hires
{
    [State(Initial = 1)] public partial double Y1 { get; set; }
    [State(Initial = 0)] public partial double Y2 { get; set; }
    [State(Initial = 0)] public partial double Y3 { get; set; }
    [State(Initial = 0)] public partial double Y4 { get; set; }
    [State(Initial = 0)] public partial double Y5 { get; set; }
    [State(Initial = 0)] public partial double Y6 { get; set; }
    [State(Initial = 0)] public partial double Y7 { get; set; }
    [State(Initial = 0.0057)] public partial double Y8 { get; set; }

    [Rate(nameof(Y1))] private double Y1Rate => -1.71 * Y1 + 0.43 * Y2 + 8.32 * Y3 + 0.0007;
    [Rate(nameof(Y2))] private double Y2Rate => 1.71 * Y1 - 8.75 * Y2;
    [Rate(nameof(Y3))] private double Y3Rate => -10.03 * Y3 + 0.43 * Y4 + 0.035 * Y5;
    [Rate(nameof(Y4))] private double Y4Rate => 8.32 * Y2 + 1.71 * Y3 - 1.12 * Y4;
    [Rate(nameof(Y5))] private double Y5Rate => -1.745 * Y5 + 0.43 * Y6 + 0.43 * Y7;
    [Rate(nameof(Y6))] private double Y6Rate => -280 * Y6 * Y8 + 0.69 * Y4 + 1.71 * Y5 - 0.43 * Y6 + 0.69 * Y7;
    [Rate(nameof(Y7))] private double Y7Rate => 280 * Y6 * Y8 - 1.81 * Y7;
    [Rate(nameof(Y8))] private double Y8Rate => -280 * Y6 * Y8 + 1.81 * Y7;
}
