using OdeDsl;

namespace OdeDsl.Tests.Events;

/// <summary>A wall that follows the temperature of one side with a lag.</summary>
[OdeModel]
public sealed partial class LaggingWall
{
    [State(Initial = 12)] public partial double Warmth { get; set; }

    [Input] public partial double Inside { get; set; }

    [Parameter(3)] public partial double Lag { get; set; }

    [Rate(nameof(Warmth))] private double WarmthRate => (Inside - Warmth) / Lag;
}

/// <summary>A heated room with a wall as a part: the room has the mode and the events, the part an input.</summary>
[OdeModel]
public sealed partial class House
{
    [State(Initial = 18)] public partial double Temperature { get; set; }

    [Mode(true)] public partial bool On { get; set; }

    [Input(0.5)] public partial double Sun { get; set; }

    [Parameter(5)] public partial double Power { get; set; }

    [Submodel] public LaggingWall Wall { get; } = new() { Lag = 4 };

    [Input(nameof(Wall), nameof(LaggingWall.Inside))] private double WallInside => Temperature;

    private double TooWarm => Temperature - 22;

    private double TooCold => Temperature - 20;

    [Rate(nameof(Temperature))] private double TemperatureRate => (Wall.Warmth - Temperature) / 5 + Sun - 2 + (On ? Power : 0);

    [Event(nameof(TooWarm), Direction = GuardDirection.Rising)]
    private void TurnOff() => On = false;

    [Event(nameof(TooCold), Direction = GuardDirection.Falling)]
    private void TurnOn() => On = true;
}

/// <summary>The same in one piece.</summary>
[OdeModel]
public sealed partial class HouseInOnePiece
{
    [State(Initial = 18)] public partial double Temperature { get; set; }

    [State(Initial = 12)] public partial double Warmth { get; set; }

    [Mode(true)] public partial bool On { get; set; }

    [Input(0.5)] public partial double Sun { get; set; }

    [Parameter(5)] public partial double Power { get; set; }

    [Parameter(4)] public partial double Lag { get; set; }

    private double TooWarm => Temperature - 22;

    private double TooCold => Temperature - 20;

    [Rate(nameof(Temperature))] private double TemperatureRate => (Warmth - Temperature) / 5 + Sun - 2 + (On ? Power : 0);

    [Rate(nameof(Warmth))] private double WarmthRate => (Temperature - Warmth) / Lag;

    [Event(nameof(TooWarm), Direction = GuardDirection.Rising)]
    private void TurnOff() => On = false;

    [Event(nameof(TooCold), Direction = GuardDirection.Falling)]
    private void TurnOn() => On = true;
}
