namespace OdeDsl.Tests.Cycles;

/// <summary>B. van der Pol, Phil. Mag. 2 (1926).</summary>
[OdeModel]
internal sealed partial class VanDerPol
{
    [State(Initial = 0.5, Lower = -4, Upper = 4)] public partial double X { get; set; }

    [State(Initial = 0, Lower = -200, Upper = 200)] public partial double V { get; set; }

    [Parameter(1)] public partial double Mu { get; set; }

    [Rate(nameof(X))] private double XRate => V;

    [Rate(nameof(V))] private double VRate => Mu * (1 - X * X) * V - X;
}

/// <summary>
/// In polar coordinates r' = r (c0 + c1 r² + c2 r⁴), φ' = 1: every closed orbit is a circle whose radius is a root, with multiplier
/// exp(2π d(r')/dr) = exp(2π (2 c1 r² + 4 c2 r⁴)).
/// </summary>
[OdeModel]
internal sealed partial class Circles
{
    [State(Initial = 0.2, Lower = -2, Upper = 2)] public partial double X { get; set; }

    [State(Initial = 0, Lower = -2, Upper = 2)] public partial double Y { get; set; }

    [Parameter(0.09)] public partial double C0 { get; set; }

    [Parameter(-1)] public partial double C1 { get; set; }

    [Parameter(0)] public partial double C2 { get; set; }

    private double Growth
    {
        get
        {
            double square = X * X + Y * Y;
            return C0 + square * (C1 + square * C2);
        }
    }

    [Rate(nameof(X))] private double XRate => Growth * X - Y;

    [Rate(nameof(Y))] private double YRate => Growth * Y + X;
}

/// <summary>The same with its growth as a constant third state: one cycle on each level, a family in the whole space.</summary>
[OdeModel]
internal sealed partial class CirclesOnLevels
{
    [State(Initial = 0.2, Lower = -2, Upper = 2)] public partial double X { get; set; }

    [State(Initial = 0, Lower = -2, Upper = 2)] public partial double Y { get; set; }

    [State(Initial = 0.25, Lower = 0.1, Upper = 1)] public partial double Level { get; set; }

    private double Growth => Level - X * X - Y * Y;

    [Rate(nameof(X))] private double XRate => Growth * X - Y;

    [Rate(nameof(Y))] private double YRate => Growth * Y + X;

    [Rate(nameof(Level))] private double LevelRate => 0;
}

/// <summary>The Brusselator (Prigogine and Lefever 1968).</summary>
[OdeModel]
internal sealed partial class Brusselator
{
    [State(Initial = 1.5, Lower = 0, Upper = 6)] public partial double X { get; set; }

    [State(Initial = 3, Lower = 0, Upper = 8)] public partial double Y { get; set; }

    [Parameter(1)] public partial double A { get; set; }

    [Parameter(3)] public partial double B { get; set; }

    [Rate(nameof(X))] private double XRate => A - (B + 1) * X + X * X * Y;

    [Rate(nameof(Y))] private double YRate => B * X - X * X * Y;
}

/// <summary>Lotka 1925, Volterra 1926.</summary>
[OdeModel]
internal sealed partial class LotkaVolterra
{
    [State(Initial = 2, Lower = 0, Upper = 10)] public partial double Prey { get; set; }

    [State(Initial = 1, Lower = 0, Upper = 10)] public partial double Predator { get; set; }

    [Parameter(1.5)] public partial double Growth { get; set; }

    [Parameter(3)] public partial double Death { get; set; }

    [Rate(nameof(Prey))] private double PreyRate => Growth * Prey - Prey * Predator;

    [Rate(nameof(Predator))] private double PredatorRate => Prey * Predator - Death * Predator;
}

/// <summary>The swing equation of a machine on a long line: angle on a circle, slip.</summary>
[OdeModel]
internal sealed partial class Machine
{
    [Angle]
    [State(Initial = 1)] public partial double Angle { get; set; }

    [State(Initial = 0, Lower = -8, Upper = 8)] public partial double Slip { get; set; }

    [Parameter(0)] public partial double Drive { get; set; }

    [Parameter(1)] public partial double Line { get; set; }

    [Parameter(0)] public partial double Damping { get; set; }

    [Rate(nameof(Angle))] private double AngleRate => Slip;

    [Rate(nameof(Slip))] private double SlipRate => Drive - Line * Math.Sin(Angle) - Damping * Slip;
}

/// <summary>A block on a hardening spring with weak damping: a slow spiral.</summary>
[OdeModel]
internal sealed partial class SlowSpiral
{
    [State(Initial = 1, Lower = -4, Upper = 4)] public partial double X { get; set; }

    [State(Initial = 0, Lower = -6, Upper = 6)] public partial double V { get; set; }

