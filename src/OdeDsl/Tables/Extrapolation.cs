namespace OdeDsl;

/// <summary>What a <see cref="Table"/> says outside its knots.</summary>
public enum Extrapolation
{
    /// <summary>The value at the nearest end.</summary>
    Hold,

    /// <summary>The straight line with the slope at the nearest end.</summary>
    ContinueLine,

    /// <summary>
    /// Nothing: <see cref="Table.At(double)"/> throws a <see cref="TableRangeException"/>, and a run ends at the last knot with
    /// <see cref="Integration.IntegrationFailure.OutsideTable"/>.
    /// </summary>
    Fail,
}
