using OdeDsl;

namespace Tarnwater;

/// <summary>
/// A drainage sump emptied by a pump that a contactor starts at the high level contact and stops at the low one.
/// </summary>
/// <remarks>
/// <para>
/// Between the contacts the pump goes on with what it was doing: the plant needs a memory. Here that is the contactor's armature, a state
/// between 0 (dropped) and 1 (pulled in), drawn within the short time <see cref="PullInTime"/> to the side that the contacts ask for, and
/// between them to the side it is nearer to (the latch). The pump runs while the armature is past the middle.
/// </para>
/// <para>
/// The armature needs PullInTime·ln 2 from one end to the middle; meanwhile the level runs past the contact. With
/// V = Area·(HighContact - LowContact) the period is exactly, up to e^(-period/PullInTime),
/// (V + Inflow·d + (PumpFlow - Inflow)·d)·(1/Inflow + 1/(PumpFlow - Inflow)) with d = PullInTime·ln 2, and tends to the textbook's
/// V/Inflow + V/(PumpFlow - Inflow) for a fast contactor.
/// </para>
/// </remarks>
[OdeModel(TimeUnit = "s")]
public sealed partial class SumpRelay
{
    /// <summary>Water level in the sump.</summary>
    [State(Initial = 0.8, Lower = 0, Upper = 2.5, Unit = "m")]
    public partial double Level { get; set; }

    /// <summary>Position of the contactor's armature: 0 dropped, 1 pulled in.</summary>
    [State(Initial = 0, Lower = 0, Upper = 1, Unit = "1")]
    public partial double Armature { get; set; }

    /// <summary>Horizontal area of the sump.</summary>
    [Parameter(3.0, Lower = 0.5, Upper = 20, Unit = "m2")]
    public partial double Area { get; set; }

    /// <summary>Water running in.</summary>
    [Parameter(0.008, Lower = 0.0005, Upper = 0.03, Unit = "m3/s")]
    public partial double Inflow { get; set; }

    /// <summary>Water lifted by the pump while it runs.</summary>
    [Parameter(0.02, Lower = 0.001, Upper = 0.06, Unit = "m3/s")]
    public partial double PumpFlow { get; set; }

    /// <summary>Level at which the pump stops.</summary>
    [Parameter(0.5, Lower = 0.1, Upper = 1.2, Unit = "m")]
    public partial double LowContact { get; set; }

    /// <summary>Level at which the pump starts.</summary>
    [Parameter(1.5, Lower = 0.8, Upper = 2.4, Unit = "m")]
    public partial double HighContact { get; set; }

    /// <summary>Time constant of the contactor.</summary>
    [Parameter(2, Lower = 0.05, Upper = 20, Unit = "s")]
    public partial double PullInTime { get; set; }

    /// <summary>Where contacts and latch draw the armature: 0 or 1.</summary>
    private double Latch
    {
        get
        {
            if (Level > HighContact) return 1;
            if (Level < LowContact) return 0;
            return Armature > 0.5 ? 1 : 0;
        }
    }

    /// <summary>Water lifted now.</summary>
    [Observable(Unit = "m3/s")]
    private double Lifted => Armature > 0.5 ? PumpFlow : 0;

    [Rate(nameof(Level))]
    private double LevelRate => (Inflow - Lifted) / Area;

    [Rate(nameof(Armature))]
    private double ArmatureRate => (Latch - Armature) / PullInTime;
}
