using OdeDsl;

namespace Tarnwater;

/// <summary>
/// A warm mixing loop that stirs itself by convection: circulation, the contrast between its rising and falling leg, and the layering
/// between its bottom and top.
/// </summary>
/// <remarks>
/// The three coarsest modes of convection, after the truncation by E. N. Lorenz (Deterministic nonperiodic flow, Journal of the Atmospheric
/// Sciences 20, 1963), in our own units: with σ = Friction/Exchange, β = Smoothing/Exchange and ρ = Heating·Lift/(Exchange·Reach) his
/// equations come out. At the numbers here no rest is stable and no cycle attracts: the circulation reverses irregularly. Check: the sum of the
/// Lyapunov exponents is the divergence -(Friction + Exchange + Smoothing), and the rests of steady circulation lose their
/// stability at σ(σ + β + 3)/(σ - β - 1).
/// </remarks>
[OdeModel(TimeUnit = "s")]
public sealed partial class StirredMixer
{
    /// <summary>Velocity of the circulation, positive in one sense.</summary>
    [State(Initial = 10, Lower = -80, Upper = 80, Unit = "mm/s")]
    public partial double Circulation { get; set; }

    /// <summary>Temperature of the rising leg above the falling leg's, in the positive sense of circulation.</summary>
    [State(Initial = 1, Lower = -8, Upper = 8, Unit = "K")]
    public partial double Contrast { get; set; }

    /// <summary>How far the circulation has undone the temperature difference between bottom and top.</summary>
    [State(Initial = 5, Lower = -2, Upper = 14, Unit = "K")]
    public partial double Layering { get; set; }

    /// <summary>Rate at which wall friction stops the circulation.</summary>
    [Parameter(0.2, Lower = 0.02, Upper = 1, Unit = "1/s")]
    public partial double Friction { get; set; }

    /// <summary>Steady circulation driven by a unit of contrast.</summary>
    [Parameter(10, Lower = 2, Upper = 40, Unit = "mm/(s.K)")]
    public partial double Lift { get; set; }

    /// <summary>Rate at which the contrast dies out by exchange through the walls.</summary>
    [Parameter(0.02, Lower = 0.004, Upper = 0.1, Unit = "1/s")]
    public partial double Exchange { get; set; }

    /// <summary>Rate at which the layering is smoothed.</summary>
    [Parameter(0.05, Lower = 0.01, Upper = 0.2, Unit = "1/s")]
    public partial double Smoothing { get; set; }

    /// <summary>Length of loop over which the circulation carries a temperature difference.</summary>
    [Parameter(150, Lower = 40, Upper = 600, Unit = "mm")]
    public partial double Reach { get; set; }

    /// <summary>Temperature difference between bottom and top that the heating would keep up without circulation.</summary>
    [Parameter(8.4, Lower = 0, Upper = 30, Unit = "K")]
    public partial double Heating { get; set; }

    [Rate(nameof(Circulation))]
    private double CirculationRate => Friction * (Lift * Contrast - Circulation);

    [Rate(nameof(Contrast))]
    private double ContrastRate => Circulation / Reach * (Heating - Layering) - Exchange * Contrast;

    [Rate(nameof(Layering))]
    private double LayeringRate => Circulation / Reach * Contrast - Smoothing * Layering;
}
