using System.Collections.Immutable;

namespace OdeDsl.Cycles;

/// <summary>One long run of the search.</summary>
/// <param name="Start">Where it started.</param>
/// <param name="End">Where it ended.</param>
/// <param name="Duration">How long it ran, in the model's time unit; negative for reversed time.</param>
/// <param name="Outcome">How it ended.</param>
/// <param name="Index">The index of the limit cycle or family it ended on, or of the equilibrium; -1 if none.</param>
/// <param name="Text">What was seen, in one sentence.</param>
public sealed record SearchRun(
    ImmutableArray<double> Start, ImmutableArray<double> End, double Duration, RunOutcome Outcome, int Index, string Text)
{
    /// <summary>Whether the run went backwards in time.</summary>
    public bool IsReversed => Duration < 0;
}
