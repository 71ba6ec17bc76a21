using OdeDsl.Assessment;
using OdeDsl.Cycles;
using OdeDsl.Equilibria;
using OdeDsl.Integration;

namespace OdeDsl.Workbench.Wording;

/// <summary>What results are called in reports: the literature's full words.</summary>
internal static class Words
{
    public const string Caution =
        "Results are predictions of a model. Where people or plant depend on them (hydraulic transients, grid protection, reactors), they "
        + "support and do not replace verification, local codes and the judgement of licensed engineers.";

    /// <summary>Rests, cycles and families are numbered from 1 in the order of their lists, as in the assessment's own texts.</summary>
    public static string Rest(int index) => $"rest {index + 1}";

    /// <inheritdoc cref="Rest"/>
    public static string Cycle(int index) => $"cycle {index + 1}";

    /// <inheritdoc cref="Rest"/>
    public static string Family(int index) => $"family {index + 1}";

    /// <summary>For example "stable focus", "saddle", "unstable node, sliding".</summary>
    public static string Kind(Equilibrium rest)
    {
        string kind = rest.Kind switch
        {
            EquilibriumKind.Node => "node",
            EquilibriumKind.Focus => "focus",
            EquilibriumKind.Saddle => "saddle",
            EquilibriumKind.Centre => "centre",
            _ => "degenerate rest",
        };
        string text = rest.Kind is EquilibriumKind.Node or EquilibriumKind.Focus ? $"{Of(rest.Stability)} {kind}" : kind;
        if (rest.IsSliding) text += ", sliding";
        return rest.Set is { } set ? $"{text}, one of a continuum of dimension {set.Dimension}" : text;
    }

    /// <summary>The time in which a mode changes by the factor e, told apart by the direction of the change.</summary>
    /// <param name="mode">The mode, or <see langword="null"/> if there is none.</param>
    /// <param name="format">How numbers are written.</param>
    public static string FactorTime(LinearMode? mode, Func<double, string> format) => mode switch
    {
        null => "–",
        { TimeConstant: >= 0 } => format(mode.TimeConstant),
        _ => format(-mode.TimeConstant) + ", growing",
    };

    public static string Of(Stability stability) => stability switch
    {
        Stability.Stable => "stable",
        Stability.Unstable => "unstable",
        _ => "undecided",
    };

    /// <summary>For example "stable cycle, rotating".</summary>
    public static string Kind(LimitCycle cycle)
    {
        string text = cycle.Stability == Stability.Undecided ? "limit cycle, stability undecided" : $"{Of(cycle.Stability)} limit cycle";
        if (cycle.Rotates) text += ", rotating";
        return cycle.Slides ? text + ", sliding" : text;
    }

    public static string Of(MotionKind kind) => kind switch
    {
        MotionKind.Settles => "settles",
        MotionKind.Oscillates => "keeps oscillating",
        MotionKind.Rotates => "keeps rotating",
        MotionKind.ClosedOrbits => "keeps swinging on one of many closed orbits",
        MotionKind.Irregular => "moves irregularly",
        MotionKind.RunsAway => "runs away",
        MotionKind.Fails => "cannot be computed further",
        _ => "undecided",
    };

    public static string Of(MarginEvent change) => change switch
    {
        MarginEvent.None => "no change found",
        MarginEvent.Fold => "fold: a rest disappears or appears",
        MarginEvent.HopfPoint => "Hopf point: stability changes by oscillation",
        MarginEvent.BranchPoint => "branch point: stability passes to another rest",
        MarginEvent.SurfaceContact => "a rest meets a switching surface",
        MarginEvent.LeavesBounds => "a rest leaves the state bounds",
        MarginEvent.CycleLost => "a stable cycle is no longer found",
        MarginEvent.CycleStabilityLost => "a cycle loses stability",
        _ => "not known",
    };

    public static string Of(IntegrationMethod method) => method switch
    {
        IntegrationMethod.DormandPrince54 => "Dormand–Prince 5(4), explicit",
        IntegrationMethod.RadauIIA5 => "Radau IIA of order 5, implicit",
        IntegrationMethod.Tsitouras54 => "Tsitouras 5(4), explicit",
        IntegrationMethod.DormandPrince853 => "Dormand–Prince 8(5,3), explicit",
        IntegrationMethod.RadauIIA9 => "Radau IIA of order 9, implicit",
        IntegrationMethod.RadauIIA13 => "Radau IIA of order 13, implicit",
        IntegrationMethod.RadauIIA => "Radau IIA of variable order, implicit",
        IntegrationMethod.Rodas4 => "Rodas4, linearly implicit",
        IntegrationMethod.BackwardDifferentiation => "backward differentiation, implicit",
        IntegrationMethod.Rodas5P => "Rodas5P, linearly implicit",
        IntegrationMethod.Automatic => "automatic choice",
        _ => method.ToString(),
    };

    /// <summary>The recommended method with its tolerance, or that there is none.</summary>
    public static string Recommendation(MethodAnswer answer) => answer is { Recommended: { } method, RelativeTolerance: { } tolerance }
        ? $"{Of(method)}, relative tolerance {NumberText.Format(tolerance, 2)}"
        : "none reached the wanted accuracy";

    /// <summary>A count with its noun: "1 rest", "3 rests".</summary>
    public static string Count(int count, string noun) => count == 1 ? $"1 {noun}" : $"{(count == 0 ? "no" : count.ToString(System.Globalization.CultureInfo.InvariantCulture))} {noun}s";
}
