using OdeDsl;

namespace WorkbenchTests;

/// <summary>A damped swing: one stable rest, nothing else.</summary>
[OdeModel(TimeUnit = "s")]
public sealed partial class Swing
{
    /// <summary>Angle from hanging.</summary>
    [State(Initial = 0.4, Lower = -1, Upper = 1, Unit = "rad")]
    public partial double Tilt { get; set; }

    /// <summary>Angular speed.</summary>
    [State(Initial = 0, Lower = -2, Upper = 2, Unit = "rad/s")]
    public partial double Rate { get; set; }

    /// <summary>Damping.</summary>
    [Parameter(0.5, Lower = 0.1, Upper = 2, Unit = "1/s")]
    public partial double Drag { get; set; }

    [Rate(nameof(Tilt))]
    private double TiltRate => Rate;

    [Rate(nameof(Rate))]
    private double RateRate => -Stiffness * Tilt - Drag * Rate;

    [Unit("1/s2")]
    private const double Stiffness = 4;
}

#pragma warning disable ODE0100 // No units on purpose: this is about what texts can do to a report.

/// <summary>Units that try to be &lt;script&gt;alert('x')&lt;/script&gt; markup, and [red]markup[/] of the console.</summary>
[OdeModel(TimeUnit = "\"><script>alert(1)</script>")]
public sealed partial class Hostile
{
    /// <summary>"]]&gt;&lt;!-- is not a comment --&gt;&lt;/style&gt;&lt;/svg&gt;.</summary>
    [State(Initial = 1, Lower = -2, Upper = 2, Unit = "</text></svg><img src=x onerror=alert(1)>")]
    public partial double First { get; set; }

    [State(Initial = 0, Lower = -2, Upper = 2, Unit = "[bold]m[/] \u202E\u0007")]
    public partial double Second { get; set; }

    /// <summary><![CDATA[<a href="https://evil.example/">here</a>]]></summary>
    [Parameter(0.5, Lower = 0.1, Upper = 2, Unit = "javascript:alert(1)")]
    public partial double Third { get; set; }

    [Observable(Unit = "' onload='alert(1)")]
    private double Fourth => First < Second ? 1 : 0;

    [Rate(nameof(First))]
    private double FirstRate => Second;

    [Rate(nameof(Second))]
    private double SecondRate => -First - Third * Second;
}

#pragma warning restore ODE0100

/// <summary>A model whose rates are not numbers anywhere.</summary>
[OdeModel]
public sealed partial class Broken
{
    [State(Initial = 1, Lower = 0.5, Upper = 2)]
    public partial double Value { get; set; }

    [Rate(nameof(Value))]
    private double ValueRate => Math.Log(-Value);
}
