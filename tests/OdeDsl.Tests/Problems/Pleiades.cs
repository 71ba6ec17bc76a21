namespace OdeDsl.Tests.Problems;

/// <summary>Seven bodies of masses 1 to 7 in the plane (E. Hairer, S. P. Norsett, G. Wanner, Solving ODEs I, section II.10).</summary>
[OdeModel]
internal sealed partial class Pleiades
{
    [State(Initial = 3)] public partial double X1 { get; set; }
    [State(Initial = 3)] public partial double X2 { get; set; }
    [State(Initial = -1)] public partial double X3 { get; set; }
    [State(Initial = -3)] public partial double X4 { get; set; }
    [State(Initial = 2)] public partial double X5 { get; set; }
    [State(Initial = -2)] public partial double X6 { get; set; }
    [State(Initial = 2)] public partial double X7 { get; set; }
    [State(Initial = 3)] public partial double Y1 { get; set; }
    [State(Initial = -3)] public partial double Y2 { get; set; }
    [State(Initial = 2)] public partial double Y3 { get; set; }
    [State(Initial = 0)] public partial double Y4 { get; set; }
    [State(Initial = 0)] public partial double Y5 { get; set; }
    [State(Initial = -4)] public partial double Y6 { get; set; }
    [State(Initial = 4)] public partial double Y7 { get; set; }
    [State(Initial = 0)] public partial double U1 { get; set; }
    [State(Initial = 0)] public partial double U2 { get; set; }
    [State(Initial = 0)] public partial double U3 { get; set; }
    [State(Initial = 0)] public partial double U4 { get; set; }
    [State(Initial = 0)] public partial double U5 { get; set; }
    [State(Initial = 1.75)] public partial double U6 { get; set; }
    [State(Initial = -1.5)] public partial double U7 { get; set; }
    [State(Initial = 0)] public partial double V1 { get; set; }
    [State(Initial = 0)] public partial double V2 { get; set; }
    [State(Initial = 0)] public partial double V3 { get; set; }
    [State(Initial = -1.25)] public partial double V4 { get; set; }
    [State(Initial = 1)] public partial double V5 { get; set; }
    [State(Initial = 0)] public partial double V6 { get; set; }
    [State(Initial = 0)] public partial double V7 { get; set; }

    [Rate(nameof(X1))] private double X1Rate => U1;
    [Rate(nameof(X2))] private double X2Rate => U2;
    [Rate(nameof(X3))] private double X3Rate => U3;
    [Rate(nameof(X4))] private double X4Rate => U4;
    [Rate(nameof(X5))] private double X5Rate => U5;
    [Rate(nameof(X6))] private double X6Rate => U6;
    [Rate(nameof(X7))] private double X7Rate => U7;
    [Rate(nameof(Y1))] private double Y1Rate => V1;
    [Rate(nameof(Y2))] private double Y2Rate => V2;
    [Rate(nameof(Y3))] private double Y3Rate => V3;
    [Rate(nameof(Y4))] private double Y4Rate => V4;
    [Rate(nameof(Y5))] private double Y5Rate => V5;
    [Rate(nameof(Y6))] private double Y6Rate => V6;
    [Rate(nameof(Y7))] private double Y7Rate => V7;

    [Rate(nameof(U1))]
    private double U1Rate =>
        2 * (X2 - X1) * W12 + 3 * (X3 - X1) * W13 + 4 * (X4 - X1) * W14
        + 5 * (X5 - X1) * W15 + 6 * (X6 - X1) * W16 + 7 * (X7 - X1) * W17;

    [Rate(nameof(U2))]
    private double U2Rate =>
        1 * (X1 - X2) * W12 + 3 * (X3 - X2) * W23 + 4 * (X4 - X2) * W24
        + 5 * (X5 - X2) * W25 + 6 * (X6 - X2) * W26 + 7 * (X7 - X2) * W27;

    [Rate(nameof(U3))]
    private double U3Rate =>
        1 * (X1 - X3) * W13 + 2 * (X2 - X3) * W23 + 4 * (X4 - X3) * W34
        + 5 * (X5 - X3) * W35 + 6 * (X6 - X3) * W36 + 7 * (X7 - X3) * W37;

    [Rate(nameof(U4))]
    private double U4Rate =>
        1 * (X1 - X4) * W14 + 2 * (X2 - X4) * W24 + 3 * (X3 - X4) * W34
        + 5 * (X5 - X4) * W45 + 6 * (X6 - X4) * W46 + 7 * (X7 - X4) * W47;

    [Rate(nameof(U5))]
    private double U5Rate =>
        1 * (X1 - X5) * W15 + 2 * (X2 - X5) * W25 + 3 * (X3 - X5) * W35
        + 4 * (X4 - X5) * W45 + 6 * (X6 - X5) * W56 + 7 * (X7 - X5) * W57;

