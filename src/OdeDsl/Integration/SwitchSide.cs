using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>The geometry of regime entries: which side of which surface an entry means.</summary>
internal static class SwitchSide
{
    /// <summary>The regime entry below (g &lt; surface) or above a surface.</summary>
    /// <param name="kind">The switch's kind.</param>
    /// <param name="surface">The value of g on the surface: 0 for a relation, a whole number otherwise.</param>
    /// <param name="above">Which side.</param>
    public static double Entry(SwitchKind kind, double surface, bool above) => kind switch
    {
        SwitchKind.Below or SwitchKind.NotAbove => above ? 0 : 1,
        SwitchKind.Above or SwitchKind.NotBelow => above ? 1 : 0,
        _ => above ? surface : surface - 1,
    };

    /// <summary>Whether the entry of a relation means the side above.</summary>
    public static bool IsAbove(SwitchKind kind, double entry) => kind is SwitchKind.Above or SwitchKind.NotBelow == (entry == 1);
}
