using System.Reflection;
using System.Runtime.InteropServices;

namespace OdeDsl.Package.Tests;

/// <summary>
/// A folder outside the repository with a feed that holds the packed files, and a package folder of its own. All else comes from
/// where the machine gets its packages, without downloading what it has already.
/// </summary>
public sealed class Workplace : IDisposable
{
    public const string Version = "0.1.0";

    private readonly Dictionary<string, string> _environment = [];

    public Workplace()
    {
        Directory.CreateDirectory(Feed);
        _environment["NUGET_PACKAGES"] = Path.Combine(Folder, "packages");
        _environment["DOTNET_CLI_UI_LANGUAGE"] = "en";
        _environment["MSBUILDDISABLENODEREUSE"] = "1"; // No process outlives the tests.
        File.WriteAllText(Path.Combine(Folder, "nuget.config"), $"""
            <configuration>
              <packageSources><add key="packed" value="{Feed}" /></packageSources>
              {FallbackFolder()}
            </configuration>
            """);
        Pack(Path.Combine("src", "OdeDsl"));
        Pack("templates");
    }

    /// <summary>The folder of all projects made here.</summary>
    public string Folder { get; } = Directory.CreateTempSubdirectory("odedsl-package-").FullName;

    public string Feed => Path.Combine(Folder, "feed");

    /// <summary>The kind of machine this is, as the SDK names it.</summary>
    public static string Platform => RuntimeInformation.RuntimeIdentifier;

    /// <summary>The name of a program's file.</summary>
    public static string Executable(string name) => OperatingSystem.IsWindows() ? name + ".exe" : name;

    /// <summary>Copies the project that uses the package.</summary>
    public string Consumer(string name)
    {
        string folder = Directory.CreateDirectory(Path.Combine(Folder, name)).FullName;
        foreach (string file in Directory.GetFiles(Path.Combine(AppContext.BaseDirectory, "Consumer")))
            File.Copy(file, Path.Combine(folder, Path.GetFileName(file)));
        return folder;
    }

    /// <summary>Runs the SDK in a folder of this place; fails if it fails or warns.</summary>
    public string Dotnet(string folder, params string[] arguments) => Dotnet(folder, new Dictionary<string, string>(), arguments);

    public string Dotnet(string folder, IReadOnlyDictionary<string, string> more, params string[] arguments)
    {
        string printed = Tool.Run(folder, _environment.Concat(more).ToDictionary(), "dotnet", arguments);
        Assert.DoesNotContain(": warning", printed, StringComparison.OrdinalIgnoreCase);
        return printed;
    }

    public static string Run(string folder, string program, params string[] arguments) =>
        Tool.Run(folder, new Dictionary<string, string>(), Path.Combine(folder, program), arguments);

    public void Dispose() => Directory.Delete(Folder, recursive: true);

    /// <summary>Packs what has been built together with these tests.</summary>
    private void Pack(string project)
    {
        string configuration = typeof(Workplace).Assembly.GetCustomAttribute<AssemblyConfigurationAttribute>()!.Configuration;
        Tool.Run(
            Root, new Dictionary<string, string> { ["DOTNET_CLI_UI_LANGUAGE"] = "en", ["MSBUILDDISABLENODEREUSE"] = "1" },
            "dotnet", "pack", project, "--no-build", "--configuration", configuration, "--output", Feed);
    }

    /// <summary>The machine's packages serve those of this place, unless one of ours is among them.</summary>
    private string FallbackFolder()
    {
        string line = Tool.Run(Folder, new Dictionary<string, string>(), "dotnet", "nuget", "locals", "global-packages", "--list");
        string machine = line[(line.IndexOf(':', StringComparison.Ordinal) + 1)..].Trim();
        return Directory.Exists(machine) && !Directory.Exists(Path.Combine(machine, "odedsl"))
            ? $"""<fallbackPackageFolders><add key="machine" value="{machine}" /></fallbackPackageFolders>"""
            : "";
    }

    private static string Root
    {
        get
        {
            string? folder = AppContext.BaseDirectory;
            while (folder is not null && !File.Exists(Path.Combine(folder, "OdeDsl.sln"))) folder = Path.GetDirectoryName(folder);
            return folder ?? throw new InvalidOperationException("The repository is not found above the tests.");
        }
    }
}
