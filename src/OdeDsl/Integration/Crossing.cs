using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>What happened where a motion met the surface of a switching function.</summary>
public enum CrossingKind
{
    /// <summary>The motion went through to the other side.</summary>
    Passed,

    /// <summary>Both sides point at the surface: the motion slides along it from here (Filippov).</summary>
    SlidingBegan,

    /// <summary>The motion left the surface it slid along.</summary>
    SlidingEnded,
}

/// <summary>A meeting with the surface of a switching function.</summary>
/// <param name="Time">The time.</param>
/// <param name="Switch">The index of the switching function in <see cref="ModelDescription.Switches"/>.</param>
/// <param name="From">The regime entry before; the entry of the side the motion came from where sliding begins.</param>
/// <param name="To">The regime entry after; where sliding begins, the entry of the far side.</param>
/// <param name="Kind">What happened.</param>
public readonly record struct Crossing(double Time, int Switch, double From, double To, CrossingKind Kind);
