using OdeDsl;

/// <summary>
/// A balance tank of a waterworks. A gate lets the water out; its motor turns faster the further the measured level is from the wanted
/// one, and the gauge lags behind the water.
/// </summary>
/// <remarks>
/// The tank settles as long as Gain stays below a (a + 1/Lag) / b with a = Inflow / (2 Area Wanted) and b = √(2 g Wanted) / Area
/// (the Routh-Hurwitz condition of the linear third-order equation); above, level and gate keep swinging.
/// </remarks>
[OdeModel(TimeUnit = "s")]
public sealed partial class BalanceTank
{
    /// <summary>Acceleration of gravity.</summary>
    [Unit("m/s2")]
    private const double Gravity = 9.81;

    /// <summary>Level of the water.</summary>
    [State(Initial = 2.5, Lower = 0.2, Upper = 8, Unit = "m")]
    public partial double Level { get; set; }

    /// <summary>Level that the gauge shows.</summary>
    [State(Initial = 2.5, Lower = 0.2, Upper = 8, Unit = "m")]
    public partial double Reading { get; set; }

    /// <summary>Free area of the gate.</summary>
    [State(Initial = 0.1, Lower = 0, Upper = 1, Unit = "m2")]
    public partial double Opening { get; set; }

    /// <summary>Horizontal area of the tank.</summary>
    [Parameter(60.0, Lower = 10, Upper = 300, Unit = "m2")]
    public partial double Area { get; set; }

    /// <summary>Water that flows in.</summary>
    [Parameter(0.8, Lower = 0.1, Upper = 3, Unit = "m3/s")]
    public partial double Inflow { get; set; }

    /// <summary>Level to hold.</summary>
    [Parameter(3.0, Lower = 1, Upper = 6, Unit = "m")]
    public partial double Wanted { get; set; }

    /// <summary>Time by which the gauge lags.</summary>
    [Parameter(20.0, Lower = 1, Upper = 120, Unit = "s")]
    public partial double Lag { get; set; }

    /// <summary>Speed of the gate per deviation of the level.</summary>
    [Parameter(5.0e-4, Lower = 1e-5, Upper = 5e-3, Unit = "m/s")]
    public partial double Gain { get; set; }

    /// <summary>Water that flows out (Torricelli).</summary>
    [Observable(Unit = "m3/s")]
    public double Outflow => Opening * Math.Sqrt(2 * Gravity * Level);

    [Rate(nameof(Level))]
    private double LevelRate => (Inflow - Outflow) / Area;

    [Rate(nameof(Reading))]
    private double ReadingRate => (Level - Reading) / Lag;

    [Rate(nameof(Opening))]
    private double OpeningRate => Gain * (Reading - Wanted);
}
