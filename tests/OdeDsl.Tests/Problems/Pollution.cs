namespace OdeDsl.Tests.Problems;

/// <summary>Twenty species and twenty-five reactions of air pollution (J. G. Verwer, SIAM Journal on Scientific Computing 15, 1994, page 1243).</summary>
[OdeModel]
internal sealed partial class Pollution
{
    [State(Initial = 0)] public partial double Y1 { get; set; }
    [State(Initial = 0.2)] public partial double Y2 { get; set; }
    [State(Initial = 0)] public partial double Y3 { get; set; }
    [State(Initial = 0.04)] public partial double Y4 { get; set; }
    [State(Initial = 0)] public partial double Y5 { get; set; }
    [State(Initial = 0)] public partial double Y6 { get; set; }
    [State(Initial = 0.1)] public partial double Y7 { get; set; }
    [State(Initial = 0.3)] public partial double Y8 { get; set; }
    [State(Initial = 0.01)] public partial double Y9 { get; set; }
    [State(Initial = 0)] public partial double Y10 { get; set; }
    [State(Initial = 0)] public partial double Y11 { get; set; }
    [State(Initial = 0)] public partial double Y12 { get; set; }
    [State(Initial = 0)] public partial double Y13 { get; set; }
    [State(Initial = 0)] public partial double Y14 { get; set; }
    [State(Initial = 0)] public partial double Y15 { get; set; }
    [State(Initial = 0)] public partial double Y16 { get; set; }
    [State(Initial = 0.007)] public partial double Y17 { get; set; }
    [State(Initial = 0)] public partial double Y18 { get; set; }
    [State(Initial = 0)] public partial double Y19 { get; set; }
    [State(Initial = 0)] public partial double Y20 { get; set; }

    private double R1 => 0.35 * Y1;
    private double R2 => 26.6 * Y2 * Y4;
    private double R3 => 1.23e4 * Y5 * Y2;
    private double R4 => 8.6e-4 * Y7;
    private double R5 => 8.2e-4 * Y7;
    private double R6 => 1.5e4 * Y7 * Y6;
    private double R7 => 1.3e-4 * Y9;
    private double R8 => 2.4e4 * Y9 * Y6;
    private double R9 => 1.65e4 * Y11 * Y2;
    private double R10 => 9e3 * Y11 * Y1;
    private double R11 => 0.022 * Y13;
    private double R12 => 1.2e4 * Y10 * Y2;
    private double R13 => 1.88 * Y14;
    private double R14 => 1.63e4 * Y1 * Y6;
    private double R15 => 4.8e6 * Y3;
    private double R16 => 3.5e-4 * Y4;
    private double R17 => 0.0175 * Y4;
    private double R18 => 1e8 * Y16;
    private double R19 => 4.44e11 * Y16;
    private double R20 => 1240 * Y17 * Y6;
    private double R21 => 2.1 * Y19;
    private double R22 => 5.78 * Y19;
    private double R23 => 0.0474 * Y1 * Y4;
    private double R24 => 1780 * Y19 * Y1;
    private double R25 => 3.12 * Y20;

    [Rate(nameof(Y1))] private double Y1Rate => R2 + R3 + R9 + R11 + R12 + R22 + R25 - R1 - R10 - R14 - R23 - R24;
    [Rate(nameof(Y2))] private double Y2Rate => R1 + R21 - R2 - R3 - R9 - R12;
    [Rate(nameof(Y3))] private double Y3Rate => R1 + R17 + R19 + R22 - R15;
    [Rate(nameof(Y4))] private double Y4Rate => R15 - R2 - R16 - R17 - R23;
    [Rate(nameof(Y5))] private double Y5Rate => 2 * R4 + R6 + R7 + R13 + R20 - R3;
    [Rate(nameof(Y6))] private double Y6Rate => R3 + 2 * R18 - R6 - R8 - R14 - R20;
    [Rate(nameof(Y7))] private double Y7Rate => R13 - R4 - R5 - R6;
    [Rate(nameof(Y8))] private double Y8Rate => R4 + R5 + R6 + R7;
    [Rate(nameof(Y9))] private double Y9Rate => -R7 - R8;
    [Rate(nameof(Y10))] private double Y10Rate => R7 + R9 - R12;
    [Rate(nameof(Y11))] private double Y11Rate => R8 + R11 - R9 - R10;
    [Rate(nameof(Y12))] private double Y12Rate => R9;
    [Rate(nameof(Y13))] private double Y13Rate => R10 - R11;
    [Rate(nameof(Y14))] private double Y14Rate => R12 - R13;
    [Rate(nameof(Y15))] private double Y15Rate => R14;
    [Rate(nameof(Y16))] private double Y16Rate => R16 - R18 - R19;
    [Rate(nameof(Y17))] private double Y17Rate => -R20;
    [Rate(nameof(Y18))] private double Y18Rate => R20;
    [Rate(nameof(Y19))] private double Y19Rate => R23 + R25 - R21 - R22 - R24;
    [Rate(nameof(Y20))] private double Y20Rate => R24 - R25;
}
