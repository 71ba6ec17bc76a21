namespace OdeDsl.Cycles;

/// <summary>A closed orbit as the shooting method leaves it, in scaled states z = x / scale.</summary>
internal sealed record ShotOrbit
{
    /// <summary>A state on the orbit.</summary>
    public required double[] State { get; init; }

    /// <summary>The time once round; negative where time ran backwards.</summary>
    public required double SignedPeriod { get; init; }

    /// <summary>The scale of each state: about the orbit's extent.</summary>
    public required double[] Scale { get; init; }

    /// <summary>Whole turns of each angle in <see cref="SignedPeriod"/>.</summary>
    public required int[] Winding { get; init; }

    /// <summary>Whole turns of each angle in one period of time running forward.</summary>
    public int[] ForwardWinding => SignedPeriod < 0 ? Array.ConvertAll(Winding, static turns => -turns) : Winding;

    /// <summary>The derivative of the state once round by the state, scaled, by rows.</summary>
    public required double[] Monodromy { get; init; }

    /// <summary>The rates at the state, scaled.</summary>
    public required double[] Velocity { get; init; }

    /// <summary>The scaled difference between the end and the start of the orbit, whole turns taken off.</summary>
    public required double[] Gap { get; init; }

    /// <summary>The largest entry of <see cref="Gap"/>.</summary>
    public double Residual => Gap.Max(Math.Abs);

    /// <summary>Whether the orbit slides along a switching surface.</summary>
    public required bool Slides { get; init; }
}
