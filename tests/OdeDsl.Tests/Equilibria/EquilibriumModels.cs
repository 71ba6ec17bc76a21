namespace OdeDsl.Tests.Equilibria;

/// <summary>Lorenz 1963, J. Atmos. Sci. 20.</summary>
[OdeModel]
internal sealed partial class Lorenz
{
    [State(Initial = 1, Lower = -30, Upper = 30)] public partial double X { get; set; }

    [State(Initial = 1, Lower = -30, Upper = 30)] public partial double Y { get; set; }

    [State(Initial = 20, Lower = 0, Upper = 60)] public partial double Z { get; set; }

    [Parameter(10)] public partial double Sigma { get; set; }

    [Parameter(28)] public partial double Rho { get; set; }

    [Parameter(8.0 / 3)] public partial double Beta { get; set; }

    [Rate(nameof(X))] private double XRate => Sigma * (Y - X);

    [Rate(nameof(Y))] private double YRate => X * (Rho - Z) - Y;

    [Rate(nameof(Z))] private double ZRate => X * Y - Beta * Z;
}

/// <summary>Two coupled Chebyshev polynomials of degree 5: all 25 roots are products of the roots cos((2k - 1) π / 10).</summary>
[OdeModel]
internal sealed partial class Grid
{
    [State(Initial = 0.3, Lower = -1.2, Upper = 1.2)] public partial double X { get; set; }

    [State(Initial = 0.2, Lower = -1.2, Upper = 1.2)] public partial double Y { get; set; }

    [Parameter(0.25)] public partial double Coupling { get; set; }

    [Rate(nameof(X))] private double XRate => Fifth(X) + Coupling * Fifth(Y);

    [Rate(nameof(Y))] private double YRate => Fifth(Y) - Coupling * Fifth(X);

    private static double Fifth(double x) => x * (5 + x * x * (16 * x * x - 20));
}

/// <summary>A cubic with two roots a small gap apart.</summary>
[OdeModel]
internal sealed partial class NearbyRests
{
    [State(Initial = 0, Lower = -3, Upper = 3)] public partial double X { get; set; }

    [Parameter(1e-5)] public partial double Gap { get; set; }

    [Rate(nameof(X))] private double XRate => (X - 1) * (X - 1 - Gap) * (X + 2);
}

/// <summary>A plane linear system.</summary>
[OdeModel]
internal sealed partial class Linear
{
    [State(Initial = 1, Lower = -5, Upper = 5)] public partial double X { get; set; }

    [State(Initial = 1, Lower = -5, Upper = 5)] public partial double Y { get; set; }

    [Parameter(0)] public partial double A { get; set; }

    [Parameter(1)] public partial double B { get; set; }

    [Parameter(-1)] public partial double C { get; set; }

    [Parameter(0)] public partial double D { get; set; }

    [Rate(nameof(X))] private double XRate => A * X + B * Y;

    [Rate(nameof(Y))] private double YRate => C * X + D * Y;
}

/// <summary>The swing equation of a machine on a long line (any power-systems textbook): angle on a circle, slip.</summary>
[OdeModel]
internal sealed partial class Machine
{
    [Angle]
    [State(Initial = 0.2)] public partial double Angle { get; set; }

    [State(Initial = 0, Lower = -8, Upper = 8)] public partial double Slip { get; set; }

    [Parameter(0.5)] public partial double Drive { get; set; }

    [Parameter(1)] public partial double Line { get; set; }

    [Parameter(0.1)] public partial double Damping { get; set; }

    [Rate(nameof(Angle))] private double AngleRate => Slip;

    [Rate(nameof(Slip))] private double SlipRate => Drive - Line * Math.Sin(Angle) - Damping * Slip;
}

/// <summary>A reversible reaction in a closed vessel, A ⇌ 2 B: the total A + B/2 is conserved.</summary>
[OdeModel]
internal sealed partial class ClosedVessel
{
    [State(Initial = 1, Lower = 0, Upper = 4)] public partial double A { get; set; }

    [State(Initial = 0.5, Lower = 0, Upper = 4)] public partial double B { get; set; }

    private double Forward => 2 * A - B * B;

