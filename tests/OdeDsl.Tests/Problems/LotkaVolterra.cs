namespace OdeDsl.Tests.Problems;

/// <summary>A. J. Lotka 1925, V. Volterra 1926; the numbers of the example in SciPy's documentation of solve_ivp.</summary>
[OdeModel]
internal sealed partial class LotkaVolterra
{
    [State(Initial = 10, Lower = 0, Upper = 20)] public partial double Prey { get; set; }
    [State(Initial = 5, Lower = 0, Upper = 20)] public partial double Predators { get; set; }

    [Parameter(1.5, Lower = 0.1, Upper = 5)] public partial double Growth { get; set; }
    [Parameter(1, Lower = 0.1, Upper = 5)] public partial double Capture { get; set; }
    [Parameter(3, Lower = 0.1, Upper = 5)] public partial double Death { get; set; }
    [Parameter(1, Lower = 0.1, Upper = 5)] public partial double Yield { get; set; }

    [Rate(nameof(Prey))] private double PreyRate => Growth * Prey - Capture * Prey * Predators;
    [Rate(nameof(Predators))] private double PredatorRate => -Death * Predators + Yield * Prey * Predators;
}
