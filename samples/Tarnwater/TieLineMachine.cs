using OdeDsl;

namespace Tarnwater;

/// <summary>
/// The station's synchronous generator on the long line to the grid: the rotor's angle against the grid, on a circle, and its slip.
/// </summary>
/// <remarks>
/// <para>
/// The swing equation of the classical model (constant voltage behind the transient reactance; P. Kundur, Power System Stability and
/// Control, 1994, chapter 13; J. Grainger and W. Stevenson, Power System Analysis, 1994, chapter 16). The rotor may rest in step with the
/// grid, or, once pushed over the saddle, slip poles for good: a rotating cycle. Both attract; a short circuit on the line decides.
/// </para>
/// <para>
/// Without damping, from the fault's beginning to the swing's end, the largest fault duration follows from the equal-area
/// criterion, and small swings have the angular frequency √(P<sub>max</sub>·cos δ₀·ω<sub>s</sub> / (2·H)).
/// </para>
/// </remarks>
[OdeModel(TimeUnit = "s")]
public sealed partial class TieLineMachine
{
    /// <summary>Electrical angular velocity of the 50 Hz grid.</summary>
    [Unit("rad/s")]
    private const double GridSpeed = 2 * Math.PI * 50;

    /// <summary>Angle of the rotor ahead of the grid, electrical.</summary>
    [Angle]
    [State(Initial = 1.6, Lower = -Math.PI, Upper = Math.PI, Unit = "rad")]
    public partial double Angle { get; set; }

    /// <summary>Speed of the rotor beyond the grid's, electrical.</summary>
    [State(Initial = 4.0, Lower = -12, Upper = 24, Unit = "rad/s")]
    public partial double Slip { get; set; }

    /// <summary>Power of the turbine, per unit of the machine's rating.</summary>
    [Parameter(0.7, Lower = 0, Upper = 1.2, Unit = "1")]
    public partial double TurbinePower { get; set; }

    /// <summary>Largest power the line carries at this voltage, per unit of the machine's rating.</summary>
    [Parameter(1.3, Lower = 0.4, Upper = 3, Unit = "1")]
    public partial double LinePower { get; set; }

    /// <summary>Inertia constant: kinetic energy at rated speed over the rating.</summary>
    [Parameter(3.5, Lower = 1, Upper = 10, Unit = "s")]
    public partial double Inertia { get; set; }

    /// <summary>Damper winding: power per unit of rating for each unit of relative slip.</summary>
    [Parameter(16.0, Lower = 0, Upper = 80, Unit = "1")]
    public partial double Damping { get; set; }

    /// <summary>Power sent to the grid, per unit of the machine's rating.</summary>
    [Observable(Unit = "1")]
    private double SentPower => LinePower * Math.Sin(Angle);

    [Rate(nameof(Angle))]
    private double AngleRate => Slip;

    [Rate(nameof(Slip))]
    private double SlipRate => GridSpeed / (2 * Inertia) * (TurbinePower - SentPower - Damping * Slip / GridSpeed);
}
