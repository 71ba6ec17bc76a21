using OdeDsl.Assessment;
using OdeDsl.Modeling;
using OdeDsl.Workbench.Figures;

namespace OdeDsl.Workbench.Report;

/// <summary>What is reported about one model: its assessment with figures, or why there is none.</summary>
internal sealed record ModelReport
{
    public required ModelDescription Description { get; init; }

    /// <summary>The assessment; null if it failed.</summary>
    public ModelAssessment? Assessment { get; init; }

    /// <summary>Why the assessment failed; empty if it did not.</summary>
    public string Failure { get; init; } = "";

    public IReadOnlyList<Figure> Figures { get; init; } = [];

    /// <summary>How long assessment and figures took.</summary>
    public TimeSpan Elapsed { get; init; }
}
