namespace OdeDsl.Tests.Branches;

/// <summary>The normal form of a fold: x' = p + x².</summary>
[OdeModel]
internal sealed partial class FoldForm
{
    [State(Initial = -1)] public partial double X { get; set; }

    [Parameter(-1)] public partial double P { get; set; }

    [Rate(nameof(X))] private double XRate => P + X * X;
}

/// <summary>Hysteresis: x' = p + x - x³/3, folds at x = ±1.</summary>
[OdeModel]
internal sealed partial class Hysteresis
{
    [State(Initial = -2, Lower = -5, Upper = 5)] public partial double X { get; set; }

    [Parameter(0, Lower = -3, Upper = 3)] public partial double P { get; set; }

    [Rate(nameof(X))] private double XRate => P + X - X * X * X / 3;
}

/// <summary>The Brusselator (Prigogine and Lefever 1968).</summary>
[OdeModel]
internal sealed partial class Brusselator
{
    [State(Initial = 1.2, Lower = 0, Upper = 20)] public partial double X { get; set; }

    [State(Initial = 1.2, Lower = 0, Upper = 20)] public partial double Y { get; set; }

    [Parameter(1.3, Lower = 0.1, Upper = 5)] public partial double A { get; set; }

    [Parameter(1, Lower = 0.1, Upper = 10)] public partial double B { get; set; }

    [Rate(nameof(X))] private double XRate => A - (B + 1) * X + X * X * Y;

    [Rate(nameof(Y))] private double YRate => B * X - X * X * Y;
}

/// <summary>Lorenz's convection model (E. N. Lorenz 1963).</summary>
[OdeModel]
internal sealed partial class Lorenz
{
    [State(Initial = 0.1, Lower = -30, Upper = 30)] public partial double X { get; set; }

    [State(Initial = 1, Lower = -40, Upper = 40)] public partial double Y { get; set; }

    [State(Initial = 0.5, Lower = 0, Upper = 60)] public partial double Z { get; set; }

    [Parameter(10)] public partial double Sigma { get; set; }

    [Parameter(28)] public partial double Rho { get; set; }

    [Parameter(8.0 / 3)] public partial double Beta { get; set; }

    [Rate(nameof(X))] private double XRate => Sigma * (Y - X);

    [Rate(nameof(Y))] private double YRate => X * (Rho - Z) - Y;

    [Rate(nameof(Z))] private double ZRate => X * Y - Beta * Z;
}

/// <summary>A machine's rotor on a long line: M δ'' + D δ' = P - Pmax sin δ.</summary>
[OdeModel]
internal sealed partial class Machine
{
    [Angle, State(Initial = 0.1)] public partial double Angle { get; set; }

    [State(Initial = 0, Lower = -20, Upper = 20)] public partial double Slip { get; set; }

    [Parameter(0.5)] public partial double Power { get; set; }

    [Parameter(1.2)] public partial double MaximumPower { get; set; }

    [Parameter(0.1)] public partial double Inertia { get; set; }

    [Parameter(0.05)] public partial double Damping { get; set; }

    [Rate(nameof(Angle))] private double AngleRate => Slip;

    [Rate(nameof(Slip))] private double SlipRate => (Power - MaximumPower * Math.Sin(Angle) - Damping * Slip) / Inertia;
}

/// <summary>Logistic growth with a constant harvest: x' = r x (1 - x/K) - h.</summary>
[OdeModel]
internal sealed partial class Harvest
{
    [State(Initial = 9, Lower = 0, Upper = 20)] public partial double Stock { get; set; }

    [Parameter(0.8)] public partial double Growth { get; set; }

    [Parameter(10)] public partial double Capacity { get; set; }

    [Parameter(0.5, Lower = 0, Upper = 5)] public partial double Catch { get; set; }

    [Rate(nameof(Stock))] private double StockRate => Growth * Stock * (1 - Stock / Capacity) - Catch;
}

/// <summary>
/// An exothermic first-order reaction in a stirred tank, dimensionless (A. Uppal, W. H. Ray and A. B. Poore, Chem. Eng. Sci. 29, 1974, from
/// memory) in the limit of infinite activation temperature: conversion x, temperature y.
/// </summary>
[OdeModel]
internal sealed partial class StirredReactor
{
    [State(Initial = 0.1, Lower = 0, Upper = 1)] public partial double Conversion { get; set; }

