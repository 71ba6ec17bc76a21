using OdeDsl.Assessment;
using OdeDsl.Workbench;
using OdeDsl.Workbench.Hosting;

namespace WorkbenchTests;

/// <summary>Runs programs as a shell would, with everything they print.</summary>
internal static class Hosts
{
    public static readonly AssessmentOptions Quick = new() { SampledStarts = 8, TimingRuns = 0 };

    public static async Task<(int Code, string Output, string Error)> Run(
        WorkbenchProgram program, string[] arguments, bool showsProgress = false, CancellationToken cancellation = default)
    {
        using StringWriter output = new(), error = new();
        int code = await program.With(Quick).RunAsync(arguments, new Surroundings(output, error, showsProgress, false, TimeProvider.System), cancellation);
        return (code, output.ToString(), error.ToString());
    }

    /// <summary>A folder that is gone at the end of the test.</summary>
    public sealed class Folder : IDisposable
    {
        public string Path { get; } = Directory.CreateTempSubdirectory("odedsl-").FullName;

        public string Read(string name) => File.ReadAllText(System.IO.Path.Combine(Path, name));

        public string[] Names => [.. Directory.EnumerateFileSystemEntries(Path).Select(static path => System.IO.Path.GetFileName(path)!).Order()];

        public void Dispose() => Directory.Delete(Path, recursive: true);
    }
}