    [Rate(nameof(A))] private double ARate => -Forward;

    [Rate(nameof(B))] private double BRate => 2 * Forward;
}

/// <summary>A block on a spring with dry and viscous friction.</summary>
[OdeModel]
internal sealed partial class Block
{
    [State(Initial = 2, Lower = -3, Upper = 3)] public partial double Position { get; set; }

    [State(Initial = 0, Lower = -3, Upper = 3)] public partial double Speed { get; set; }

    [Parameter(1)] public partial double Stiffness { get; set; }

    [Parameter(0.3)] public partial double Friction { get; set; }

    [Parameter(0.1)] public partial double Damping { get; set; }

    [Rate(nameof(Position))] private double PositionRate => Speed;

    [Rate(nameof(Speed))] private double SpeedRate => -Stiffness * Position - Friction * Math.Sign(Speed) - Damping * Speed;
}

/// <summary>A tank with a valve that is open above a level, and too strong to leave the level there: it rests by sliding.</summary>
[OdeModel]
internal sealed partial class SlidingTank
{
    [State(Initial = 0.5, Lower = 0, Upper = 2)] public partial double Level { get; set; }

    [State(Initial = 0.5, Lower = 0, Upper = 2)] public partial double Inflow { get; set; }

    [Rate(nameof(Level))] private double LevelRate => Inflow - (Level > 1 ? 1.5 : 0);

    [Rate(nameof(Inflow))] private double InflowRate => 0.6 - Inflow;
}

/// <summary>A different law on each of five stretches of the state.</summary>
[OdeModel]
internal sealed partial class Stretches
{
    [State(Initial = 0.5, Lower = 0, Upper = 5)] public partial double X { get; set; }

    [Rate(nameof(X))]
    private double XRate => Math.Floor(X) switch
    {
        0 => 0.25 - X,
        1 => X - 1.5,
        2 => 2.75 - X,
        3 => 1,
        _ => X - 20,
    };
}

/// <summary>A rest on a kink: the rate's slope differs on its two sides.</summary>
[OdeModel]
internal sealed partial class Kinked
{
    [State(Initial = 0.5, Lower = -1, Upper = 1)] public partial double X { get; set; }

    [Rate(nameof(X))] private double XRate => X < 0 ? -X : -3 * X;
}

/// <summary>A double root.</summary>
[OdeModel]
internal sealed partial class DoubleRoot
{
    [State(Initial = 0.5, Lower = -1, Upper = 1)] public partial double X { get; set; }

    [State(Initial = 0.5, Lower = -1, Upper = 1)] public partial double Y { get; set; }

    [Rate(nameof(X))] private double XRate => (X - 0.25) * (X - 0.25);

    [Rate(nameof(Y))] private double YRate => X - Y;
}

/// <summary>A rate without a root: the nearest thing to one is its minimum.</summary>
[OdeModel]
internal sealed partial class NoRest
{
    [State(Initial = 0.5)] public partial double X { get; set; }

    [Rate(nameof(X))] private double XRate => 1e-3 + X * X;
}

/// <summary>A rate that depends on time.</summary>
[OdeModel]
internal sealed partial class Driven
{
    [State(Initial = 0.5)] public partial double X { get; set; }

    [Rate(nameof(X))] private double XRate(double time) => Math.Sin(time) - X;
}

/// <summary>
/// H. H. Robertson's reactions (1966) with an inflow and outflow of one per cent: rates between 0.01 and 3e7, one rest.
/// </summary>
[OdeModel]
internal sealed partial class OpenRobertson
{
    [State(Initial = 1, Lower = 0, Upper = 1)] public partial double A { get; set; }

    [State(Initial = 0, Lower = 0, Upper = 1e-3)] public partial double B { get; set; }

    [State(Initial = 0, Lower = 0, Upper = 1)] public partial double C { get; set; }

    [Rate(nameof(A))] private double ARate => -0.04 * A + 1e4 * B * C + 0.01 * (1 - A);

    [Rate(nameof(B))] private double BRate => 0.04 * A - 1e4 * B * C - 3e7 * B * B - 0.01 * B;

    [Rate(nameof(C))] private double CRate => 3e7 * B * B - 0.01 * C;
}
