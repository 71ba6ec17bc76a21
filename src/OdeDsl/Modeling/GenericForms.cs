namespace OdeDsl.Modeling;

/// <summary>The fault of equations that only run on doubles.</summary>
internal static class GenericForms
{
    public static NotSupportedException Missing(string member) => new(
        $"{member} is not available: these equations only run on doubles. Ask HasGenericForms first; generated equations of flat models "
        + "have generic forms unless they are very large, hand-written ones if they define the members themselves.");
}
