using OdeDsl;

namespace Tarnwater;

/// <summary>
/// The neutraliser: a stirred, cooled tank in which a reagent reacts with much heat, the faster the hotter.
/// </summary>
/// <remarks>
/// The heat set free against temperature is a step, the heat carried off a straight line; they meet once or three times
/// (C. van Heerden, Autothermic processes, Industrial and Engineering Chemistry 45, 1953). With three rests the middle one is a saddle: the
/// tank lies cold or burns hot, ignites where the cold rest ends and goes out where the hot one ends. A hot rest cooled too hard
/// loses its stability by oscillation before it goes out.
/// </remarks>
[OdeModel(TimeUnit = "min")]
public sealed partial class HeatedReactor
{
    /// <summary>Molar gas constant, exact in the SI since 2019.</summary>
    [Unit("J/(mol.K)")]
    private const double GasConstant = 8.31446261815324;

    /// <summary>Temperature at which <see cref="Rate320"/> is given.</summary>
    [Unit("K")]
    private const double ReferenceTemperature = 320;

    /// <summary>Concentration of the reagent in the tank.</summary>
    [State(Initial = 1000, Lower = 0, Upper = 5000, Unit = "mol/m3")]
    public partial double Concentration { get; set; }

    /// <summary>Temperature in the tank.</summary>
    [State(Initial = 340, Lower = 273, Upper = 420, Unit = "K")]
    public partial double Temperature { get; set; }

    /// <summary>Volume of the tank.</summary>
    [Parameter(2.0, Lower = 0.5, Upper = 10, Unit = "m3")]
    public partial double Volume { get; set; }

    /// <summary>Flow through the tank.</summary>
    [Parameter(0.25, Lower = 0.02, Upper = 1.5, Unit = "m3/min")]
    public partial double Flow { get; set; }

    /// <summary>Concentration in the inflow.</summary>
    [Parameter(4000, Lower = 500, Upper = 5000, Unit = "mol/m3")]
    public partial double InflowConcentration { get; set; }

    /// <summary>Temperature of the inflow.</summary>
    [Parameter(290, Lower = 275, Upper = 330, Unit = "K")]
    public partial double InflowTemperature { get; set; }

    /// <summary>Temperature of the coolant.</summary>
    [Parameter(290, Lower = 275, Upper = 330, Unit = "K")]
    public partial double CoolantTemperature { get; set; }

    /// <summary>Heat passed to the coolant per unit of time and of temperature difference.</summary>
    [Parameter(520e3, Lower = 20e3, Upper = 2e6, Unit = "J/(min.K)")]
    public partial double Cooling { get; set; }

    /// <summary>Rate constant of the reaction at 320 K.</summary>
    [Parameter(0.09, Lower = 0.01, Upper = 0.5, Unit = "1/min")]
    public partial double Rate320 { get; set; }

    /// <summary>Activation energy of the reaction.</summary>
    [Parameter(80e3, Lower = 30e3, Upper = 120e3, Unit = "J/mol")]
    public partial double ActivationEnergy { get; set; }

    /// <summary>Heat set free by a mole of reagent.</summary>
    [Parameter(100e3, Lower = 10e3, Upper = 200e3, Unit = "J/mol")]
    public partial double ReactionHeat { get; set; }

    /// <summary>Heat that warms a unit of volume of the contents by a unit of temperature.</summary>
    [Parameter(4.0e6, Lower = 2e6, Upper = 5e6, Unit = "J/(m3.K)")]
    public partial double HeatCapacity { get; set; }

    /// <summary>Reagent used up per unit of volume and time: first order, temperature after S. Arrhenius (1889).</summary>
    private double Reaction =>
        Rate320 * Math.Exp(ActivationEnergy / GasConstant * (1 / ReferenceTemperature - 1 / Temperature)) * Concentration;

    /// <summary>Share of the reagent in the inflow that has reacted.</summary>
    [Observable(Unit = "1")]
    private double Conversion => 1 - Concentration / InflowConcentration;

    [Rate(nameof(Concentration))]
    private double ConcentrationRate => Flow / Volume * (InflowConcentration - Concentration) - Reaction;

    [Rate(nameof(Temperature))]
    private double TemperatureRate =>
        Flow / Volume * (InflowTemperature - Temperature)
        + ReactionHeat / HeatCapacity * Reaction
        - Cooling / (HeatCapacity * Volume) * (Temperature - CoolantTemperature);
}
