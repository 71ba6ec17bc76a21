#if FORGETFUL
using OdeDsl;

namespace Consumer;

/// <summary>A model on which the package's analyzers have advice.</summary>
[OdeModel]
public sealed partial class Forgetful
{
    /// <summary>A state.</summary>
    [State]
    public partial double X { get; set; }

    /// <summary>A parameter that nothing reads.</summary>
    [Parameter(2)]
    public partial double Unused { get; set; }

    [Rate(nameof(X))]
    private double XRate => -X;
}
#endif
