using OdeDsl;

namespace OdeDsl.Tests.Tables;

/// <summary>Fills at a rate read from a course over time, and empties through a characteristic.</summary>
[OdeModel]
public sealed partial class Reservoir
{
    [Table(Unit = "m3/s", ArgumentUnit = "s")]
    private static readonly Table Course = new([0, 2, 3, 7, 8], [1, 3, 3, 0, 4], Interpolation.Linear, Extrapolation.Hold);

    /// <summary>What has flowed in.</summary>
    [State(Unit = "m3")] public partial double Volume { get; set; }

    [Rate(nameof(Volume))] private double Inflow(double time) => Course.At(time);
}

/// <summary>A motion along straight pieces of a characteristic: X' = −Curve(X).</summary>
[OdeModel]
public sealed partial class Sliding
{
    [Table] private static Table Curve { get; } = new([0, 1, 3], [0.5, 1, 5], Interpolation.Linear, Extrapolation.ContinueLine);

    /// <summary>Falls through both segments and out below.</summary>
    [State(Initial = 3)] public partial double X { get; set; }

    [Rate(nameof(X))] private double XRate => -Curve.At(X);

    [Observable] private double Reading => Curve.At(X);
}

/// <summary>A motion that leaves a table which does not extrapolate.</summary>
[OdeModel]
public sealed partial class Leaving
{
    [Table] private static readonly Table Curve = new([0, 1, 2], [1, 2, 1], Interpolation.ShapePreservingCubic, Extrapolation.Fail);

    /// <summary>Rises without end.</summary>
    [State] public partial double X { get; set; }

    /// <summary>1: the table is only read inside its knots.</summary>
    [Parameter(0)] public partial double Guarded { get; set; }

    [Rate(nameof(X))] private double XRate => Guarded > 0 && X > 1.5 ? 1 : Curve.At(X);
}
