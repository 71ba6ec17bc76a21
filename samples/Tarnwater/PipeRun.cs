using OdeDsl;

namespace Tarnwater;

/// <summary>A buried hot-water main: the water carries heat along, mixes it along the way and loses it to the ground.</summary>
/// <remarks>
/// <para>
/// Balance of heat in a flow with longitudinal mixing and loss through the wall, ∂T/∂t = −v ∂T/∂x + D ∂²T/∂x² − k (T − T<sub>ground</sub>), by
/// the method of lines: the pipe is cut into cells, and heat flows through the faces between them (central differences: second order in the
/// length of a cell, without wiggles as long as v Δx / D is below 2).
/// </para>
/// <para>
/// The water enters with a given temperature; at the far end it leaves without mixing. How long a pipe is cut into how many cells is set when a
/// model is made.
/// </para>
/// </remarks>
[OdeModel(TimeUnit = "s")]
public sealed partial class PipeRun
{
    /// <summary>The number of cells.</summary>
    [Parameter(100, Lower = 2, Upper = 1_000_000, Unit = "1")]
    public partial int Cells { get; init; }

    /// <summary>The water's temperature in each cell.</summary>
    [State(Length = nameof(Cells), Initial = 10, Lower = -20, Upper = 120, Unit = "Cel")]
    public partial double[] Temperature { get; set; }

    /// <summary>The length of the pipe.</summary>
    [Parameter(1200, Lower = 10, Upper = 100_000, Unit = "m")]
    public partial double Length { get; set; }

    /// <summary>The water's velocity.</summary>
    [Parameter(0.8, Lower = 0.05, Upper = 3, Unit = "m/s")]
    public partial double Velocity { get; set; }

    /// <summary>Longitudinal mixing, an effective diffusivity.</summary>
    [Parameter(6, Lower = 0.01, Upper = 100, Unit = "m2/s")]
    public partial double Mixing { get; set; }

    /// <summary>Loss through the wall, over the heat capacity of the water.</summary>
    [Parameter(2.5e-4, Lower = 0, Upper = 0.01, Unit = "1/s")]
    public partial double LossRate { get; set; }

    /// <summary>The temperature with which the water enters.</summary>
    [Parameter(70, Lower = 0, Upper = 110, Unit = "Cel")]
    public partial double InletTemperature { get; set; }

    /// <summary>The temperature of the ground.</summary>
    [Parameter(10, Lower = -10, Upper = 25, Unit = "Cel")]
    public partial double GroundTemperature { get; set; }

    /// <summary>The temperature with which the water leaves.</summary>
    [Observable(Unit = "Cel")]
    public double OutletTemperature => Temperature[^1];

    /// <summary>The mean temperature of the water in the pipe.</summary>
    [Observable(Unit = "Cel")]
    public double MeanTemperature
    {
        get
        {
            double sum = 0;
            for (int i = 0; i < Temperature.Length; i++) sum += Temperature[i];
            return sum / Temperature.Length;
        }
    }

    private double CellLength => Length / Cells;

    [Rate(nameof(Temperature))]
    private double TemperatureRate(int i) =>
        (HeatFlow(i) - HeatFlow(i + 1)) / CellLength - LossRate * (Temperature[i] - GroundTemperature);

    /// <summary>Heat through a face, over heat capacity and cross-section. Face i lies before cell i.</summary>
    private double HeatFlow(int face)
    {
        if (face == 0) return Velocity * InletTemperature - Mixing * (Temperature[0] - InletTemperature) / (CellLength / 2);
        if (face == Cells) return Velocity * Temperature[face - 1];
        return Velocity * (Temperature[face - 1] + Temperature[face]) / 2 - Mixing * (Temperature[face] - Temperature[face - 1]) / CellLength;
    }
}
