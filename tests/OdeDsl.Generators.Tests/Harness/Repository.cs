namespace OdeDsl.Generators.Tests.Harness;

/// <summary>The repository the tests were built in.</summary>
internal static class Repository
{
    public static string Root { get; } = Find();

    private static string Find()
    {
        string? folder = AppContext.BaseDirectory;
        while (folder is not null && !File.Exists(Path.Combine(folder, "OdeDsl.sln"))) folder = Path.GetDirectoryName(folder);
        return folder ?? throw new InvalidOperationException("The repository is not found above the tests.");
    }
}
