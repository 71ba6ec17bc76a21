using OdeDsl.Equilibria;
using OdeDsl.Modeling;

namespace OdeDsl.Assessment;

/// <summary>
/// The four answers about a model: where it rests, whether it keeps moving, how far its parameters stand from a change of that
/// answer, and which integration method computes it best.
/// </summary>
/// <remarks>
/// Results are predictions of a model. Where people or plant depend on them, they support and do not replace verification, local
/// codes and the judgement of licensed engineers.
/// </remarks>
public sealed record ModelAssessment
{
    /// <summary>The model.</summary>
    public required ModelDescription Description { get; init; }

    /// <summary>The parameter values assessed, in the order of the parameter vector.</summary>
    public required IReadOnlyList<double> Parameters { get; init; }

    /// <summary>The state the working motion starts from, in the order of the state vector.</summary>
    public required IReadOnlyList<double> InitialState { get; init; }

    /// <summary>Where the system comes to rest: all equilibria found in the state bounds, classified.</summary>
    public required EquilibriumSearchResult Rests { get; init; }

    /// <summary>Whether it keeps moving, how strongly and how fast.</summary>
    public required MotionsAnswer Motions { get; init; }

    /// <summary>How far each parameter stands from a change of the set of attractors.</summary>
    public required MarginsAnswer Margins { get; init; }

    /// <summary>Which integration method computes the model's motion best.</summary>
    public required MethodAnswer Method { get; init; }

    /// <summary>What could not be answered and why, or what deserves attention; a sentence each.</summary>
    public required IReadOnlyList<string> Remarks { get; init; }

    /// <summary>The four answers, a line each.</summary>
    /// <returns>Lines of text, in invariant culture.</returns>
    public override string ToString() => string.Join(
        '\n',
        [
            Description.Name,
            "Where it rests: " + Rests.Completeness,
            "Whether it keeps moving: " + Motions.Working.Text,
            "How far from a change: " + (Margins.Narrowest?.Nearest.Text ?? Margins.Completeness),
            "Which method computes it: " + Method.Reason,
            .. Remarks,
        ]);
}
