using System.Globalization;
using OdeDsl.Modeling;

namespace OdeDsl.Branches;

/// <summary>A branch: the equilibria that belong together while one parameter moves.</summary>
public sealed record BranchResult
{
    /// <summary>The model.</summary>
    public required ModelDescription Description { get; init; }

    /// <summary>The index of the parameter that moved.</summary>
    public required int ParameterIndex { get; init; }

    /// <summary>The parameter value the branch was started at, in its unit.</summary>
    public required double From { get; init; }

    /// <summary>The parameter value the branch was meant to reach, in its unit.</summary>
    public required double To { get; init; }

    /// <summary>The computed equilibria, in the order of the branch.</summary>
    public required IReadOnlyList<FollowedEquilibrium> Points { get; init; }

    /// <summary>The folds, Hopf points, branch points and surface contacts, in the order of the branch.</summary>
    public required IReadOnlyList<SpecialPoint> SpecialPoints { get; init; }

    /// <summary>Why the branch ended.</summary>
    public required BranchEnd End { get; init; }

    /// <summary>Why the branch ended, as one sentence.</summary>
    public required string EndText { get; init; }

    /// <summary>How many steps were tried and thrown away.</summary>
    public required int RejectedSteps { get; init; }

    /// <summary>How many times a state Jacobian was evaluated.</summary>
    public required long JacobianEvaluations { get; init; }

    /// <summary>The parameter that moved.</summary>
    public ParameterDescription Parameter => Description.Parameters[ParameterIndex];

    /// <summary>The branch in a few lines: where it went, its special points, why it ended.</summary>
    /// <returns>Lines of text, in invariant culture.</returns>
    public override string ToString() => string.Join(
        '\n',
        [
            string.Create(CultureInfo.InvariantCulture, $"{Description.Name}: {Points.Count} equilibria along {Parameter.Name}, from {From:G6} towards {To:G6} {Parameter.Unit}").TrimEnd(),
            .. SpecialPoints.Select(point => string.Create(CultureInfo.InvariantCulture, $"{point.Kind} at {point.Parameter:G8} {Parameter.Unit}").TrimEnd()),
            EndText,
        ]);

    /// <summary>The special points of one kind, in the order of the branch.</summary>
    /// <param name="kind">The kind.</param>
    /// <returns>Those points; empty if there are none.</returns>
    public IEnumerable<SpecialPoint> Special(SpecialPointKind kind) => SpecialPoints.Where(point => point.Kind == kind);
}
