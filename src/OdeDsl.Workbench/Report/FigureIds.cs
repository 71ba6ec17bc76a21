namespace OdeDsl.Workbench.Report;

/// <summary>How the ids of a model's figures end.</summary>
internal static class FigureIds
{
    public const string Margins = "-margins";
    public const string Methods = "-methods";
    public const string Course = "-course";
}