    [State(Initial = 0.5, Lower = -1, Upper = 20)] public partial double Temperature { get; set; }

    [Parameter(0.1, Lower = 0.001, Upper = 1)] public partial double Damkohler { get; set; }

    [Parameter(11)] public partial double HeatRelease { get; set; }

    [Parameter(1.5)] public partial double Cooling { get; set; }

    [Rate(nameof(Conversion))] private double ConversionRate => -Conversion + Reaction;

    [Rate(nameof(Temperature))] private double TemperatureRate => -Temperature + HeatRelease * Reaction - Cooling * Temperature;

    private double Reaction => Damkohler * (1 - Conversion) * Math.Exp(Temperature);
}

/// <summary>A surge tank behind a headrace tunnel with a governor that keeps the power constant; level positive above the reservoir.</summary>
[OdeModel]
internal sealed partial class SurgeTankModel
{
    [State(Initial = -2, Lower = -15, Upper = 15)] public partial double Level { get; set; }

    [State(Initial = 2.2, Lower = -4, Upper = 6)] public partial double Velocity { get; set; }

    [Parameter(60, Lower = 5, Upper = 400)] public partial double TankArea { get; set; }

    [Parameter(12)] public partial double TunnelArea { get; set; }

    [Parameter(4000)] public partial double Length { get; set; }

    [Parameter(0.5)] public partial double Loss { get; set; }

    [Parameter(100)] public partial double Head { get; set; }

    [Parameter(24e6)] public partial double Power { get; set; }

    [Parameter(1000)] public partial double Density { get; set; }

    [Parameter(9.81)] public partial double Gravity { get; set; }

    private double Flow => Power / (Density * Gravity * (Head + Level));

    [Rate(nameof(Level))] private double LevelRate => (TunnelArea * Velocity - Flow) / TankArea;

    [Rate(nameof(Velocity))] private double VelocityRate => -Gravity / Length * (Level + Loss * Velocity * Math.Abs(Velocity));
}

/// <summary>x' = p - x where x is positive and p - 2 x elsewhere: continuous rates with a corner.</summary>
[OdeModel]
internal sealed partial class Corner
{
    [State(Initial = 1, Lower = -5, Upper = 5)] public partial double X { get; set; }

    [Parameter(2)] public partial double P { get; set; }

    [Rate(nameof(X))] private double XRate => X > 0 ? P - X : P - 2 * X;
}

/// <summary>x' = p + |x|: two rests meet at the corner and disappear.</summary>
[OdeModel]
internal sealed partial class CornerFold
{
    [State(Initial = -1, Lower = -5, Upper = 5)] public partial double X { get; set; }

    [Parameter(-1)] public partial double P { get; set; }

    [Rate(nameof(X))] private double XRate => P + Math.Abs(X);
}

/// <summary>A rate that jumps: x' = p - x, less 1 where x ≥ 0.7.</summary>
[OdeModel]
internal sealed partial class Jump
{
    [State(Initial = 0, Lower = -5, Upper = 5)] public partial double X { get; set; }

    [Parameter(0)] public partial double P { get; set; }

    [Rate(nameof(X))] private double XRate => P - X - (X >= 0.7 ? 1 : 0);
}

/// <summary>A pitchfork: x' = p x - x³.</summary>
[OdeModel]
internal sealed partial class Pitchfork
{
    [State(Initial = 1, Lower = -5, Upper = 5)] public partial double X { get; set; }

    [Parameter(1)] public partial double P { get; set; }

    [Rate(nameof(X))] private double XRate => P * X - X * X * X;
}

/// <summary>A rate with a square root that ends at p = 0: x' = √p - x.</summary>
[OdeModel]
internal sealed partial class SquareRootEnd
{
    [State(Initial = 1)] public partial double X { get; set; }

    [Parameter(1)] public partial double P { get; set; }

    [Rate(nameof(X))] private double XRate => Math.Sqrt(P) - X;
}

/// <summary>A rate that depends on time.</summary>
[OdeModel]
internal sealed partial class Driven
{
    [State(Initial = 1)] public partial double X { get; set; }

    [Parameter(1)] public partial double P { get; set; }

    [Rate(nameof(X))] private double XRate(double time) => P * Math.Sin(time) - X;
}