    [Rate(nameof(U6))]
    private double U6Rate =>
        1 * (X1 - X6) * W16 + 2 * (X2 - X6) * W26 + 3 * (X3 - X6) * W36
        + 4 * (X4 - X6) * W46 + 5 * (X5 - X6) * W56 + 7 * (X7 - X6) * W67;

    [Rate(nameof(U7))]
    private double U7Rate =>
        1 * (X1 - X7) * W17 + 2 * (X2 - X7) * W27 + 3 * (X3 - X7) * W37
        + 4 * (X4 - X7) * W47 + 5 * (X5 - X7) * W57 + 6 * (X6 - X7) * W67;

    [Rate(nameof(V1))]
    private double V1Rate =>
        2 * (Y2 - Y1) * W12 + 3 * (Y3 - Y1) * W13 + 4 * (Y4 - Y1) * W14
        + 5 * (Y5 - Y1) * W15 + 6 * (Y6 - Y1) * W16 + 7 * (Y7 - Y1) * W17;

    [Rate(nameof(V2))]
    private double V2Rate =>
        1 * (Y1 - Y2) * W12 + 3 * (Y3 - Y2) * W23 + 4 * (Y4 - Y2) * W24
        + 5 * (Y5 - Y2) * W25 + 6 * (Y6 - Y2) * W26 + 7 * (Y7 - Y2) * W27;

    [Rate(nameof(V3))]
    private double V3Rate =>
        1 * (Y1 - Y3) * W13 + 2 * (Y2 - Y3) * W23 + 4 * (Y4 - Y3) * W34
        + 5 * (Y5 - Y3) * W35 + 6 * (Y6 - Y3) * W36 + 7 * (Y7 - Y3) * W37;

    [Rate(nameof(V4))]
    private double V4Rate =>
        1 * (Y1 - Y4) * W14 + 2 * (Y2 - Y4) * W24 + 3 * (Y3 - Y4) * W34
        + 5 * (Y5 - Y4) * W45 + 6 * (Y6 - Y4) * W46 + 7 * (Y7 - Y4) * W47;

    [Rate(nameof(V5))]
    private double V5Rate =>
        1 * (Y1 - Y5) * W15 + 2 * (Y2 - Y5) * W25 + 3 * (Y3 - Y5) * W35
        + 4 * (Y4 - Y5) * W45 + 6 * (Y6 - Y5) * W56 + 7 * (Y7 - Y5) * W57;

    [Rate(nameof(V6))]
    private double V6Rate =>
        1 * (Y1 - Y6) * W16 + 2 * (Y2 - Y6) * W26 + 3 * (Y3 - Y6) * W36
        + 4 * (Y4 - Y6) * W46 + 5 * (Y5 - Y6) * W56 + 7 * (Y7 - Y6) * W67;

    [Rate(nameof(V7))]
    private double V7Rate =>
        1 * (Y1 - Y7) * W17 + 2 * (Y2 - Y7) * W27 + 3 * (Y3 - Y7) * W37
        + 4 * (Y4 - Y7) * W47 + 5 * (Y5 - Y7) * W57 + 6 * (Y6 - Y7) * W67;

    private double W12 => Weight(X1 - X2, Y1 - Y2);
    private double W13 => Weight(X1 - X3, Y1 - Y3);
    private double W14 => Weight(X1 - X4, Y1 - Y4);
    private double W15 => Weight(X1 - X5, Y1 - Y5);
    private double W16 => Weight(X1 - X6, Y1 - Y6);
    private double W17 => Weight(X1 - X7, Y1 - Y7);
    private double W23 => Weight(X2 - X3, Y2 - Y3);
    private double W24 => Weight(X2 - X4, Y2 - Y4);
    private double W25 => Weight(X2 - X5, Y2 - Y5);
    private double W26 => Weight(X2 - X6, Y2 - Y6);
    private double W27 => Weight(X2 - X7, Y2 - Y7);
    private double W34 => Weight(X3 - X4, Y3 - Y4);
    private double W35 => Weight(X3 - X5, Y3 - Y5);
    private double W36 => Weight(X3 - X6, Y3 - Y6);
    private double W37 => Weight(X3 - X7, Y3 - Y7);
    private double W45 => Weight(X4 - X5, Y4 - Y5);
    private double W46 => Weight(X4 - X6, Y4 - Y6);
    private double W47 => Weight(X4 - X7, Y4 - Y7);
    private double W56 => Weight(X5 - X6, Y5 - Y6);
    private double W57 => Weight(X5 - X7, Y5 - Y7);
    private double W67 => Weight(X6 - X7, Y6 - Y7);

    private static double Weight(double dx, double dy)
    {
        double square = dx * dx + dy * dy;
        return 1 / (square * Math.Sqrt(square));
    }
}
