using OdeDsl;

namespace Consumer;

/// <summary>
/// A gate at the end of a channel, held by a spring and slowed by a damper with dry friction: a state on a circle, functions with kinks,
/// a helper, units, a rate that takes the time, and an observable.
/// </summary>
[OdeModel(TimeUnit = "s")]
public sealed partial class DamperedGate
{
    /// <summary>Angle of the gate.</summary>
    [State(Initial = 0.4, Lower = -3.2, Upper = 3.2, Unit = "rad"), Angle]
    public partial double Angle { get; set; }

    /// <summary>Angular velocity of the gate.</summary>
    [State(Initial = 0.0, Lower = -4, Upper = 4, Unit = "rad/s")]
    public partial double Speed { get; set; }

    /// <summary>Damping per moment of inertia.</summary>
    [Parameter(0.35, Lower = 0, Upper = 4, Unit = "1/s")]
    public partial double Damping { get; set; }

    /// <summary>Square of the frequency of small swings.</summary>
    [Parameter(2.25, Lower = 0.1, Upper = 20, Unit = "1/s2")]
    public partial double Stiffness { get; set; }

    /// <summary>Load of the water.</summary>
    [Parameter(0.9, Lower = -4, Upper = 4, Unit = "1/s2")]
    public partial double Load { get; set; }

    [Unit("s")]
    private const double Roughness = 0.25;

    private double Drag => Damping * Speed * (1 + Roughness * Math.Abs(Speed));

    /// <summary>Energy per moment of inertia.</summary>
    [Observable(Unit = "1/s2")]
    public double Energy => Speed * Speed / 2 + Stiffness * (1 - Math.Cos(Angle)) - Load * Angle;

    [Rate(nameof(Angle))]
    private double AngleRate => Speed;

    [Rate(nameof(Speed))]
    private double SpeedRate(double time) => Load - Stiffness * Math.Sin(Angle) - Drag;
}
