using System.Collections.Immutable;

namespace OdeDsl.Branches;

/// <summary>How finely to follow a branch. Lengths are in scaled variables: 1 is the parameter range, or the range of a state.</summary>
public sealed record BranchOptions
{
    /// <summary>The longest step along the branch; between 1e-6 and 1.</summary>
    public double MaximumStep { get; init; } = 0.02;

    /// <summary>The shortest step tried before the following gives up; positive and below <see cref="MaximumStep"/>.</summary>
    public double MinimumStep { get; init; } = 1e-8;

    /// <summary>The largest number of points computed; at least 2.</summary>
    public int MaximumPoints { get; init; } = 5000;

    /// <summary>Whether the branch ends where a state reaches its bound; angles have no end.</summary>
    public bool RespectStateBounds { get; init; } = true;

    /// <summary>
    /// A state near the equilibrium to start from; <see langword="null"/> starts at the model's own state and searches the state
    /// bounds if no equilibrium lies near it.
    /// </summary>
    public ImmutableArray<double>? Start { get; init; }

    internal static void Validate(BranchOptions options, int stateCount)
    {
        if (!(options.MaximumStep is >= 1e-6 and <= 1))
            throw new ArgumentOutOfRangeException(nameof(options), options.MaximumStep, "MaximumStep, the longest step along a branch, must lie between 1e-6 and 1.");
        if (!(options.MinimumStep > 0 && options.MinimumStep < options.MaximumStep))
            throw new ArgumentOutOfRangeException(nameof(options), options.MinimumStep, "MinimumStep must be positive and below MaximumStep.");
        if (options.MaximumPoints < 2)
            throw new ArgumentOutOfRangeException(nameof(options), options.MaximumPoints, "MaximumPoints must be at least 2.");
        if (options.Start is { } start && (start.IsDefault || start.Length != stateCount || start.Any(static value => !double.IsFinite(value))))
            throw new ArgumentException($"Start must hold {stateCount} finite numbers, one for each state.", nameof(options));
    }
}
