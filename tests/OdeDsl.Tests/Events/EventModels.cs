using OdeDsl;

namespace OdeDsl.Tests.Events;

/// <summary>A ball that falls and bounces with restitution e.</summary>
[OdeModel]
public sealed partial class Ball
{
    [State(Initial = 1, Lower = 0, Upper = 5)] public partial double Height { get; set; }

    [State(Lower = -10, Upper = 10)] public partial double Speed { get; set; }

    [Parameter(9.81)] public partial double Gravity { get; set; }

    [Parameter(0.5)] public partial double Restitution { get; set; }

    [Rate(nameof(Height))] private double HeightRate => Speed;

    [Rate(nameof(Speed))] private double SpeedRate => -Gravity;

    /// <summary>Bounces.</summary>
    [Event(nameof(Height), Direction = GuardDirection.Falling)]
    private void Bounce()
    {
        Height = 0;
        Speed = -Restitution * Speed;
    }

    [Observable] private double Energy => Gravity * Height + Speed * Speed / 2;
}

/// <summary>A room heated by a relay with hysteresis: T' = -(T - Outside)/Tau + Power when on.</summary>
[OdeModel]
public sealed partial class Thermostat
{
    [State(Initial = 18, Lower = 0, Upper = 40)] public partial double Temperature { get; set; }

    [Mode(true)] public partial bool On { get; set; }

    [Mode(0.0)] public partial double Switchings { get; set; }

    [Parameter(10)] public partial double Tau { get; set; }

    [Parameter(5)] public partial double Power { get; set; }

    [Rate(nameof(Temperature))] private double TemperatureRate => -Temperature / Tau + (On ? Power : 0);

    private double TooWarm => Temperature - 22;

    private bool TooCold(double time) => Temperature < 20;

    [Event(nameof(TooWarm))]
    private void TurnOff()
    {
        On = false;
        Switchings++;
    }

    [Event(nameof(TooCold))]
    private void TurnOn()
    {
        if (On) return;
        On = true;
        Switchings += 1;
    }

    [Observable] private double Heating => On ? Power : 0;
}

/// <summary>Ends at a level; on the way two events happen at one time, and one that only counts.</summary>
[OdeModel]
public sealed partial class Ending
{
    [State] public partial double X { get; set; }

    [Mode(0, Upper = 9)] public partial int First { get; set; }

    [Mode(0, Upper = 9)] public partial int Second { get; set; }

    [Rate(nameof(X))] private double XRate => 1;

    private double Half => X - 0.5;

    private double HalfToo => 2 * X - 1;

    private double Full => X - 1;

    [Event(nameof(Half))] private void MarkFirst() => First = Math.Min(Second + 1, 9);

    [Event(nameof(HalfToo), Direction = GuardDirection.Both)] private void MarkSecond() => Second = Math.Min(First + 1, 9);

    [Event(nameof(Full), Terminal = true)]
    private void End()
    {
    }
}

/// <summary>A sampled controller: every period the held value is set anew.</summary>
[OdeModel]
public sealed partial class Sampled
{
    [State(Initial = 1)] public partial double X { get; set; }

    [Mode(0.0)] public partial double Held { get; set; }

    [Mode(0.0)] public partial double Next { get; set; }

    [Parameter(0.5)] public partial double Period { get; set; }

    [Rate(nameof(X))] private double XRate => Held;

    private double Clock(double time) => time - Next;

    [Event(nameof(Clock))]
    private void Sample(double time)
    {
        Held = -X;
        Next += Period;
    }
}

/// <summary>A basin whose overflow alarm looks at the level at which the inflow is throttled.</summary>
[OdeModel]
public sealed partial class ThrottledBasin
{
    [State(Initial = 1)] public partial double Level { get; set; }

    [Mode(0.0)] public partial double Alarms { get; set; }

    private double Overflow => 2 * Level - 6;

    private bool IsHigh => Level > 3;

    [Rate(nameof(Level))] private double LevelRate => 0.3 - (Level > 3 ? 0.1 : 0);

    [Event(nameof(Overflow), Direction = GuardDirection.Rising)]
    private void Alarm() => Alarms += 1;

    [Event(nameof(IsHigh), Direction = GuardDirection.Rising)]
    private void Note() => Alarms += 10;
}

/// <summary>A condition as guard, many times over.</summary>
[OdeModel]
public sealed partial class SwingPastMark
{
    [State] public partial double X { get; set; }

    [Mode(0.0)] public partial double Passes { get; set; }

    private bool IsPast => X > 0.5;

    [Rate(nameof(X))] private double XRate(double time) => Math.Cos(time);

    [Event(nameof(IsPast), Direction = GuardDirection.Rising)]
    private void Count() => Passes += 1;
}
