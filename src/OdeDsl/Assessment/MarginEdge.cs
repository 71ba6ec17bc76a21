namespace OdeDsl.Assessment;

/// <summary>The nearest change of the set of attractors when one parameter moves in one direction.</summary>
public sealed record MarginEdge
{
    /// <summary>What happens there.</summary>
    public required MarginEvent Event { get; init; }

    /// <summary>
    /// The parameter's value there, in its unit; <see langword="null"/> for <see cref="MarginEvent.None"/>.
    /// For <see cref="MarginEvent.Unknown"/> the last value reached.
    /// </summary>
    public double? Value { get; init; }

    /// <summary>How far that is from the present value, signed, in the parameter's unit.</summary>
    public double? Distance { get; init; }

    /// <summary>The same in per cent of the present value's size, signed; <see langword="null"/> if the present value is zero.</summary>
    public double? Percent { get; init; }

    /// <summary>The end of the explored range in this direction, in the parameter's unit.</summary>
    public required double ExploredTo { get; init; }

    /// <summary>The attractor concerned: "rest 1", "cycle 1", or "new rest"; empty for <see cref="MarginEvent.None"/>.</summary>
    public string Attractor { get; init; } = "";

    /// <summary>The angular frequency of the oscillation that begins at a Hopf point, per unit of time.</summary>
    public double? Frequency { get; init; }

    /// <summary>How accurate <see cref="Value"/> is, in the parameter's unit; 0 if to rounding.</summary>
    public double Uncertainty { get; init; }

    /// <summary>The statement as one sentence.</summary>
    public required string Text { get; init; }

    /// <summary>What was computed to say so.</summary>
    public required string Evidence { get; init; }
}
