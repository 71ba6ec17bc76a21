namespace OdeDsl.Tests.Integration;

/// <summary>x'' = −sign(x) from (0, 1): parabolas of period 4, x = t − t²/2 on the first half.</summary>
[OdeModel]
internal sealed partial class BouncingRelay
{
    [State(Initial = 0)] public partial double X { get; set; }
    [State(Initial = 1)] public partial double V { get; set; }
    [Rate(nameof(X))] private double XRate => V;
    [Rate(nameof(V))] private double VRate => -Math.Sign(X);
}

/// <summary>A rate that jumps at given times.</summary>
[OdeModel]
internal sealed partial class SteppedForcing
{
    [State(Initial = 1)] public partial double X { get; set; }
    [Rate(nameof(X))] private double XRate(double time) => time < 2 ? 1 : time < 3.5 ? -2 : -X;
}

/// <summary>A block on a moving belt: spring against dry friction; sticks, slips, sticks.</summary>
[OdeModel]
internal sealed partial class BeltBlock
{
    [State(Initial = 0)] public partial double X { get; set; }
    [State(Initial = 0.2)] public partial double V { get; set; }
    [Parameter(0.2)] public partial double BeltSpeed { get; set; }
    [Parameter(1.0)] public partial double Friction { get; set; }
    private double Relative => V - BeltSpeed;
    [Rate(nameof(X))] private double XRate => V;
    [Rate(nameof(V))] private double VRate => -X - Friction * Math.Sign(Relative) / (1 + 3 * Math.Abs(Relative));
}

/// <summary>A condition that holds for a very short while in every turn.</summary>
[OdeModel]
internal sealed partial class NarrowWindow
{
    [State(Initial = 0)] public partial double Angle { get; set; }
    [State(Initial = 0)] public partial double Count { get; set; }
    [Parameter(1e-6)] public partial double Narrowness { get; set; }
    [Rate(nameof(Angle))] private double AngleRate => 1;
    [Rate(nameof(Count))] private double CountRate => Math.Sin(Angle) > 1 - Narrowness ? 1 : 0;
}

/// <summary>Spirals into the origin in finite time with infinitely many crossings.</summary>
[OdeModel]
internal sealed partial class FiniteSpiral
{
    [State(Initial = 1)] public partial double X { get; set; }
    [State(Initial = 0.3)] public partial double Y { get; set; }
    [Rate(nameof(X))] private double XRate => -Math.Sign(X) + 2 * Math.Sign(Y);
    [Rate(nameof(Y))] private double YRate => -2 * Math.Sign(X) - Math.Sign(Y);
}

/// <summary>A tank that empties through an orifice: the root has no value below the bottom.</summary>
[OdeModel]
internal sealed partial class DrainingTank
{
    [State(Initial = 4)] public partial double Level { get; set; }
    [Rate(nameof(Level))] private double LevelRate => Level > 0 ? -2 * Math.Sqrt(Level) : 0;
}

/// <summary>Whole-number surfaces in time and in a state.</summary>
[OdeModel]
internal sealed partial class Staircase
{
    [State(Initial = 0)] public partial double X { get; set; }
    [State(Initial = 0.5)] public partial double Y { get; set; }
    [Rate(nameof(X))] private double XRate(double time) => Math.Floor(time);
    [Rate(nameof(Y))] private double YRate => 1 / (1 + Math.Floor(Y));
}

/// <summary>Two surfaces that attract at once.</summary>
[OdeModel]
internal sealed partial class TwoSurfaces
{
    [State(Initial = 1)] public partial double X { get; set; }
    [State(Initial = 2)] public partial double Y { get; set; }
    [Rate(nameof(X))] private double XRate => -Math.Sign(X);
    [Rate(nameof(Y))] private double YRate => -Math.Sign(Y);
}

/// <summary>Three conditions that change together at t = 1; from there y' = 1 + 2 + 3.</summary>
[OdeModel]
internal sealed partial class SimultaneousSwitches
{
    [State(Initial = 0)] public partial double X { get; set; }
    [State(Initial = 0)] public partial double Y { get; set; }
    [Rate(nameof(X))] private double XRate => 1;
    [Rate(nameof(Y))] private double YRate(double time) => (X > 1 ? 1 : 0) + (2 * X > 2 ? 2 : 0) + (time >= 1 ? 3 : 0);
}

/// <summary>A planar motion whose rates jump across a circle and across a kink.</summary>
[OdeModel]
internal sealed partial class CircularFence
{
    [State(Initial = 0.2)] public partial double X { get; set; }
    [State(Initial = 0.1)] public partial double Y { get; set; }
    private bool IsInside => X * X + Y * Y < 1;
    [Rate(nameof(X))] private double XRate => IsInside ? 1 + Y : 0.8 * Y + 0.1;
    [Rate(nameof(Y))] private double YRate => (IsInside ? 0.3 : -X) + 0.2 * Math.Abs(Y - 0.5);
}
