using OdeDsl.Modeling;

namespace OdeDsl.Assessment;

/// <summary>How far one parameter stands from a change of the set of attractors, down and up.</summary>
public sealed record ParameterMargin
{
    /// <summary>The index of the parameter in the parameter vector.</summary>
    public required int ParameterIndex { get; init; }

    /// <summary>The parameter.</summary>
    public required ParameterDescription Parameter { get; init; }

    /// <summary>Its present value, in its unit.</summary>
    public required double Value { get; init; }

    /// <summary>The nearest change towards smaller values.</summary>
    public required MarginEdge Down { get; init; }

    /// <summary>The nearest change towards larger values.</summary>
    public required MarginEdge Up { get; init; }

    /// <summary>
    /// The size of the nearer change in per cent of the present value; infinity if there is none in the explored range. Margins are
    /// ranked by it.
    /// </summary>
    public double NearestPercent => Math.Min(Size(Down), Size(Up));

    /// <summary>The nearer of the two edges; the lower one if there is no change on either side.</summary>
    public MarginEdge Nearest => Size(Down) <= Size(Up) ? Down : Up;

    private static double Size(MarginEdge edge) =>
        edge is { Event: not (MarginEvent.None or MarginEvent.Unknown), Percent: { } percent } ? Math.Abs(percent) : double.PositiveInfinity;
}
