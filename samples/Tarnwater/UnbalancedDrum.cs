using OdeDsl;

namespace Tarnwater;

/// <summary>
/// The screenings drum: its centre of mass is off the axle, its bearings drag, and a drive clutch pushes it on only below a speed and
/// only while the drum is inside a window of angles.
/// </summary>
/// <remarks>
/// A rotor on a circle with switched torque. Hanging still it stays still, because the window lies on the falling side; turned over by
/// hand it is caught by the clutch once a turn and settles on a limit cycle that rotates. Check: over one turn of the cycle the work
/// of the clutch equals the work lost in the bearings, since the weight gives back what it takes.
/// </remarks>
[OdeModel(TimeUnit = "s")]
public sealed partial class UnbalancedDrum
{
    /// <summary>Acceleration of gravity.</summary>
    [Unit("m/s2")]
    private const double Gravity = 9.81;

    /// <summary>Angle of the centre of mass from hanging straight down, in the sense of rotation.</summary>
    [Angle]
    [State(Initial = 3.0, Lower = -Math.PI, Upper = Math.PI, Unit = "rad")]
    public partial double Angle { get; set; }

    /// <summary>Angular speed.</summary>
    [State(Initial = 4.0, Lower = -10, Upper = 14, Unit = "rad/s")]
    public partial double Speed { get; set; }

    /// <summary>Moment of inertia about the axle.</summary>
    [Parameter(1.2, Lower = 0.2, Upper = 10, Unit = "kg.m2")]
    public partial double Inertia { get; set; }

    /// <summary>Mass of the drum with its screenings.</summary>
    [Parameter(40.0, Lower = 5, Upper = 200, Unit = "kg")]
    public partial double Mass { get; set; }

    /// <summary>Distance of the centre of mass from the axle.</summary>
    [Parameter(0.03, Lower = 0, Upper = 0.2, Unit = "m")]
    public partial double Eccentricity { get; set; }

    /// <summary>Drag of the bearings per unit of speed.</summary>
    [Parameter(0.6, Lower = 0.05, Upper = 5, Unit = "N.m.s")]
    public partial double BearingDrag { get; set; }

    /// <summary>Torque of the clutch while it is engaged.</summary>
    [Parameter(25.0, Lower = 0, Upper = 100, Unit = "N.m")]
    public partial double ClutchTorque { get; set; }

    /// <summary>Speed above which the clutch lets go.</summary>
    [Parameter(7.0, Lower = 1, Upper = 14, Unit = "rad/s")]
    public partial double ReleaseSpeed { get; set; }

    /// <summary>Middle of the window of angles in which the clutch engages.</summary>
    [Parameter(4.05, Lower = 3.3, Upper = 5.5, Unit = "rad")]
    public partial double WindowMiddle { get; set; }

    /// <summary>Width of that window.</summary>
    [Parameter(1.5, Lower = 0.2, Upper = 2.5, Unit = "rad")]
    public partial double WindowWidth { get; set; }

    /// <summary>Torque of the clutch: none outside its window and above its speed.</summary>
    [Observable(Unit = "N.m")]
    private double Drive =>
        Speed < ReleaseSpeed && Math.Cos(Angle - WindowMiddle) > Math.Cos(WindowWidth / 2) ? ClutchTorque : 0;

    [Rate(nameof(Angle))]
    private double AngleRate => Speed;

    [Rate(nameof(Speed))]
    private double SpeedRate =>
        (Drive - Mass * Gravity * Eccentricity * Math.Sin(Angle) - BearingDrag * Speed) / Inertia;
}
