namespace OdeDsl.Tests.Problems;

/// <summary>B. van der Pol, Philosophical Magazine 2, 1926, page 978; stiff for large damping.</summary>
[OdeModel]
internal sealed partial class VanDerPol
{
    [State(Initial = 2, Lower = -4, Upper = 4)] public partial double X { get; set; }
    [State(Initial = 0, Lower = -6, Upper = 6)] public partial double V { get; set; }

    [Parameter(1, Lower = -1, Upper = 5)] public partial double Mu { get; set; }

    [Rate(nameof(X))] private double XRate => V;
    [Rate(nameof(V))] private double VRate => Mu * (1 - X * X) * V - X;
}
