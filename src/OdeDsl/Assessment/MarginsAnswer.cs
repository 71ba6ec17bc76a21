namespace OdeDsl.Assessment;

/// <summary>The third answer: how far each parameter stands from a change of the set of attractors.</summary>
public sealed record MarginsAnswer
{
    /// <summary>One margin for each parameter, the narrowest in per cent first.</summary>
    public required IReadOnlyList<ParameterMargin> Parameters { get; init; }

    /// <summary>What was followed and what that cannot show.</summary>
    public required string Completeness { get; init; }

    /// <summary>The parameter nearest to a change; <see langword="null"/> if no change was found in any explored range.</summary>
    public ParameterMargin? Narrowest => Parameters.FirstOrDefault(static margin => double.IsFinite(margin.NearestPercent));
}