    [Parameter(2e-4)] public partial double Damping { get; set; }

    [Parameter(0.3)] public partial double Hardening { get; set; }

    [Rate(nameof(X))] private double XRate => V;

    [Rate(nameof(V))] private double VRate => -X - Hardening * X * X * X - Damping * V;
}

/// <summary>A block between two wells, without friction: families inside each well and around both.</summary>
[OdeModel]
internal sealed partial class TwoWells
{
    [State(Initial = 1.3, Lower = -2, Upper = 2)] public partial double X { get; set; }

    [State(Initial = 0, Lower = -2, Upper = 2)] public partial double V { get; set; }

    [Rate(nameof(X))] private double XRate => V;

    [Rate(nameof(V))] private double VRate => X - X * X * X;
}

/// <summary>One angle driven past its holding torque.</summary>
[OdeModel]
internal sealed partial class OneAngle
{
    [Angle]
    [State(Initial = 0)] public partial double Angle { get; set; }

    [Parameter(2)] public partial double Drive { get; set; }

    [Rate(nameof(Angle))] private double AngleRate => Drive - Math.Sin(Angle);
}

/// <summary>Two angles, the second drawn to a fixed relation 2φ₂ - 3φ₁ = π.</summary>
[OdeModel]
internal sealed partial class TwoAngles
{
    [Angle]
    [State(Initial = 0.3)] public partial double First { get; set; }

    [Angle]
    [State(Initial = 0.1)] public partial double Second { get; set; }

    [Parameter(1.5)] public partial double Ratio { get; set; }

    [Parameter(0.1)] public partial double Pull { get; set; }

    [Rate(nameof(First))] private double FirstRate => 1;

    [Rate(nameof(Second))] private double SecondRate => Ratio + Pull * Math.Sin(2 * Second - 3 * First);
}

/// <summary>A rotor whose speed repels: an unstable rotating cycle.</summary>
[OdeModel]
internal sealed partial class RepellingRotor
{
    [Angle]
    [State(Initial = 0)] public partial double Angle { get; set; }

    [State(Initial = 1, Lower = -4, Upper = 8)] public partial double Speed { get; set; }

    [Rate(nameof(Angle))] private double AngleRate => Speed;

    [Rate(nameof(Speed))] private double SpeedRate => 0.5 * (Speed - 2) + 0.2 * Math.Sin(Angle);
}

/// <summary>
/// A clock: a damped balance with an escapement that pushes with constant force in the direction of motion (A. A. Andronov, A. A. Vitt and
/// S. E. Khaikin, "Theory of Oscillators", chapter III).
/// </summary>
[OdeModel]
internal sealed partial class Clock
{
    [State(Initial = 3, Lower = -6, Upper = 6)] public partial double X { get; set; }

    [State(Initial = 0, Lower = -6, Upper = 6)] public partial double V { get; set; }

    [Parameter(0.1)] public partial double Damping { get; set; }

    [Parameter(0.5)] public partial double Push { get; set; }

    [Rate(nameof(X))] private double XRate => V;

    [Rate(nameof(V))] private double VRate => -X - 2 * Damping * V + (V > 0 ? Push : -Push);
}

/// <summary>O. E. Rössler, Phys. Lett. A 57 (1976).</summary>
[OdeModel]
internal sealed partial class Roessler
{
    [State(Initial = 1, Lower = -12, Upper = 12)] public partial double X { get; set; }

    [State(Initial = 1, Lower = -12, Upper = 12)] public partial double Y { get; set; }

    [State(Initial = 1, Lower = 0, Upper = 20)] public partial double Z { get; set; }

    [Parameter(2.5)] public partial double C { get; set; }

    [Rate(nameof(X))] private double XRate => -Y - Z;

    [Rate(nameof(Y))] private double YRate => X + 0.2 * Y;

    [Rate(nameof(Z))] private double ZRate => 0.2 + Z * (X - C);
}

/// <summary>
/// A block on a spring, dragged by a belt whose friction weakens with the sliding speed: it sticks (slides along the surface of equal
/// speeds) and slips in turn.
/// </summary>
[OdeModel]
internal sealed partial class Belt
{
    [State(Initial = 0, Lower = -4, Upper = 4)] public partial double X { get; set; }

    [State(Initial = 0.5, Lower = -4, Upper = 4)] public partial double V { get; set; }

    [Parameter(0.5)] public partial double Speed { get; set; }

    [Parameter(1)] public partial double Grip { get; set; }

    [Parameter(0.3)] public partial double Weakening { get; set; }

    [Rate(nameof(X))] private double XRate => V;

    [Rate(nameof(V))] private double VRate => -X + (V < Speed ? Grip - Weakening * (Speed - V) : -Grip + Weakening * (V - Speed));
}
