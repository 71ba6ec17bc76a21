namespace OdeDsl.Tests.Problems;

/// <summary>E. N. Lorenz, Journal of the Atmospheric Sciences 20, 1963, page 130, with his parameters and starting point.</summary>
[OdeModel]
internal sealed partial class Lorenz63
{
    [State(Initial = 0, Lower = -40, Upper = 40)] public partial double X { get; set; }
    [State(Initial = 1, Lower = -40, Upper = 40)] public partial double Y { get; set; }
    [State(Initial = 0, Lower = -10, Upper = 70)] public partial double Z { get; set; }

    [Parameter(10, Lower = 1, Upper = 30)] public partial double Sigma { get; set; }
    [Parameter(28, Lower = 0, Upper = 60)] public partial double Rho { get; set; }
    [Parameter(8.0 / 3, Lower = 0.5, Upper = 5)] public partial double Beta { get; set; }

    [Rate(nameof(X))] private double XRate => Sigma * (Y - X);
    [Rate(nameof(Y))] private double YRate => X * (Rho - Z) - Y;
    [Rate(nameof(Z))] private double ZRate => X * Y - Beta * Z;
}
