namespace OdeDsl.Generators.Algebra;

/// <summary>How the value of a switching function decides its regime entry; the same names as in the runtime's contract.</summary>
internal enum SwitchKind
{
    Below,
    NotAbove,
    Above,
    NotBelow,
    WholeNumber,
}

/// <summary>A surface on which a locked expression changes its formula.</summary>
/// <param name="Value">The switching function, a node of the locked graph.</param>
/// <param name="Kind">How its value decides the regime entry.</param>
/// <param name="Decision">The user's own condition (or the whole number), a node of the free graph: it decides the regime exactly.</param>
/// <param name="Source">The node of the free graph that asked for it first, to name it by.</param>
/// <param name="IsRelation">Whether the kind is fixed by a relation of the user, rather than chosen for a function with a kink.</param>
internal sealed record SwitchingFunction(int Value, SwitchKind Kind, int Decision, int Source, bool IsRelation)
{
    /// <summary>The table whose knots are the surfaces, if it is one's.</summary>
    public int? Table { get; init; }
}
