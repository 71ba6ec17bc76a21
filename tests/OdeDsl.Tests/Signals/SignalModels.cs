using OdeDsl;

namespace OdeDsl.Tests.Signals;

/// <summary>V' = Inflow − Rate V; beyond a capacity the inflow runs over.</summary>
[OdeModel]
public sealed partial class Basin
{
    /// <summary>Volume.</summary>
    [State(Initial = 0, Lower = 0, Upper = 10, Unit = "m3")] public partial double Volume { get; set; }

    /// <summary>What comes in.</summary>
    [Input(2, Unit = "m3/s")] public partial double Inflow { get; set; }

    [Input] public partial double Loss { get; set; }

    [Parameter(0.5, Lower = 0.1, Upper = 2, Unit = "1/s")] public partial double Rate { get; set; }

    [Parameter(100, Unit = "m3/s")] public partial double Capacity { get; set; }

    [Rate(nameof(Volume))] private double VolumeRate => (Inflow > Capacity ? Capacity : Inflow) - Loss - Rate * Volume;

    [Observable] private double Taken => Math.Min(Inflow, Capacity);
}

/// <summary>What a pump does.</summary>
public enum Stage
{
    /// <summary>Nothing.</summary>
    Off = 0,

    /// <summary>Half speed.</summary>
    Half = 2,

    /// <summary>Full speed.</summary>
    Full = 5,
}

/// <summary>Modes of every type in rates.</summary>
[OdeModel]
public sealed partial class Modal
{
    [State(Initial = 1)] public partial double X { get; set; }

    [Mode(true)] public partial bool On { get; set; }

    [Mode(2, Lower = -1, Upper = 3)] public partial int Count { get; set; }

    [Mode(Stage.Half)] public partial Stage Stage { get; set; }

    [Mode(0.25)] public partial double Held { get; set; }

    [Rate(nameof(X))] private double XRate => (On ? Held * X : -X) + Count / 2 + (Stage == Stage.Full ? 10 : (int)Stage) * Count;

    /// <summary>The member itself.</summary>
    public double Written => XRate;
}
