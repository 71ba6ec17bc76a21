using OdeDsl;

namespace Tarnwater;

/// <summary>
/// The hydro station's headrace: a long tunnel feeds a turbine that its governor keeps at constant power; a surge tank near the
/// turbine takes up the water when tunnel and turbine disagree.
/// </summary>
/// <remarks>
/// <para>
/// A governor that holds power opens its gates when the head falls, and so draws more water just when the tank has too little. In a
/// tank that is too slender this feeds the surge until the plant trips. D. Thoma (Zur Theorie des Wasserschlosses bei selbsttätig
/// geregelten Turbinenanlagen, 1910): small surges die out if the tank's area exceeds
/// L·A / (2·g·c·H<sub>net</sub>) with L, A the tunnel's length and area, c its loss coefficient and H<sub>net</sub> = Head + Level at rest.
/// </para>
/// <para>
/// Idealised: rigid water column, no throttle at the tank's foot, a governor without delay, turbine efficiency within the power.
/// Level is measured upwards from the reservoir's surface, so that it is negative at rest by the loss in the tunnel.
/// </para>
/// </remarks>
[OdeModel(TimeUnit = "s")]
public sealed partial class SurgeTank
{
    /// <summary>Density of water.</summary>
    [Unit("kg/m3")]
    private const double Density = 1000;

    /// <summary>Acceleration of gravity.</summary>
    [Unit("m/s2")]
    private const double Gravity = 9.81;

    /// <summary>Water level in the surge tank above the reservoir's surface.</summary>
    [State(Initial = -2.0, Lower = -45, Upper = 15, Unit = "m")]
    public partial double Level { get; set; }

    /// <summary>Velocity of the water in the tunnel, towards the turbine.</summary>
    [State(Initial = 2.2, Lower = -2, Upper = 8, Unit = "m/s")]
    public partial double Velocity { get; set; }

    /// <summary>Horizontal area of the surge tank.</summary>
    [Parameter(60.0, Lower = 5, Upper = 400, Unit = "m2")]
    public partial double TankArea { get; set; }

    /// <summary>Cross-section of the tunnel.</summary>
    [Parameter(14.0, Lower = 4, Upper = 40, Unit = "m2")]
    public partial double TunnelArea { get; set; }

    /// <summary>Length of the tunnel.</summary>
    [Parameter(3750.0, Lower = 500, Upper = 9000, Unit = "m")]
    public partial double Length { get; set; }

    /// <summary>Loss coefficient: head lost per square of the velocity.</summary>
    [Parameter(1.2, Lower = 0.2, Upper = 4, Unit = "s2/m")]
    public partial double Loss { get; set; }

    /// <summary>Height of the reservoir's surface above the tail water.</summary>
    [Parameter(63.0, Lower = 30, Upper = 200, Unit = "m")]
    public partial double Head { get; set; }

    /// <summary>Hydraulic power the governor holds.</summary>
    [Parameter(20.0e6, Lower = 2e6, Upper = 40e6, Unit = "W")]
    public partial double Power { get; set; }

    /// <summary>Water drawn by the turbine.</summary>
    [Observable(Unit = "m3/s")]
    private double Flow => Power / (Density * Gravity * (Head + Level));

    [Rate(nameof(Level))]
    private double LevelRate => (TunnelArea * Velocity - Flow) / TankArea;

    [Rate(nameof(Velocity))]
    private double VelocityRate => -Gravity / Length * (Level + Loss * Velocity * Math.Abs(Velocity));
}
