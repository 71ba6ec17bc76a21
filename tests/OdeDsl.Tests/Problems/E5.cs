namespace OdeDsl.Tests.Problems;

/// <summary>
/// W. H. Enright, T. E. Hull, B. Lindberg, BIT 15, 1975, problem E5; E. Hairer, G. Wanner, Solving ODEs II, section IV.10. The third rate must be
/// formed as a difference of two others: its four terms cancel.
/// </summary>
[OdeModel]
internal sealed partial class E5
{
    private const double A = 7.89e-10, B = 1.1e7, C = 1.13e3, M = 1e6;

    [State(Initial = 1.76e-3)] public partial double Y1 { get; set; }
    [State(Initial = 0)] public partial double Y2 { get; set; }
    [State(Initial = 0)] public partial double Y3 { get; set; }
    [State(Initial = 0)] public partial double Y4 { get; set; }

    [Rate(nameof(Y1))] private double Y1Rate => -A * Y1 - B * Y1 * Y3;
    [Rate(nameof(Y2))] private double Y2Rate => A * Y1 - M * C * Y2 * Y3;
    [Rate(nameof(Y3))] private double Y3Rate => Y2Rate - Y4Rate;
    [Rate(nameof(Y4))] private double Y4Rate => B * Y1 * Y3 - C * Y4;
}
