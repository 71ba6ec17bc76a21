using OdeDsl.Equilibria;
using OdeDsl.Modeling;

namespace OdeDsl.Assessment;

/// <summary>Answers that cannot be given.</summary>
internal static class Empty
{
    public static EquilibriumSearchResult Rests(DynamicSystem system)
    {
        SearchRegion region = SearchRegion.Of(system);
        return new EquilibriumSearchResult
        {
            Equilibria = [],
            Lower = region.LowerCorner,
            Upper = region.UpperCorner,
            Starts = 0,
            Landed = 0,
            Rejected = 0,
            LastNewStart = 0,
            UnseenShare = 1,
            RegimesSearched = 0,
            SurfacesSearched = 0,
        };
    }

    public static MotionsAnswer Motions(MotionKind kind, string reason) => new()
    {
        Working = new MotionVerdict
        {
            Kind = kind,
            Label = kind == MotionKind.Fails ? "fails" : "undecided",
            Text = kind == MotionKind.Fails
                ? "The model's motion cannot be computed from its own state."
                : "What the model does in the long run was not examined.",
            Evidence = [reason],
            Duration = 0,
        },
        Outcomes = [],
        Cycles = [],
        Families = [],
        SampledStarts = 0,
        Completeness = reason,
    };

    public static MarginsAnswer Margins(string reason) => new() { Parameters = [], Completeness = reason };
}
