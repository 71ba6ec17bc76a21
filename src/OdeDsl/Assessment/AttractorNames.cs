namespace OdeDsl.Assessment;

/// <summary>How rests, cycles and families are called in texts and tables: numbered from 1 in the order of their lists.</summary>
internal static class AttractorNames
{
    public static string Rest(int index) => $"rest {index + 1}";

    public static string Cycle(int index) => $"cycle {index + 1}";

    public static string Family(int index) => $"family {index + 1}";
}
