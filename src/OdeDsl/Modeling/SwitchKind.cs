namespace OdeDsl.Modeling;

/// <summary>
/// How the value g of a switching function decides the regime entry of that switch. Relations give 1 where they hold and 0
/// where they do not.
/// </summary>
public enum SwitchKind
{
    /// <summary>Holds where g &lt; 0.</summary>
    Below,

    /// <summary>Holds where g ≤ 0.</summary>
    NotAbove,

    /// <summary>Holds where g &gt; 0.</summary>
    Above,

    /// <summary>Holds where g ≥ 0.</summary>
    NotBelow,

    /// <summary>The entry is ⌊g⌋: every whole number is a surface (rounding functions, remainders, knots of tables).</summary>
    WholeNumber,
}
