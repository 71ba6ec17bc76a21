namespace OdeDsl.Tests.Problems;

/// <summary>H. H. Robertson 1966; E. Hairer, G. Wanner, Solving ODEs II, section IV.1.</summary>
[OdeModel]
internal sealed partial class Robertson
{
    [State(Initial = 1)] public partial double A { get; set; }
    [State(Initial = 0)] public partial double B { get; set; }
    [State(Initial = 0)] public partial double C { get; set; }

    [Parameter(0.04)] public partial double K1 { get; set; }
    [Parameter(1e4)] public partial double K2 { get; set; }
    [Parameter(3e7)] public partial double K3 { get; set; }

    [Rate(nameof(A))] private double ARate => -K1 * A + K2 * B * C;
    [Rate(nameof(B))] private double BRate => K1 * A - K2 * B * C - K3 * B * B;
    [Rate(nameof(C))] private double CRate => K3 * B * B;
}
