namespace OdeDsl.Assessment;

/// <summary>How rests, cycles and families are called in texts and tables: numbered from 1 in the order of their lists.</summary>
internal static class AttractorNames
{
    /// <summary>A rest met beyond a fold, which may or may not be in the list.</summary>
    public const string OtherRest = "another rest";

    public static string Rest(int index) => $"rest {index + 1}";

    public static string Cycle(int index) => $"cycle {index + 1}";

    public static string Family(int index) => $"family {index + 1}";
}
