namespace OdeDsl.Integration;

/// <summary>What a search for crossings inside a step found.</summary>
internal enum SearchOutcome
{
    /// <summary>No guard is met.</summary>
    Nothing,

    /// <summary>A guard is met.</summary>
    Found,

    /// <summary>A guard varies too much over the step to be followed, or is not a number: the step must be shorter.</summary>
    Unresolved,
}
