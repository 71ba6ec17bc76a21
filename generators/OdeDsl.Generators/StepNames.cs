namespace OdeDsl.Generators;

/// <summary>The names of the pipeline's steps, for tests that watch what an edit recomputes.</summary>
internal static class StepNames
{
    public const string Reading = "Reading";
    public const string Model = "Model";
    public const string Problems = "Problems";
}
