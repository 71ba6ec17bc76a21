namespace OdeDsl;

/// <summary>How a <see cref="Table"/> runs between its knots.</summary>
public enum Interpolation
{
    /// <summary>Straight lines: continuous, with a kink at each knot.</summary>
    Linear,

    /// <summary>
    /// Cubics with continuous slope that rise and fall only where the values do, without overshoot (F. N. Fritsch, R. E. Carlson, Monotone
    /// piecewise cubic interpolation, SIAM Journal on Numerical Analysis 17, 1980).
    /// </summary>
    ShapePreservingCubic,
}
