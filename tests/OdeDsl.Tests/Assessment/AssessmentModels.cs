namespace OdeDsl.Tests.Assessment;

/// <summary>A self-sustained oscillator (B. van der Pol 1926).</summary>
[OdeModel]
internal sealed partial class VanDerPol
{
    [State(Initial = 0.5, Lower = -5, Upper = 5)] public partial double X { get; set; }

    [State(Initial = 0, Lower = -5, Upper = 5)] public partial double V { get; set; }

    [Parameter(1, Lower = -2, Upper = 3)] public partial double Mu { get; set; }

    [Rate(nameof(X))] private double XRate => V;

    [Rate(nameof(V))] private double VRate => Mu * (1 - X * X) * V - X;
}

/// <summary>Two species, one living on the other (Lotka 1925, Volterra 1926).</summary>
[OdeModel]
internal sealed partial class LotkaVolterra
{
    [State(Initial = 2, Lower = 0, Upper = 8)] public partial double Prey { get; set; }

    [State(Initial = 1, Lower = 0, Upper = 8)] public partial double Predator { get; set; }

    [Parameter(1.5)] public partial double Birth { get; set; }

    [Parameter(1)] public partial double Capture { get; set; }

    [Parameter(3)] public partial double Death { get; set; }

    [Rate(nameof(Prey))] private double PreyRate => Birth * Prey - Capture * Prey * Predator;

    [Rate(nameof(Predator))] private double PredatorRate => Capture * Prey * Predator - Death * Predator;
}

/// <summary>A quantity that leaves to infinity in finite time: x' = x².</summary>
[OdeModel]
internal sealed partial class Runaway
{
    [State(Initial = 1, Lower = 0.1, Upper = 10)] public partial double X { get; set; }

    [Rate(nameof(X))] private double XRate => X * X;
}

/// <summary>Two stable rests, x = -1 and x = 1, with a straight border between their basins.</summary>
[OdeModel]
internal sealed partial class Bistable
{
    [State(Initial = 0.9, Lower = -2, Upper = 2)] public partial double X { get; set; }

    [State(Initial = 0, Lower = -1, Upper = 1)] public partial double Y { get; set; }

    /// <summary>The border lies at x equal to this.</summary>
    [Parameter(0.5, Lower = -0.99, Upper = 0.99)] public partial double Border { get; set; }

    [Rate(nameof(X))] private double XRate => (1 - X * X) * (X - Border);

    [Rate(nameof(Y))] private double YRate => -Y;
}

/// <summary>In polar form r' = r (μ + r² - r⁴), θ' = 1: two cycles r² = (1 ± √(1+4μ))/2 that meet at μ = -1/4.</summary>
[OdeModel]
internal sealed partial class TwoCycles
{
    [State(Initial = 1, Lower = -2, Upper = 2)] public partial double X { get; set; }

    [State(Initial = 0, Lower = -2, Upper = 2)] public partial double Y { get; set; }

    [Parameter(-0.1, Lower = -1, Upper = 1)] public partial double Mu { get; set; }

    private double Growth => Mu + (X * X + Y * Y) - (X * X + Y * Y) * (X * X + Y * Y);

    [Rate(nameof(X))] private double XRate => Growth * X - Y;

    [Rate(nameof(Y))] private double YRate => Growth * Y + X;
}

/// <summary>A cycle r = 1 in the plane z = 0 that loses its hold across: z' = μ z - z³; its multiplier e^(2πμ) passes 1 at μ = 0.</summary>
[OdeModel]
internal sealed partial class SidewaysCycle
{
    [State(Initial = 1, Lower = -2, Upper = 2)] public partial double X { get; set; }

    [State(Initial = 0.2, Lower = -2, Upper = 2)] public partial double Y { get; set; }

    [State(Initial = 0.3, Lower = -2, Upper = 2)] public partial double Z { get; set; }

    [Parameter(-0.5, Lower = -1, Upper = 1)] public partial double Mu { get; set; }

    private double Growth => 1 - X * X - Y * Y;

    [Rate(nameof(X))] private double XRate => Growth * X - Y;

    [Rate(nameof(Y))] private double YRate => Growth * Y + X;

    [Rate(nameof(Z))] private double ZRate => Mu * Z - Z * Z * Z;
}

/// <summary>A fast lag behind a slow one: stiff.</summary>
[OdeModel]
internal sealed partial class StiffLag
{
    [State(Initial = 0, Lower = -1, Upper = 3)] public partial double Fast { get; set; }

    [State(Initial = 2, Lower = -1, Upper = 3)] public partial double Slow { get; set; }

    [Parameter(1e5, Lower = 1, Upper = 1e6, Unit = "1/s")] public partial double Rate { get; set; }

    [Rate(nameof(Fast))] private double FastRate => Rate * (Math.Cos(Slow) - Fast);

    [Rate(nameof(Slow))] private double SlowRate => 0.3 - Slow * Fast;
}

/// <summary>A rate that throws: the bounds of the clamp are crossed while Low lies above High.</summary>
[OdeModel]
internal sealed partial class Throwing
{
    [State(Initial = 1, Lower = -2, Upper = 2)] public partial double X { get; set; }

    [Parameter(1)] public partial double Low { get; set; }

    [Parameter(-1)] public partial double High { get; set; }

    [Rate(nameof(X))] private double XRate => Math.Clamp(-X, Low, High);
}
